import { expect, test, type Page } from '../support/page'
import type { Series } from '#shared/contracts/series'
import { seriousViolations, sidewaysScroll } from '../support/axe'
import { signInAs } from '../support/demo'

/** Invented cloud points that bind and turn: mol/L and °C. */
const table = ['salt,conc (M),T (°C),n', 'blank,0,31.00,3', ...[[0.02, 31.25], [0.05, 31.54], [0.12, 31.93], [0.2, 32.07], [0.3, 32.09], [0.4, 31.86], [0.6, 31.47], [0.8, 30.81], [1, 30.17]].map(([x, y]) => `NaSCN,${x},${y},3`)].join('\n')

/** A series of its own, so that the demonstration stays as it is; gives its address. */
async function newSeries(page: Page): Promise<{ place: string, id: string }> {
  await signInAs(page, 'ines@norrvik.example')
  const post = (address: string, data: object) => page.request.post(`/api/v1${address}`, { data }).then(answer => answer.json())
  const project = await post('/projects', { name: 'One series' })
  const campaign = await post(`/projects/${project.id}/campaigns`, { name: 'spring' })
  const { id } = await post(`/campaigns/${campaign.id}/imports`, { text: table })
  const { series } = await post(`/imports/${id}/commit`, {})
  return { id: series[0].id, place: `/projects/${project.id}/series/${series[0].id}` }
}

const seriesOf = (page: Page, id: string): Promise<Series> => page.request.get(`/api/v1/series/${id}`).then(answer => answer.json())
const readingAt = ({ readings }: Series, x: number) => readings.find(reading => reading.x === x)!
const cell = (page: Page, number: number) => page.getByLabel(`cloud point of reading ${number}, °C`)
const constants = (page: Page) => page.getByRole('table', { name: /^Constants/ })

test.describe('editing a series', () => {
  test('moves the constants with each key, keeps a draft over a reload, and undoes', async ({ page }) => {
    const { place, id } = await newSeries(page)
    await page.goto(place)
    const before = await constants(page).innerText()
    const { number } = readingAt(await seriesOf(page, id), 0.4)
    await cell(page, number).fill('31.2')
    await expect(constants(page)).not.toHaveText(before)
    await expect(page.getByText('was 31.86')).toBeVisible()
    await expect(page.getByText('draft saved')).toBeVisible()
    await page.reload()
    await expect(page.getByText('is here again')).toBeVisible()
    await expect(cell(page, number)).toHaveValue('31.2')
    await cell(page, number).fill('31.25')
    await page.getByRole('button', { name: 'Undo' }).click()
    await expect(cell(page, number)).toHaveValue('31.2')
    await cell(page, number).press('Escape')
    await expect(cell(page, number)).toHaveValue('31.86')
    await expect(page.getByRole('button', { name: 'Keep as revision 2' })).toBeDisabled()
  })

  test('asks for what is missing before it keeps, and leads there', async ({ page }) => {
    const { place, id } = await newSeries(page)
    await page.goto(place)
    const { number } = readingAt(await seriesOf(page, id), 0.4)
    await cell(page, number).fill('31.8x')
    await expect(page.getByText('no number')).toBeVisible()
    await cell(page, number).fill('31.8')
    await page.getByRole('button', { name: 'Keep as revision 2' }).click()
    await expect(page.getByText('say why the value changes')).toBeVisible()
    await expect(page.getByRole('radio', { name: 'typing error' })).toBeFocused()
    expect((await seriesOf(page, id)).revision).toBe(1)
  })

  test('chooses a form, holds a constant, and changes a blank for its batch', async ({ page }) => {
    const { place, id } = await newSeries(page)
    await page.goto(place)
    await page.getByRole('radio', { name: 'line + saturable binding', exact: true }).check()
    await page.getByText('Weights, intervals, constants held').click()
    await page.getByLabel('K held at, M⁻¹').fill('4,5')
    await expect(constants(page).getByRole('row', { name: /K .*4\.5 held/ })).toBeVisible()
    await page.getByRole('button', { name: 'Keep as revision 2' }).click()
    await expect(page.getByText('Revision 2 is kept.').first()).toBeVisible()
    const kept = await seriesOf(page, id)
    expect(kept.choice).toEqual({ model: 'linear-langmuir', options: { parameters: { K: { fixed: 4.5 } } } })
    await cell(page, readingAt(kept, 0).number).fill('31.1')
    await page.getByRole('radio', { name: 're-measured' }).check()
    await page.getByRole('button', { name: 'Keep the blanks' }).click()
    await expect(page.getByText('every series of the batch is fitted again').first()).toBeVisible()
    const after = await seriesOf(page, id)
    expect(after.revision).toBe(2)
    expect(readingAt(after, 0).y).toBe(31.1)
  })

  test('adds a reading', async ({ page }) => {
    const { place, id } = await newSeries(page)
    await page.goto(place)
    await page.getByRole('button', { name: 'Add a reading' }).click()
    await page.keyboard.type('1,2')
    await page.getByLabel('cloud point of reading 11, °C').fill('29.5')
    await page.getByRole('button', { name: 'Keep as revision 2' }).click()
    await expect(page.getByText('Revision 2 is kept.').first()).toBeVisible()
    expect(readingAt(await seriesOf(page, id), 1.2)).toMatchObject({ y: 29.5, number: 11 })
  })
})

