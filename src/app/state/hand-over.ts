/** A file handed out of the app: to the browser's downloads, or by the phone's share sheet. Only ever by a person's key. */
export type HandedFile = TextFile | (Named & { bytes: Uint8Array<ArrayBuffer> })

export interface TextFile extends Named {
  text: string
}

interface Named {
  name: string
  /** MIME type. */
  type: string
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

export function saveFile(file: HandedFile): void {
  const address = URL.createObjectURL(new Blob([contentOf(file)], { type: file.type }))
  const link = document.createElement('a')
  link.href = address
  link.download = file.name
  link.click()
  // The browser needs the address until it has begun to write.
  setTimeout(() => URL.revokeObjectURL(address), 60_000)
}

/** Whether this phone hands files of a kind to other apps. */
export function sharesFiles(type = 'text/plain', name = 'a.txt'): boolean {
  return navigator.canShare?.({ files: [new File([''], name, { type })] }) ?? false
}

/** True: handed over. False: the person thought better of it, or the phone would not. */
export async function shareFile(file: HandedFile): Promise<boolean> {
  const { name, type } = file
  // Share sheets take text files everywhere, JSON hardly anywhere.
  const handed = new File([contentOf(file)], name, { type: type === 'application/json' ? 'text/plain' : type })
  try {
    await navigator.share({ files: [handed], title: name })
    return true
  } catch {
    return false
  }
}

function contentOf(file: HandedFile): string | Uint8Array<ArrayBuffer> {
  return 'text' in file ? file.text : file.bytes
}
