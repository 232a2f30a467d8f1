import { readFileSync } from 'node:fs'
import { expect, type Page, test } from '@playwright/test'
import { axeFinds } from './axe.ts'
import { AppServer, OutsideWall, Phone } from './phone.ts'
import { Surveyor } from './surveyor.ts'

const parts = 10
/** Every state of the journey that axe looks at; no rule is off. */
const looked: string[] = []

async function look(page: Page, state: string): Promise<void> {
  expect(await axeFinds(page), state).toEqual([])
  looked.push(state)
}

test('one walk by touch alone: the network cut, the phone killed, nothing lost, the sheet in hand', async () => {
  const server = new AppServer()
  const wall = new OutsideWall()
  const phone = new Phone(await wall.start(), { acceptDownloads: true })
  let address = ''
  try {
    address = await server.start()
    let page = await phone.open()
    let surveyor = new Surveyor(page)

    await test.step('installed, then the server stops for good', async () => {
      await page.goto(address)
      await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined))
      await page.waitForFunction(() => navigator.serviceWorker.controller !== null)
      await look(page, 'venues, empty')
      await server.stop()
      await page.reload()
      await expect(page.getByRole('heading', { level: 1, name: 'Venues on this phone' })).toBeVisible()
    })

    await test.step('a venue, its zone, and a walk', async () => {
      await surveyor.newVenue('Corner House', 'Ada Brook')
      await surveyor.unfold('Zones')
      await page.getByLabel('Name of another zone').fill('Hall')
      await surveyor.key('Add the zone')
      await surveyor.readsSaved(/Saved: zone Hall/)
      await surveyor.unfold('Hall: robot')
      await surveyor.tap(page.getByRole('radio', { name: 'Allowed' }))
      await page.getByLabel('Role that said so').fill('duty manager')
      await surveyor.key('Save the permission')
      await surveyor.readsSaved(/Saved: Hall.*allowed/i)
      await look(page, 'venue, with a zone')
      await page.getByLabel('From').first().selectOption({ label: 'Another place' })
      await page.getByLabel('Name of the place it starts at').fill('Front door')
      await page.getByLabel('To').first().selectOption({ label: 'Another place' })
      await page.getByLabel('Name of the place it ends at').fill('Room 4')
      await surveyor.key('New walk')
      await expect(page.getByRole('button', { name: 'Start part 1 here' })).toBeVisible()
      await look(page, 'strip, no part yet')
    })

    await test.step('ten plain stretches', async () => {
      await surveyor.key('Start part 1 here')
      await expect(page.getByRole('heading', { level: 1, name: 'Part 1 of 1' })).toBeVisible()
      for (let part = 1; part <= parts; part++) {
        const before = surveyor.taps
        await surveyor.plainStretch(part, part === 1 ? { look: (state) => look(page, state) } : {})
        const taps = surveyor.taps - before
        if (part === 2) {
          console.log(`taps of a plain stretch, opening its card and closing it included: ${taps}`)
          expect(taps).toBeLessThanOrEqual(14)
        }
      }
    })

    await test.step('killed in the middle of a value', async () => {
      await surveyor.leaveCard()
      await surveyor.key('Width')
      await surveyor.keypad('2.1')
      await look(page, 'keypad, half typed')
      // The draft is kept a moment after the last key.
      await page.waitForTimeout(1000)
      await phone.kill()
    })

    await test.step('opened again: every reading whose "Saved" was read is there', async () => {
      page = await phone.open()
      const seen = surveyor.savedOnScreen
      surveyor = new Surveyor(page)
      surveyor.savedOnScreen.push(...seen)
      await page.goto(address)
      await surveyor.tap(page.getByRole('link', { name: /Corner House/ }))
      await surveyor.tap(page.getByRole('link', { name: /^Record/ }))
      await expect(page.getByText(/half typed 2\.1/)).toBeVisible()
      await look(page, 'strip, half typed value found again')
      const list = await page.getByRole('region', { name: 'Parts of this walk' }).innerText()
      const lengths = seen.flatMap((words) => /length ([\d.]+) m/.exec(words)?.[1] ?? [])
      expect(lengths).toHaveLength(parts)
      for (const length of lengths) expect(list).toContain(`length ${length} m`)
      expect(list.match(/width/gi)?.length ?? 0).toBeGreaterThanOrEqual(parts)
      await surveyor.key('Go on with it')
      await expect(page.getByLabel('Value')).toHaveValue('2.1')
      await surveyor.tap(page.getByRole('radio', { name: 'tape on the floor' }))
      await surveyor.key('Save')
      const place = page.getByRole('radio', { name: 'Another place' })
      if (await place.isVisible()) {
        await surveyor.tap(place)
        await surveyor.key('Save')
      }
      await surveyor.readsSaved(/Saved: .*width 2\.1 m/i)
    })

    await test.step('before leaving: what is left, then the copy, read back', async () => {
      await surveyor.key('Leave now')
      await expect(page.getByRole('heading', { level: 1, name: 'Before you leave' })).toBeVisible()
      await look(page, 'before you leave')
      const download = page.waitForEvent('download')
      await surveyor.key('Make the copy')
      const file = JSON.parse(readFileSync(await (await download).path(), 'utf8'))
      await expect(page.getByRole('status').filter({ hasText: 'Ready to leave: copy checked' })).toBeVisible()
      const readings = file.facts.filter((fact: { field: string }) => fact.field === 'reading')
      // A length, a width and a swept height for each part, and the width that was half typed.
      expect(readings.length).toBe(3 * parts + 1)
    })

    await test.step('the ladder', async () => {
      await page.goto(`${address}/`)
      await surveyor.tap(page.getByRole('link', { name: /Corner House/ }))
      await surveyor.tap(page.getByRole('link', { name: /^Ladder/ }))
      await expect(page.getByRole('table')).toBeVisible()
      await expect(page.getByRole('row')).toHaveCount(parts + 2)
      await look(page, 'ladder')
      await page.goBack()
    })

    await test.step('the sheet: one sentence for the client of a walk not known; for the venue, saved as a file', async () => {
      await surveyor.tap(page.getByRole('link', { name: /^Sheet/ }))
      const preview = page.frameLocator('iframe').locator('body')
      await expect(preview).toContainText('Do not use this walk.')
      await expect(preview).not.toContainText('Part 1')
      await look(page, 'sheet, for the client of a walk not known')
      await surveyor.tap(page.getByRole('radio', { name: 'Venue manager' }))
      await surveyor.tap(page.getByRole('radio', { name: 'Plain text' }))
      await look(page, 'sheet for the venue manager')
      const download = page.waitForEvent('download')
      await surveyor.key('Save')
      const text = readFileSync(await (await download).path(), 'utf8')
      expect(text).toContain('Corner House')
      expect(text).toContain('DRAFT')
      expect(text).toMatch(/Local codes and licensed/)
    })

    await test.step('team and settings', async () => {
      await page.goto(`${address}/settings`)
      await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
      await look(page, 'settings')
      await page.goBack()
    })

    expect(wall.left(), 'requests that left for another machine').toEqual([])
    expect(phone.asked.length).toBeGreaterThan(0)
    const elsewhere = phone.asked.filter((url) => !url.startsWith(address) && !/^(blob|data|about):/.test(url))
    expect(elsewhere, 'requests of the app itself for another machine').toEqual([])
    console.log(`axe looked at: ${looked.join('; ')}`)
  } finally {
    await phone.close()
    await server.stop()
    wall.stop()
  }
})
