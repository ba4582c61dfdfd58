import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { isRoot, root, shortHash } from '../places.mjs'
import { must, run } from '../run.mjs'
import { StopSentence } from '../stop-sentence.mjs'

const STATE = '/var/lib/anionary'

/** PostgreSQL refuses to run as root: there its commands run as its own user. */
export const asPostgres = isRoot ? ['setpriv', '--reuid=postgres', '--regid=postgres', '--init-groups', '--'] : []

/**
 * Where the cluster of this data folder lies: inside it, or, when the postgres user cannot pass through to it
 * (a home of mode 700), in the system's state folder. The choice is written to `where` once and kept.
 * @param {string} data @returns {Promise<string>}
 */
export async function clusterFolder(data) {
  const where = join(data, 'where')
  if (existsSync(where)) return recordedFolder(where)
  const inside = join(data, 'postgres')
  if (await canPass(data)) return inside
  const outside = join(STATE, shortHash(root, data), 'postgres')
  writeFileSync(where, `${outside}\n`)
  console.log(`PostgreSQL cannot reach ${data}; the database lives in ${outside}.`)
  return outside
}

/** Makes the empty folder and hands it to PostgreSQL's user. @param {string} folder */
export async function makeClusterFolder(folder) {
  mkdirSync(dirname(folder), { recursive: true, mode: 0o711 })
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  if (isRoot) await must(['chown', 'postgres:postgres', folder])
}

/** @param {string} where */
function recordedFolder(where) {
  const folder = readFileSync(where, 'utf8').trim()
  // A recorded folder that is gone is lost data: never make an empty one in its place.
  if (existsSync(dirname(folder))) return folder
  throw new StopSentence(`${where} says the database lives in ${folder}, which is gone. Bring it back, or delete ${where} and restore a backup.`)
}

/** @param {string} folder */
async function canPass(folder) {
  return !isRoot || (await run([...asPostgres, 'test', '-x', folder], { cwd: '/' })).code === 0
}
