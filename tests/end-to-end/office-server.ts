import { type ChildProcess, spawn } from 'node:child_process'
import { existsSync, mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

const program = 'dist/office.js'

/** The office's own program on an embedded file, serving the built app; stopped and started again on the same data. */
export class OfficeServer {
  private readonly folder = mkdtempSync(join(tmpdir(), 'tautline-office-'))
  private process: ChildProcess | null = null
  private port = 0
  private administrator = ''
  address = ''

  async start(): Promise<string> {
    if (!existsSync(program)) throw new Error(`${program} is not built: run \`npm run build\``)
    const env = { ...process.env, PORT: String(this.port), TAUTLINE_DATA: this.folder, TAUTLINE_LOG: 'silent' }
    const running = spawn(process.execPath, [program], { env })
    this.process = running
    const said = await new Promise<string>((resolve, reject) => {
      let text = ''
      running.stderr.on('data', (chunk) => {
        text += chunk
      })
      running.stdout.on('data', (chunk) => {
        text += chunk
        if (/Tautline's office is at http:\S+:\d+/.test(text)) resolve(text)
      })
      running.on('exit', (code) => reject(new Error(`the office stopped with ${code}: ${text}`)))
    })
    this.port = Number(/office is at http:\S+:(\d+)/.exec(said)?.[1])
    this.address = `http://localhost:${this.port}`
    if (this.administrator === '') {
      const code = /One-time code for Administrator: (\S+)/.exec(said)?.[1] ?? ''
      const { token } = await this.ask('POST', '/api/enrol', { code, label: 'desk', record: '' })
      this.administrator = token
    }
    return this.address
  }

  /** Asks as the administrator. */
  // What comes back is looked at, not typed.
  // biome-ignore lint/suspicious/noExplicitAny: answers of several routes
  async ask(method: 'GET' | 'POST' | 'PUT' | 'DELETE', path: string, body?: object): Promise<any> {
    const reply = await fetch(`${this.address}${path}`, {
      method,
      headers: {
        ...(this.administrator === '' ? {} : { authorization: `Bearer ${this.administrator}` }),
        ...(body ? { 'content-type': 'application/json' } : {}),
      },
      ...(body ? { body: JSON.stringify(body) } : {}),
    })
    const answer = await reply.json()
    if (!reply.ok) throw new Error(JSON.stringify(answer))
    return answer
  }

  /** A new surveyor's one-time code. */
  async invite(name: string): Promise<string> {
    return (await this.ask('POST', '/api/people', { name, role: 'surveyor' })).code
  }

  /** Ends the access of every device of that name. */
  async revoke(label: string): Promise<void> {
    const { devices } = await this.ask('GET', '/api/people')
    for (const one of devices as { device: string; label: string }[])
      if (one.label === label) await this.ask('POST', `/api/devices/${one.device}/revoke`)
  }

  async stop(): Promise<void> {
    const running = this.process
    this.process = null
    if (!running || running.exitCode !== null) return
    await new Promise<void>((resolve) => {
      running.on('exit', () => resolve())
      running.kill('SIGKILL')
    })
  }

  async end(): Promise<void> {
    await this.stop()
    rmSync(this.folder, { recursive: true, force: true })
  }
}
