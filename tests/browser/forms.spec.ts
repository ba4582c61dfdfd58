import { expect, test, type Page } from '../support/page'
import { seriousViolations, sidewaysScroll } from '../support/axe'
import { demoSeriesPath, signInAs } from '../support/demo'

/** A project of the person's own with one campaign. */
async function newProject(page: Page): Promise<{ project: string, campaign: string }> {
  await signInAs(page, 'ines@norrvik.example')
  const project = await page.request.post('/api/v1/projects', { data: { name: 'Bottles and cells' } }).then(answer => answer.json())
  const campaign = await page.request.post(`/api/v1/projects/${project.id}/campaigns`, { data: { name: 'spring' } }).then(answer => answer.json())
  return { project: project.id, campaign: campaign.id }
}

test.describe('a stock', () => {
  test('is made by keyboard, with what to weigh and the cautions beside it', async ({ page }) => {
    const { project } = await newProject(page)
    await page.goto(`/projects/${project}/materials`)
    await page.getByRole('button', { name: 'New stock' }).focus()
    await page.keyboard.press('Enter')
    await page.getByLabel('Salt, with its water').focus()
    await page.keyboard.type('sodium sulphate decahydrate')
    await expect(page.getByText('322.19 g mol')).toBeVisible()
    await expect(page.getByText('55.9 % weaker than its label')).toBeVisible()
    await page.getByLabel('wanted concentration, mol/L').focus()
    await page.keyboard.type('0,5')
    await page.keyboard.press('Tab')
    await page.keyboard.type('250')
    await expect(page.getByText('40.273 g, made up to 250 mL')).toBeVisible()
    await expect(page.getByLabel('Cautions for Na2SO4')).toContainText('safety data sheet')
    await page.getByRole('button', { name: 'Add the stock' }).focus()
    await page.keyboard.press('Enter')
    await expect(page.getByRole('listitem').filter({ hasText: 'sodium sulfate' })).toBeVisible()
  })

  test('says at its field what is wrong, and keeps what is typed over a reload', async ({ page }) => {
    const { project } = await newProject(page)
    await page.goto(`/projects/${project}/materials`)
    await page.getByRole('button', { name: 'New stock' }).click()
    await page.getByLabel('Salt, with its water').fill('NaSNC')
    await page.getByLabel('Purity as a mass fraction').fill('99.5')
    await page.getByLabel('Lot').click()
    await expect(page.getByRole('alert').filter({ hasText: 'must be at most 1' })).toBeVisible()
    await expect(page.getByText('NaSCN was meant?')).toBeVisible()
    await page.reload()
    await page.getByRole('button', { name: 'New stock' }).click()
    await expect(page.getByText('What you typed before is here again.')).toBeVisible()
    await expect(page.getByLabel('Salt, with its water')).toHaveValue('NaSNC')
    await page.getByLabel('Purity as a mass fraction').fill('0.995')
    await page.getByRole('button', { name: 'Add the stock' }).click()
    await expect(page.getByLabel('Salt, with its water')).toHaveAttribute('aria-invalid', 'true')
    await expect(page.getByLabel('Salt, with its water')).toBeFocused()
  })
})

test.describe('a campaign', () => {
  test('takes its conditions, a batch, and says what a report still misses', async ({ page }) => {
    const { project, campaign } = await newProject(page)
    await page.goto(`/projects/${project}/campaigns/${campaign}`)
    const missing = page.locator('section', { has: page.getByRole('heading', { name: 'What a report still misses' }) })
    await expect(missing.getByText('heating rate')).toBeVisible()
    await page.getByLabel('Rate / K min').fill('0,5')
    await page.getByRole('button', { name: 'Keep the conditions' }).click()
    await expect(page.getByText('The conditions are kept.')).toBeVisible()
    await expect(missing.getByText('heating rate')).toHaveCount(0)
    await page.getByRole('button', { name: 'New batch' }).click()
    await page.getByLabel('Name').last().fill('4 March')
    await page.getByRole('button', { name: 'Add the batch' }).click()
    await expect(page.getByRole('listitem').filter({ hasText: '4 March' })).toContainText('no blanks')
  })

  test('is made like another one', async ({ page }) => {
    const { project, campaign } = await newProject(page)
    await page.request.put(`/api/v1/campaigns/${campaign}`, { data: { name: 'spring', rate: 0.7 } })
    await page.goto(`/projects/${project}/campaigns/${campaign}`)
    await page.getByRole('link', { name: 'Another like this' }).click()
    await expect(page.getByRole('heading', { name: 'New campaign' })).toBeVisible()
    await page.getByLabel('Name').fill('autumn')
    await page.getByRole('button', { name: 'Make the campaign' }).click()
    await expect(page.getByRole('heading', { name: 'Norrvik, autumn' })).toBeVisible()
    await expect(page.getByLabel('Rate / K min')).toHaveValue('0.7')
  })

  test('shows a reader the conditions and why they cannot be changed', async ({ page }) => {
    await signInAs(page, 'piet@elsewhere.example')
    const { campaigns } = await page.request.get(`/api/v1${(await demoSeriesPath(page)).replace('/series', '')}`).then(answer => answer.json())
    await page.goto(`${(await demoSeriesPath(page)).replace('/series', '')}/campaigns/${campaigns[0].id}`)
    await expect(page.getByText('You read here')).toBeVisible()
    await expect(page.getByRole('button', { name: 'Keep the conditions' })).toHaveCount(0)
  })
})

for (const theme of ['light', 'dark'] as const) {
  for (const width of [1440, 390]) {
    test(`forms at ${width} px, ${theme}, are readable for all and do not scroll sideways`, async ({ page }) => {
      await page.setViewportSize({ width, height: 900 })
      await page.emulateMedia({ colorScheme: theme })
      const { project, campaign } = await newProject(page)
      for (const place of ['materials', `campaigns/${campaign}`, 'campaigns', 'settings']) {
        await page.goto(`/projects/${project}/${place}`)
        await expect(page.getByRole('heading').first()).toBeVisible()
        if (place === 'materials') await page.getByRole('button', { name: 'New stock' }).click()
        expect(await seriousViolations(page)).toEqual([])
        expect(await sidewaysScroll(page)).toBeLessThanOrEqual(0)
      }
    })
  }
}
