/** Hands a file to the person: the share sheet where the phone has one for files, else a download. */
export async function handOver(name: string, text: string): Promise<'shared' | 'downloaded' | 'stopped'> {
  const file = new File([text], name, { type: 'application/json' })
  if (navigator.canShare?.({ files: [file] })) {
    try {
      await navigator.share({ files: [file], title: name })
      return 'shared'
    } catch (error) {
      if (error instanceof DOMException && error.name === 'AbortError') return 'stopped'
      // Refused by the browser for another reason: a download still gives the file.
    }
  }
  const link = document.createElement('a')
  link.href = URL.createObjectURL(file)
  link.download = name
  link.click()
  // The browser needs the address until it has begun to save.
  setTimeout(() => URL.revokeObjectURL(link.href), 60_000)
  return 'downloaded'
}
