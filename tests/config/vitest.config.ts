import path from 'node:path'
import { defineConfig } from 'vitest/config'

const root = path.resolve(import.meta.dirname, '../..')

const resolve = {
  alias: {
    '@': root,
    // Next replaces this package in a server build; plain Node would throw on it.
    'server-only': path.join(root, 'node_modules/server-only/empty.js'),
  },
}

const shared = {
  root,
  environment: 'node',
  // A child process asks the kernel to be ended with its parent thread, so tests run in processes, not threads.
  pool: 'forks',
} as const

export default defineConfig({
  root,
  resolve,
  test: {
    reporters: ['default'],
    passWithNoTests: true,
    projects: [
      {
        resolve,
        test: {
          ...shared,
          name: 'unit',
          include: [
            '{lib,app,db,workers,fake-sensors}/**/*.test.{ts,tsx}',
            'tests/{support,measure}/**/*.test.ts',
          ],
          // Properties draw hundreds of cases; a test that hangs is told all the same.
          testTimeout: 60_000,
          maxWorkers: 2,
        },
      },
      {
        resolve,
        test: {
          ...shared,
          name: 'integration',
          include: ['tests/integration/**/*.test.ts'],
          globalSetup: ['tests/support/global-cluster.ts'],
          testTimeout: 60_000,
          hookTimeout: 60_000,
          maxWorkers: 2,
        },
      },
      {
        resolve,
        test: {
          ...shared,
          name: 'api',
          include: ['tests/api/**/*.test.ts'],
          globalSetup: ['tests/support/global-stack.ts'],
          testTimeout: 30_000,
          hookTimeout: 60_000,
          fileParallelism: false,
        },
      },
      {
        resolve,
        test: {
          ...shared,
          name: 'pages',
          include: ['tests/pages/**/*.test.ts'],
          globalSetup: ['tests/support/global-stack.ts'],
          testTimeout: 90_000,
          hookTimeout: 90_000,
          fileParallelism: false,
          maxConcurrency: 2,
        },
      },
    ],
  },
})
