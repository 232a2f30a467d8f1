import { type Complaint, complaint } from './ended.ts'

export interface Args {
  places: string[]
  values: Readonly<Record<string, string>>
  flags: ReadonlySet<string>
}

export interface Known {
  /** Options that take a value. */
  values: readonly string[]
  /** Options that take none. */
  flags?: readonly string[]
  /** How many words without an option: exactly. */
  places: number
  /** What a word stands for: "FILE". */
  place: string
}

/** `--name value`, `--name=value` and `--flag`; what is not known, twice or missing is a complaint. */
export function readArgs(args: readonly string[], known: Known): { ok: true; args: Args } | Complaint {
  const places: string[] = []
  const values: Record<string, string> = {}
  const flags = new Set<string>()
  for (let i = 0; i < args.length; i++) {
    const word = args[i] ?? ''
    if (!word.startsWith('--')) {
      places.push(word)
      continue
    }
    const [name = '', ...given] = word.slice(2).split('=')
    if (known.flags?.includes(name) && given.length === 0) flags.add(name)
    else if (known.values.includes(name)) {
      const value = given.length > 0 ? given.join('=') : args[++i]
      if (value === undefined || value === '') return complaint(`--${name} has no value`, `write --${name} VALUE`)
      if (Object.hasOwn(values, name)) return complaint(`--${name} is given twice`, 'keep one')
      values[name] = value
    } else return complaint(`--${name} is no option of this command`, `options: ${optionsOf(known)}`)
  }
  if (places.length !== known.places)
    return complaint(
      places.length < known.places ? `no ${known.place} is given` : `"${places.at(-1)}" is one word too many`,
      known.places === 0 ? 'leave it out' : `give one ${known.place}`,
    )
  return { ok: true, args: { places, values, flags } }
}

function optionsOf({ values, flags = [] }: Known): string {
  return [...values, ...flags].map((name) => `--${name}`).join(', ')
}

/** One of the words an option takes, or what it takes. */
export function oneOf<Word extends string>(
  name: string,
  value: string | undefined,
  words: readonly Word[],
): { ok: true; word: Word } | Complaint {
  const word = words.find((one) => one === value)
  if (word !== undefined) return { ok: true, word }
  return complaint(
    value === undefined ? `--${name} is not given` : `--${name} ${value} is not known`,
    `write --${name} with one of ${words.join(', ')}`,
  )
}

/** A day that exists, YYYY-MM-DD. */
export function isDay(text: string): boolean {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(text)) return false
  const day = new Date(`${text}T00:00:00Z`)
  return !Number.isNaN(day.getTime()) && day.toISOString().startsWith(text)
}
