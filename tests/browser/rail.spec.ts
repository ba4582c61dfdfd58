import { expect, test, type Locator, type Page } from '../support/page'
import { demoSeriesPath, signInAs } from '../support/demo'

async function openRail(page: Page): Promise<Locator> {
  await signInAs(page, 'ines@norrvik.example')
  await page.goto(await demoSeriesPath(page))
  const rail = page.getByRole('toolbar', { name: /^Ion rail/ })
  // The chips answer once the page is alive: the first press that does something says so.
  await expect(async () => {
    await rail.getByRole('button').first().focus()
    await page.keyboard.press('ArrowDown')
    await expect(rail.getByRole('button').nth(1)).toBeFocused({ timeout: 300 })
  }).toPass()
  await page.keyboard.press('Home')
  return rail
}

test.describe('the ion rail', () => {
  test('ranks ten anions from thiocyanate down to carbonate', async ({ page }) => {
    const chips = (await openRail(page)).getByRole('button')
    await expect(chips).toHaveCount(10)
    await expect(chips.first()).toHaveAccessibleName(/^SCN−, thiocyanate, \+1\.\d\d K$/)
    await expect(chips.last()).toHaveAccessibleName(/^CO32−, carbonate, −11\.\d\d K$/)
  })

  test('moves by arrow keys, to the ends by Home and End', async ({ page }) => {
    const chips = (await openRail(page)).getByRole('button')
    await expect(chips.first()).toBeFocused()
    await page.keyboard.press('ArrowDown')
    await expect(chips.nth(1)).toBeFocused()
    await page.keyboard.press('End')
    await expect(chips.last()).toBeFocused()
    await page.keyboard.press('ArrowDown')
    await expect(chips.last()).toBeFocused()
  })

  test('draws by Space and brings to the front by Enter', async ({ page }) => {
    const chips = (await openRail(page)).getByRole('button')
    const drawings = page.locator('.multiples .line').nth(1).locator('a.panel svg.drawing')
    await expect(drawings).toHaveCount(6)
    await page.keyboard.press(' ')
    await expect(chips.first()).toHaveAttribute('aria-pressed', 'false')
    await expect(drawings).toHaveCount(0)
    await page.keyboard.press(' ')
    await expect(drawings).toHaveCount(6)
    await page.keyboard.press('Enter')
    await expect(page.locator('.multiples a.panel.front')).toHaveCount(6)
  })

  test('ties perchlorate and iodide, whose order is not settled', async ({ page }) => {
    const rail = await openRail(page)
    const names = await rail.getByRole('button').evaluateAll(chips => chips.map(chip => chip.getAttribute('aria-label') ?? ''))
    expect(names.slice(1, 3).map(name => name.split(', ')[1]).sort()).toEqual(['iodide', 'perchlorate'])
    await expect(rail.locator('.tie')).toHaveCount(2)
  })
})
