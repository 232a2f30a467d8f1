import { readFileSync } from 'node:fs'
import { expect, type Page, test } from '@playwright/test'
import { axeFinds } from './axe.ts'
import { AppServer, OutsideWall, Phone } from './phone.ts'

/** A phone on a demo venue's page; the page's own complaints (policy, script errors) are gathered. */
async function onDemo(name: RegExp, work: (page: Page, complaints: string[]) => Promise<void>): Promise<void> {
  const server = new AppServer()
  const wall = new OutsideWall()
  const phone = new Phone(await wall.start(), { acceptDownloads: true })
  try {
    const page = await phone.open()
    const complaints: string[] = []
    page.on('pageerror', (error) => complaints.push(error.message))
    page.on('console', (message) => {
      if (message.type() === 'error') complaints.push(message.text())
    })
    const address = await server.start()
    // The browser itself talks to its maker; what the page asks for is this.
    page.on('request', (request) => {
      const url = request.url()
      if (!url.startsWith(address) && !/^(blob|data|about):/.test(url)) complaints.push(`asked for ${url}`)
    })
    await page.goto(address)
    await page.getByRole('button', { name }).click()
    await page.waitForURL(/\/venue\//)
    await work(page, complaints)
    expect(complaints).toEqual([])
  } finally {
    await phone.close()
    await server.stop()
    wall.stop()
  }
}

test('the team card: a figure in centimetres, a form kept over a reload, a new revision, undo', async () => {
  await onDemo(/Fennel/, async (page) => {
    await page.getByRole('link', { name: 'Team card' }).click()
    await expect(page.getByRole('heading', { level: 1 })).toBeFocused()
    const revision = Number(/revision (\d+)/.exec((await page.locator('.page-head').textContent()) ?? '')?.[1])
    expect(revision).toBeGreaterThan(0)
    await page.getByLabel('Breadth across the shoulders').fill('61 cm')
    await page.waitForTimeout(900)
    await page.reload()
    await expect(page.getByLabel('Breadth across the shoulders')).toHaveValue('61 cm')
    await page.getByLabel('Opens doors on the way').selectOption('')
    await page.getByRole('button', { name: 'Save as a new revision' }).click()
    await expect(page.getByText('Ask the handler: it decides about every door.')).toBeVisible()
    await page.getByLabel('Opens doors on the way').selectOption('yes')
    await page.getByRole('button', { name: 'Save as a new revision' }).click()
    await expect(page.getByRole('status').first()).toContainText(`revision ${revision + 1}`)
    await expect(page.getByLabel('Breadth across the shoulders')).toHaveValue('0.61')
    expect(await axeFinds(page)).toEqual([])
    await page.getByRole('link', { name: /Fennel/ }).click()
    await page.getByRole('button', { name: /^Undo: team card/ }).click()
    await expect(page.locator('.page-head')).toContainText(`card ${revision}`)
  })
})

test('the plan draws what the list says; the ladder and the sheets stand under the policy of the page', async () => {
  await onDemo(/Quern/, async (page) => {
    await page.locator('summary', { hasText: /^Plan$/ }).click()
    const walk = page.getByRole('list', { name: /^Parts of / })
    await expect(page.locator('.plan-words')).toHaveCount(await walk.getByRole('listitem').count())
    await page.locator('.verdict').first().waitFor({ timeout: 200_000 })
    await page.getByRole('link', { name: 'Ladder' }).first().click()
    await expect(page.getByRole('columnheader', { name: /recommended/ })).toBeVisible({ timeout: 100_000 })
    expect(await page.getByRole('row').count()).toBe(5)
    await page.goBack()
    await page.getByRole('link', { name: 'Sheet' }).first().click()
    await expect(page.getByRole('heading', { name: 'No sheet yet' })).toBeVisible({ timeout: 100_000 })
    await page.getByRole('radio', { name: 'Venue manager' }).check()
    const sheet = page.frameLocator('iframe')
    await expect(sheet.getByRole('heading', { level: 1 })).toContainText('For the venue')
    // The sheet's own style got through: its body is not as wide as the frame.
    expect(await sheet.locator('body').evaluate((body) => getComputedStyle(body).maxWidth)).not.toBe('none')
    for (const [form, words] of [
      ['Plain text', /Verdict: /],
      ['Table of readings', /,/],
      ['Map', /FeatureCollection/],
      ['Script to read aloud', /./],
    ] as const) {
      await page.getByRole('radio', { name: form }).check()
      await expect(page.locator('.sheet-text')).toContainText(words)
    }
    const saved = page.waitForEvent('download')
    await page.getByRole('button', { name: 'Save' }).click()
    expect((await saved).suggestedFilename()).toMatch(/venue\.txt$/)
  })
})

test('a back-up brings a venue to another phone, at once in its list; a damaged one changes nothing', async () => {
  let backUp = ''
  await onDemo(/Larch/, async (page) => {
    await page.goto(new URL('/settings', page.url()).href)
    const saved = page.waitForEvent('download')
    await page.getByRole('button', { name: 'Save a back-up' }).click()
    backUp = readFileSync(await (await saved).path(), 'utf8')
  })
  await onDemo(/Fennel/, async (page) => {
    await page.getByRole('link', { name: 'Venues' }).click()
    await page.getByRole('link', { name: 'Settings and back-up' }).click()
    // The page before has a file key of its own.
    await expect(page.getByRole('button', { name: 'Save a back-up' })).toBeVisible()
    const bring = (text: string) =>
      page
        .locator('input[type=file]')
        .setInputFiles({ name: 'back-up.json', mimeType: 'application/json', buffer: Buffer.from(text) })
    await bring(backUp.replace('Larch', 'Lurch'))
    await expect(page.getByRole('alert')).toContainText('the checksum differs')
    await bring(backUp)
    await expect(page.getByText(/^Brought back: \d+ entries of 1 venues/)).toBeVisible()
    await page.getByRole('link', { name: 'Venues' }).click()
    await expect(page.getByRole('link', { name: /Larch/ })).toBeVisible()
    await expect(page.getByRole('link', { name: /Fennel/ })).toBeVisible()
    expect(await axeFinds(page)).toEqual([])
  })
})

test('an answer whose source is not said is refused: the choice goes back, typed words stay in their field', async () => {
  await onDemo(/Larch/, async (page) => {
    await page.locator('summary', { hasText: 'Alarm, help and rest' }).first().click()
    const signal = page.getByLabel('Phone signal').first()
    const call = page.getByLabel('How to call for help').first()
    await expect(signal).toHaveValue('yes')
    await signal.selectOption('none')
    await expect(page.getByRole('status').first()).toContainText('Not saved: first say how you know')
    await expect(signal).toHaveValue('yes')
    await call.fill('ring the bell at the lodge')
    await call.blur()
    await expect(call).toHaveValue('ring the bell at the lodge')
    await page.getByRole('radio', { name: 'Looked myself' }).first().check({ force: true })
    await signal.selectOption('none')
    const said = page.getByRole('status').first()
    await expect(said).toContainText(/Saved: .*Phone signal: none/)
    // The colleague who answered it before is not overruled: both stand until one is settled on.
    await expect(page.getByText(/Not agreed: Lene Prior says “yes, all along”/)).toBeVisible()
    await page.getByRole('button', { name: 'Settle on “none on a part of it”' }).click()
    await expect(signal).toHaveValue('none')
    await expect(page.getByText(/Not agreed/)).toBeHidden()
    await call.focus()
    await call.blur()
    await expect(said).toContainText(/Saved: .*How to call for help: ring the bell/)
    await page.reload()
    await page.locator('summary', { hasText: 'Alarm, help and rest' }).first().click()
    await expect(page.getByText(/Not agreed: Lene Prior says “call the lodge/)).toBeVisible()
    await expect(signal).toHaveValue('none')
  })
})
