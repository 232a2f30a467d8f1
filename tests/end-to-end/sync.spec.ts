import { readFileSync } from 'node:fs'
import { expect, type Page, test } from '@playwright/test'
import type { Fact } from '../../src/record/facts.ts'
import { axeFinds } from './axe.ts'
import { OfficeServer } from './office-server.ts'
import { AppServer, OutsideWall, Phone } from './phone.ts'
import { Surveyor } from './surveyor.ts'

/** Two people's phones, a wall round both, everything ended afterwards. */
async function onTwoPhones(work: (ana: Phone, ben: Phone) => Promise<void>): Promise<void> {
  const wall = new OutsideWall()
  const port = await wall.start()
  const ana = new Phone(port, { acceptDownloads: true })
  const ben = new Phone(port, { acceptDownloads: true })
  try {
    await work(ana, ben)
  } finally {
    await ana.close()
    await ben.close()
    wall.stop()
  }
}

/** Enrols by the address of an invitation, the code behind its #. */
async function enrol(page: Page, office: OfficeServer, name: string): Promise<void> {
  await page.goto(`${office.address}/enrol#${await office.invite(name)}`)
  await expect(page.getByLabel('One-time code')).not.toHaveValue('')
  expect(new URL(page.url()).hash).toBe('')
  await page.getByLabel('Name of this phone').fill(`${name}’s phone`)
  await page.getByRole('button', { name: 'Enrol', exact: true }).click()
  await expect(page.getByRole('button', { name: 'Send now' })).toBeVisible()
}

async function toOffice(page: Page): Promise<void> {
  await page.goto(new URL('/', page.url()).href)
  await page.getByRole('link', { name: 'Office', exact: true }).first().click()
  await expect(page.getByRole('heading', { level: 1, name: 'Office' })).toBeVisible()
}

async function toVenue(page: Page, name: string): Promise<void> {
  await page.goto(new URL('/', page.url()).href)
  await page.getByRole('link', { name }).click()
  await expect(page.getByRole('heading', { level: 1, name })).toBeVisible()
}

