import { readdirSync } from 'node:fs'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { emptyLog, mergeFacts } from '../../src/record/log.ts'
import { sendPhotos } from '../../src/sync/photos.ts'
import {
  engines,
  fact,
  message,
  type OfficeUnderTest,
  type Person,
  startOffice,
  syncPath,
} from './office-under-test.ts'
import { exif, jpeg, nameOf, png, webp } from './pictures.ts'
import { storeOf } from './simulated-phone.ts'

describe.each(engines)('photos on %s', (engine) => {
  let under: OfficeUnderTest
  let ada: Person
  const pathOf = (name: string) => `/api/surveys/venue-1/photos/${name}`
  const put = (bytes: Buffer, name = nameOf(bytes)) => under.ask(ada, 'PUT', pathOf(name), bytes)

  beforeAll(async () => {
    under = await startOffice(engine)
    ada = await under.person('surveyor', 'Ada')
    await under.ask(ada, 'POST', syncPath, message([fact('a', 1)]))
  })
  afterAll(() => under.close())

  test.each([
    ['image/jpeg', jpeg('one')],
    ['image/png', png()],
    ['image/webp', webp()],
  ])('a picture of type %s is kept once, however often it is sent, and comes back whole', async (type, bytes) => {
    expect((await put(bytes)).status).toBe(201)
    expect((await put(bytes)).status).toBe(200)
    const reply = await under.app.inject({
      url: pathOf(nameOf(bytes)),
      headers: { authorization: `Bearer ${ada.token}` },
    })
    expect(reply.headers['content-type']).toBe(type)
    expect(reply.headers['content-security-policy']).toBe("default-src 'none'; sandbox")
    expect(nameOf(reply.rawPayload)).toBe(nameOf(bytes))
  })

  test.each([
    ['a JPEG with an APP1 part', jpeg('two', exif)],
    ['a JPEG with notes behind its data', Buffer.concat([jpeg('three'), exif])],
    ['a PNG with Exif', png('eXIf')],
    ['a PNG with text', png('iTXt')],
    ['a WebP with Exif', webp('EXIF')],
    ['a WebP with XMP', webp('XMP ')],
    ['a page', Buffer.from('<!doctype html><script>1</script>')],
    ['an SVG', Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"></svg>')],
    ['a JPEG cut short', jpeg('four').subarray(0, 14)],
    ['a PNG with something behind its end', Buffer.concat([png(), Buffer.from('more')])],
  ])('%s is refused', async (_what, bytes) => {
    const { status, body } = await put(bytes)
    expect(status).toBe(422)
    expect(body.error).toBe('photo')
    expect((await under.ask(ada, 'GET', pathOf(nameOf(bytes)))).status).toBe(404)
  })

  test('bytes that do not answer to their name are refused', async () => {
    expect((await put(jpeg('five'), nameOf(jpeg('six')))).status).toBe(422)
    expect((await put(jpeg('five'), '../../etc/passwd')).status).toBe(404)
    expect((await put(jpeg('five'), 'A'.repeat(64))).status).toBe(400)
  })

  test('more than eight megabytes are refused', async () => {
    expect((await put(Buffer.alloc(8 * 1024 * 1024 + 1))).status).toBe(413)
  })

  test('the same photo sent ten times at once is one file and one row', async () => {
    const bytes = jpeg('seven')
    const all = await Promise.all(Array.from({ length: 10 }, () => put(bytes)))
    expect(all.filter(({ status }) => status === 201)).toHaveLength(1)
    expect(all.filter(({ status }) => status === 200)).toHaveLength(9)
    const folder = join(under.folder, 'photos', nameOf(bytes).slice(0, 2))
    expect(readdirSync(folder).filter((name) => name.startsWith(nameOf(bytes)))).toEqual([nameOf(bytes)])
  })

  test('the phone sends the photos its entries name, goes on after a cut, and says which were refused', async () => {
    const address = await under.app.listen({ port: 0, host: '127.0.0.1' })
    const good = [jpeg('a'), jpeg('b'), jpeg('c')]
    const bad = jpeg('d', exif)
    const all = new Map([...good, bad].map((bytes) => [nameOf(bytes), bytes]))
    const log = emptyLog('venue-1')
    mergeFacts(
      log,
      [...all.keys()].map((name, i) => fact('p', i + 1, { entity: 'f', field: `photo/${name}`, value: true })),
    )
    const store = {
      ...storeOf(log),
      readPhoto: async (id: string) => {
        const bytes = all.get(id)
        return bytes ? { bytes: new Uint8Array(bytes).buffer } : null
      },
    }
    let calls = 0
    const line = {
      address,
      token: ada.token,
      fetch: (to: string, init: object) => (++calls === 2 ? Promise.reject(new Error('cut')) : fetch(to, init)),
    }
    expect(await sendPhotos(line, store, 'venue-1')).toEqual({ sent: 1, left: 3, refused: [] })
    const second = await sendPhotos(line, store, 'venue-1')
    expect(second).toMatchObject({ sent: 2, left: 0, refused: [{ photo: nameOf(bad) }] })
    const { body } = await under.ask(ada, 'GET', '/api/surveys/venue-1/photos')
    const names = body.photos.map(({ photo }: { photo: string }) => photo)
    for (const bytes of good) expect(names).toContain(nameOf(bytes))
    expect(names).not.toContain(nameOf(bad))
  })
})
