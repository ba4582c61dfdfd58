import { build } from 'esbuild'
import { fileURLToPath } from 'node:url'

export const root = fileURLToPath(new URL('../..', import.meta.url)).replace(/\/$/, '')

// CommonJS packages inside an ES module bundle still ask for require, __filename and __dirname.
const banner = [
  'import { createRequire as makeRequire } from "node:module"',
  'import { fileURLToPath as toPath } from "node:url"',
  'const require = makeRequire(import.meta.url)',
  'const __filename = toPath(import.meta.url)',
  'const __dirname = toPath(new URL(".", import.meta.url))',
].join(';')

/**
 * Bundles TypeScript entries into single files that node runs without the source tree.
 * @param {Record<string, string>} entries name of the output → entry file, from the root
 * @param {string} outdir
 */
export async function bundle(entries, outdir) {
  await build({
    absWorkingDir: root,
    entryPoints: entries,
    outdir,
    outExtension: { '.js': '.mjs' },
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    alias: { '~~': root, '#shared': `${root}/shared` },
    loader: { '.tsv': 'text' },
    external: ['pg-native'],
    banner: { js: banner },
    logLevel: 'warning',
  })
}
