// Finds a Chromium for the browser tests, or installs one, and says which.
import { execFileSync } from 'node:child_process'
import { existsSync } from 'node:fs'
import { fileURLToPath } from 'node:url'

const usual = [
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/usr/bin/google-chrome',
  '/usr/bin/google-chrome-stable',
  '/Applications/Google Chrome.app/Contents/MacOS/Google Chrome',
  '/Applications/Chromium.app/Contents/MacOS/Chromium',
  'C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe',
]

/** Arguments that keep a test browser quiet: no sandbox in a container, no connection of its own accord. */
export const chromiumArguments = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
]

/** Path of a Chromium that is here now, or null. CHROMIUM_PATH names one that stands elsewhere. */
export function findChromium() {
  const named = process.env.CHROMIUM_PATH
  if (named) {
    if (existsSync(named)) return named
    throw new Error(`CHROMIUM_PATH names ${named}, and no file is there. Correct it or unset it.`)
  }
  return usual.find((path) => existsSync(path)) ?? testRunnersOwn()
}

/** Like findChromium, but installs one where none is found: by the system's package manager, else the test runner's download. */
export function ensureChromium() {
  const found = findChromium()
  if (found) return { path: found, how: 'found' }
  const run = (command, args) => execFileSync(command, args, { stdio: ['ignore', 'inherit', 'inherit'] })
  if (existsSync('/usr/bin/apt-get') && process.getuid?.() === 0) {
    console.log('No Chromium here: installing the system package `chromium`.')
    run('apt-get', ['update', '-qq'])
    run('apt-get', ['install', '-y', '-qq', 'chromium'])
    const installed = findChromium()
    if (installed) return { path: installed, how: "installed by the system's package manager" }
  }
  console.log("No Chromium here: asking the test runner's download for one.")
  run(process.execPath, ['node_modules/@playwright/test/cli.js', 'install', 'chromium'])
  const downloaded = testRunnersOwn()
  if (downloaded) return { path: downloaded, how: 'downloaded by the test runner' }
  throw new Error('No Chromium could be found or installed. Install one and set CHROMIUM_PATH to its program file.')
}

function testRunnersOwn() {
  try {
    const path = execFileSync(
      process.execPath,
      ['-e', "console.log(require('@playwright/test').chromium.executablePath())"],
      { encoding: 'utf8', stdio: ['ignore', 'pipe', 'ignore'] },
    ).trim()
    return existsSync(path) ? path : null
  } catch {
    return null
  }
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const { path, how } = ensureChromium()
  console.log(`Chromium ${how}: ${path}`)
}
