import { defineConfig } from '@playwright/test'
import { quietChromium } from './scripts/lib/browser.mjs'

// Started by `npm test -- browser`, which boots a fresh stack first and says where it listens.
export default defineConfig({
  testDir: 'tests/browser',
  forbidOnly: true,
  fullyParallel: true,
  retries: 0,
  workers: 2,
  timeout: 60_000,
  // A first page on a busy machine takes its time; what a test says is whether, not when.
  expect: { timeout: 15_000 },
  outputDir: 'test-results',
  use: {
    baseURL: process.env.ANIONARY_TEST_URL,
    locale: 'en-GB',
    timezoneId: 'UTC',
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: process.env.ANIONARY_CHROMIUM ?? '/usr/bin/chromium',
      args: quietChromium,
    },
  },
})
