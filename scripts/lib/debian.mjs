import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import { dirname } from 'node:path'
import { isRoot } from './places.mjs'
import { run } from './run.mjs'
import { StopSentence } from './stop-sentence.mjs'

const CLUSTER_RULES = '/etc/postgresql-common/createcluster.conf'
const QUIET = { DEBIAN_FRONTEND: 'noninteractive' }

/**
 * Installs Debian packages when we may, else stops with the line to run.
 * @param {string[]} packages @param {string} why
 */
export async function installDebian(packages, why) {
  const line = `apt-get update && apt-get install -y --no-install-recommends ${packages.join(' ')}`
  if (!isRoot || !existsSync('/usr/bin/apt-get')) throw new StopSentence(`${why} is missing. Run as root: ${line}`)
  console.log(`Installing ${packages.join(', ')} from Debian …`)
  const update = await run(['apt-get', 'update', '-q'], { env: QUIET })
  const install = await run(['apt-get', 'install', '-y', '-q', '--no-install-recommends', ...packages], { env: QUIET })
  if (install.code !== 0) throw new StopSentence(`${why} could not be installed with: ${line}\n${update.stderr}${install.stderr}`)
}

/** PostgreSQL's server, without the cluster Debian would make and start by itself. */
export async function installPostgres() {
  if (isRoot) {
    await installDebian(['postgresql-common'], 'PostgreSQL')
    mkdirSync(dirname(CLUSTER_RULES), { recursive: true })
    const rules = existsSync(CLUSTER_RULES) ? readFileSync(CLUSTER_RULES, 'utf8') : ''
    writeFileSync(CLUSTER_RULES, withoutMainCluster(rules))
  }
  await installDebian(['postgresql'], 'PostgreSQL')
}

/** @param {string} rules content of createcluster.conf @returns {string} the same, making no main cluster */
export function withoutMainCluster(rules) {
  const setting = 'create_main_cluster = false'
  const line = /^#?\s*create_main_cluster\s*=.*$/m
  return line.test(rules) ? rules.replace(line, setting) : `${rules}${setting}\n`
}
