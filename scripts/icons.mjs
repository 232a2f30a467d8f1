// Draws the icons of public/ from public/icon.svg: sizes a phone asks for, and one with a margin that a mask may cut.
// Run it after a change of the drawing: `node scripts/icons.mjs`.
import { readFileSync, writeFileSync } from 'node:fs'
import { chromium } from '@playwright/test'
import { chromiumArguments, ensureChromium } from './chromium.mjs'

const drawing = readFileSync('public/icon.svg', 'utf8')
const ground = '#1B1F3B'
// A mask keeps a disc of 80 % of the width: the drawing is brought inside it.
const icons = [
  { file: 'icon-180.png', size: 180, scale: 1, ground },
  { file: 'icon-192.png', size: 192, scale: 1, ground: 'transparent' },
  { file: 'icon-512.png', size: 512, scale: 1, ground: 'transparent' },
  { file: 'icon-maskable-512.png', size: 512, scale: 0.72, ground },
]

const browser = await chromium.launch({ executablePath: ensureChromium().path, args: chromiumArguments })
for (const { file, size, scale, ground } of icons) {
  const page = await browser.newPage({ viewport: { width: size, height: size } })
  await page.setContent(
    `<body style="margin:0;background:${ground};display:grid;place-items:center;height:100vh">` +
      drawing.replace('<svg ', `<svg width="${size * scale}" height="${size * scale}" `),
  )
  writeFileSync(`public/${file}`, await page.screenshot({ omitBackground: true }))
  await page.close()
  console.log(`public/${file}`)
}
await browser.close()
