import { playwright } from '@vitest/browser-playwright'
import { defineConfig } from 'vitest/config'
import { chromiumArguments, findChromium } from '../../scripts/chromium.mjs'

const path = findChromium()

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
          ...(path ? { executablePath: path } : {}),
          args: chromiumArguments,
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
