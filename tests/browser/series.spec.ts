import { expect, test, type Page } from '../support/page'
import { seriousViolations, sidewaysScroll } from '../support/axe'
import { demoSeries, demoSeriesPath, signInAs } from '../support/demo'

async function openSeries(page: Page, lab: string, campaign: string, anion: string) {
  await signInAs(page, 'ines@norrvik.example')
  const { id } = await demoSeries(page, lab, campaign, anion)
  await page.goto(`${await demoSeriesPath(page)}/${id}`)
}

/** Constants of the truth behind the demonstration (data-seeds/demo/truth.json), with their units. */
const truth = { T0: 31.0, c: -4.02, Bmax: 3.83, K: 4.69 }
/** Estimates lie within this many of their own standard errors of the truth. */
const withinErrors = 4

test.describe('one series of the demonstration', () => {
  test('gives constants near the stated truth', async ({ page }) => {
    await signInAs(page, 'ines@norrvik.example')
    const { fit } = await demoSeries(page, 'Norrvik', 'spring', 'SCN^-')
    for (const [name, value] of Object.entries(truth)) {
      const { estimate, standardError } = fit!.parameters.find(parameter => parameter.name === name)!
      expect(Math.abs(estimate! - value)).toBeLessThan(withinErrors * standardError!)
    }
  })

  test('shows readings, the forms compared, constants and the history', async ({ page }) => {
    await openSeries(page, 'Norrvik', 'spring', 'SCN^-')
    const readings = page.getByRole('table', { name: /^Readings 19, one set aside/ })
    await expect(readings.getByText('Air bubble at the window')).toBeVisible()
    await expect(page.getByRole('table', { name: 'Model' }).getByRole('row', { name: /^line \+ saturable binding/ })).toHaveClass(/sel/)
    await expect(page.getByRole('table', { name: /^Constants/ }).getByRole('row')).toHaveCount(7)
    await expect(page.getByRole('heading', { name: 'One reading is set aside' })).toBeVisible()
    await expect(page.getByText('corrected from 32.70')).toBeVisible()
    await expect(page.locator('.plot svg').first()).toBeVisible()
  })

  test('says why there is no fit where readings are too few', async ({ page }) => {
    await openSeries(page, 'Ostrel', 'autumn', 'ClO4^-')
    await expect(page.getByRole('heading', { name: 'Too few readings for a fit' })).toBeVisible()
    await expect(page.getByRole('table', { name: /^Constants/ })).toHaveCount(0)
  })

  test('says so where nobody has measured', async ({ page }) => {
    await openSeries(page, 'Quaymere', 'autumn', 'H2PO4^-')
    await expect(page.getByRole('heading', { name: 'No readings' })).toBeVisible()
  })
})

for (const theme of ['light', 'dark'] as const) {
  for (const width of [1440, 1024, 390]) {
    test.describe(`one series at ${width} px, ${theme}`, () => {
      test.use({ viewport: { width, height: 900 }, colorScheme: theme })

      test('has no serious accessibility violation and does not scroll sideways', async ({ page }) => {
        await openSeries(page, 'Norrvik', 'spring', 'SCN^-')
        await expect(page.locator('.plot svg').first()).toBeVisible()
        expect(await seriousViolations(page)).toEqual([])
        expect(await sidewaysScroll(page)).toBeLessThanOrEqual(0)
      })
    })
  }
}
