/** The first letter large, as at the head of a line. */
export function sentence(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1)
}
