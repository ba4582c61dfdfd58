import { backUp } from './lib/backup.mjs'
import { withDatabaseBesideOthers } from './lib/maintenance.mjs'
import { givenFile } from './lib/places.mjs'
import { runMain } from './lib/stop-sentence.mjs'

// npm run backup [-- FILE]: works beside a running Anionary too.
await runMain(() => withDatabaseBesideOthers(async (cluster, data) => {
  console.log(`Backed up: ${await backUp(cluster, data, givenFile(process.argv[2]))}`)
}))
