const longest = 80

/**
 * Names of files for ids of walks, which are anything: letters, digits, dot, dash and underscore stay, the rest becomes a
 * dash, and two that come out alike (on a disk that knows no capitals too) are numbered.
 */
export function fileNames(ids: readonly string[]): Map<string, string> {
  const names = new Map<string, string>()
  const taken = new Set<string>()
  for (const id of ids) {
    const plain =
      id
        .normalize('NFC')
        .replace(/[^\p{L}\p{M}\p{N}._-]+/gu, '-')
        .replace(/^[.-]+|[.-]+$/g, '')
        .slice(0, longest) || 'walk'
    let name = plain
    for (let n = 2; taken.has(name.toLowerCase()); n++) name = `${plain}-${n}`
    taken.add(name.toLowerCase())
    names.set(id, name)
  }
  return names
}
