import { cp } from 'node:fs/promises'
import { existsSync } from 'node:fs'
import { bundle, root } from './bundle.mjs'

const tools = {
  migrate: 'server/database/migrate.ts',
  seed: 'server/database/seed/index.ts',
  worker: 'server/jobs/worker.ts',
}

/**
 * Puts the command-line tools and the worker threads beside the built server.
 * @param {string} serverDir where the server is built
 */
export async function buildTools(serverDir) {
  const present = Object.fromEntries(Object.entries(tools).filter(([, file]) => existsSync(`${root}/${file}`)))
  await bundle(present, `${serverDir}/tools`)

  await cp(`${root}/server/database/migrations`, `${serverDir}/tools/migrations`, { recursive: true })
}
