import { resolve } from 'node:path'

/** How this office runs, from its environment. */
export interface Settings {
  folder: string
  databaseUrl: string | undefined
  host: string
  port: number
  /** The address people reach it by, for codes and links. */
  origin: string
  trustProxy: string[]
  requestsAMinute: number
  logLevel: string
}

const levels = ['debug', 'info', 'warn', 'error', 'silent']

/** Reads the settings; what cannot be meant throws, naming the variable. */
export function readSettings(environment: Readonly<Record<string, string | undefined>>): Settings {
  const port = wholeNumber(environment, 'PORT', 8080, 65_535)
  const host = environment.HOST || '127.0.0.1'
  const logLevel = environment.TAUTLINE_LOG || 'info'
  if (!levels.includes(logLevel)) throw new Error(`TAUTLINE_LOG: one of ${levels.join(', ')}, not "${logLevel}"`)
  const origin = environment.TAUTLINE_ORIGIN || `http://localhost:${port}`
  if (!URL.canParse(origin) || !/^https?:$/.test(new URL(origin).protocol))
    throw new Error(`TAUTLINE_ORIGIN: an address like https://office.example, not "${origin}"`)
  const databaseUrl = environment.DATABASE_URL || undefined
  if (databaseUrl !== undefined && !/^postgres(ql)?:\/\//.test(databaseUrl))
    throw new Error(
      'DATABASE_URL: an address that begins with postgres://, or leave it out for the file in TAUTLINE_DATA',
    )
  return {
    folder: resolve(environment.TAUTLINE_DATA || 'tautline-data'),
    databaseUrl,
    host,
    port,
    origin: new URL(origin).origin,
    trustProxy: (environment.TAUTLINE_TRUST_PROXY ?? '').split(',').filter((one) => one.trim() !== ''),
    requestsAMinute: wholeNumber(environment, 'TAUTLINE_REQUESTS_A_MINUTE', 6000, 1_000_000),
    logLevel,
  }
}

/** The settings in lines for the start of the log; no password in them. */
export function summary(settings: Settings): string[] {
  const { databaseUrl } = settings
  return [
    `data folder      ${settings.folder}   (TAUTLINE_DATA)`,
    `database         ${databaseUrl ? withoutPassword(databaseUrl) : 'office.sqlite in the data folder'}   (DATABASE_URL)`,
    `listens on       ${settings.host}:${settings.port}   (HOST, PORT)`,
    `reached at       ${settings.origin}   (TAUTLINE_ORIGIN)`,
    `trusted proxies  ${settings.trustProxy.join(', ') || 'none'}   (TAUTLINE_TRUST_PROXY)`,
    `rate             ${settings.requestsAMinute} requests a minute from one address   (TAUTLINE_REQUESTS_A_MINUTE)`,
    `log              ${settings.logLevel}   (TAUTLINE_LOG)`,
  ]
}

function withoutPassword(url: string): string {
  if (!URL.canParse(url)) return 'PostgreSQL'
  const shown = new URL(url)
  return `${shown.protocol}//${shown.host || '(socket)'}${shown.pathname}`
}

function wholeNumber(
  environment: Readonly<Record<string, string | undefined>>,
  name: string,
  instead: number,
  most: number,
): number {
  const text = environment[name]
  if (text === undefined || text === '') return instead
  const number = Number(text)
  if (!/^\d+$/.test(text) || number > most) throw new Error(`${name}: a whole number up to ${most}, not "${text}"`)
  return number
}
