import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { chromium } from './lib/chromium.mjs'
import { buildApp, checkNode, installPackages, prepareApp } from './lib/packages.mjs'
import { dataFolder, refuseForeign, root } from './lib/places.mjs'
import { postgresPrograms } from './lib/postgres/binaries.mjs'
import { Report, check, countPlaywright, countTests, countVitest } from './lib/report.mjs'
import { withSession } from './lib/session.mjs'
import { runMain } from './lib/stop-sentence.mjs'
import { startThrowAway } from './lib/throw-away.mjs'

// npm test runs every stage; npm test -- unit api runs the named ones.
const STAGES = ['lint', 'types', 'unused', 'unit', 'build', 'start', 'api', 'browser']
const NEED_BUILD = ['build', 'start', 'api', 'browser']

const asked = process.argv.slice(2)
const chosen = asked.length ? STAGES.filter(stage => asked.includes(stage)) : STAGES

/** @param {string} tool path of a package's program @param {string[]} args */
const node = (tool, ...args) => [process.execPath, join(root, 'node_modules', tool), ...args]

await runMain(async () => {
  checkNode()
  refuseForeign(dataFolder())
  await installPackages()
  await postgresPrograms(null)
  const browser = await chromium()
  process.env.NODE_ENV = 'test'
  await prepareApp()
  const report = new Report()
  const reports = mkdtempSync(join(tmpdir(), 'anionary-reports-'))
  const isDone = await withSession(async (session) => {
    session.onEnd(() => rmSync(reports, { recursive: true, force: true }))
    await checkSources(report, reports)
    session.checkpoint()
    if (NEED_BUILD.some(isChosen)) await checkBuild(session, report, reports, browser)
    session.checkpoint()
    return true
  })
  return isDone ? report.print() : 130
})

/** @param {string} stage */
function isChosen(stage) {
  return chosen.includes(stage)
}

/** @param {Report} report @param {string} reports */
async function checkSources(report, reports) {
  if (isChosen('lint')) await report.stage('lint', () => check(node('eslint/bin/eslint.js', '.')))
  if (isChosen('types')) {
    await report.stage('types', () => check(node('nuxt/bin/nuxt.mjs', 'typecheck')))
    await report.stage('types of tests', () => check(node('vue-tsc/bin/vue-tsc.js', '--noEmit', '-p', 'tests/tsconfig.json')))
  }
  if (isChosen('unused')) await report.stage('unused code', () => check(node('knip/bin/knip.js', '--no-progress')))
  if (isChosen('unit')) await report.stage('unit and external', () => vitest('unit', reports))
}

/** @param {import('./lib/session.mjs').Session} session @param {Report} report @param {string} reports @param {string} browser */
async function checkBuild(session, report, reports, browser) {
  const isBuilt = await report.stage('build', async () => {
    await buildApp()
    return { passed: 0, failed: 0 }
  })
  session.checkpoint()
  const rest = ['start', 'api', 'browser'].filter(isChosen)
  if (!isBuilt) return rest.forEach(stage => report.notRun(stage, 'there is no build'))
  if (isChosen('start')) await report.stage('start', () => vitest('ops', reports))
  session.checkpoint()
  if (isChosen('api') || isChosen('browser')) await checkRunning(session, report, reports, browser)
}

/** @param {import('./lib/session.mjs').Session} session @param {Report} report @param {string} reports @param {string} browser */
async function checkRunning(session, report, reports, browser) {
  /** @type {Record<string, string>} */
  let env = {}
  const isUp = await report.stage('boot', async () => {
    env = (await startThrowAway(session)).env
    return { passed: 0, failed: 0 }
  })
  const rest = ['api', 'browser'].filter(isChosen)
  if (!isUp) return rest.forEach(stage => report.notRun(stage, 'the stack did not boot'))
  if (isChosen('api')) await report.stage('api', () => vitest('api', reports, env))
  session.checkpoint()
  if (isChosen('browser')) await report.stage('browser', () => playwright(reports, { ...env, ANIONARY_CHROMIUM: browser }))
}

/** @param {string} project @param {string} reports @param {NodeJS.ProcessEnv} [env] */
function vitest(project, reports, env = {}) {
  const file = join(reports, `${project}.json`)
  const options = ['--reporter=default', '--reporter=json', `--outputFile.json=${file}`]
  return countTests(node('vitest/vitest.mjs', 'run', '--project', project, ...options), env, file, countVitest)
}

/** @param {string} reports @param {NodeJS.ProcessEnv} env */
function playwright(reports, env) {
  const file = join(reports, 'browser.json')
  const command = node('@playwright/test/cli.js', 'test', '--reporter=list,json')
  return countTests(command, { ...env, PLAYWRIGHT_JSON_OUTPUT_NAME: file }, file, countPlaywright)
}
