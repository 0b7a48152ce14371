/** Five suites. Only `api` needs a database and only `launch` and `e2e` start processes, so each can be run alone and quickly. */
import { defineConfig } from 'vitest/config'

// before any worker starts: every process of Felloe counts in UTC
process.env.TZ = 'UTC'

export default defineConfig({
  test: {
    maxWorkers: 2,
    projects: [
      {
        test: {
          name: 'core',
          environment: 'node',
          include: ['tests/core/**/*.test.ts', 'tests/*.test.ts'],
          testTimeout: 30_000,
        },
      },
      {
        test: {
          name: 'api',
          environment: 'node',
          include: ['tests/api/**/*.test.ts'],
          globalSetup: ['tests/support/global-setup.ts'],
          testTimeout: 20_000,
          hookTimeout: 30_000,
        },
      },
      {
        test: {
          name: 'ui',
          environment: 'jsdom',
          include: ['tests/ui/**/*.test.{ts,tsx}'],
          setupFiles: ['tests/support/ui-setup.ts'],
          testTimeout: 15_000,
        },
      },
      {
        test: {
          name: 'launch',
          environment: 'node',
          include: ['tests/launch/**/*.test.ts'],
          // whole starts and stops, one after the other: they measure time and count processes
          sequence: { groupOrder: 1 },
          maxWorkers: 1,
          testTimeout: 120_000,
          hookTimeout: 120_000,
        },
      },
      {
        test: {
          name: 'e2e',
          environment: 'node',
          include: ['tests/e2e/**/*.e2e.ts'],
          globalSetup: ['tests/e2e/global-setup.ts'],
          // one shop for all files, so one file at a time
          sequence: { groupOrder: 2 },
          maxWorkers: 1,
          // the whole path takes a minute on a quiet machine
          testTimeout: 300_000,
          hookTimeout: 120_000,
        },
      },
    ],
  },
})
