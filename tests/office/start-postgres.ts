import { type ChildProcess, execFileSync, spawn, spawnSync } from 'node:child_process'
import { chownSync, existsSync, mkdtempSync, readdirSync, rmSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import pg from 'pg'

/** Starts a PostgreSQL of its own in a temporary folder. Where none is installed, root installs Debian's. */
export async function startPostgres(): Promise<{ address: string; stop(): Promise<void> }> {
  const programs = findPrograms() ?? installed()
  const folder = mkdtempSync(join(tmpdir(), 'tautline-postgres-'))
  const owner = unprivileged()
  if (owner) chownSync(folder, owner.uid, owner.gid)
  const as = { ...(owner ?? {}), cwd: folder, stdio: 'pipe' as const }
  const data = join(folder, 'data')
  const made = spawnSync(
    join(programs, 'initdb'),
    ['-D', data, '-U', 'tautline', '-A', 'trust', '-E', 'UTF8', '--locale=C'],
    as,
  )
  if (made.status !== 0) throw new Error(`initdb failed: ${made.stderr}`)
  const port = await freePort()
  const flags = ['-D', data, '-h', '127.0.0.1', '-p', String(port), '-k', folder, '-N', '200']
  const server = spawn(join(programs, 'postgres'), flags, as)
  let said = ''
  server.stderr?.on('data', (chunk) => {
    said += chunk
  })
  const address = `postgres://tautline@127.0.0.1:${port}`
  await answered(`${address}/postgres`, server, () => said)
  return {
    address,
    async stop() {
      const ended = new Promise((resolve) => server.once('exit', resolve))
      // Fast shutdown: open connections are ended.
      server.kill('SIGINT')
      await ended
      rmSync(folder, { recursive: true, force: true })
    },
  }
}

function findPrograms(): string | null {
  const home = '/usr/lib/postgresql'
  const versions = existsSync(home) ? readdirSync(home).sort((a, b) => Number(b) - Number(a)) : []
  const found = versions.map((version) => join(home, version, 'bin')).find((path) => existsSync(join(path, 'initdb')))
  if (found) return found
  const which = spawnSync('sh', ['-c', 'dirname "$(readlink -f "$(command -v initdb)")"'], { encoding: 'utf8' })
  const path = which.stdout.trim()
  return path !== '' && existsSync(join(path, 'initdb')) ? path : null
}

function installed(): string {
  const how = 'These tests need a real PostgreSQL: install Debian’s package "postgresql", or put initdb on the PATH.'
  if (process.getuid?.() !== 0) throw new Error(how)
  const environment = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  const done = spawnSync('apt-get', ['install', '-y', 'postgresql'], { env: environment, encoding: 'utf8' })
  const programs = findPrograms()
  if (!programs) throw new Error(`${how}\napt-get said: ${done.stderr}`)
  return programs
}

/** PostgreSQL does not run as root: whom it runs as instead, or null where we are nobody special already. */
function unprivileged(): { uid: number; gid: number } | null {
  if (process.getuid?.() !== 0) return null
  for (const name of ['postgres', 'nobody'])
    try {
      const of = (flag: string) => Number(execFileSync('id', [flag, name], { encoding: 'utf8', stdio: 'pipe' }))
      return { uid: of('-u'), gid: of('-g') }
    } catch {
      // Not on this machine: the next one.
    }
  throw new Error('These tests start PostgreSQL as the user "postgres" or "nobody", and neither is there.')
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.once('error', reject)
    server.listen(0, '127.0.0.1', () => {
      const address = server.address()
      server.close(() =>
        typeof address === 'object' && address ? resolve(address.port) : reject(new Error('no port')),
      )
    })
  })
}

async function answered(address: string, server: ChildProcess, said: () => string): Promise<void> {
  for (let attempt = 0; attempt < 150; attempt++) {
    if (server.exitCode !== null) throw new Error(`PostgreSQL ended at once: ${said()}`)
    const client = new pg.Client({ connectionString: address })
    try {
      await client.connect()
      await client.end()
      return
    } catch {
      await new Promise((resolve) => setTimeout(resolve, 200))
    }
  }
  throw new Error(`PostgreSQL does not answer: ${said()}`)
}
