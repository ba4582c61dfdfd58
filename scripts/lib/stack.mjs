import { join } from 'node:path'
import { backUpBeforeMigrating } from './backup.mjs'
import { lastWords, startChild } from './children.mjs'
import { startCluster } from './postgres/cluster.mjs'
import { databaseUrls, makeRoles } from './postgres/roles.mjs'
import { until, whenGone } from './processes.mjs'
import { run } from './run.mjs'
import { appSettings, serviceSettings } from './settings.mjs'
import { StopSentence } from './stop-sentence.mjs'

const TOOLS = '.output/server/tools'
const READY_WITHIN_SECONDS = 60

/**
 * @typedef {object} Stack
 * @property {string} url
 * @property {Record<string, string>} env settings every part of it was started with, and DATABASE_OWNER_URL
 * @property {Promise<string>} broken settles with a sentence when one of its processes ends by itself
 */

/**
 * Starts database, migrations, seeds, stand-ins, web server and worker, and waits until the whole answers.
 * @param {import('./session.mjs').Session} session stops all of it when the session ends
 * @param {string} data @param {import('./settings.mjs').Address} address
 * @returns {Promise<Stack>}
 */
export async function startStack(session, data, address) {
  const children = new Children(session, join(data, 'logs'))
  const database = await startDatabase(session, data, children)
  session.checkpoint()
  const { env: serviceEnv, objectsPort, mailPort } = await serviceSettings(data)
  const env = { ...appSettings(data, address), ...serviceEnv, DATABASE_URL: database.DATABASE_URL }
  if (objectsPort) children.start('object store', 'scripts/standins/object-store.mjs', { ...env, STANDIN_PORT: String(objectsPort), STANDIN_FOLDER: join(data, 'objects') })
  if (mailPort) children.start('mail', 'scripts/standins/mail.mjs', { ...env, STANDIN_PORT: String(mailPort), STANDIN_FOLDER: join(data, 'mail') })
  children.start('worker', `${TOOLS}/worker.mjs`, env)
  children.start('web', '.output/server/index.mjs', env)
  const url = `http://${address.host}:${address.port}`
  await waitUntilReady(url, children.broken)
  session.checkpoint()
  return { url, env: { ...env, ...database }, broken: children.broken }
}

/**
 * The database, migrated and seeded; a real one when DATABASE_URL names it.
 * @param {import('./session.mjs').Session} session @param {string} data @param {Children} children
 */
async function startDatabase(session, data, children) {
  const urls = await externalDatabase() ?? await ownDatabase(session, data, children)
  const env = { ...urls, ANIONARY_DEMO: process.env.ANIONARY_DEMO || '1' }
  await runTool('migrate', env)
  session.checkpoint()
  await runTool('seed', env)
  return urls
}

/** @param {string} name @param {Record<string, string>} env */
async function runTool(name, env) {
  const { code, stderr } = await run([process.execPath, `${TOOLS}/${name}.mjs`], { env })
  if (code !== 0) throw new StopSentence(`${TOOLS}/${name}.mjs ended with ${code}:\n${stderr.trim()}`)
}

async function externalDatabase() {
  const { DATABASE_URL, DATABASE_OWNER_URL } = process.env
  if (!DATABASE_URL) return null
  if (DATABASE_OWNER_URL) return { DATABASE_URL, DATABASE_OWNER_URL }
  throw new StopSentence('DATABASE_URL is set and DATABASE_OWNER_URL is not: migrations need the owner of that database.')
}

/** @param {import('./session.mjs').Session} session @param {string} data @param {Children} children */
async function ownDatabase(session, data, children) {
  const cluster = await startCluster(data)
  session.onEnd(cluster.stop)
  session.onEnd(whenGone(cluster.pid, () => children.break(`PostgreSQL (process ${cluster.pid}) ended by itself; its log: ${cluster.folder}/server.log`)))
  if (cluster.isAdopted) console.log(`PostgreSQL was still running after a crash (process ${cluster.pid}): taken over.`)
  await makeRoles(cluster, data)
  await backUpBeforeMigrating(cluster, data)
  return databaseUrls(cluster, data)
}

/** The processes of a stack: each is stopped with the session, and one that ends by itself breaks the stack. */
class Children {
  /** @param {import('./session.mjs').Session} session @param {string} logs */
  constructor(session, logs) {
    this.session = session
    this.logs = logs
    /** @type {(sentence: string) => void} */
    this.break = () => {}
    /** @type {Promise<string>} */
    this.broken = new Promise((settle) => {
      this.break = settle
    })
  }

  /** @param {string} name @param {string} script @param {Record<string, string>} env */
  start(name, script, env) {
    const child = startChild(name, script, { env, logs: this.logs })
    this.session.onEnd(child.stop)
    child.ended.then(how => this.break(`the ${name} process ended by itself (${how}). The end of ${child.log}:\n${lastWords(child)}`))
  }
}

/** @param {string} url @param {Promise<string>} broken */
async function waitUntilReady(url, broken) {
  let last = 'no answer'
  const isReady = until(async () => {
    const answer = await fetch(`${url}/api/ready`).catch(() => null)
    if (answer && !answer.ok) last = `${answer.status} ${await answer.text()}`
    return answer?.ok ?? false
  }, READY_WITHIN_SECONDS)
  const outcome = await Promise.race([isReady, broken])
  if (typeof outcome === 'string') throw new StopSentence(outcome)
  if (!outcome) throw new StopSentence(`${url}/api/ready did not say ready within ${READY_WITHIN_SECONDS} s: ${last}`)
}
