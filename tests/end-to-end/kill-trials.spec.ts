import { expect, test } from '@playwright/test'
import { AppServer, OutsideWall, Phone } from './phone.ts'
import { Surveyor } from './surveyor.ts'

const trials = process.env.TAUTLINE_LONG ? 20 : 3

/** A seeded sequence of numbers in [0, 1): the trials are the same on every run. */
function seeded(seed: number): () => number {
  let state = seed
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0
    return state / 2 ** 32
  }
}

test(`the browser is killed during entry ${trials} times: nothing whose "Saved" stood on the screen is lost`, async () => {
  const seed = 20261130
  const random = seeded(seed)
  const server = new AppServer()
  const wall = new OutsideWall()
  const phone = new Phone(await wall.start())
  /** What stood on the screen, told by the page itself the moment it stood. */
  const heard = new Set<string>()
  try {
    const address = await server.start()
    let centimetres = 300
    for (let trial = 0; trial < trials; trial++) {
      const page = await phone.open()
      await page.exposeBinding('saved', (_source, words: string) => {
        const length = /length ([\d.]+) m/.exec(words)?.[1]
        if (length) heard.add(length)
      })
      await page.addInitScript(() => {
        const look = () => {
          for (const status of document.querySelectorAll('[role=status]'))
            if (status.textContent?.startsWith('Saved: '))
              (globalThis as unknown as { saved(words: string): void }).saved(status.textContent)
        }
        new MutationObserver(look).observe(document, { subtree: true, childList: true, characterData: true })
      })
      const surveyor = new Surveyor(page)
      await page.goto(address)
      if (trial === 0) {
        await surveyor.newVenue('Corner House', 'Ada Brook')
        await page.getByLabel('From').first().selectOption({ label: 'Another place' })
        await page.getByLabel('Name of the place it starts at').fill('Front door')
        await page.getByLabel('To').first().selectOption({ label: 'Another place' })
        await page.getByLabel('Name of the place it ends at').fill('Room 4')
        await surveyor.key('New walk')
        await surveyor.key('Start part 1 here')
      } else {
        await surveyor.tap(page.getByRole('link', { name: /Corner House/ }))
        await surveyor.tap(page.getByRole('link', { name: /^Record/ }))
      }
      const drop = page.getByRole('button', { name: 'Drop it' })
      await expect(page.getByRole('button', { name: 'Length', exact: true })).toBeVisible()
      if (await drop.isVisible()) await surveyor.tap(drop)

      const list = page.getByRole('region', { name: 'Parts of this walk' })
      for (const length of heard) await expect(list, `seed ${seed}, trial ${trial}`).toContainText(`length ${length} m`)

      const entries = 1 + Math.floor(random() * 4)
      for (let entry = 0; entry < entries; entry++) {
        centimetres += 1
        await surveyor.key('Length')
        await page.getByLabel('Value').fill((centimetres / 100).toFixed(2))
        const laser = page.getByRole('radio', { name: 'laser' })
        if (!(await laser.isChecked())) await surveyor.tap(laser)
        await surveyor.key('Save')
        if (entry < entries - 1) await expect(page.getByRole('dialog')).toBeHidden()
      }
      // Somewhere between the press and long after: most kills fall while the entry is being written.
      await page.waitForTimeout(random() * 120)
      await phone.kill()
    }

    const page = await phone.open()
    await page.goto(address)
    await page.getByRole('link', { name: /Corner House/ }).tap()
    await page.getByRole('link', { name: /^Record/ }).tap()
    const list = page.getByRole('region', { name: 'Parts of this walk' })
    for (const length of heard) await expect(list, `seed ${seed}, the end`).toContainText(`length ${length} m`)
    expect(heard.size).toBeGreaterThanOrEqual(trials - 1)
    console.log(`${trials} kills, ${heard.size} readings whose "Saved" stood on the screen, all there`)
  } finally {
    await phone.close()
    await server.stop()
    wall.stop()
  }
})
