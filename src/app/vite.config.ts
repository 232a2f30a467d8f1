import { createHash } from 'node:crypto'
import preact from '@preact/preset-vite'
import { defineConfig, type Plugin } from 'vite'
import { VitePWA } from 'vite-plugin-pwa'
import { extras } from '../../scripts/extras.ts'
import { style } from '../sheets/html/style.ts'

/** Paths are from this folder: the page lives in src/app, the build goes to dist. */
export default defineConfig({
  root: import.meta.dirname,
  publicDir: '../../public',
  build: {
    outDir: '../../dist',
    emptyOutDir: true,
    manifest: true,
    // A data: address for a small picture would need a wider policy than 'self'.
    assetsInlineLimit: 0,
    modulePreload: { polyfill: false },
  },
  worker: { format: 'es' },
  plugins: [
    preact({ reactAliasesEnabled: false }),
    contentPolicy(),
    extras(),
    VitePWA({
      strategies: 'injectManifest',
      srcDir: '../service-worker',
      filename: 'sw.ts',
      registerType: 'prompt',
      injectRegister: false,
      // public/manifest.webmanifest is written by hand.
      manifest: false,
      injectManifest: {
        globPatterns: ['**/*.{js,css,html,svg,webmanifest}'],
        globIgnores: ['cli.js', 'sw.js', 'extras/**'],
      },
    }),
  ],
})

/** Nothing may be asked of another machine, and no script may stand in the page. In development the bundler's client needs more. */
function contentPolicy(): Plugin {
  return {
    name: 'content-policy',
    apply: 'build',
    transformIndexHtml: (html) => {
      if (/<script(?![^>]*\bsrc=)/.test(html))
        throw new Error('index.html has a script of its own: move it into a file')
      return [
        {
          tag: 'meta',
          attrs: { 'http-equiv': 'Content-Security-Policy', content: policy.join('; ') },
          injectTo: 'head-prepend',
        },
      ]
    },
  }
}

// A previewed sheet carries its one style inside and stands under this page's policy: its hash lets it through.
const sheetStyle = `'sha256-${createHash('sha256').update(style).digest('base64')}'`

const policy = [
  "default-src 'none'",
  "script-src 'self'",
  `style-src 'self' ${sheetStyle}`,
  "img-src 'self' blob: data:",
  "connect-src 'self'",
  "worker-src 'self'",
  "manifest-src 'self'",
  "base-uri 'none'",
  "form-action 'none'",
]
