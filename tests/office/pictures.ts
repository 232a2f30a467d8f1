import { createHash } from 'node:crypto'

/** The least bytes that are a picture of each kind: heads and parts by their published layouts, no real image data. */

function jpegSegment(marker: number, content: Buffer): Buffer {
  const head = Buffer.from([0xff, marker, 0, 0])
  head.writeUInt16BE(content.length + 2, 2)
  return Buffer.concat([head, content])
}

export function jpeg(seed: string, ...extra: Buffer[]): Buffer {
  const jfif = jpegSegment(0xe0, Buffer.from('JFIF\0\x01\x01\0\0\x01\0\x01\0\0', 'latin1'))
  const scan = Buffer.concat([
    jpegSegment(0xda, Buffer.from([1, 1, 0, 0, 63, 0])),
    Buffer.from(seed),
    Buffer.from([0xff, 0xd9]),
  ])
  return Buffer.concat([Buffer.from([0xff, 0xd8]), jfif, ...extra, scan])
}

export const exif = jpegSegment(0xe1, Buffer.from('Exif\0\0II*\0GPS', 'latin1'))

export function png(...names: string[]): Buffer {
  const chunk = (name: string, content: Buffer) => {
    const length = Buffer.alloc(4)
    length.writeUInt32BE(content.length)
    return Buffer.concat([length, Buffer.from(name, 'latin1'), content, Buffer.alloc(4)])
  }
  const parts = ['IHDR', ...names, 'IDAT', 'IEND'].map((name) =>
    chunk(name, Buffer.from(name === 'IEND' ? '' : 'xxxx')),
  )
  return Buffer.concat([Buffer.from('\x89PNG\r\n\x1a\n', 'latin1'), ...parts])
}

export function webp(...names: string[]): Buffer {
  const chunks = ['VP8 ', ...names].map((name) =>
    Buffer.concat([Buffer.from(name, 'latin1'), Buffer.from([4, 0, 0, 0]), Buffer.from('data')]),
  )
  const body = Buffer.concat([Buffer.from('WEBP', 'latin1'), ...chunks])
  const head = Buffer.from('RIFF\0\0\0\0', 'latin1')
  head.writeUInt32LE(body.length, 4)
  return Buffer.concat([head, body])
}

export function nameOf(bytes: Buffer): string {
  return createHash('sha256').update(bytes).digest('hex')
}
