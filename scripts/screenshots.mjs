import { mkdirSync } from 'node:fs'
import { join } from 'node:path'
import { openBrowser, signIn, themes, widths } from './lib/browser.mjs'
import { chromium } from './lib/chromium.mjs'
import { buildApp, checkNode, installPackages } from './lib/packages.mjs'
import { dataFolder, refuseForeign, root } from './lib/places.mjs'
import { withSession } from './lib/session.mjs'
import { StopSentence, runMain } from './lib/stop-sentence.mjs'
import { startThrowAway } from './lib/throw-away.mjs'

// npm run screenshots: the main pages into docs/screens; ANIONARY_TEST_URL names a running Anionary to take them from.
const READER = 'ines@norrvik.example'

/** @typedef {{ name: string, path: string, isSignedIn: boolean }} Screen */

await runMain(async () => {
  checkNode()
  refuseForeign(dataFolder())
  await installPackages()
  const program = await chromium()
  await withSession(async (session) => {
    const url = process.env.ANIONARY_TEST_URL || await startOwn(session)
    session.checkpoint()
    const browser = await openBrowser(program)
    session.onEnd(() => browser.close())
    const screens = await screensOf(browser, url)
    for (const theme of themes) {
      for (const width of widths) {
        await takeAll(browser, url, screens, { theme, width })
        session.checkpoint()
      }
    }
  })
})

/** @param {import('./lib/session.mjs').Session} session */
async function startOwn(session) {
  await buildApp()
  return (await startThrowAway(session)).url
}

/**
 * The pages to take; the project is the first that the demo lists, the series one with a reading set aside.
 * @param {import('playwright-core').Browser} browser @param {string} url @returns {Promise<Screen[]>}
 */
async function screensOf(browser, url) {
  const context = await browser.newContext({ baseURL: url })
  await signIn(context, READER)
  const project = await idOf(context, '/api/v1/projects', () => true)
  const series = await idOf(context, `/api/v1/projects/${project}/series`,
    ({ salt, readings }) => salt.formula === 'NaSCN' && readings.some(({ setAside }) => setAside))
  await context.close()
  return [
    { name: 'landing', path: '/', isSignedIn: false },
    { name: 'home', path: '/', isSignedIn: true },
    { name: 'project', path: `/projects/${project}`, isSignedIn: true },
    { name: 'project-series', path: `/projects/${project}/series`, isSignedIn: true },
    { name: 'series', path: `/projects/${project}/series/${series}`, isSignedIn: true },
    { name: 'materials', path: `/projects/${project}/materials`, isSignedIn: true },
  ]
}

/** @typedef {{ id: string, salt: { formula: string }, readings: { setAside: boolean }[] }} Listed */

/**
 * Id of the first item that fits.
 * @param {import('playwright-core').BrowserContext} context @param {string} path @param {(item: Listed) => boolean} isWanted @returns {Promise<string>}
 */
async function idOf(context, path, isWanted) {
  const answer = await context.request.get(path)
  const { items } = /** @type {{ items?: Listed[] }} */ (await answer.json())
  const found = items?.find(isWanted)
  if (!found) throw new StopSentence(`${path} lists nothing to picture: the pictures need the demo data.`)
  return found.id
}

/**
 * @param {import('playwright-core').Browser} browser @param {string} url @param {Screen[]} screens
 * @param {{ theme: 'light' | 'dark', width: number }} look
 */
async function takeAll(browser, url, screens, { theme, width }) {
  const folder = join(root, 'docs', 'screens')
  mkdirSync(folder, { recursive: true })
  for (const isSignedIn of [false, true]) {
    const context = await browser.newContext({ baseURL: url, colorScheme: theme, reducedMotion: 'reduce', viewport: { width, height: 900 } })
    if (isSignedIn) await signIn(context, READER)
    const page = await context.newPage()
    for (const { name, path } of screens.filter(screen => screen.isSignedIn === isSignedIn)) {
      const answer = await page.goto(path, { waitUntil: 'networkidle' })
      if (!answer?.ok()) throw new StopSentence(`${path} was answered with ${answer?.status()}: there is no page to take.`)
      await page.evaluate(chosen => document.documentElement.dataset.theme = chosen, theme)
      await page.evaluate(() => document.fonts.ready.then(() => true))
      const file = join(folder, `${name}-${width}-${theme}.png`)
      const { length } = await page.screenshot({ path: file, fullPage: true, animations: 'disabled' })
      console.log(`${file.slice(root.length + 1)}  ${Math.round(length / 1000)} kB`)
    }
    await context.close()
  }
}
