import { defineConfig } from '@playwright/test'

export default defineConfig({
  testDir: '.',
  outputDir: '../../test-results/end-to-end',
  timeout: 480_000,
  expect: { timeout: 20_000 },
  use: { actionTimeout: 30_000 },
  workers: 1,
  retries: 0,
  forbidOnly: true,
  reporter: [['list'], ['json', { outputFile: '../../test-results/end-to-end.json' }]],
})
