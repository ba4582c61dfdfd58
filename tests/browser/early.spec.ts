import { expect, test, type Page } from '@playwright/test'
import { uglyTable } from '../support/uglyTable'
import { signInAs } from '../support/demo'

/** Shows a page whose scripts come late; `arrive` lets them. */
async function openEarly(page: Page, address: string): Promise<() => void> {
  let arrive = () => {}
  const late = new Promise<void>(resolve => arrive = resolve)
  await page.route('**/_nuxt/*.js', async (route) => {
    await late
    await route.continue()
  })
  await page.goto(address, { waitUntil: 'commit' })
  return arrive
}

test.describe('what is done before a page is alive', () => {
  test('an address typed to sign in stays', async ({ page }) => {
    const arrive = await openEarly(page, '/')
    await page.getByLabel('Email').fill('ines@norrvik.example')
    await page.getByLabel('Password').fill('anionary-demo')
    await expect(page.getByRole('button', { name: 'Sign in' })).toBeDisabled()
    arrive()
    await page.getByRole('button', { name: 'Sign in' }).click()
    await expect(page).toHaveURL(/\/projects$/)
  })

  test('a file that was chosen is read', async ({ page }) => {
    await signInAs(page, 'ines@norrvik.example')
    const project = await page.request.post('/api/v1/projects', { data: { name: 'Early' } }).then(answer => answer.json())
    await page.request.post(`/api/v1/projects/${project.id}/campaigns`, { data: { name: 'spring' } })
    const arrive = await openEarly(page, `/projects/${project.id}/import`)
    await page.getByLabel('A file').setInputFiles({ name: 'bench.csv', mimeType: 'text/csv', buffer: Buffer.from(uglyTable) })
    arrive()
    await expect(page.getByText('2 need a decision from you')).toBeVisible()
  })
})
