import { fileURLToPath } from 'node:url'
import { isMainThread } from 'node:worker_threads'
import { administer, type Command, commands } from './admin.ts'
import { answerAsCore } from './core-thread.ts'
import { serve } from './serve.ts'
import { readSettings } from './settings.ts'

declare const __VERSION__: string

const usage = `Usage: node dist/office.js COMMAND
  serve                                   starts the office and the app (also without a command)
  create-admin [--name NAME] [--branch NAME]   a new administrator, with a one-time code
  enrol --name NAME                       a one-time code for a person who is there
  back-up FOLDER                          everything into a new folder
  restore FOLDER                          a back-up into an empty office
  check                                   reads everything and says what does not fit
Settings come from the environment: TAUTLINE_DATA, DATABASE_URL, HOST, PORT, TAUTLINE_ORIGIN, TAUTLINE_TRUST_PROXY,
TAUTLINE_REQUESTS_A_MINUTE, TAUTLINE_LOG.`

if (isMainThread) await main(process.argv.slice(2))
else answerAsCore()

async function main([command = 'serve', ...rest]: string[]): Promise<void> {
  // What it writes is for this user alone.
  process.umask(0o077)
  try {
    if (command === '--help' || command === 'help') return console.log(usage)
    const settings = readSettings(process.env)
    if (command === 'serve') {
      const file = new URL(import.meta.url)
      return await serve(settings, { file, dist: fileURLToPath(new URL('.', file)), version: __VERSION__ })
    }
    if (!commands.includes(command as Command)) throw new Error(`"${command}" is no command. Try --help.`)
    const { lines, code } = await administer(command as Command, rest, settings, Date.now())
    console.log(lines.join('\n'))
    process.exitCode = code
  } catch (error) {
    console.error(`office: ${error instanceof Error ? error.message : error}`)
    process.exitCode = 2
  }
}
