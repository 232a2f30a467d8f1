import { spawnSync } from 'node:child_process'

/** A first installation may take minutes: the timeout for a hook that calls `needTool`. */
export const toInstall = 300_000

/**
 * Sees to it that a program of Debian is there: found, or installed where the tests run as root (as in continuous
 * integration). Otherwise says what to install. Test files run side by side: each waits for the other's installation.
 */
export function needTool(tool: string, debian: string): void {
  const apt = (...args: string[]) =>
    spawnSync('apt-get', ['-q', '-o', 'DPkg::Lock::Timeout=120', ...args], { stdio: 'ignore' })
  for (let attempt = 0; attempt < 3 && !found(tool) && process.getuid?.() === 0; attempt++) {
    if (attempt > 0) apt('update')
    apt('install', '-y', '--no-install-recommends', debian)
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
