// Takes pictures of every screen into pictures/, and tells what an accessibility checker finds on each.
// Needs a build in dist/. `node scripts/pictures.mjs [screen ...]` takes those screens alone.
import { spawn } from 'node:child_process'
import { mkdirSync } from 'node:fs'
import { chromium } from '@playwright/test'
import axe from 'axe-core'
import { chromiumArguments, ensureChromium } from './chromium.mjs'

const survey = '/venue/demo-museum'

/** What each picture shows: an address, and what is done there before it is taken. */
const screens = {
  venues: { at: '/' },
  venue: { at: survey },
  plan: { at: survey, act: (page) => page.locator('summary', { hasText: /^Plan$/ }).click() },
  zones: { at: survey, act: (page) => openAll(page, 'Zones') },
  'new-walk': { at: survey, act: (page) => page.locator('summary', { hasText: 'New walk' }).click() },
  strip: { at: 'walk' },
  leave: { at: 'walk', page: '/leave' },
  ladder: { at: 'walk', page: '/ladder' },
  sheet: { at: 'walk', page: '/sheet' },
  'sheet-venue': {
    at: 'walk',
    page: '/sheet',
    act: (page) => page.getByRole('radio', { name: 'Venue manager' }).check({ force: true }),
  },
  team: { at: survey, page: '/team' },
  settings: { at: '/settings' },
  nowhere: { at: '/no/such/page' },
}

/** How it is looked at. Text of 200 % is the browser's own larger text, which every length in rem follows. */
const looks = {
  phone: { size: { width: 390, height: 844 } },
  small: { size: { width: 320, height: 568 } },
  dark: { size: { width: 390, height: 844 }, media: { colorScheme: 'dark' } },
  forced: { size: { width: 390, height: 844 }, media: { forcedColors: 'active' } },
  large: { size: { width: 390, height: 844 }, text: '225%' },
  desk: { size: { width: 1280, height: 800 } },
}

const wanted = process.argv.slice(2)
const server = spawn(process.execPath, ['scripts/serve.mjs'], { env: { ...process.env, PORT: '0' } })
const address = await new Promise((resolve, reject) => {
  server.stdout.on('data', (chunk) => {
    const found = /http:\/\/localhost:\d+/.exec(String(chunk))
    if (found) resolve(found[0])
  })
  server.on('exit', (code) => reject(new Error(`the server stopped with ${code}`)))
})
const browser = await chromium.launch({ executablePath: ensureChromium().path, args: chromiumArguments })
mkdirSync('pictures', { recursive: true })

let faults = 0
try {
  const page = await browser.newPage({ viewport: looks.phone.size })
  page.setDefaultTimeout(240_000)
  page.on('pageerror', (error) => fault(error.message))
  page.on('console', (message) => {
    if (message.type() === 'error' || message.type() === 'warning') fault(message.text())
  })
  await page.goto(address)
  await page.getByRole('button', { name: /Quern/ }).click()
  await page.waitForURL(/\/venue\//)
  // The first judgement works out every corner; later ones remember.
  await page.locator('.verdict').first().waitFor()
  const walk = await page.locator('a.key.primary').first().getAttribute('href')
  for (const [screen, { at, act, page: under = '' }] of Object.entries(screens)) {
    if (wanted.length > 0 && !wanted.includes(screen)) continue
    await page.goto(address + (at === 'walk' ? walk : at) + under)
    await page.locator('h1').first().waitFor()
    await page.getByText('Judging', { exact: true }).first().waitFor({ state: 'detached' })
    await act?.(page)
    for (const [look, { size, media = {}, text = '' }] of Object.entries(looks)) {
      await page.setViewportSize(size)
      await page.emulateMedia({ colorScheme: 'light', forcedColors: 'none', reducedMotion: 'reduce', ...media })
      await page.evaluate((percent) => document.documentElement.style.setProperty('font-size', percent), text)
      await page.waitForTimeout(400)
      await page.screenshot({ path: `pictures/${screen}-${look}.png`, fullPage: screen !== 'strip' })
      const wide = await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)
      if (wide > 0) fault(`${screen}, ${look}: ${wide} px wider than the screen`)
      if (look === 'phone' || look === 'dark' || look === 'desk') await check(page, screen, look)
    }
  }
} finally {
  await browser.close()
  server.kill()
}
console.log(`pictures/: done, ${faults} faults`)
process.exitCode = faults > 0 ? 1 : 0

async function openAll(page, title) {
  await page.locator('summary', { hasText: title }).click()
  for (const inner of await page.locator('details details summary').all())
    if (await inner.isVisible()) await inner.click()
}

/** The page's policy lets no script in from outside; the browser's own debugger may. */
async function check(page, screen, look) {
  await page.evaluate(axe.source)
  const { violations } = await page.evaluate(() => globalThis.axe.run(document, { iframes: false }))
  for (const { id, help, nodes } of violations)
    fault(
      `${screen}, ${look}: ${id}: ${help}: ${nodes
        .slice(0, 3)
        .map((node) => node.html.slice(0, 140))
        .join(' | ')}`,
    )
}

function fault(text) {
  faults += 1
  console.error(text)
}
