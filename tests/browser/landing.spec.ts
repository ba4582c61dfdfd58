import { expect, test, type Locator, type Page } from '../support/page'

const readings = [['0', '31.00'], ['0.05', '31.56'], ['0.12', '31.91'], ['0.2', '32.09'], ['0.3', '32.07'], ['0.4', '31.86'], ['0.6', '31.47'], ['1', '30.17']]

function cell(page: Page, what: 'concentration' | 'cloud point' | 'standard uncertainty', row: number): Locator {
  return page.getByRole('textbox', { name: `${what}, row ${row}`, exact: true })
}

function constant(page: Page, symbol: string): Locator {
  return page.getByRole('table', { name: /^Constants/ }).getByRole('row').filter({ has: page.getByRole('rowheader', { name: symbol, exact: true }) })
}

async function paste(page: Page, target: Locator, text: string) {
  await target.focus()
  await target.evaluate((element, pasted) => {
    const data = new DataTransfer()
    data.setData('text/plain', pasted)
    element.dispatchEvent(new ClipboardEvent('paste', { clipboardData: data, bubbles: true, cancelable: true }))
  }, text)
}

async function openReady(page: Page) {
  await page.goto('/')
  await expect(page.locator('.plot svg').first()).toBeVisible()
}

test.describe('the front page', () => {
  test('shows constants and notes before any script has run', async ({ browser }) => {
    const context = await browser.newContext({ javaScriptEnabled: false })
    const page = await context.newPage()
    await page.goto(`${process.env.ANIONARY_TEST_URL}/`)
    await expect(constant(page, 'K')).toContainText('5.02(44)')
    await expect(page.getByRole('heading', { name: 'The binding term is needed' })).toBeVisible()
    await context.close()
  })

  test('fits what is typed', async ({ page }) => {
    await openReady(page)
    await page.getByRole('button', { name: 'Clear' }).click()
    for (const [index, [x = '', y = '']] of readings.entries()) {
      await cell(page, 'concentration', index + 1).fill(x)
      await cell(page, 'cloud point', index + 1).fill(y)
    }
    await expect(page.getByText('8 readings, 4 to spare')).toBeVisible()
    await expect(constant(page, 'T0')).toContainText('31.0')
  })

  for (const [name, separator, mark] of [['tabs', '\t', '.'], ['semicolons and decimal commas', ';', ','], ['commas', ',', '.']] as const) {
    test(`fits a table pasted with ${name}, its head left out`, async ({ page }) => {
      await openReady(page)
      await page.getByRole('button', { name: 'Clear' }).click()
      const lines = readings.map(row => row.map(text => text.replace('.', mark)).join(separator))
      await paste(page, cell(page, 'concentration', 1), [`[NaSCN]${separator}T`, `mol/L${separator}C`, ...lines].join('\n'))
      await expect(page.getByText('2 lines of headings left out.')).toBeVisible()
      await expect(page.getByText('8 readings, 4 to spare')).toBeVisible()
    })
  }

  test('marks a bad cell, names its row and takes over the value that was meant', async ({ page }) => {
    await openReady(page)
    await cell(page, 'cloud point', 10).fill('30,8l')
    const sentence = page.getByRole('alert').filter({ hasText: 'Row 10: “30,8l” is not a number.' })
    await expect(sentence).toContainText('Until then the fit uses 10 of 11 rows.')
    await expect(cell(page, 'cloud point', 10)).toHaveAttribute('aria-invalid', 'true')
    await expect(page.getByText('10 readings, 6 to spare')).toBeVisible()
    await sentence.getByRole('button', { name: '30.81' }).click()
    await expect(page.getByText('11 readings, 7 to spare')).toBeVisible()
    await expect(cell(page, 'cloud point', 10)).toHaveValue('30.81')
  })

  test('tells in the cell what only the server finds wrong', async ({ page }) => {
    await openReady(page)
    await page.route('**/api/v1/fit', route => route.fulfill({
      status: 400, contentType: 'application/problem+json',
      body: JSON.stringify({ type: 'about:blank', title: 'x', status: 400, detail: 'x', errors: [{ path: 'points.2.y', message: 'must be reachable' }] }),
    }))
    await cell(page, 'cloud point', 3).fill('31.57')
    await expect(page.getByRole('alert').filter({ hasText: 'Row 3: must be reachable' })).toBeVisible()
    await expect(cell(page, 'cloud point', 3)).toHaveAttribute('aria-invalid', 'true')
    await expect(constant(page, 'K')).toContainText('5.02(44)')
  })

  test('keeps the last fit and the table without a connection, and goes on by itself', async ({ page, context }) => {
    await openReady(page)
    await context.setOffline(true)
    await cell(page, 'cloud point', 11).fill('30.20')
    await expect(page.getByText('No connection.')).toBeVisible()
    await expect(constant(page, 'K')).toContainText('5.02(44)')
    await context.setOffline(false)
    await expect(page.getByText('No connection.')).toBeHidden()
    await expect(constant(page, 'K')).not.toContainText('5.02(44)')
    await expect(cell(page, 'cloud point', 11)).toHaveValue('30.20')
  })

  test('says so when it is asked too often', async ({ page }) => {
    await openReady(page)
    await page.route('**/api/v1/fit', route => route.fulfill({
      status: 429, headers: { 'retry-after': '60' }, contentType: 'application/problem+json',
      body: JSON.stringify({ type: 'about:blank', title: 'x', status: 429, detail: 'x', errors: [] }),
    }))
    await cell(page, 'cloud point', 11).fill('30.20')
    await expect(page.getByText('Many fits in a short time.')).toBeVisible()
    await expect(constant(page, 'K')).toContainText('5.02(44)')
  })

  test('shows the straight line when nothing speaks for binding, and says why', async ({ page }) => {
    await openReady(page)
    await page.getByRole('button', { name: 'sulfate' }).click()
    await expect(constant(page, 'c')).toContainText('−30.1')
    await expect(constant(page, 'K')).toHaveCount(0)
    await expect(page.getByRole('complementary', { name: 'Margin notes' }).getByRole('heading').first()).toContainText(/binding/i)
  })

  test('gives no constants a table is too short for', async ({ page }) => {
    await openReady(page)
    await page.getByRole('button', { name: 'too few' }).click()
    await expect(page.getByText('No constants yet')).toBeVisible()
    await expect(page.getByRole('heading', { name: '4 constants from 4 readings' })).toBeVisible()
  })

  test('loses nothing on a reload and undoes a clearing', async ({ page }) => {
    await openReady(page)
    await cell(page, 'cloud point', 11).fill('30.2')
    await page.reload()
    await expect(cell(page, 'cloud point', 11)).toHaveValue('30.2')
    await page.getByRole('button', { name: 'Clear' }).click()
    await expect(cell(page, 'cloud point', 1)).toHaveValue('')
    await page.getByRole('button', { name: 'Undo' }).click()
    await expect(cell(page, 'cloud point', 11)).toHaveValue('30.2')
  })

  test('takes a third column as standard uncertainty', async ({ page }) => {
    await openReady(page)
    await page.getByRole('button', { name: 'Clear' }).click()
    await paste(page, cell(page, 'concentration', 1), readings.map(row => [...row, '0.05'].join('\t')).join('\n'))
    await expect(cell(page, 'standard uncertainty', 8)).toHaveValue('0.05')
    await expect(page.getByText('8 readings, 4 to spare')).toBeVisible()
  })

  test('offers to divide a table in mmol/L', async ({ page }) => {
    await openReady(page)
    await page.getByRole('button', { name: 'Clear' }).click()
    await paste(page, cell(page, 'concentration', 1), 'c / mM\tT\n50\t31.56\n120\t31.91')
    await page.getByRole('button', { name: 'Divide by 1000' }).click()
    await expect(cell(page, 'concentration', 2)).toHaveValue('0.12')
  })

  test('is worked by keyboard alone', async ({ page }) => {
    await openReady(page)
    await cell(page, 'concentration', 1).focus()
    await page.keyboard.press('Enter')
    await expect(cell(page, 'concentration', 2)).toBeFocused()
    await page.keyboard.press('Tab')
    await expect(cell(page, 'cloud point', 2)).toBeFocused()
    await page.keyboard.press('ArrowUp')
    await expect(cell(page, 'cloud point', 1)).toBeFocused()
    await page.locator('.plot').focus()
    await page.keyboard.press('ArrowRight')
    await page.keyboard.press('ArrowRight')
    await expect(page.locator('.reading')).toContainText('Reading 2')
    await expect(page.locator('.reading')).toContainText('31.27')
    await page.keyboard.press('Escape')
    await expect(page.locator('.reading')).toContainText('Point at a reading')
  })

  test('gives the figure as data, SVG and PNG', async ({ page }) => {
    await openReady(page)
    await page.getByRole('button', { name: 'Data as a table' }).click()
    await expect(page.getByRole('table', { name: 'Readings of the figure' }).getByRole('row')).toHaveCount(12)
    for (const kind of ['CSV', 'SVG', 'PNG']) {
      const [file] = await Promise.all([page.waitForEvent('download'), page.getByRole('button', { name: kind, exact: true }).click()])
      expect(file.suggestedFilename()).toBe(`cloud-points.${kind.toLowerCase()}`)
    }
  })

  test('draws the same figure after another table was shown in between', async ({ page }) => {
    await openReady(page)
    const marks = () => page.locator('.plot .chart path').evaluateAll(paths => paths.map(path => path.getAttribute('d')))
    const first = await marks()
    await page.getByRole('button', { name: 'too few' }).click()
    await expect(page.getByText('No constants yet')).toBeVisible()
    expect((await marks()).length).toBeLessThan(first.length)
    await page.getByRole('button', { name: 'thiocyanate' }).click()
    await expect(constant(page, 'K')).toContainText('5.02(44)')
    expect(await marks()).toEqual(first)
  })

  test('copies the constants with the engine version', async ({ page, context }) => {
    await context.grantPermissions(['clipboard-read', 'clipboard-write'])
    await openReady(page)
    await page.getByRole('button', { name: 'Copy constants' }).click()
    await expect(page.getByText('Copied')).toBeVisible()
    const text = await page.evaluate(() => navigator.clipboard.readText())
    expect(text).toMatch(/^K\t5\.0188\d+\t0\.435/m)
    expect(text).toMatch(/^engine\tanionary \d/m)
  })
})
