import { expect, test } from '../support/page'
import { seriousViolations } from '../support/axe'

for (const theme of ['light', 'dark'] as const) {
  for (const width of [1440, 1024, 390]) {
    test.describe(`the front page at ${width} px, ${theme}`, () => {
      test.use({ viewport: { width, height: 900 }, colorScheme: theme })

      test('has no serious accessibility violation', async ({ page }) => {
        await page.goto('/')
        await expect(page.locator('.plot svg').first()).toBeVisible()
        expect(await seriousViolations(page)).toEqual([])
      })

      test('does not scroll sideways', async ({ page }) => {
        await page.goto('/')
        await expect(page.locator('.plot svg').first()).toBeVisible()
        expect(await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)).toBeLessThanOrEqual(0)
      })
    })
  }
}

test.describe('on a phone', () => {
  test.use({ viewport: { width: 390, height: 844 } })

  test('controls are at least 44 px high', async ({ page }) => {
    await page.goto('/')
    const heights = await page.locator('main button:visible, main input:visible:not([type=checkbox]), main a.btn:visible').evaluateAll(elements =>
      elements.map(element => ({ text: element.textContent || element.getAttribute('aria-label'), height: element.getBoundingClientRect().height })))
    expect(heights.filter(({ height }) => height < 44)).toEqual([])
  })
})

test('keeps the chosen theme over a reload, from the first byte', async ({ page }) => {
  await page.goto('/')
  await page.getByRole('button', { name: 'Switch between light and dark' }).click()
  await expect(page.locator('html')).toHaveAttribute('data-theme', 'dark')
  const answer = await page.reload()
  expect(await answer?.text()).toContain('data-theme="dark"')
})

test('asks nothing of any other machine', async ({ page, baseURL }) => {
  const strangers: string[] = []
  page.on('request', (request) => {
    if (!request.url().startsWith(baseURL ?? '') && !/^(data|blob):/.test(request.url())) strangers.push(request.url())
  })
  await page.goto('/')
  await expect(page.locator('.plot svg').first()).toBeVisible()
  expect(strangers).toEqual([])
})
