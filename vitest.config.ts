import { defineConfig } from 'vitest/config'

export default defineConfig({
  test: {
    include: ['tests/**/*.test.ts'],
    exclude: ['tests/end-to-end/**', 'tests/bench/**'],
    testTimeout: 120_000,
    maxWorkers: 2,
  },
})
