import { playwright } from '@vitest/browser-playwright'
import { defineConfig } from 'vitest/config'

// The store is tried where it lives: in a real Chromium with its real IndexedDB.
export default defineConfig({
  root: new URL('../..', import.meta.url).pathname,
  optimizeDeps: { include: ['idb', 'valibot', 'fast-check'] },
  test: {
    include: ['tests/store/**/*.spec.ts'],
    testTimeout: 60_000,
    browser: {
      enabled: true,
      headless: true,
      screenshotFailures: false,
      provider: playwright({
        launchOptions: {
          executablePath: process.env.CHROMIUM_PATH ?? '/usr/bin/chromium',
          args: [
            '--no-sandbox',
            '--disable-gpu',
            '--disable-quic',
            '--no-first-run',
            '--disable-background-networking',
            '--disable-component-update',
            '--disable-sync',
          ],
        },
      }),
      instances: [
        { browser: 'chromium', name: 'store', exclude: ['**/quota.spec.ts'] },
        // A browser of its own: Chromium remembers for a while how much room an origin has.
        { browser: 'chromium', name: 'full phone', include: ['tests/store/quota.spec.ts'] },
      ],
    },
  },
})
