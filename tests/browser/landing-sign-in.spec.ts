import { expect, test } from '../support/page'

test.describe('signing in', () => {
  test('leads to the projects', async ({ page }) => {
    await page.goto('/')
    await page.getByLabel('Email').fill('ines@norrvik.example')
    await page.getByLabel('Password').fill('anionary-demo')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await expect(page).toHaveURL(/\/projects$/)
    await page.goto('/')
    await expect(page.getByRole('heading', { name: 'Your projects' })).toBeVisible()
    await expect(page.getByRole('link', { name: 'Shadehouse gel' }).first()).toBeVisible()
  })

  test('leads back to where a visitor was sent from', async ({ page }) => {
    await page.goto('/?to=/docs/api')
    await page.getByLabel('Email').fill('piet@elsewhere.example')
    await page.getByLabel('Password').fill('anionary-demo')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await expect(page).toHaveURL(/\/docs\/api$/)
  })

  test('says beside the field what is wrong with an address', async ({ page }) => {
    await page.goto('/')
    await page.getByLabel('Email').fill('nobody')
    await page.getByLabel('Password').fill('x')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await expect(page.getByRole('alert').filter({ hasText: 'must be an e-mail address' })).toBeVisible()
  })

  test('keeps the address after a wrong password and says what to do', async ({ page }) => {
    await page.goto('/')
    await page.getByLabel('Email').fill('nobody@nowhere.example')
    await page.getByLabel('Password').fill('wrong')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await expect(page.locator('#signin').getByRole('alert')).toBeVisible()
    await expect(page.getByLabel('Email')).toHaveValue('nobody@nowhere.example')
  })

  test('counts down the wait after too many misses', async ({ page }) => {
    await page.route('**/api/auth/sign-in', route => route.fulfill({
      status: 429, headers: { 'retry-after': '12' }, contentType: 'application/problem+json',
      body: JSON.stringify({ type: 'about:blank', title: 'x', status: 429, detail: 'Too many misses: wait 12 s.', errors: [] }),
    }))
    await page.goto('/')
    await page.getByLabel('Email').fill('ines@norrvik.example')
    await page.getByLabel('Password').fill('wrong')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await expect(page.getByRole('button', { name: /^Wait \d+ s$/ })).toBeDisabled()
    await expect(page.getByText('Too many misses')).toBeVisible()
  })
})
