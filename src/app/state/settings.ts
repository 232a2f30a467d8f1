import { type ReadonlySignal, signal } from '@preact/signals'
import { phoneStore } from './phone.ts'

/** What the person chose on this phone. */
export interface Choices {
  /** The surveyor's name, as it stands in every reading. Empty: not yet told. */
  person: string
  units: 'metric' | 'imperial'
  theme: 'system' | 'light' | 'dark'
  /** The hand that holds the phone: mirrors the rows of keys. */
  hand: 'right' | 'left'
}

const chosen = signal<Choices>({ person: '', units: 'metric', theme: 'system', hand: 'right' })
export const choices: ReadonlySignal<Choices> = chosen

let reading: Promise<void> | null = null

/** Reads the choices once; until then the defaults stand. */
export function readChoices(): Promise<void> {
  reading ??= (async () => {
    const { person, units, theme, hand } = await (await phoneStore()).settings()
    chosen.value = {
      person: typeof person === 'string' ? person : '',
      units: units === 'imperial' ? 'imperial' : 'metric',
      theme: theme === 'light' || theme === 'dark' ? theme : 'system',
      hand: hand === 'left' ? 'left' : 'right',
    }
    show(chosen.value)
  })()
  return reading
}

/** Keeps a choice; shown at once, and taken back where it could not be kept. */
export async function choose(
  change: Partial<Choices>,
): Promise<{ saved: true } | { saved: false; what: string; whatToDo: string }> {
  const before = chosen.value
  chosen.value = { ...before, ...change }
  show(chosen.value)
  const kept = await (await phoneStore()).changeSettings(change)
  if (!kept.saved) {
    chosen.value = before
    show(before)
  }
  return kept
}

function show({ theme, hand }: Choices) {
  const { dataset } = document.documentElement
  dataset.hand = hand
  if (theme === 'system') delete dataset.theme
  else dataset.theme = theme
}
