import { existsSync, readFileSync, readdirSync, readlinkSync, realpathSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { rememberPort, rememberedPort } from '../ports.mjs'
import { must, run } from '../run.mjs'
import { secretsOf } from '../secrets.mjs'
import { StopSentence } from '../stop-sentence.mjs'
import { postgresPrograms } from './binaries.mjs'
import { asPostgres, clusterFolder, makeClusterFolder } from './place.mjs'

export const BOOTSTRAP = 'anionary_bootstrap'

/**
 * @typedef {object} Cluster
 * @property {string} folder
 * @property {string} bin folder of the PostgreSQL programs that made it
 * @property {number} port on loopback
 * @property {number} pid
 * @property {boolean} isAdopted the server had been left running by a crash
 * @property {() => Promise<void>} stop
 */

/**
 * Starts this data folder's PostgreSQL, making the cluster on first use; a server that a crash left running is adopted.
 * @param {string} data @returns {Promise<Cluster>}
 */
export async function startCluster(data) {
  const folder = await clusterFolder(data)
  const { bin, major } = await postgresPrograms(majorOf(folder))
  if (!majorOf(folder)) await makeCluster(data, folder, bin)
  writeFileSync(join(data, 'postgres-version'), `${major}\n`)
  const orphan = livingServer(folder)
  const { pid, port } = orphan ?? await startServer(data, folder, bin)
  rememberPort(data, 'postgres', port)
  const stop = async () => {
    const stopped = await run([...asPostgres, join(bin, 'pg_ctl'), '-D', folder, '-m', 'fast', '-w', 'stop'], { cwd: '/' })
    if (stopped.code !== 0 && livingServer(folder)) throw new Error(`PostgreSQL did not stop: ${stopped.stderr}`)
  }
  return { folder, bin, port, pid, isAdopted: orphan !== null, stop }
}

/**
 * The server that runs on a cluster, from its postmaster.pid. A number that now belongs to another process does not count.
 * @param {string} folder @returns {{ pid: number, port: number } | null}
 */
export function livingServer(folder) {
  const file = join(folder, 'postmaster.pid')
  if (!existsSync(file)) return null
  // Lines: process, folder, start time, port, …
  const [pid, , , port] = readFileSync(file, 'utf8').split('\n').map(line => line.trim())
  return isServerOf(Number(pid), folder) ? { pid: Number(pid), port: Number(port) } : null
}

/** A PostgreSQL server works inside its data folder. @param {number} pid @param {string} folder */
function isServerOf(pid, folder) {
  try {
    return readlinkSync(`/proc/${pid}/cwd`) === realpathSync(folder)
  }
  catch {
    return false
  }
}

/**
 * A killed server's pid file whose number now belongs to somebody else would make PostgreSQL refuse to start. The file also
 * guards against leftover backends of the killed server, so it goes only when no process works in the folder any more.
 * @param {string} folder
 */
function removeForeignPid(folder) {
  const file = join(folder, 'postmaster.pid')
  if (!existsSync(file)) return
  const left = readdirSync('/proc').filter(pid => /^\d+$/.test(pid) && isServerOf(Number(pid), folder))
  if (left.length === 0) return rmSync(file)
  throw new StopSentence(`PostgreSQL in ${folder} was killed and processes ${left.join(', ')} still work there: wait until they end, then start again.`)
}

/** @param {string} folder @returns {string | null} major version of the cluster there */
function majorOf(folder) {
  const file = join(folder, 'PG_VERSION')
  return existsSync(file) ? readFileSync(file, 'utf8').trim() : null
}

/** @param {string} data @param {string} folder @param {string} bin */
async function makeCluster(data, folder, bin) {
  if (existsSync(join(data, 'postgres-version'))) {
    throw new StopSentence(`the database of ${data} is missing from ${folder}. Bring that folder back, or empty ${data} and restore a backup.`)
  }
  await makeClusterFolder(folder)
  const passwordFile = `${folder}.password`
  writeFileSync(passwordFile, secretsOf(data).bootstrapPassword, { mode: 0o600 })
  if (asPostgres.length) await must(['chown', 'postgres', passwordFile])
  const options = ['-U', BOOTSTRAP, '-A', 'scram-sha-256', `--pwfile=${passwordFile}`, '-E', 'UTF8', '--locale=C.UTF-8']
  try {
    await must([...asPostgres, join(bin, 'initdb'), '-D', folder, ...options], { cwd: '/' })
  }
  finally {
    rmSync(passwordFile, { force: true })
  }
}

/** @param {string} data @param {string} folder @param {string} bin */
async function startServer(data, folder, bin) {
  removeForeignPid(folder)
  const port = await rememberedPort(data, 'postgres')
  const settings = `-p ${port} -c listen_addresses=127.0.0.1 -c unix_socket_directories='' -c max_connections=100`
  const log = join(folder, 'server.log')
  const started = await run([...asPostgres, join(bin, 'pg_ctl'), '-D', folder, '-l', log, '-w', '-t', '30', '-o', settings, 'start'], { cwd: '/' })
  if (started.code !== 0) throw new StopSentence(`PostgreSQL did not start; its last words:\n${(await run(['tail', '-n', '15', log])).stdout}`)
  const server = livingServer(folder)
  if (!server) throw new Error(`PostgreSQL started but left no ${folder}/postmaster.pid`)
  return server
}