test('constants under other choices, and intervals drawn by the worker, stand beneath the diagnostics', async ({ page }) => {
  const { place } = await newSeries(page)
  await page.goto(place)
  await expect(page.getByRole('table', { name: 'Other choices' }).getByRole('row', { name: /robust, Tukey/ })).toBeVisible()
  await page.getByRole('button', { name: 'Draw' }).click()
  await expect(page.getByRole('table', { name: 'By resampling' }).getByRole('row')).toHaveCount(8)
  await expect(page.getByText(/^2,000 draws, residuals drawn anew, seed \d+/)).toBeVisible()
})

test.describe('a series that moved on', () => {
  test('offers both versions, joins what does not touch, and asks about the rest', async ({ page }) => {
    const { place, id } = await newSeries(page)
    await page.goto(place)
    const first = await seriesOf(page, id)
    const [own, both, theirs] = [0.2, 0.4, 0.6].map(x => readingAt(first, x))
    await cell(page, own!.number).fill('32.10')
    await page.locator(`[name="reason-${own!.id}"][value="typing-error"]`).check()
    await cell(page, both!.number).fill('31.90')
    await page.locator(`[name="reason-${both!.id}"][value="re-measured"]`).check()
    await expect(page.getByText('draft saved')).toBeVisible()
    const correct = (reading: typeof own, y: number) => ({ kind: 'correct', reading: reading!.id, to: { y }, reason: 're-measured' })
    await page.request.post(`/api/v1/series/${id}/revisions`, { data: { from: 1, changes: [correct(both, 31.8), correct(theirs, 31.5)] } })
    await page.getByRole('button', { name: 'Keep as revision 2' }).click()
    await expect(page.getByText('the series moved on while you worked')).toBeVisible()
    await expect(page.getByRole('button', { name: 'Save the joined version' })).toBeDisabled()
    expect(await seriousViolations(page)).toEqual([])
    await page.getByRole('group', { name: '0.40 M' }).getByRole('button', { name: '31.90' }).click()
    await page.getByRole('button', { name: 'Save the joined version' }).click()
    await expect(page.getByRole('heading', { name: /Thiocyanate, NaSCN/ })).toBeVisible()
    const joined = await seriesOf(page, id)
    expect(joined.revision).toBe(3)
    expect([0.2, 0.4, 0.6].map(x => readingAt(joined, x).y)).toEqual([32.1, 31.9, 31.5])
  })

  test('lets theirs stand', async ({ page }) => {
    const { place, id } = await newSeries(page)
    await page.goto(place)
    const target = readingAt(await seriesOf(page, id), 0.4)
    await cell(page, target.number).fill('31.90')
    await page.locator(`[name="reason-${target.id}"][value="re-measured"]`).check()
    await page.request.post(`/api/v1/series/${id}/revisions`, { data: { from: 1, changes: [{ kind: 'set-aside', reading: target.id, reason: 'dust' }] } })
    await page.getByRole('button', { name: 'Keep as revision 2' }).click()
    await page.getByRole('button', { name: 'Keep theirs' }).click()
    await expect(page.getByText('Dust. Set aside by Ines Tamsel')).toBeVisible()
    expect((await seriesOf(page, id)).revision).toBe(2)
  })
})

for (const theme of ['light', 'dark'] as const) {
  for (const width of [1440, 390]) {
    test(`a series being edited at ${width} px, ${theme}, is readable for all and does not scroll sideways`, async ({ page }) => {
      await page.setViewportSize({ width, height: 900 })
      await page.emulateMedia({ colorScheme: theme })
      const { place, id } = await newSeries(page)
      await page.goto(place)
      const { number } = readingAt(await seriesOf(page, id), 0.4)
      await cell(page, number).fill('31.2')
      await page.getByRole('button', { name: `Reading ${number}: more` }).click()
      await page.getByText('Weights, intervals, constants held').click()
      expect(await seriousViolations(page)).toEqual([])
      expect(await sidewaysScroll(page)).toBeLessThanOrEqual(0)
      await page.goto(`${place}/revisions/1`)
      expect(await seriousViolations(page)).toEqual([])
    })
  }
}
