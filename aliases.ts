import { fileURLToPath } from 'node:url'

const root = fileURLToPath(new URL('.', import.meta.url)).replace(/\/$/, '')

/** The one table of import aliases: Nuxt, vitest, esbuild and the command line all read it. */
export const aliases = {
  '~~': root,
  '#shared': `${root}/shared`,
} as const
