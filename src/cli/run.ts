import { assess } from './assess.ts'
import { clearance } from './clearance-command.ts'
import { complaint, done, type Ended, type Machine } from './ended.ts'
import { helpText } from './help-text.ts'
import { schema } from './schema.ts'
import { sheet } from './sheet.ts'

/** Set by the build to the package's version. */
declare const __VERSION__: string

const commands: Readonly<Record<string, (args: readonly string[], machine: Machine) => Ended | Promise<Ended>>> = {
  assess,
  clearance,
  sheet,
  schema,
}

/** Runs one command. Reads what it needs through `machine` and writes nothing: that is left to the caller. */
export async function run(args: readonly string[], machine: Machine): Promise<Ended> {
  const [name, ...rest] = args
  if (name === '--help' || rest.includes('--help')) return done(helpText)
  if (name === '--version') return done(`${typeof __VERSION__ === 'string' ? __VERSION__ : 'unbuilt'}\n`)
  const command = name !== undefined && Object.hasOwn(commands, name) ? commands[name] : undefined
  if (!command)
    return complaint(
      name === undefined ? 'no command is given' : `${name} is no command`,
      `commands: ${Object.keys(commands).join(', ')}; --help says more`,
    )
  return command(rest, machine)
}
