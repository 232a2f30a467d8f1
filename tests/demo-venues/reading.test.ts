import { describe, expect, test } from 'vitest'
import { kind } from '../../src/catalogue/kinds.ts'
import type { Feature, SurveyView } from '../../src/record/survey.ts'
import { siOf } from '../fixtures/demo/raw.ts'
import { attributeOf, demoSurvey } from '../fixtures/demo/survey.ts'
import { demoVenues } from '../fixtures/demo/venues.ts'

/** Every feature and turn of the venue, with the segment it lies on. */
function featuresOf(view: SurveyView): Feature[] {
  return view.walks.flatMap((walk) =>
    walk.segments.flatMap((segment) => [...segment.features, ...(segment.turn ? [segment.turn] : [])]),
  )
}

describe.each(demoVenues)('%s as a file', (venue) => {
  const { view } = demoSurvey(venue)

  test('is read without a problem, is a demo, and carries its day and card', () => {
    expect(view.demo).toBe(true)
    expect(view.asOn).toBe('2026-11-30')
    expect(typeof view.team?.handler.opensDoors).toBe('boolean')
    expect(view.walks.length).toBeGreaterThanOrEqual(2)
    for (const { segments } of view.walks) {
      expect(segments.length).toBeGreaterThanOrEqual(4)
      expect(segments.length).toBeLessThanOrEqual(8)
    }
  })

  test('every feature is of a kind in the catalogue and says what its row requires', () => {
    for (const { id, kind: of, readings, words } of featuresOf(view)) {
      const row = kind(of)
      expect(row, `${id}: ${of}`).toBeDefined()
      for (const { id: attribute, type, required } of row?.attributes ?? []) {
        const wanted =
          required === 'always' || (required !== 'optional' && required.says.includes(words[required.item]?.says ?? ''))
        if (wanted)
          expect(type === 'quantity' ? readings[attribute] : words[attribute], `${id} ${attribute}`).toBeDefined()
      }
      const known = new Set(row?.attributes.map((attribute) => attribute.id))
      for (const named of [...Object.keys(readings), ...Object.keys(words)]) {
        expect(known, `${id} ${named}`).toContain(named)
      }
      for (const attribute of row?.attributes ?? []) {
        const answer = words[attribute.id]
        if (attribute.type === 'words' && attribute.says && answer) expect(attribute.says, id).toContain(answer.says)
      }
    }
  })

  test('the program reads each raw text as these tests do', () => {
    const plain = view.walks.flatMap((walk) =>
      walk.segments.flatMap((segment) => Object.values(segment.readings).flat()),
    )
    const onFeatures = featuresOf(view).flatMap(({ kind: of, readings }) =>
      Object.entries(readings).flatMap(([attribute, taken]) =>
        taken.map((reading) => ({ ...reading, gradient: attributeOf(of, attribute)?.quantity === 'gradient' })),
      ),
    )
    expect(plain.length + onFeatures.length).toBeGreaterThan(30)
    for (const reading of [...plain.map((reading) => ({ ...reading, gradient: false })), ...onFeatures]) {
      const si = siOf(reading.raw)
      const wanted = reading.gradient && reading.raw.includes('°') ? Math.tan(si) : si
      expect(Math.abs(reading.value - wanted), reading.raw).toBeLessThan(1e-9)
    }
  })

  test('readings are of 27 to 30 November 2026 and name a person', () => {
    const readings = view.walks.flatMap((walk) =>
      walk.segments.flatMap(({ readings: taken }) => Object.values(taken).flat()),
    )
    for (const { id, time, person } of readings) {
      expect(time, id).toMatch(/^2026-11-(27|28|29|30)T/)
      expect(person, id).toMatch(/\w/)
    }
  })
})
