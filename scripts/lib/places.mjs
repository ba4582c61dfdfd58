import { createHash } from 'node:crypto'
import { accessSync, constants, existsSync, mkdirSync, statSync } from 'node:fs'
import { join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { StopSentence } from './stop-sentence.mjs'

/** The folder of the clone. */
export const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '')

export const isRoot = process.getuid?.() === 0

/** Where everything that is not source lives: ANIONARY_DATA, or .data in the clone. */
export function dataFolder() {
  return resolve(root, process.env.ANIONARY_DATA || '.data')
}

/** A file named on the command line: npm runs us in the clone, the person stood elsewhere. @param {string | undefined} name */
export function givenFile(name) {
  return name && resolve(process.env.INIT_CWD || '.', name)
}

/** Short stable name for a path, for folders that live outside the clone. @param {string[]} parts */
export function shortHash(...parts) {
  return createHash('sha256').update(parts.join('\0')).digest('hex').slice(0, 16)
}

/**
 * Makes the data folder; others may pass through it (PostgreSQL runs as its own user when we are root) but not list it.
 * @param {string} data
 */
export function makeDataFolder(data) {
  refuseForeign(data)
  mkdirSync(data, { recursive: true, mode: 0o711 })
  for (const name of ['backups', 'logs', 'mail', 'objects']) mkdirSync(join(data, name), { recursive: true, mode: 0o700 })
}

/**
 * Stops when another account started Anionary here before, or the clone is not ours to write.
 * @param {string} data
 */
export function refuseForeign(data) {
  const owner = [join(data, 'secrets.json'), data].find(existsSync)
  if (owner && statSync(owner).uid !== process.getuid?.()) throw new StopSentence(foreignSentence(owner))
  for (const place of [root, ...['node_modules', '.nuxt', '.output'].map(name => join(root, name))]) {
    if (existsSync(place) && !isWritable(place)) throw new StopSentence(foreignSentence(place))
  }
}

/** @param {string} place */
function foreignSentence(place) {
  return `${place} belongs to user ${statSync(place).uid} and this is user ${process.getuid?.()}: `
    + 'run it as the user who started it first, or clone anew (ANIONARY_DATA moves the data folder alone).'
}

/** @param {string} place */
function isWritable(place) {
  try {
    accessSync(place, constants.W_OK)
    return true
  }
  catch {
    return false
  }
}
