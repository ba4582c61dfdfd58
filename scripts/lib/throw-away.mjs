import { chmodSync, existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { makeDataFolder } from './places.mjs'
import { freePort } from './ports.mjs'
import { startStack } from './stack.mjs'

/** Settings of a real installation must never reach a test. */
const REAL_SERVICES = ['DATABASE_URL', 'DATABASE_OWNER_URL', 'S3_ENDPOINT', 'SMTP_URL', 'ANIONARY_URL', 'ANIONARY_DEMO', 'ANIONARY_PUBLIC_FIT_PER_MINUTE']

/** A new data folder outside the clone, gone with the session. @param {import('./session.mjs').Session} session */
export function throwAwayFolder(session) {
  const data = mkdtempSync(join(tmpdir(), 'anionary-test-'))
  // mkdtemp makes it private; PostgreSQL's own user has to pass through.
  chmodSync(data, 0o711)
  session.onEnd(() => removeData(data))
  makeDataFolder(data)
  return data
}

/**
 * A fresh stack with the demo seed, on free ports, gone with the session.
 * @param {import('./session.mjs').Session} session
 * @returns {Promise<{ env: Record<string, string>, url: string }>} env: what tests against it read
 */
export async function startThrowAway(session) {
  for (const name of REAL_SERVICES) delete process.env[name]
  const data = throwAwayFolder(session)
  const { url, env } = await startStack(session, data, { host: '127.0.0.1', port: await freePort() })
  return { url, env: { ...env, NODE_ENV: 'test', ANIONARY_DATA: data, ANIONARY_TEST_URL: url } }
}

/** @param {string} data */
export function removeData(data) {
  const where = join(data, 'where')
  if (existsSync(where)) rmSync(dirname(readFileSync(where, 'utf8').trim()), { recursive: true, force: true })
  rmSync(data, { recursive: true, force: true })
}
