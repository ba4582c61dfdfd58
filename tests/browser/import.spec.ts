import { expect, test, type Page } from '../support/page'
import { seriousViolations, sidewaysScroll } from '../support/axe'
import { signInAs } from '../support/demo'
import { uglyTable } from '../support/uglyTable'

/** A project of the person's own with one campaign. */
async function newProject(page: Page): Promise<string> {
  await signInAs(page, 'ines@norrvik.example')
  const project = await page.request.post('/api/v1/projects', { data: { name: 'Tables from the bench' } }).then(answer => answer.json())
  await page.request.post(`/api/v1/projects/${project.id}/campaigns`, { data: { name: 'spring' } })
  return project.id
}

async function upload(page: Page, project: string) {
  await page.goto(`/projects/${project}/import`)
  await page.getByLabel('A file').setInputFiles({ name: 'bench.csv', mimeType: 'text/csv', buffer: Buffer.from(uglyTable) })
  await expect(page.getByText('2 need a decision from you')).toBeVisible()
}

test.describe('importing a table', () => {
  test('goes from an ugly file over decisions to constants', async ({ page }) => {
    await upload(page, await newProject(page))
    await expect(page.getByRole('button', { name: /^Import/ })).toBeDisabled()
    await page.getByRole('radio', { name: /standard uncertainty/ }).check()
    await page.getByRole('button', { name: 'Use NaSCN' }).click()
    await page.getByRole('row', { name: /318\.6/ }).getByRole('button', { name: 'Correct' }).click()
    await page.getByLabel('The cell as it should read').fill('31.86')
    await page.keyboard.press('Enter')
    await page.getByRole('button', { name: 'One reading' }).click()
    await page.getByRole('button', { name: 'Import 22 readings' }).click()
    await expect(page.getByRole('heading', { name: 'Imported' })).toBeVisible()
    await page.getByRole('link', { name: 'NaSCN' }).click()
    await expect(page.getByRole('heading', { name: /Thiocyanate, NaSCN/ })).toBeVisible()
    await expect(page.getByText('readings imported from bench.csv')).toBeVisible()
  })

  test('is left and resumed', async ({ page }) => {
    const project = await newProject(page)
    await upload(page, project)
    await page.getByRole('button', { name: 'Use NaSCN' }).click()
    await expect(page.getByText('1 needs a decision from you')).toBeVisible()
    await page.getByRole('link', { name: 'Keep for later' }).click()
    await page.getByRole('link', { name: 'bench.csv' }).click()
    await expect(page.getByText('1 needs a decision from you')).toBeVisible()
  })

  test('says why a paste is refused and keeps it', async ({ page }) => {
    await page.goto(`/projects/${await newProject(page)}/import`)
    const field = page.getByLabel('Or a table from the clipboard')
    await field.fill('only words\nand more of them')
    await page.getByRole('button', { name: 'Read the pasted table' }).click()
    await expect(page.getByRole('alert')).toContainText('Not taken.')
    await expect(field).toHaveValue('only words\nand more of them')
  })

  test('works on a phone, and for whoever cannot see it', async ({ page }) => {
    await upload(page, await newProject(page))
    expect(await seriousViolations(page)).toEqual([])
    await page.setViewportSize({ width: 390, height: 844 })
    await expect(page.getByRole('heading', { name: 'What needs a look' })).toBeVisible()
    expect(await sidewaysScroll(page)).toBe(0)
    expect(await seriousViolations(page)).toEqual([])
  })
})
