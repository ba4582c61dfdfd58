import { aliases } from './aliases'
import { registerRoutes } from './scripts/build/registry.mjs'
import { buildTools } from './scripts/build/tools.mjs'

export default defineNuxtConfig({
  modules: ['@pinia/nuxt', '@nuxtjs/tailwindcss', '@nuxt/icon', '@nuxt/eslint', 'nuxt-auth-utils', 'nuxt-security'],
  components: [{ path: '~~/components', pathPrefix: false, extensions: ['vue'] }],
  // Nuxt's own helpers stay automatic; ours are imported by path so that the lint rule on arrows can see them.
  imports: { scan: false },
  devtools: { enabled: false },
  css: [
    // The whole family with its unicode ranges: a browser loads only the subsets that a page's letters ask for.
    '@fontsource/ibm-plex-sans/400.css',
    '@fontsource/ibm-plex-sans/400-italic.css',
    '@fontsource/ibm-plex-sans/500.css',
    '@fontsource/ibm-plex-sans/600.css',
    '@fontsource/ibm-plex-mono/400.css',
    '@fontsource/ibm-plex-mono/500.css',
    '~~/assets/css/tokens.css',
    '~~/assets/css/main.css',
  ],
  runtimeConfig: {
    // Declared here so that NUXT_SESSION_COOKIE_SECURE=false can override it on plain http.
    session: { name: 'anionary-session', password: '', maxAge: 14 * 86_400, cookie: { sameSite: 'lax', secure: true } },
  },
  srcDir: '.',
  alias: aliases,
  compatibilityDate: '2026-11-01',
  // Helpers of libraries only; our own server code is imported by path.
  nitro: { imports: { dirsScanOptions: { fileFilter: file => file.includes('/node_modules/') } } },
  typescript: { strict: true },
  telemetry: false,
  hooks: {
    'nitro:config'(config) {
      // The API's errors leave as problem details; what this handler does not answer goes on to Nuxt's page for errors.
      config.errorHandler = ['~~/server/error-handler', config.errorHandler ?? []].flat()
    },
    'nitro:init'(nitro) {
      registerRoutes(nitro)
      // Answers are typed by their contracts; without this the client's type check would read the server's files.
      nitro.hooks.hook('types:extend', types => void (types.routes = {}))
      nitro.hooks.hook('compiled', () => buildTools(nitro.options.output.serverDir))
    },
  },
  eslint: { config: { stylistic: true } },
  icon: { provider: 'none', clientBundle: { scan: true }, serverBundle: { collections: ['lucide'] } },
  security: {
    strict: true,
    // What these would do, our routes do themselves: limits with a sentence, counted in the database for all processes.
    xssValidator: false,
    corsHandler: false,
    requestSizeLimiter: false,
    rateLimiter: false,
    removeLoggers: false,
    headers: {
      // Other names of the same domain, and the browsers' lists, are for whoever runs it to decide.
      strictTransportSecurity: { maxAge: 31_536_000, includeSubdomains: false, preload: false },
      contentSecurityPolicy: {
        'default-src': ['\'none\''],
        'script-src': ['\'self\'', '\'strict-dynamic\'', '\'nonce-{{nonce}}\''],
        'style-src': ['\'self\'', '\'nonce-{{nonce}}\''],
        // The one written exception: tooltips of the chart library carry style attributes.
        'style-src-attr': ['\'unsafe-inline\''],
        'img-src': ['\'self\'', 'data:'],
        'frame-ancestors': ['\'none\''],
        // Served over plain http on loopback; behind a proxy the proxy redirects.
        'upgrade-insecure-requests': false,
      },
    },
  },
  tailwindcss: { cssPath: false, viewer: false },
})
