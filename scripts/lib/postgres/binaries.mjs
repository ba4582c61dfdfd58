import { existsSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import { installDebian, installPostgres } from '../debian.mjs'

const VERSIONS = '/usr/lib/postgresql'

/**
 * Folder of PostgreSQL's programs, installed first when absent and permitted.
 * @param {string | null} major the version a cluster was made by; null for the newest
 * @returns {Promise<{ bin: string, major: string }>}
 */
export async function postgresPrograms(major) {
  if (!newest(major)) await (major ? installDebian([`postgresql-${major}`], `PostgreSQL ${major}, which made this data folder,`) : installPostgres())
  const found = newest(major)
  if (!found) throw new Error(`no PostgreSQL server under ${VERSIONS} after installing it`)
  return { major: found, bin: join(VERSIONS, found, 'bin') }
}

/** @param {string | null} major @returns {string | undefined} */
function newest(major) {
  if (!existsSync(VERSIONS)) return undefined
  return readdirSync(VERSIONS)
    .filter(version => (!major || version === major) && existsSync(join(VERSIONS, version, 'bin', 'initdb')))
    .sort((a, b) => Number(b) - Number(a))[0]
}
