import { phoneStore } from './phone.ts'

/** A form half filled in, kept on this phone until it is saved. `null` forgets it. */
export async function keepForm(name: string, texts: Readonly<Record<string, string>> | null): Promise<void> {
  await (await phoneStore()).keepDraft(`form ${name}`, texts)
}

export async function readForm(name: string): Promise<Record<string, string> | null> {
  const kept = await (await phoneStore()).readDraft(`form ${name}`)
  if (typeof kept !== 'object' || kept === null) return null
  return Object.fromEntries(Object.entries(kept).filter((one): one is [string, string] => typeof one[1] === 'string'))
}
