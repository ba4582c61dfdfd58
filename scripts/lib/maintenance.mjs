import { isLocked, lock } from './lock.mjs'
import { dataFolder, makeDataFolder } from './places.mjs'
import { startCluster } from './postgres/cluster.mjs'
import { makeRoles } from './postgres/roles.mjs'
import { withSession } from './session.mjs'

/** @typedef {(cluster: import('./postgres/cluster.mjs').Cluster, data: string) => Promise<void>} Work */

/** Works on this data folder's database while nothing else uses the folder. @param {Work} work */
export function withDatabase(work) {
  const data = dataFolder()
  makeDataFolder(data)
  return withSession(async (session) => {
    session.onEnd(lock(data, 'A backup or restore').release)
    const cluster = await startCluster(data)
    session.onEnd(cluster.stop)
    await makeRoles(cluster, data)
    await work(cluster, data)
  })
}

/** The same beside a running Anionary, whose server goes on afterwards. @param {Work} work */
export async function withDatabaseBesideOthers(work) {
  const data = dataFolder()
  if (!isLocked(data)) return withDatabase(work)
  return work(await startCluster(data), data)
}
