import { type ChildProcess, spawn } from 'node:child_process'
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { type BrowserContext, chromium, type Page } from '@playwright/test'
import { chromiumArguments, findChromium } from '../../scripts/chromium.mjs'

/** The built app behind its own server, which a test can stop for good. */
export class AppServer {
  private process: ChildProcess | null = null
  address = ''

  async start(): Promise<string> {
    this.process = spawn(process.execPath, ['scripts/serve.mjs'], { env: { ...process.env, PORT: '0' } })
    this.address = await new Promise<string>((resolve, reject) => {
      let said = ''
      this.process?.stdout?.on('data', (chunk) => {
        said += chunk
        const address = /http:\/\/(localhost|127\.0\.0\.1):\d+/.exec(said)
        if (address) resolve(address[0])
      })
      this.process?.on('exit', (code) => reject(new Error(`the server stopped with ${code}: ${said}`)))
    })
    return this.address
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
}

/** A wall that every request for another machine runs into: what it saw is the evidence that nothing left. */
export class OutsideWall {
  private server: Server = createServer((request, response) => {
    this.seen.push(`${request.method} ${request.url}`)
    response.writeHead(502).end()
  })
  private readonly seen: string[] = []

  /** Requests for another machine that are not the browser's own. */
  left(): string[] {
    return this.seen.filter((request) => !browsersOwn.test(request))
  }

  async start(): Promise<number> {
    this.server.on('connect', (request, socket) => {
      this.seen.push(`CONNECT ${request.url}`)
      socket.end('HTTP/1.1 502 Bad Gateway\r\n\r\n')
    })
    await new Promise<void>((resolve) => this.server.listen(0, '127.0.0.1', resolve))
    return (this.server.address() as AddressInfo).port
  }

  stop(): void {
    this.server.close()
  }
}

/**
 * What the desktop browser asks of its maker by itself (sign-in, form filling, its own updates), whatever page is shown. The app could not
 * ask these: its own policy lets it connect to its own address alone, and `Phone.asked` holds every request of its pages.
 */
const browsersOwn = /^(CONNECT |[A-Z]+ https?:\/\/)[\w-]+\.(google|googleapis|gvt1)\.com[:/]/

/** A phone-sized Chromium with a profile that outlives the browser process. */
export class Phone {
  readonly profile = mkdtempSync(join(tmpdir(), 'tautline-phone-'))
  context: BrowserContext | null = null
  /** Addresses that the app's pages and its service worker asked for. */
  readonly asked: string[] = []

  private readonly wallPort: number
  private readonly options: Parameters<typeof chromium.launchPersistentContext>[1]

  constructor(wallPort: number, options: Parameters<typeof chromium.launchPersistentContext>[1] = {}) {
    this.wallPort = wallPort
    this.options = options
  }

  async open(): Promise<Page> {
    const executablePath = findChromium()
    if (!executablePath) throw new Error('no Chromium: run `node scripts/chromium.mjs`')
    this.context = await chromium.launchPersistentContext(this.profile, {
      executablePath,
      args: [
        ...chromiumArguments,
        `--proxy-server=http://127.0.0.1:${this.wallPort}`,
        '--proxy-bypass-list=127.0.0.1;localhost',
      ],
      viewport: { width: 390, height: 844 },
      deviceScaleFactor: 2,
      hasTouch: true,
      isMobile: true,
      ...this.options,
    })
    this.context.on('request', (request) => this.asked.push(request.url()))
    return this.context.pages()[0] ?? (await this.context.newPage())
  }

  /** Kills the browser process as a flat battery would: no page is told. */
  async kill(): Promise<void> {
    for (const pid of this.browserProcesses()) process.kill(pid, 'SIGKILL')
    await this.context?.close().catch(() => undefined)
    this.context = null
    for (const name of readdirSync(this.profile))
      if (name.startsWith('Singleton')) rmSync(join(this.profile, name), { force: true })
  }

  async close(): Promise<void> {
    await this.context?.close().catch(() => undefined)
    this.context = null
    rmSync(this.profile, { recursive: true, force: true, maxRetries: 5, retryDelay: 200 })
  }

  private browserProcesses(): number[] {
    return readdirSync('/proc')
      .filter((name) => /^\d+$/.test(name))
      .filter((pid) => {
        try {
          const line = readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0')
          return (
            line.some((part) => part === `--user-data-dir=${this.profile}`) &&
            !line.some((part) => part.startsWith('--type='))
          )
        } catch {
          return false
        }
      })
      .map(Number)
  }
}
