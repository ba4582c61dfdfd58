import { defineConfig } from 'vitest/config'
import { aliases } from './aliases'

export default defineConfig({
  resolve: { alias: aliases },
  test: {
    projects: [
      { extends: true, test: { name: 'unit', include: ['tests/unit/**/*.test.ts', 'tests/external/**/*.test.ts'] } },
      { extends: true, test: { name: 'soak', include: ['tests/soak/**/*.test.ts'], testTimeout: 3_600_000 } },
      { extends: true, test: { name: 'api', include: ['tests/api/**/*.test.ts'], testTimeout: 30_000, fileParallelism: false } },
      { extends: true, test: { name: 'ops', include: ['tests/ops/**/*.test.ts'], testTimeout: 60_000, hookTimeout: 60_000, fileParallelism: false } },
    ],
  },
})
