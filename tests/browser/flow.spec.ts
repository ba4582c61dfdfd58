import { readFile } from 'node:fs/promises'
import { expect, test, type Locator, type Page } from '../support/page'
import type { Series } from '#shared/contracts/series'
import { uglyTable } from '../support/uglyTable'

/** How somebody works: with the pointer, or with the keyboard alone. */
interface Hand {
  press: (target: Locator) => Promise<void>
  type: (target: Locator, text: string) => Promise<void>
  tick: (target: Locator) => Promise<void>
}

const pointer = (): Hand => ({
  press: target => target.click(),
  type: (target, text) => target.fill(text),
  tick: target => target.check(),
})

/** Tab leads there, and nothing else does. */
function keyboard(page: Page): Hand {
  const furthest = 200
  const isFocused = (element: Element) => element === document.activeElement
  async function tabUntil(isThere: () => Promise<boolean>, what: Locator) {
    for (let presses = 0; presses < furthest; presses++) {
      if (await isThere()) return
      await page.keyboard.press('Tab')
    }
    throw new Error(`Tab does not lead to ${what}`)
  }
  async function tabTo(target: Locator) {
    await expect(target).toBeEnabled()
    await tabUntil(() => target.evaluate(isFocused), target)
  }
  return {
    async press(target) {
      await tabTo(target)
      await page.keyboard.press('Enter')
    },
    async type(target, text) {
      await tabTo(target)
      await page.keyboard.press('ControlOrMeta+a')
      await page.keyboard.insertText(text)
    },
    /** Tab enters a group of radio buttons at one of them; arrows lead on. */
    async tick(target) {
      await expect(target).toBeEnabled()
      await tabUntil(() => target.evaluate(radio => (document.activeElement as HTMLInputElement | null)?.name === (radio as HTMLInputElement).name), target)
      await page.keyboard.press('Space')
      for (let steps = 0; steps < 6 && !await target.isChecked(); steps++) await page.keyboard.press('ArrowDown')
      await expect(target).toBeChecked()
    },
  }
}

async function signIn(page: Page, { press, type }: Hand) {
  await page.goto('/')
  await type(page.getByLabel('Email'), 'ines@norrvik.example')
  await type(page.getByLabel('Password'), 'anionary-demo')
  await press(page.getByRole('button', { name: 'Sign in' }))
  await expect(page).toHaveURL(/\/projects$/)
}

async function startProject(page: Page, { press, type }: Hand, name: string) {
  await press(page.getByText('Start a project'))
  await type(page.getByLabel('Name'), name)
  await press(page.getByRole('button', { name: 'Make the project' }))
  await expect(page.getByRole('heading', { name: 'New campaign' })).toBeVisible()
  await type(page.getByLabel('Name'), 'spring')
  await press(page.getByRole('button', { name: 'Make the campaign' }))
}

async function importText(page: Page, { press, type }: Hand, text: string) {
  await type(page.getByLabel('Or a table from the clipboard'), text)
  await press(page.getByRole('button', { name: 'Read the pasted table' }))
}

async function decide(page: Page, { press, type, tick }: Hand) {
  await tick(page.getByRole('radio', { name: /standard uncertainty/ }))
  await press(page.getByRole('button', { name: 'Use NaSCN' }))
  await press(page.getByRole('row', { name: /318\.6/ }).getByRole('button', { name: 'Correct' }))
  await type(page.getByLabel('The cell as it should read'), '31.86')
  await page.keyboard.press('Enter')
  await press(page.getByRole('button', { name: 'One reading' }))
}

async function commit(page: Page, { press }: Hand) {
  await press(page.getByRole('button', { name: /^Import \d+ readings/ }))
  await expect(page.getByRole('heading', { name: 'Imported' })).toBeVisible()
  await press(page.getByRole('link', { name: 'NaSCN' }))
  await expect(page.getByRole('heading', { name: /Thiocyanate, NaSCN/ })).toBeVisible()
}

async function seriesShown(page: Page): Promise<Series> {
  const id = new URL(page.url()).pathname.split('/').at(-1)
  return (await page.request.get(`/api/v1/series/${id}`)).json()
}

/** What an export must bring back. */
const carried = ({ readings }: Series) => readings.map(({ x, y, sd, n, direction, limit, blank, note, setAside }) => ({ x, y, sd, n, direction, limit, blank, note, aside: setAside?.reason ?? null }))

async function change(page: Page, { press, type, tick }: Hand) {
  await expect(page.getByRole('table', { name: /^Constants/ })).toBeVisible()
  const shown = await seriesShown(page)
  const numberAt = (x: number) => shown.readings.find(reading => reading.x === x && reading.direction === 'heating')!.number
  await type(page.getByLabel(`cloud point of reading ${numberAt(0.12)}, °C`), '31,93')
  await tick(page.getByRole('radio', { name: 're-measured' }))
  await press(page.getByRole('button', { name: `Reading ${numberAt(0.5)}: more` }))
  await press(page.getByRole('button', { name: 'Set it aside' }))
  await type(page.getByLabel('Why is it set aside?'), 'air bubble at the window')
}

async function download(page: Page, { press }: Hand): Promise<string> {
  await press(page.getByText('Take it away'))
  const [file] = await Promise.all([page.waitForEvent('download'), press(page.getByRole('link', { name: 'readings as CSV' }))])
  return readFile(await file.path(), 'utf8')
}

for (const [name, handOf] of [['with the pointer', pointer], ['by keyboard alone', keyboard]] as const) {
  test(`a lab's own table becomes constants, is corrected, kept, compared and taken away, ${name}`, async ({ page }) => {
    test.setTimeout(180_000)
    const hand = handOf(page)
    await signIn(page, hand)
    await startProject(page, hand, `Gel on the bench, ${name}`)
    await importText(page, hand, uglyTable)
    await decide(page, hand)
    await commit(page, hand)
    const first = await seriesShown(page)
    await change(page, hand)
    await hand.press(page.getByRole('button', { name: 'Keep as revision 2' }))
    await expect(page.getByText('Revision 2 is kept.').first()).toBeVisible()
    const second = await seriesShown(page)
    expect(second.revision).toBe(2)
    expect(second.fit!.parameters).not.toEqual(first.fit!.parameters)

    const file = await download(page, hand)
    await hand.press(page.getByRole('link', { name: 'Compare' }))
    await expect(page.getByRole('heading', { name: 'NaSCN, revisions 1 and 2' })).toBeVisible()
    await expect(page.getByRole('row', { name: /0\.12 M 31\.91 31\.93 re-measured/ })).toBeVisible()
    await expect(page.getByRole('row', { name: /0\.50 M .*set aside: air bubble at the window/ })).toBeVisible()

    await page.goto('/projects')
    await startProject(page, hand, `The same again, ${name}`)
    await importText(page, hand, file)
    await commit(page, hand)
    expect(carried(await seriesShown(page))).toEqual(carried(second))
  })
}
