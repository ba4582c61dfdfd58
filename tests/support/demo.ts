import { expect, type Page } from '@playwright/test'
import type { SeriesSummary } from '#shared/contracts/series'

/** Signs a demo person in; the page's requests carry the session from then on. */
export async function signInAs(page: Page, email: string) {
  const answer = await page.request.post('/api/auth/sign-in', { data: { email, password: 'anionary-demo' } })
  expect(answer.ok()).toBe(true)
}

/** Address of the demonstration's series page, for whoever is signed in. */
export async function demoSeriesPath(page: Page): Promise<string> {
  const { items } = await (await page.request.get('/api/v1/projects')).json()
  const project = items.find(({ name }: { name: string }) => name === 'Shadehouse gel')
  return `/projects/${project.id}/series`
}

/** One series of the demonstration as the API gives it. */
export async function demoSeries(page: Page, lab: string, campaign: string, anion: string): Promise<SeriesSummary> {
  const { items } = await (await page.request.get(`/api/v1${await demoSeriesPath(page)}?limit=200`)).json() as { items: SeriesSummary[] }
  return items.find(one => one.campaign.lab.name === lab && one.campaign.name === campaign && one.salt.anion === anion)!
}
