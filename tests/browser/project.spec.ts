import { expect, test, type Locator } from '../support/page'
import { seriousViolations, sidewaysScroll } from '../support/axe'
import { demoSeriesPath, signInAs } from '../support/demo'

/** A control answers once the page is alive: acts again until it does. */
async function until(act: () => Promise<unknown>, target: Locator, count: number) {
  await expect(async () => {
    await act()
    await expect(target).toHaveCount(count, { timeout: 500 })
  }).toPass()
}

test.describe('the way to the series', () => {
  test('leads from the front page over the projects to one series', async ({ page }) => {
    await page.goto('/')
    await page.getByLabel('Email').fill('ines@norrvik.example')
    await page.getByLabel('Password').fill('anionary-demo')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.getByRole('main').getByRole('link', { name: 'Shadehouse gel' }).click()
    await expect(page.getByRole('heading', { name: 'Series', exact: true })).toBeVisible()
    await expect(page.getByText('812 readings, 9 set aside')).toBeVisible()
    await page.getByRole('link', { name: 'thiocyanate, Norrvik, spring' }).first().click()
    await expect(page.getByRole('heading', { name: 'Thiocyanate, NaSCN' })).toBeVisible()
  })

  test('sends a visitor to the front page and back after signing in', async ({ page }) => {
    await page.goto('/projects')
    await expect(page).toHaveURL(/\/\?to=(\/|%2F)projects$/)
    await page.getByLabel('Email').fill('piet@elsewhere.example')
    await page.getByLabel('Password').fill('anionary-demo')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await expect(page).toHaveURL(/\/projects$/)
  })

  test('says that a project which is not yours is not there', async ({ page, browser }) => {
    await signInAs(page, 'ines@norrvik.example')
    const path = await demoSeriesPath(page)
    const stranger = await browser.newPage({ baseURL: process.env.ANIONARY_TEST_URL })
    await signInAs(stranger, 'sana@shelf.example')
    const answer = await stranger.goto(path)
    expect(answer?.status()).toBe(404)
    await expect(stranger.getByRole('heading', { name: 'There is nothing at this address' })).toBeVisible()
    await stranger.close()
  })

  test('ends with signing out', async ({ page }) => {
    await signInAs(page, 'ines@norrvik.example')
    await page.goto('/projects')
    await page.getByRole('button', { name: 'IT, signed in as Ines Tamsel' }).click()
    await page.getByRole('button', { name: 'Sign out' }).click()
    await expect(page.getByRole('heading', { name: 'Sign in' })).toBeVisible()
    await page.goto('/projects')
    await expect(page).toHaveURL(/\/\?to=/)
  })
})

test.describe('the series of the demonstration', () => {
  test.beforeEach(async ({ page }) => {
    await signInAs(page, 'ines@norrvik.example')
    await page.goto(await demoSeriesPath(page))
  })

  test('stand as sixty panels with what needs a look marked', async ({ page }) => {
    await expect(page.locator('.multiples a.panel')).toHaveCount(60)
    await expect(page.locator('.multiples a.panel.look')).toHaveCount(3)
    await expect(page.getByRole('heading', { name: 'Quaymere’s iodide stands apart' })).toBeVisible()
    await expect(page.getByRole('heading', { name: 'Ostrel starts 0.4 K higher' })).toBeVisible()
    await expect(page.getByRole('heading', { name: 'Two places are empty' })).toBeVisible()
  })

  test('can be narrowed, and the address brings the view back', async ({ page }) => {
    const panels = page.locator('.multiples a.panel')
    await page.getByRole('link', { name: '3 to look at' }).click()
    await expect(panels).toHaveCount(3)
    await page.reload()
    await expect(panels).toHaveCount(3)
    await page.getByRole('link', { name: 'by lab' }).click()
    await expect(page.locator('.multiples .rowhead b')).toHaveCount(2)
    await expect(page).toHaveURL(/show=to-look-at/)
    await expect(page).toHaveURL(/rows=lab/)
  })

  test('are found again as they were left after a look at one', async ({ page }) => {
    const labs = page.getByRole('combobox', { name: 'Labs' })
    await until(async () => {
      await labs.selectOption('')
      await labs.selectOption('Quaymere')
    }, page.locator('.multiples a.panel'), 20)
    await page.getByRole('link', { name: 'iodide, Quaymere, spring' }).first().click()
    await expect(page.getByRole('heading', { name: 'Iodide, NaI' })).toBeVisible()
    await page.getByRole('link', { name: 'All series' }).click()
    await expect(page.locator('.multiples a.panel')).toHaveCount(20)
  })
})

for (const theme of ['light', 'dark'] as const) {
  for (const width of [1440, 1024, 390]) {
    test.describe(`the series page at ${width} px, ${theme}`, () => {
      test.use({ viewport: { width, height: 900 }, colorScheme: theme })

      test('has no serious accessibility violation and does not scroll sideways', async ({ page }) => {
        await signInAs(page, 'ines@norrvik.example')
        await page.goto(await demoSeriesPath(page))
        await expect(page.getByText('812 readings, 9 set aside')).toBeVisible()
        expect(await seriousViolations(page)).toEqual([])
        expect(await sidewaysScroll(page)).toBeLessThanOrEqual(0)
      })
    })
  }
}

test.describe('on a phone', () => {
  test.use({ viewport: { width: 390, height: 844 } })

  test('the drawer holds the places, and Escape closes it', async ({ page }) => {
    await signInAs(page, 'ines@norrvik.example')
    await page.goto(await demoSeriesPath(page))
    const menu = page.getByRole('button', { name: 'Menu' })
    const drawer = page.getByRole('dialog', { name: 'Menu' })
    await expect(async () => {
      await menu.click()
      await expect(drawer).toBeVisible({ timeout: 500 })
    }).toPass()
    await expect(drawer.getByRole('link', { name: 'Series' })).toHaveAttribute('aria-current', 'page')
    await page.keyboard.press('Escape')
    await expect(drawer).toBeHidden()
    await expect(page.getByRole('link', { name: 'thiocyanate, Norrvik, spring' }).last()).toBeVisible()
  })
})
