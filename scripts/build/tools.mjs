import { cp } from 'node:fs/promises'
import { bundle, root } from './bundle.mjs'

const tools = {
  migrate: 'server/database/migrate.ts',
  seed: 'server/database/seed/index.ts',
  worker: 'server/jobs/worker.ts',
}

/** Threads are files of their own: taken into the server's bundle they would start a second server. */
const threads = {
  fit: 'server/workers/fit.ts',
  table: 'server/workers/table.ts',
}

/**
 * Puts the command-line tools and the worker threads beside the built server.
 * @param {string} serverDir where the server is built
 */
export async function buildTools(serverDir) {
  await bundle(tools, `${serverDir}/tools`)
  await bundle(threads, `${serverDir}/workers`)
  await cp(`${root}/server/database/migrations`, `${serverDir}/tools/migrations`, { recursive: true })
}
