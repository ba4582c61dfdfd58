import { expect, test, type Page } from '../support/page'
import { seriousViolations, sidewaysScroll } from '../support/axe'
import { demoSeriesPath, signInAs } from '../support/demo'

async function openFront(page: Page, email = 'ines@norrvik.example') {
  await signInAs(page, email)
  await page.goto((await demoSeriesPath(page)).replace('/series', ''))
  await expect(page.getByRole('heading', { name: 'Shadehouse gel' })).toBeVisible()
}

test.describe('the front page of a project', () => {
  test('tells campaigns with their salts, what waits, and who takes part', async ({ page }) => {
    await openFront(page)
    const campaigns = page.locator('section', { has: page.getByRole('heading', { name: 'Campaigns' }) }).getByRole('table')
    await expect(campaigns.getByRole('row')).toHaveCount(7)
    await expect(campaigns.getByRole('row', { name: /Quaymere, autumn/ })).toContainText('no blanks: 2026-09-25')
    await expect(page.getByText('Measure blanks')).toBeVisible()
    await expect(page.getByRole('listitem').filter({ hasText: 'Ines Tamsel' })).toContainText('owner')
    await campaigns.getByRole('row', { name: /Norrvik, spring/ }).getByRole('link', { name: /^sodium thiocyanate/ }).click()
    await expect(page.getByRole('heading', { name: /Thiocyanate, NaSCN/ })).toBeVisible()
  })

  test('shows a collaborator the news and nothing to change', async ({ page }) => {
    await openFront(page, 'piet@elsewhere.example')
    await expect(page.getByRole('link', { name: 'Import readings' })).toHaveCount(0)
    await expect(page.getByRole('link', { name: 'New campaign' })).toHaveCount(0)
  })
})

for (const theme of ['light', 'dark'] as const) {
  for (const width of [1440, 1024, 390]) {
    test(`the front page at ${width} px, ${theme}, is readable for all and does not scroll sideways`, async ({ page }) => {
      await page.setViewportSize({ width, height: 900 })
      await page.emulateMedia({ colorScheme: theme })
      await openFront(page)
      expect(await seriousViolations(page)).toEqual([])
      expect(await sidewaysScroll(page)).toBeLessThanOrEqual(0)
    })
  }
}
