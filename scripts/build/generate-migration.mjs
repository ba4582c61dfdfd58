/** Writes the next migration from the schema: `npm run migration -- name`. drizzle-kit does not know our aliases, so it reads a bundle. */
import { spawnSync } from 'node:child_process'
import { bundle, root } from './bundle.mjs'

await bundle({ schema: 'server/database/schema/index.ts' }, `${root}/node_modules/.cache/anionary`)
const { status } = spawnSync(process.execPath, ['node_modules/drizzle-kit/bin.cjs', 'generate', '--name', process.argv[2] ?? 'change', ...process.argv.slice(3)], { cwd: root, stdio: 'inherit' })
process.exitCode = status ?? 1
