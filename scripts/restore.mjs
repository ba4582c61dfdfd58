import { restore } from './lib/backup.mjs'
import { withDatabase } from './lib/maintenance.mjs'
import { givenFile } from './lib/places.mjs'
import { StopSentence, runMain } from './lib/stop-sentence.mjs'

// npm run restore -- FILE: Anionary must be stopped.
await runMain(() => withDatabase(async (cluster, data) => {
  const file = givenFile(process.argv[2])
  if (!file) throw new StopSentence('name the backup: npm run restore -- FILE')
  const before = await restore(cluster, data, file)
  console.log(`Restored ${file}. What was there before: ${before}`)
}))
