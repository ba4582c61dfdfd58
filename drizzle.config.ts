import { defineConfig } from 'drizzle-kit'

export default defineConfig({
  dialect: 'postgresql',
  // the bundle that scripts/build/generate-migration.mjs makes
  schema: './node_modules/.cache/anionary/schema.mjs',
  out: './server/database/migrations',
})
