import { fileURLToPath } from 'node:url'
import { defineConfig } from 'vitest/config'

const long = process.env.LATCHWRIGHT_LONG === '1'

export default defineConfig({
  test: {
    root: fileURLToPath(new URL('..', import.meta.url)),
    include: ['tests/**/*.test.ts', 'tests/**/*.test.tsx'],
    exclude: ['tests/e2e/**', 'node_modules/**', ...(long ? [] : ['tests/**/*.long.test.ts'])],
    environment: 'node',
    testTimeout: long ? 3_600_000 : 120_000,
    hookTimeout: 120_000,
    pool: 'threads',
    maxWorkers: 2,
    allowOnly: false,
  },
})
