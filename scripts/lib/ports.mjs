import { randomInt } from 'node:crypto'
import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import { join } from 'node:path'

// Below the range from which the kernel takes ports for outgoing connections.
const FIRST = 20_000
const LAST = 32_000

/** @param {number} port @param {string} [host] @returns {Promise<boolean>} */
export function isFree(port, host = '127.0.0.1') {
  return new Promise((answer) => {
    const probe = createServer()
    probe.once('error', () => answer(false))
    probe.listen(port, host, () => probe.close(() => answer(true)))
  })
}

/** @returns {Promise<number>} a loopback port nobody listens on */
export async function freePort() {
  for (let attempt = 0; attempt < 100; attempt++) {
    const port = randomInt(FIRST, LAST)
    if (await isFree(port)) return port
  }
  throw new Error(`no free port between ${FIRST} and ${LAST}`)
}

/**
 * The port a service used last time, when it is still free; else a new one, remembered.
 * @param {string} data @param {string} service
 */
export async function rememberedPort(data, service) {
  const port = portsOf(data)[service]
  if (port && await isFree(port)) return port
  const fresh = await freePort()
  rememberPort(data, service, fresh)
  return fresh
}

/** @param {string} data @param {string} service @param {number} port */
export function rememberPort(data, service, port) {
  writeFileSync(join(data, 'ports.json'), JSON.stringify({ ...portsOf(data), [service]: port }, null, 2))
}

/** @param {string} data @returns {Record<string, number>} */
function portsOf(data) {
  const file = join(data, 'ports.json')
  return existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : {}
}
