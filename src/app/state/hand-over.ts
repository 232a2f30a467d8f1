/** A text handed out of the app: to the browser's downloads, or by the phone's share sheet. Only ever by a person's key. */
export interface TextFile {
  name: string
  /** MIME type. */
  type: string
  text: string
}

/** "quern-house-museum-2026-11-30.json" */
export function fileName(what: string, extension: string, day?: string): string {
  const plain = what
    .normalize('NFKD')
    .replace(/[^\w\s-]/g, '')
    .trim()
    .toLowerCase()
    .replace(/[\s_]+/g, '-')
  return `${[plain || 'tautline', day].filter(Boolean).join('-')}.${extension}`
}

export function saveFile({ name, type, text }: TextFile): void {
  const address = URL.createObjectURL(new Blob([text], { type }))
  const link = document.createElement('a')
  link.href = address
  link.download = name
  link.click()
  // The browser needs the address until it has begun to write.
  setTimeout(() => URL.revokeObjectURL(address), 60_000)
}

/** Whether this phone hands files to other apps. */
export function sharesFiles(): boolean {
  return navigator.canShare?.({ files: [new File([''], 'a.txt', { type: 'text/plain' })] }) ?? false
}

/** True: handed over. False: the person thought better of it, or the phone would not. */
export async function shareFile({ name, type, text }: TextFile): Promise<boolean> {
  // Share sheets take text files everywhere, JSON hardly anywhere.
  const file = new File([text], name, { type: type === 'application/json' ? 'text/plain' : type })
  try {
    await navigator.share({ files: [file], title: name })
    return true
  } catch {
    return false
  }
}
