import { inflateRawSync } from 'node:zlib'

/** The files of a ZIP archive by name, from its central directory (APPNOTE 4.3.12): stored and deflated entries. */
export function unzip(bytes: Uint8Array): Map<string, string> {
  const file = Buffer.from(bytes)
  const end = file.lastIndexOf(Buffer.from('PK\x05\x06', 'latin1'))
  if (end < 0) throw new Error('no ZIP archive')
  const files = new Map<string, string>()
  let at = file.readUInt32LE(end + 16)
  for (let i = 0; i < file.readUInt16LE(end + 10); i++) {
    if (file.readUInt32LE(at) !== 0x02014b50) throw new Error(`no directory entry at ${at}`)
    const [method, packed] = [file.readUInt16LE(at + 10), file.readUInt32LE(at + 20)]
    const nameLength = file.readUInt16LE(at + 28)
    const name = file.toString('utf8', at + 46, at + 46 + nameLength)
    const local = file.readUInt32LE(at + 42)
    const start = local + 30 + file.readUInt16LE(local + 26) + file.readUInt16LE(local + 28)
    const data = file.subarray(start, start + packed)
    files.set(name, (method === 8 ? inflateRawSync(data) : data).toString('utf8'))
    at += 46 + nameLength + file.readUInt16LE(at + 30) + file.readUInt16LE(at + 32)
  }
  return files
}
