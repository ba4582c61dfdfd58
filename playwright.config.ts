import { defineConfig } from '@playwright/test'
import { quietChromium } from './scripts/lib/browser.mjs'

// Started by `npm test -- browser`, which boots a fresh stack first and says where it listens.
export default defineConfig({
  testDir: 'tests/browser',
  forbidOnly: true,
  fullyParallel: true,
  retries: 0,
  workers: 2,
  timeout: 30_000,
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
