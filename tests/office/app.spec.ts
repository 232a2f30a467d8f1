import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { type OfficeUnderTest, startOffice } from './office-under-test.ts'

describe('the app, served by the office', () => {
  const root = mkdtempSync(join(tmpdir(), 'tautline-dist-'))
  const dist = join(root, 'dist')
  let under: OfficeUnderTest
  const get = (path: string) => under.ask(null, 'GET', path)

  beforeAll(async () => {
    mkdirSync(join(dist, 'assets'), { recursive: true })
    writeFileSync(join(root, 'secret.txt'), 'for the machine')
    writeFileSync(join(dist, 'index.html'), '<!doctype html><title>Tautline</title>')
    writeFileSync(join(dist, 'assets', 'main-abc123.js'), 'export const page = 1\n')
    writeFileSync(join(dist, 'sw.js'), '/* service worker */\n')
    for (const name of ['office.js', 'cli.js', '.hidden.json']) writeFileSync(join(dist, name), 'for the machine')
    under = await startOffice('sqlite', { dist })
  })
  afterAll(async () => {
    await under.close()
    rmSync(root, { recursive: true })
  })

  test('any address without an extension is the page; its parts are found by name', async () => {
    for (const path of ['/', '/venue/v1', '/enrol']) {
      const { status, text, headers } = await get(path)
      expect(status, path).toBe(200)
      expect(text).toContain('<title>Tautline')
      expect(headers['cache-control']).toContain('max-age=0')
    }
    const part = await get('/assets/main-abc123.js')
    expect(part.headers['content-type']).toContain('javascript')
    expect(part.headers['cache-control']).toContain('immutable')
    expect((await get('/sw.js')).headers['cache-control']).toContain('max-age=0')
  })

  test('what lies beside the app for the machine, what is hidden and what lies outside is not served', async () => {
    const paths = [
      '/office.js',
      '/cli.js',
      '/.hidden.json',
      '/%2e%2e/secret.txt',
      '/..%2fsecret.txt',
      '/assets/..%2f..%2fsecret.txt',
      '/assets/none.js',
    ]
    for (const path of paths) {
      const { status, text } = await get(path)
      expect([403, 404], path).toContain(status)
      expect(text, path).not.toContain('for the machine')
    }
  })

  test('an address of the interface that is not there is no page', async () => {
    const { status, body } = await get('/api/nothing')
    expect(status).toBe(404)
    expect(body.error).toBe('not-found')
  })
})
