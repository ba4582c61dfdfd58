import { join } from 'node:path'
import { checkNode, installPackages, prepareApp } from './lib/packages.mjs'
import { root } from './lib/places.mjs'
import { run } from './lib/run.mjs'
import { runMain } from './lib/stop-sentence.mjs'

// npm run test:soak: the large seeded counts; they need neither build nor database.
await runMain(async () => {
  checkNode()
  await installPackages()
  await prepareApp()
  const command = [process.execPath, join(root, 'node_modules/vitest/vitest.mjs'), 'run', '--project', 'soak', ...process.argv.slice(2)]
  return (await run(command, { show: true, env: { NODE_ENV: 'test' } })).code
})
