import { readFileSync } from 'node:fs'
import { expect, type Page, test } from '@playwright/test'
import { needTool, run, toInstall } from '../sheets/system-tool.ts'
import { unzip } from '../sheets/unzip.ts'
import { axeFinds } from './axe.ts'
import { AppServer, OutsideWall, Phone } from './phone.ts'

test.beforeAll(() => {
  test.setTimeout(toInstall)
  needTool('pdfinfo', 'poppler-utils')
})

/** Chooses a form, waits until it is written, saves it. */
async function saved(page: Page, form: string): Promise<{ name: string; path: string; bytes: Buffer }> {
  await page.getByRole('radio', { name: form, exact: true }).check()
  await expect(page.getByText(/^Written: /)).toBeVisible({ timeout: 60_000 })
  const download = page.waitForEvent('download')
  await page.getByRole('button', { name: 'Save', exact: true }).tap()
  const file = await download
  const path = await file.path()
  return { name: file.suggestedFilename(), path, bytes: readFileSync(path) }
}

/** The words of a BRF file's lines, and the form of its pages. */
function brailleLines(bytes: Buffer): string[] {
  const text = bytes.toString('latin1')
  const pages = text.split('\f')
  for (const page of pages) {
    expect(page.endsWith('\r\n')).toBe(true)
    const lines = page.slice(0, -2).split('\r\n')
    expect(lines).toHaveLength(25)
    for (const line of lines) expect(line).toMatch(/^[ -_]{0,40}$/)
  }
  return text.split(/[\r\n\f]+/)
}

test('PDF, word-processor file and braille are made on the phone with no network, once the extras are there', async () => {
  const server = new AppServer()
  const wall = new OutsideWall()
  const phone = new Phone(await wall.start(), { acceptDownloads: true })
  try {
    const page = await phone.open()
    const errors: string[] = []
    page.on('pageerror', (error) => errors.push(error.message))
    await page.goto(await server.start())
    await page.evaluate(async () => {
      await navigator.serviceWorker.ready
    })
    await page.getByRole('button', { name: /Quern/ }).tap()
    await page.waitForURL(/\/venue\//)
    await page.getByRole('link', { name: 'Sheet' }).first().tap()
    const extras = page.getByRole('region', { name: 'Offline extras' })

    await test.step('without the extras the keys that need them say so; nothing is loaded unasked', async () => {
      await expect(extras.getByText(/^Not here\./)).toBeVisible({ timeout: 200_000 })
      await page.getByRole('radio', { name: 'Venue manager' }).check()
      await expect(page.getByRole('radio', { name: 'Braille, contracted: needs the extras' })).toBeVisible()
      await page.getByRole('radio', { name: 'PDF: needs the extras' }).check()
      await expect(page.getByText('PDF needs the offline extras.')).toBeVisible()
      await expect(page.getByRole('button', { name: 'Save', exact: true })).toHaveCount(0)
      expect(phone.asked.filter((url) => url.includes('/extras/'))).toEqual([])
      expect(await axeFinds(page)).toEqual([])
    })

    await test.step('the extras are taken, the network is gone, the page is loaded anew', async () => {
      await extras.getByRole('button', { name: /^Offline extras: \d\.\d MB$/ }).tap()
      await expect(extras.getByText(/^Here, \d\.\d MB\./)).toBeVisible({ timeout: 60_000 })
      await server.stop()
      await page.reload()
      await expect(extras.getByText(/^Here, /)).toBeVisible({ timeout: 200_000 })
      await page.getByRole('radio', { name: 'Venue manager' }).check()
    })

    await test.step('the sheet as a page is there to compare with', async () => {
      await expect(page.frameLocator('iframe').getByRole('heading', { level: 1 })).toContainText('For the venue', {
        timeout: 200_000,
      })
    })
    const heading = (await page.frameLocator('iframe').getByRole('heading', { level: 1 }).textContent()) ?? ''
    const title = await page.locator('iframe').getAttribute('title')

    await test.step('PDF', async () => {
      const { name, path, bytes } = await saved(page, 'PDF')
      expect(name).toMatch(/venue\.pdf$/)
      expect(bytes.toString('latin1', 0, 8)).toBe('%PDF-1.7')
      const said = run('pdfinfo', [path])
      expect(`Preview: ${/^Title: +(.*)$/m.exec(said)?.[1]}`).toBe(title)
      expect(said).toMatch(/^Tagged: +yes$/m)
      expect(run('pdfinfo', ['-struct-text', path])).toContain(heading.slice(0, 30))
    })

    await test.step('word-processor file', async () => {
      const { name, bytes } = await saved(page, 'Word-processor file')
      expect(name).toMatch(/venue\.docx$/)
      const body = unzip(bytes).get('word/document.xml') ?? ''
      expect(body).toContain('w:val="Heading1"')
      expect(body.replace(/<[^>]+>/g, '')).toContain(heading.slice(0, 30))
    })

    await test.step('braille, contracted and not', async () => {
      const contracted = await saved(page, 'Braille, contracted')
      const plain = await saved(page, 'Braille, uncontracted')
      expect(contracted.name).toMatch(/venue\.brf$/)
      expect(plain.name).toMatch(/venue-uncontracted\.brf$/)
      // "For the venue" in each grade: "for" is one cell, "the" another.
      expect(brailleLines(plain.bytes).join(' ')).toContain(',FOR THE V')
      expect(brailleLines(contracted.bytes).join(' ')).toContain(',= ! V')
      expect(contracted.bytes.length).toBeLessThan(plain.bytes.length)
    })

    await test.step('the licences lie beside the extras, and are read without a network too', async () => {
      const opened = page.context().waitForEvent('page')
      await extras.getByRole('link', { name: 'its terms in full' }).tap()
      const licence = await opened
      await expect(licence.locator('body')).toContainText('GNU LESSER GENERAL PUBLIC LICENSE')
      await licence.close()
    })

    await test.step('removed in Settings; without a network they do not come back, and it says what to do', async () => {
      await page.goto(new URL('/settings', page.url()).href)
      await expect(extras.getByText(/^Here, /)).toBeVisible()
      expect(await axeFinds(page)).toEqual([])
      await extras.getByRole('button', { name: 'Remove the extras' }).tap()
      await expect(extras.getByText(/^Not here\./)).toBeVisible()
      await extras.getByRole('button', { name: /^Offline extras/ }).tap()
      await expect(
        extras.getByText(/^Failed\. They did not arrive whole .* Try again where there is a network/),
      ).toBeVisible()
      expect(
        await page.evaluate(async () => (await caches.keys()).filter((name) => name.startsWith('extras'))),
      ).toEqual([])
    })
    expect(errors).toEqual([])
    expect(wall.left()).toEqual([])
  } finally {
    await phone.close()
    await server.stop()
    wall.stop()
  }
})
