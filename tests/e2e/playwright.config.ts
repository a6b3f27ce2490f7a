import { fileURLToPath } from 'node:url'
import { defineConfig } from '@playwright/test'
import { browserArguments, browserPath } from './browser'

const fileOf = (path: string) => fileURLToPath(new URL(path, import.meta.url))

export default defineConfig({
  testDir: fileOf('.'),
  testMatch: '**/*.spec.ts',
  outputDir: fileOf('../../test-results'),
  globalSetup: fileOf('global-setup.ts'),
  workers: 1,
  retries: process.env['CI'] ? 1 : 0,
  forbidOnly: true,
  timeout: 90_000,
  expect: { timeout: 20_000 },
  use: {
    browserName: 'chromium',
    headless: true,
    viewport: { width: 1440, height: 900 },
    locale: 'en-GB',
    timezoneId: 'UTC',
    screenshot: 'only-on-failure',
    launchOptions: { executablePath: browserPath(), args: browserArguments },
  },
})
