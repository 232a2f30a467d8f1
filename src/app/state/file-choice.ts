/** Longest survey or team file read, bytes; a longer one is refused before it is read. */
const longest = 60_000_000

export type ChosenFile = { ok: true; name: string; text: string } | { ok: false; what: string }

/** The text of a file that a person chose. */
export async function textOf(file: File, most = longest): Promise<ChosenFile> {
  if (file.size > most) return { ok: false, what: `${file.name} is too large to be read here.` }
  try {
    return { ok: true, name: file.name, text: await file.text() }
  } catch {
    return { ok: false, what: `${file.name} could not be read. Choose it again.` }
  }
}
