import { defineConfig } from 'vitest/config'
import react from '@vitejs/plugin-react'

/** A browser, its server and a database are slow to bring up on a busy machine; a test that hangs still ends. */
const minutes = 60_000

const quiet = './tests/support/quiet-console.ts'

export default defineConfig({
  test: {
    maxWorkers: 2,
    projects: [
      {
        test: {
          name: 'unit',
          environment: 'node',
          include: ['shared/**/*.test.ts', 'server/**/*.test.ts', 'src/**/*.test.ts'],
          setupFiles: [quiet],
          testTimeout: minutes / 2,
        },
      },
      {
        plugins: [react()],
        test: {
          name: 'dom',
          environment: 'jsdom',
          include: ['src/**/*.test.tsx'],
          setupFiles: [quiet, './tests/support/dom.ts'],
          testTimeout: minutes / 2,
        },
      },
      {
        test: {
          name: 'reference',
          environment: 'node',
          include: ['tests/reference/**/*.test.ts'],
          setupFiles: [quiet],
          testTimeout: minutes,
        },
      },
      {
        test: {
          name: 'architecture',
          environment: 'node',
          include: ['tests/architecture/**/*.test.ts'],
          setupFiles: [quiet],
          testTimeout: minutes,
        },
      },
      {
        test: {
          name: 'api',
          environment: 'node',
          include: ['tests/api/**/*.test.ts'],
          globalSetup: ['./tests/support/start-database.ts'],
          setupFiles: [quiet, './tests/support/api-setup.ts'],
          testTimeout: 30_000,
          hookTimeout: minutes,
        },
      },
      {
        test: {
          name: 'faults',
          environment: 'node',
          include: ['tests/faults/**/*.test.ts'],
          globalSetup: ['./tests/support/start-database.ts', './tests/support/build-client.ts'],
          setupFiles: [quiet],
          testTimeout: 30 * minutes,
          hookTimeout: 2 * minutes,
          fileParallelism: false,
        },
      },
      {
        test: {
          name: 'e2e',
          environment: 'node',
          include: ['tests/e2e/**/*.test.ts'],
          globalSetup: ['./tests/support/start-database.ts', './tests/support/build-client.ts'],
          setupFiles: ['./tests/support/e2e-setup.ts'],
          testTimeout: 5 * minutes,
          hookTimeout: 2 * minutes,
          fileParallelism: false,
        },
      },
    ],
  },
})
