import { test as base, type Page } from '@playwright/test'

export { expect, type Locator, type Page } from '@playwright/test'

/** A page is there once it answers: presses before that are lost, as they are for a person who is that fast. */
const alive = (page: Page) => page.waitForFunction(() => (window as { useNuxtApp?: () => { isHydrating?: boolean } }).useNuxtApp?.().isHydrating === false)

/** Playwright's test with pages that are waited for until they are alive. */
export const test = base.extend({
  page: async ({ page }, use) => {
    const [goto, reload] = [page.goto.bind(page), page.reload.bind(page)]
    page.goto = async (...call) => {
      const answer = await goto(...call)
      await alive(page)
      return answer
    }
    page.reload = async (...call) => {
      const answer = await reload(...call)
      await alive(page)
      return answer
    }
    await use(page)
  },
})
