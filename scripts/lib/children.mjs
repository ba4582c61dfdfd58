import { spawn } from 'node:child_process'
import { closeSync, existsSync, openSync, readFileSync, renameSync } from 'node:fs'
import { join } from 'node:path'
import { pathToFileURL } from 'node:url'
import { root } from './places.mjs'

const FOLLOW = pathToFileURL(join(root, 'scripts/lib/follow-parent.mjs')).href
const PATIENCE = 10_000

/**
 * @typedef {object} Child
 * @property {string} name
 * @property {string} log file that holds what it printed
 * @property {number} pid
 * @property {Promise<string>} ended how it ended, once it has
 * @property {() => Promise<void>} stop
 */

/**
 * Starts one of our long-running Node processes; it stops by itself when this process dies.
 * @param {string} name @param {string} script path in the clone
 * @param {{ env: Record<string, string>, logs: string }} options logs: folder for its log
 * @returns {Child}
 */
export function startChild(name, script, { env, logs }) {
  const log = join(logs, `${name.replaceAll(' ', '-')}.log`)
  // The run before stays readable: it may be the one that crashed.
  if (existsSync(log)) renameSync(log, `${log}.before`)
  const output = openSync(log, 'w', 0o600)
  // Only migrations and seeds work as the owner of the database.
  const inherited = { ...process.env }
  delete inherited.DATABASE_OWNER_URL
  const child = spawn(process.execPath, ['--import', FOLLOW, join(root, script)], {
    cwd: root, env: { ...inherited, ...env }, stdio: ['ignore', output, output, 'ipc'],
    // Its own group: Ctrl-C reaches us alone, and we stop the children in order.
    detached: true,
  })
  closeSync(output)
  /** @type {Promise<string>} */
  const ended = new Promise((done) => {
    child.on('error', error => done(String(error)))
    child.on('exit', (code, signal) => done(signal ? `signal ${signal}` : `code ${code}`))
  })
  return { name, log, pid: child.pid ?? 0, ended, stop: () => stopChild(child, ended) }
}

/** @param {Child} child @returns {string} the end of its log, for a message */
export function lastWords(child) {
  return readFileSync(child.log, 'utf8').trimEnd().split('\n').slice(-15).join('\n')
}

/** @param {import('node:child_process').ChildProcess} child @param {Promise<string>} ended */
async function stopChild(child, ended) {
  child.kill('SIGTERM')
  const force = setTimeout(() => child.kill('SIGKILL'), PATIENCE)
  await ended
  clearTimeout(force)
}