async function newWalk(page: Page, from: string, to: string): Promise<void> {
  const fold = page.locator('details').filter({ has: page.locator('summary', { hasText: /^New walk$/ }) })
  if (!(await fold.evaluate((one) => (one as HTMLDetailsElement).open))) await fold.locator('summary').click()
  await page.getByLabel('From', { exact: true }).selectOption({ label: 'Another place' })
  await page.getByLabel('To', { exact: true }).selectOption({ label: 'Another place' })
  await page.getByLabel('Name of the place it starts at').fill(from)
  await page.getByLabel('Name of the place it ends at').fill(to)
  await page.getByRole('button', { name: 'New walk', exact: true }).click()
  await page.waitForURL(/\/walk\//)
}

/** Answers the phone signal of the venue's first walk, as seen by oneself. */
async function answerSignal(page: Page, value: 'yes' | 'none'): Promise<void> {
  await page.locator('summary', { hasText: 'Alarm, help and rest' }).first().click()
  await page.getByRole('radio', { name: 'Looked myself' }).first().check({ force: true })
  const signal = page.getByLabel('Phone signal').first()
  await signal.selectOption(value)
  await expect(signal).toHaveValue(value)
}

const whereIs = (page: Page, venue: string) =>
  page.getByRole('listitem').filter({ has: page.getByRole('link', { name: venue }) })

test('two phones at one office: recorded apart without a network, both have everything, and a disputed answer shows both', async () => {
  const office = new OfficeServer()
  await office.start()
  try {
    await onTwoPhones(async (ana, ben) => {
      const a = await ana.open()
      const b = await ben.open()

      await test.step('before enrolling: on this phone only', async () => {
        await a.goto(office.address)
        await new Surveyor(a).newVenue('Reed House', 'Ana Pell')
        await newWalk(a, 'Door', 'Desk')
        await a.goto(`${office.address}/sync`)
        await expect(whereIs(a, 'Reed House')).toContainText(/On this phone only: \d+ entries\./)
        expect(await axeFinds(a)).toEqual([])
      })

      await test.step('a wrong code and another address are refused in words; the right code sends by itself', async () => {
        await a.getByLabel('One-time code').fill('ABCD-EFGH-JKMN')
        await a.getByLabel('Office address').fill('https://office.example')
        await a.getByRole('button', { name: 'Enrol', exact: true }).click()
        await expect(a.getByText(/talks to that address alone\. Open https:\/\/office\.example/)).toBeVisible()
        await a.getByLabel('Office address').fill(office.address)
        await a.getByRole('button', { name: 'Enrol', exact: true }).click()
        await expect(a.getByRole('alert')).toContainText('This code does not work')
        await enrol(a, office, 'Ana Pell')
        await expect(whereIs(a, 'Reed House')).toContainText(/^Reed HouseAt the office, /)
        await expect(a.getByText(/^Last exchanged in full: /)).toBeVisible()
        expect(await axeFinds(a)).toEqual([])
      })

      await test.step('the other phone brings the venue from the office', async () => {
        await enrol(b, office, 'Ben Ode')
        await b.getByRole('button', { name: 'Look at the office' }).click()
        await b.getByRole('button', { name: 'Bring Reed House here' }).click()
        await expect(b.getByText('On this phone now: Reed House.')).toBeVisible()
        await expect(whereIs(b, 'Reed House')).toContainText('At the office')
      })

      await test.step('the office is gone: each records, nothing waits for it', async () => {
        for (const page of [a, b]) await page.waitForFunction(() => navigator.serviceWorker.controller !== null)
        await office.stop()
        await toVenue(a, 'Reed House')
        await answerSignal(a, 'yes')
        await newWalk(a, 'Yard', 'Shed')
        await toVenue(b, 'Reed House')
        await answerSignal(b, 'none')
        await newWalk(b, 'Lift', 'Library')
        for (const page of [a, b]) {
          await toOffice(page)
          await expect(whereIs(page, 'Reed House')).toContainText(
            /not yet acknowledged: \d+ entries still count as on this phone only\./,
          )
        }
        await a.getByRole('button', { name: 'Send now' }).click()
        await expect(a.getByText('The office does not answer. It is tried again by itself.')).toBeVisible()
        await a.getByRole('link', { name: 'Venues' }).click()
        await expect(whereIs(a, 'Reed House')).toContainText('still count as on this phone only')
      })

      await test.step('the office is back: the network coming back is enough', async () => {
        await office.start()
        for (const page of [a, b, a]) {
          await page.evaluate(() => dispatchEvent(new Event('online')))
          await expect(whereIs(page, 'Reed House')).toContainText('At the office')
        }
        await toVenue(a, 'Reed House')
        await toVenue(b, 'Reed House')
        for (const page of [a, b]) {
          for (const walk of ['Door to Desk', 'Yard to Shed', 'Lift to Library'])
            await expect(page.getByRole('heading', { name: walk })).toBeVisible()
          await page.locator('summary', { hasText: 'Alarm, help and rest' }).first().click()
        }
        for (const page of [a, b]) {
          const dispute = page.getByText(/Not agreed: /)
          await expect(dispute).toContainText('Ana Pell says “yes, all along”')
          await expect(dispute).toContainText('Ben Ode says “none on a part of it”')
        }
      })

      await test.step('a copied phone is told, and both copies are kept', async () => {
        await office.stop()
        await newWalk(a, 'Stage', 'Foyer')
        const survey = /venue\/([^/]+)/.exec(a.url())?.[1] ?? ''
        await a.goto('about:blank')
        await office.start()
        const held = async (): Promise<Fact[]> => (await office.ask('GET', `/api/surveys/${survey}/file`)).facts
        const own = (await held()).filter(({ person }) => person === 'Ana Pell')
        const last = own.at(-1) as Fact
        // The other copy went on under the same id, and was at the office first.
        const other = {
          ...last,
          n: Math.max(...own.map(({ n }) => n)) + 1,
          field: 'note',
          value: 'by the copy',
          replaces: [],
        }
        await office.ask('POST', `/api/surveys/${survey}/sync`, { protocol: 1, have: {}, facts: [other] })

        await a.goto(`${office.address}/sync`)
        await expect(whereIs(a, 'Reed House')).toContainText('Nothing is lost. Keep both')
        await a.getByRole('button', { name: 'Keep both' }).click()
        await expect(whereIs(a, 'Reed House')).toContainText(/^Reed HouseAt the office, [^.]*\.$/)
        const after = await held()
        expect(after).toContainEqual(other)
        expect(after.some(({ value }) => value === 'Stage to Foyer')).toBe(true)
      })

      await test.step('a revoked phone is told, loses nothing, and records on', async () => {
        await office.revoke('Ben Ode’s phone')
        await toOffice(b)
        // It asks by itself as it is opened.
        await expect(b.getByRole('heading', { name: 'Signed out by the office' })).toBeVisible()
        await expect(b.getByText(/The office signed this device out on/).first()).toBeVisible()
        await toVenue(b, 'Reed House')
        await newWalk(b, 'Ramp', 'Garden')
        await b.goto(office.address)
        await expect(b.getByText(/The office signed this device out on .* share it as a file/)).toBeVisible()
        await expect(whereIs(b, 'Reed House')).toContainText(/On this phone only: \d+ entries; the rest at the office/)
      })

      await test.step('what the office erased for good is told, and goes from the phone when a person says so', async () => {
        await a.goto(office.address)
        await a.getByLabel('Name of the venue').fill('Sedge Court')
        await a.getByRole('button', { name: 'New venue' }).click()
        await expect(a.getByRole('heading', { level: 1, name: 'Sedge Court' })).toBeVisible()
        const survey = /venue\/([^/]+)/.exec(a.url())?.[1] ?? ''
        await toOffice(a)
        await a.getByRole('button', { name: 'Send now' }).click()
        await expect(whereIs(a, 'Sedge Court')).toContainText('At the office')
        await office.ask('PUT', `/api/surveys/${survey}/client`, { client: 'N. N.' })
        await office.ask('DELETE', '/api/clients/N.%20N.')
        await a.getByRole('button', { name: 'Send now' }).click()
        await expect(whereIs(a, 'Sedge Court')).toContainText('was erased at the office')
        await a.getByRole('button', { name: 'Remove it from this phone' }).click()
        await a.getByRole('button', { name: 'Remove for good' }).click()
        await expect(whereIs(a, 'Sedge Court')).toHaveCount(0)
        await expect(whereIs(a, 'Reed House')).toContainText('At the office')
      })

      await test.step('signing out with wiping is asked once, and leaves nothing', async () => {
        await a.goto(`${office.address}/sync`)
        await a.getByRole('button', { name: 'Sign this phone out' }).click()
        await expect(a.getByText('Everything in your venues is at the office.')).toBeVisible()
        await a.getByRole('button', { name: 'Sign out and wipe this phone' }).click()
        await expect(a.getByText(/^None yet\. Begin one/)).toBeVisible()
        const { devices } = await office.ask('GET', '/api/people')
        const own = (devices as { label: string; revoked_at: string | null }[]).find(
          (one) => one.label === 'Ana Pell’s phone',
        )
        expect(own?.revoked_at).not.toBeNull()
      })
    })
  } finally {
    await office.end()
  }
})

test('without any office: it says so, and a file brings what the other phone wrote', async () => {
  const server = new AppServer()
  const address = await server.start()
  try {
    await onTwoPhones(async (ana, ben) => {
      const a = await ana.open()
      const b = await ben.open()
      const fileOf = async (page: Page) => {
        const saved = page.waitForEvent('download')
        await page.getByRole('button', { name: 'Save as a file' }).click()
        return readFileSync(await (await saved).path(), 'utf8')
      }
      const read = async (page: Page, text: string) => {
        await page.goto(address)
        await expect(page.getByRole('button', { name: 'Read a survey file' })).toBeVisible()
        await page
          .locator('input[type=file]')
          .first()
          .setInputFiles({ name: 'survey.json', mimeType: 'application/json', buffer: Buffer.from(text) })
      }

      await a.goto(`${address}/sync`)
      await a.getByLabel('One-time code').fill('ABCD-EFGH-JKMN')
      await a.getByRole('button', { name: 'Enrol', exact: true }).click()
      await expect(a.getByRole('alert')).toContainText('No office answers at this address.')

      await a.goto(address)
      await new Surveyor(a).newVenue('Alder Hall', 'Ana Pell')
      await read(b, await fileOf(a))
      await expect(b.getByRole('heading', { level: 1, name: 'Alder Hall' })).toBeVisible()
      await newWalk(b, 'Lift', 'Library')
      await toVenue(b, 'Alder Hall')
      const fromBen = await fileOf(b)
      await newWalk(a, 'Door', 'Desk')

      await read(a, fromBen)
      const known = JSON.parse(fromBen).facts.length
      const said = a.getByRole('status').filter({ hasText: 'Read: Alder Hall.' })
      await expect(said).toContainText(/\d+ new entries beside the \d+ that were here; none of those was changed\./)
      const [added, before] = ((await said.textContent()) ?? '').match(/\d+/g)?.map(Number) ?? []
      // One entry, the venue's name, was in both.
      expect(added).toBe(known - 1)
      expect(before).toBeGreaterThan(1)
      await a.getByRole('link', { name: 'Alder Hall' }).click()
      for (const walk of ['Door to Desk', 'Lift to Library'])
        await expect(a.getByRole('heading', { name: walk })).toBeVisible()

      await read(a, fromBen)
      await expect(a.getByText('Read: Alder Hall. All of the file was on this phone already.')).toBeVisible()
    })
  } finally {
    await server.stop()
  }
})
