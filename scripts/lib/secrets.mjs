import { randomBytes } from 'node:crypto'
import { existsSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'

/**
 * @typedef {object} Secrets
 * @property {string} bootstrapPassword superuser of the cluster, unused after setup
 * @property {string} ownerPassword
 * @property {string} appPassword
 * @property {string} sessionPassword seals the session cookies
 * @property {string} objectStoreKeyId
 * @property {string} objectStoreKey
 */

/**
 * Reads this folder's secrets, making them on the first call. Only their owner can read the file.
 * @param {string} data @returns {Secrets}
 */
export function secretsOf(data) {
  const file = join(data, 'secrets.json')
  if (existsSync(file)) return JSON.parse(readFileSync(file, 'utf8'))
  const secret = () => randomBytes(24).toString('hex')
  const secrets = {
    bootstrapPassword: secret(), ownerPassword: secret(), appPassword: secret(),
    sessionPassword: secret(), objectStoreKeyId: secret(), objectStoreKey: secret(),
  }
  // Renamed into place so that a crash never leaves half a file.
  writeFileSync(`${file}.new`, JSON.stringify(secrets, null, 2), { mode: 0o600 })
  renameSync(`${file}.new`, file)
  return secrets
}
