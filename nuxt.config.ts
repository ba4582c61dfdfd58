import { aliases } from './aliases'
import { buildTools } from './scripts/build/tools.mjs'

export default defineNuxtConfig({
  modules: ['@pinia/nuxt', '@nuxtjs/tailwindcss', '@nuxt/icon', '@nuxt/eslint', 'nuxt-auth-utils', 'nuxt-security'],
  components: [{ path: '~~/components', pathPrefix: false, extensions: ['vue'] }],
  // Nuxt's own helpers stay automatic; ours are imported by path so that the lint rule on arrows can see them.
  imports: { scan: false },
  devtools: { enabled: false },
  css: [
    '@fontsource/ibm-plex-sans/latin-400.css',
    '@fontsource/ibm-plex-sans/latin-400-italic.css',
    '@fontsource/ibm-plex-sans/latin-500.css',
    '@fontsource/ibm-plex-sans/latin-600.css',
    '@fontsource/ibm-plex-sans/greek-400.css',
    '@fontsource/ibm-plex-sans/greek-400-italic.css',
    '@fontsource/ibm-plex-sans/greek-500.css',
    '@fontsource/ibm-plex-sans/greek-600.css',
    '@fontsource/ibm-plex-mono/latin-400.css',
    '@fontsource/ibm-plex-mono/latin-500.css',
    '~~/assets/css/tokens.css',
    '~~/assets/css/main.css',
  ],
  srcDir: '.',
  alias: aliases,
  compatibilityDate: '2026-11-01',
  nitro: { imports: { dirs: [], dirsScanOptions: { fileFilter: () => false } } },
  typescript: { strict: true },
  telemetry: false,
  hooks: {
    'nitro:init'(nitro) {
      nitro.hooks.hook('compiled', () => buildTools(nitro.options.output.serverDir))
    },
  },
  eslint: { config: { stylistic: true } },
  icon: { provider: 'none', clientBundle: { scan: true }, serverBundle: { collections: ['lucide'] } },
  tailwindcss: { cssPath: false, viewer: false },
})
