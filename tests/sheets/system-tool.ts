import { spawnSync } from 'node:child_process'

/**
 * Sees to it that a program of Debian is there: found, or installed where the tests run as root (as in continuous
 * integration). Otherwise says what to install.
 */
export function needTool(tool: string, debian: string): void {
  if (found(tool)) return
  if (process.getuid?.() === 0) {
    const install = () =>
      spawnSync('apt-get', ['install', '-y', '-q', '--no-install-recommends', debian], { stdio: 'ignore' })
    if (install().status !== 0) {
      spawnSync('apt-get', ['update', '-q'], { stdio: 'ignore' })
      install()
    }
  }
  if (!found(tool))
    throw new Error(`These tests read sheets with ${tool}: install it, on Debian by "apt-get install ${debian}".`)
}

function found(tool: string): boolean {
  return spawnSync('which', [tool], { stdio: 'ignore' }).status === 0
}

/** Standard output of a program fed with `input`. A complaint on its standard error is a failure too, but for `known`. */
export function run(tool: string, args: string[], input: string | Uint8Array = '', known = /^$/): string {
  const { status, stdout, stderr } = spawnSync(tool, args, { input, encoding: 'utf8', maxBuffer: 64_000_000 })
  if (status !== 0 || !(stderr.trim() === '' || known.test(stderr)))
    throw new Error(`${tool} ${args.join(' ')}: ${status} ${stderr}`)
  return stdout
}
