import { defineConfig } from 'vitest/config'

/** The office against both databases: a real PostgreSQL is started for it, and the program is built once. */
export default defineConfig({
  test: {
    root: new URL('../..', import.meta.url).pathname,
    include: ['tests/office/**/*.spec.ts'],
    globalSetup: ['tests/office/global-setup.ts'],
    pool: 'forks',
    maxWorkers: 2,
    testTimeout: 120_000,
    hookTimeout: 60_000,
  },
})
