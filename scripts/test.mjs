// Runs every suite, one after the other, and closes with one line of totals.
// `node scripts/test.mjs` is `npm test`; with --long the full counts of trials, scenes and schedules.
import { spawnSync } from 'node:child_process'
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { ensureChromium } from './chromium.mjs'

const long = process.argv.includes('--long')
const { path, how } = ensureChromium()
console.log(`Chromium ${how}: ${path}`)
if (isStale() && run('npm', ['run', 'build']) !== 0) process.exit(1)

rmSync('test-results', { recursive: true, force: true })
mkdirSync('test-results', { recursive: true })
const suites = [
  { name: 'core', report: 'core.json', command: ['vitest', 'run', ...vitestReport('core.json')] },
  {
    name: 'store, in Chromium',
    report: 'store.json',
    command: ['vitest', 'run', '--config', 'tests/store/vitest.config.ts', ...vitestReport('store.json')],
  },
  {
    name: 'office, on SQLite and PostgreSQL',
    report: 'office.json',
    command: ['vitest', 'run', '--config', 'tests/office/vitest.config.ts', ...vitestReport('office.json')],
  },
  {
    name: 'end to end, in Chromium',
    report: 'end-to-end.json',
    command: ['playwright', 'test', '--config', 'tests/end-to-end/playwright.config.ts'],
  },
]

let passed = 0
let failed = 0
let skipped = 0
let broken = false
for (const suite of suites) {
  console.log(`\n== ${suite.name}`)
  const status = run('npx', ['--no-install', ...suite.command])
  const counts = countsOf(`test-results/${suite.report}`)
  passed += counts.passed
  failed += counts.failed
  skipped += counts.skipped
  if (status !== 0 || counts.passed === 0) broken = true
}
console.log(`\n${passed} passed, ${failed} failed${skipped ? `, ${skipped} skipped` : ''}`)
process.exit(broken || failed > 0 ? 1 : 0)

/** The built app is what the browser tests drive: true where it is missing or older than what it was built from. */
function isStale() {
  const made = ['dist/index.html', 'dist/cli.js', 'dist/office.js']
  if (!made.every(existsSync)) return true
  const built = Math.min(...made.map((path) => statSync(path).mtimeMs))
  const newest = (path) =>
    statSync(path).isDirectory()
      ? Math.max(0, ...readdirSync(path).map((name) => newest(join(path, name))))
      : statSync(path).mtimeMs
  return ['src', 'public', 'demo-venues', 'package.json'].some((path) => newest(path) > built)
}

function run(command, args) {
  const env = { ...process.env, CHROMIUM_PATH: path, ...(long ? { TAUTLINE_LONG: '1' } : {}) }
  return spawnSync(command, args, { stdio: 'inherit', env }).status ?? 1
}

function vitestReport(file) {
  return ['--reporter=default', '--reporter=json', `--outputFile.json=test-results/${file}`]
}

/** Totals of a suite's own report; none at all where it wrote none, which counts as broken. */
function countsOf(file) {
  if (!existsSync(file)) return { passed: 0, failed: 1, skipped: 0 }
  const report = JSON.parse(readFileSync(file, 'utf8'))
  if (report.stats)
    return {
      passed: report.stats.expected + report.stats.flaky,
      failed: report.stats.unexpected,
      skipped: report.stats.skipped,
    }
  return { passed: report.numPassedTests, failed: report.numFailedTests, skipped: report.numPendingTests }
}
