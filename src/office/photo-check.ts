import { createHash } from 'node:crypto'

export type PhotoType = 'image/jpeg' | 'image/png' | 'image/webp'
export type CheckedPhoto = { ok: true; type: PhotoType } | { ok: false; what: string }

/**
 * A photo as the office takes it: its bytes hash to its name, they begin as a picture does, and no part of it can say where
 * it was taken (APP1 of a JPEG, eXIf or text of a PNG, EXIF or XMP of a WebP).
 */
export function checkPhoto(hash: string, bytes: Buffer): CheckedPhoto {
  if (createHash('sha256').update(bytes).digest('hex') !== hash)
    return { ok: false, what: 'The bytes do not hash to the name: cut or changed on the way.' }
  const type = typeOf(bytes)
  if (!type) return { ok: false, what: 'The bytes are no JPEG, PNG or WebP picture.' }
  const tells = { 'image/jpeg': tellsInJpeg, 'image/png': tellsInPng, 'image/webp': tellsInWebp }[type](bytes)
  return tells
    ? { ok: false, what: 'The picture carries notes that may say where it was taken, or is cut short.' }
    : { ok: true, type }
}

function typeOf(bytes: Buffer): PhotoType | null {
  if (bytes.length < 12) return null
  if (bytes.readUIntBE(0, 3) === 0xffd8ff) return 'image/jpeg'
  if (bytes.subarray(0, 8).toString('latin1') === '\x89PNG\r\n\x1a\n') return 'image/png'
  const riff = bytes.subarray(0, 4).toString('latin1') === 'RIFF'
  return riff && bytes.subarray(8, 12).toString('latin1') === 'WEBP' ? 'image/webp' : null
}

/** Markers up to the picture's data: none may be APP1. What cannot be walked is refused as well. */
function tellsInJpeg(bytes: Buffer): boolean {
  let at = 2
  while (at + 4 <= bytes.length) {
    if (bytes[at] !== 0xff) return true
    const marker = bytes[at + 1] as number
    if (marker === 0xff) {
      at++
      continue
    }
    if (marker === 0xe1) return true
    // Start of scan: the rest is the picture, and what follows it is looked for as a whole.
    if (marker === 0xda)
      return bytes.includes('Exif\0\0', at, 'latin1') || bytes.includes('ns.adobe.com/xap', at, 'latin1')
    const length = bytes.readUInt16BE(at + 2)
    if (length < 2) return true
    at += 2 + length
  }
  return true
}

function tellsInPng(bytes: Buffer): boolean {
  let at = 8
  while (at + 12 <= bytes.length) {
    const name = bytes.subarray(at + 4, at + 8).toString('latin1')
    if (['eXIf', 'tEXt', 'iTXt', 'zTXt'].includes(name)) return true
    at += 12 + bytes.readUInt32BE(at)
    if (name === 'IEND') return at !== bytes.length
  }
  return true
}

function tellsInWebp(bytes: Buffer): boolean {
  let at = 12
  while (at + 8 <= bytes.length) {
    const name = bytes.subarray(at, at + 4).toString('latin1')
    if (name === 'EXIF' || name === 'XMP ') return true
    const length = bytes.readUInt32LE(at + 4)
    at += 8 + length + (length % 2)
  }
  return at !== bytes.length
}
