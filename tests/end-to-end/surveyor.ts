import { expect, type Locator, type Page } from '@playwright/test'

/** What a surveyor does with one thumb, in the app's own words. Every touch is counted. */
export class Surveyor {
  taps = 0
  /** Entries whose "Saved" was read on screen. */
  readonly savedOnScreen: string[] = []
  readonly page: Page

  constructor(page: Page) {
    this.page = page
  }

  async tap(target: Locator): Promise<void> {
    await target.tap()
    this.taps += 1
  }

  async key(name: string | RegExp): Promise<void> {
    await this.tap(this.page.getByRole('button', { name, exact: typeof name === 'string' }))
  }

  /** Types a value on the app's own keypad. */
  async keypad(value: string): Promise<void> {
    const pad = this.page.getByRole('group', { name: 'Keypad' })
    for (const mark of value) await this.tap(pad.getByText(mark, { exact: true }))
  }

  /** Waits until the screen says that it is saved, and remembers the words. */
  async readsSaved(words: RegExp): Promise<void> {
    const said = this.page.getByRole('status').filter({ hasText: words }).first()
    await expect(said).toBeVisible()
    this.savedOnScreen.push((await said.textContent()) ?? '')
  }

  async newVenue(name: string, person: string): Promise<void> {
    await this.page.getByLabel('Name of the venue').fill(name)
    await this.page.getByLabel('Your name').fill(person)
    await this.tap(this.page.getByRole('button', { name: 'New venue' }))
    await expect(this.page.getByRole('heading', { level: 1, name })).toBeVisible()
  }

  /** Opens a fold of the page by its heading. */
  async unfold(name: string | RegExp): Promise<void> {
    await this.tap(this.page.locator('summary').filter({ hasText: name }).first())
  }

  /** Fills the plain stretch card of one part, from the strip to the next part. */
  async plainStretch(part: number, extra: { look?: (state: string) => Promise<void> } = {}): Promise<void> {
    const { page } = this
    const length = (4 + part / 10).toFixed(1)
    if (!(await page.getByRole('dialog').isVisible())) await this.key('Plain stretch')
    await expect(page.getByLabel('Value')).toBeVisible()
    await this.keypad(length)
    const laser = page.getByRole('radio', { name: 'laser' })
    if (!(await laser.isChecked())) await this.tap(laser)
    await this.key('Save')
    await this.readsSaved(new RegExp(`Saved: .*length ${length} m`, 'i'))
    await this.key('Passed the 1.05 m stick')
    await this.readsSaved(/Saved: width over 1\.05 m, stick/i)
    // As long as a person needs to walk and sweep it: sooner is marked too quick.
    await page.waitForTimeout((Number(length) / 1.5) * 1000)
    await this.key(/^Rod at .*, both shoulders, nothing$/)
    await this.readsSaved(/Saved: overhead swept/i)
    await extra.look?.('plain stretch card')
    const surface = page.getByRole('button', { name: 'Surface as before and dry' })
    const single = await page.getByText('One by one this time').isVisible()
    for (const name of ['No step, slope or cross-fall', 'No edge within 3 m']) {
      await this.key(name)
      if (single) await this.key('Next question')
    }
    if (await surface.isEnabled()) await this.tap(surface)
    else await this.saySurface()
    if (single) await this.key('Next question')
    for (const name of ['No slots over 13 mm', 'No door or gate']) {
      await this.key(name)
      if (single && name !== 'No door or gate') await this.key('Next question')
    }
    await this.key('No glass, mirror, dark or shiny floor, rope, low sun')
    await this.finishCard(part)
  }

  /** The first part of a zone says its finish in words. */
  private async saySurface(): Promise<void> {
    await this.key('Say the surface')
    await this.tap(this.page.getByRole('radio', { name: 'smooth' }))
    await this.readsSaved(/Saved: .*smooth/i)
    await this.tap(this.page.getByRole('radio', { name: 'dry' }))
    await this.readsSaved(/Saved: .*dry/i)
    await this.key('Back')
  }

  /** End sign, shoreline and surroundings; then the next part, unless it is the last. */
  private async finishCard(part: number): Promise<void> {
    const { page } = this
    await this.tap(page.getByRole('radio', { name: 'wall ends' }))
    await this.readsSaved(/Saved: end sign: wall ends/i)
    if (part === 1) {
      await this.tap(page.getByRole('group', { name: 'Shoreline' }).getByRole('radio', { name: 'Left' }))
      await this.readsSaved(/Saved: shoreline: left/i)
      await this.key('Choose the zone')
      await this.tap(page.getByRole('dialog').getByRole('radio', { name: 'Hall' }))
      await this.key('Back')
    }
    await this.key(/next plain stretch$/i)
    await expect(
      page.getByRole('heading', { level: 1, name: new RegExp(`^Part ${part + 1} of ${part + 1}`) }),
    ).toBeAttached()
  }

  /** Closes the card and stands on the strip again. */
  async leaveCard(): Promise<void> {
    await this.key('Close')
    await expect(this.page.getByRole('dialog')).toBeHidden()
  }
}
