import { existsSync, mkdtempSync, readFileSync, renameSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { root } from './places.mjs'
import { BOOTSTRAP } from './postgres/cluster.mjs'
import { DATABASE, makeDatabase, query } from './postgres/roles.mjs'
import { must } from './run.mjs'
import { secretsOf } from './secrets.mjs'
import { StopSentence } from './stop-sentence.mjs'

/** @typedef {import('./postgres/cluster.mjs').Cluster} Cluster */

const DUMP = 'database.dump'
const JOURNAL = '.output/server/tools/migrations/meta/_journal.json'

/**
 * Writes one .tar: the database and the stand-in's files. File storage elsewhere has its own backups.
 * @param {Cluster} cluster @param {string} data @param {string} [file] default: named by the moment, under backups/
 * @returns {Promise<string>} the file
 */
export async function backUp(cluster, data, file = join(data, 'backups', `${moment()}.tar`)) {
  if (existsSync(file)) throw new StopSentence(`${file} is there already: name another file.`)
  return withFolder(async (folder) => {
    await must([join(cluster.bin, 'pg_dump'), ...address(cluster), '-d', DATABASE, '-Fc', '-f', join(folder, DUMP)], login(data))
    // Renamed into place: a file with a backup's name is a whole backup.
    await must(['tar', '-cf', `${file}.part`, '-C', folder, DUMP, '-C', data, 'objects'])
    renameSync(`${file}.part`, file)
    return file
  })
}

/**
 * Puts a backup in place of the present database, which is backed up first. Files are added, never removed.
 * @param {Cluster} cluster @param {string} data @param {string} file
 * @returns {Promise<string>} the backup of what was there before
 */
export async function restore(cluster, data, file) {
  if (!existsSync(file)) throw new StopSentence(`${file} does not exist.`)
  return withFolder(async (folder) => {
    await must(['tar', '-xf', file, '-C', folder, DUMP]).catch(() => {
      throw new StopSentence(`${file} is not a backup of Anionary: it holds no ${DUMP}.`)
    })
    const before = await backUp(cluster, data)
    const setup = { role: BOOTSTRAP, password: secretsOf(data).bootstrapPassword, database: 'postgres' }
    const aside = `${DATABASE}_before_restore`
    await query(cluster, setup, `DROP DATABASE IF EXISTS ${aside}`)
    await query(cluster, setup, `ALTER DATABASE ${DATABASE} RENAME TO ${aside}`)
    await makeDatabase(cluster, data)
    await must([join(cluster.bin, 'pg_restore'), ...address(cluster), '-d', DATABASE, '--exit-on-error', '--single-transaction', join(folder, DUMP)], login(data))
      .catch(error => backToFormer(cluster, setup, aside, error))
    await query(cluster, setup, `DROP DATABASE ${aside}`)
    await must(['tar', '-xf', file, '-C', data, 'objects'])
    return before
  })
}

/**
 * A backup when there is data and the build brings migrations it has not seen: going back is a restore.
 * @param {Cluster} cluster @param {string} data
 */
export async function backUpBeforeMigrating(cluster, data) {
  const journal = JSON.parse(readFileSync(join(root, JOURNAL), 'utf8'))
  const setup = { role: BOOTSTRAP, password: secretsOf(data).bootstrapPassword }
  const table = 'drizzle.__drizzle_migrations'
  const isEmpty = await query(cluster, setup, `select to_regclass('${table}') is null`) === 't'
  if (isEmpty) return
  const applied = Number(await query(cluster, setup, `select count(*) from ${table}`))
  if (applied === 0 || applied >= journal.entries.length) return
  console.log(`Backed up before migrating: ${await backUp(cluster, data)}`)
}

/** @param {Cluster} cluster @param {{ role: string, password: string, database: string }} setup @param {string} aside @param {Error} error */
async function backToFormer(cluster, setup, aside, error) {
  await query(cluster, setup, `DROP DATABASE ${DATABASE}`)
  await query(cluster, setup, `ALTER DATABASE ${aside} RENAME TO ${DATABASE}`)
  throw new StopSentence(`the backup could not be read, the database is as it was before:\n${error.message}`)
}

/** Dumps pass row-level security, so they need the bootstrap role. @param {Cluster} cluster */
function address(cluster) {
  return ['-h', '127.0.0.1', '-p', String(cluster.port), '-U', BOOTSTRAP]
}

/** @param {string} data */
function login(data) {
  return { env: { PGPASSWORD: secretsOf(data).bootstrapPassword } }
}

/** @template T @param {(folder: string) => Promise<T>} work @returns {Promise<T>} */
async function withFolder(work) {
  const folder = mkdtempSync(join(tmpdir(), 'anionary-'))
  try {
    return await work(folder)
  }
  finally {
    rmSync(folder, { recursive: true, force: true })
  }
}

function moment() {
  return new Date().toISOString().replaceAll(/[:.]/g, '-')
}
