/**
 * The device under which a hand-written file's facts are kept: the same text gives the same name, so that two phones that
 * read one file hold the same facts, and a file that was changed never forks the facts of the one before.
 * Two rounds of a 32-bit multiplicative hash (FNV-1a), which tells texts apart and protects nothing.
 */
export function deviceOfText(text: string): string {
  return `file-${hash(text, 0x811c9dc5)}${hash(text, 0x01000193)}`
}

function hash(text: string, seed: number): string {
  let sum = seed
  for (let i = 0; i < text.length; i++) sum = Math.imul(sum ^ text.charCodeAt(i), 0x01000193)
  return (sum >>> 0).toString(16).padStart(8, '0')
}
