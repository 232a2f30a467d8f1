import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { boldIsWider, layoutStrip, mostNodes } from '../../src/app/components/strip/layout.ts'
import { spreadLabels } from '../../src/app/components/strip/layout-labels.ts'
import type { StripItem, StripPart, StripView } from '../../src/app/components/strip/layout-part.ts'
import { greatestBend, placeParts } from '../../src/app/components/strip/layout-place.ts'
import { stripScale } from '../../src/app/components/strip/layout-scale.ts'
import { lineWidth, wrap } from '../../src/app/components/strip/layout-words.ts'

const degree = Math.PI / 180

function part(over: Partial<StripPart> & { number: number }): StripPart {
  return {
    id: `p${over.number}`,
    title: `${over.number} Corridor`,
    length: 10,
    width: 1.5,
    turn: null,
    turnText: null,
    verdict: null,
    items: [],
    ...over,
  }
}

const phone: StripView = { width: 390, height: 460, text: 15, current: 0 }

const anyItem: fc.Arbitrary<StripItem> = fc.record({
  id: fc.uuid(),
  text: fc.stringMatching(/^[a-z]{2,14}( [a-z0-9.]{1,14}){0,5}$/),
  along: fc.option(fc.double({ min: 0, max: 25, noNaN: true })),
  side: fc.constantFrom('left', 'right', 'centre', 'across'),
  offset: fc.option(fc.double({ min: 0, max: 4, noNaN: true })),
  mark: fc.constantFrom('caution', 'stop', 'note'),
})

const anyWalk = fc
  .array(
    fc.record({
      length: fc.option(fc.double({ min: 0.1, max: 25, noNaN: true })),
      width: fc.option(fc.double({ min: 0.3, max: 9, noNaN: true })),
      turn: fc.option(fc.double({ min: -Math.PI, max: Math.PI, noNaN: true })),
      items: fc.uniqueArray(anyItem, { maxLength: 8, selector: (item) => item.id }),
      verdict: fc.constantFrom(null, 'usable' as const, 'do-not-use' as const),
    }),
    { minLength: 1, maxLength: 80 },
  )
  .map((parts) =>
    parts.map((one, i) =>
      part({ ...one, number: i + 1, turnText: one.turn === null ? null : `turn ${Math.round(one.turn / degree)}` }),
    ),
  )

const anyView = fc.record({
  width: fc.integer({ min: 300, max: 1200 }),
  height: fc.integer({ min: 140, max: 900 }),
  text: fc.integer({ min: 14, max: 32 }),
})

describe('parts to scale', () => {
  test('a straight part is as long as measured on one scale and as wide as measured on a larger one', () => {
    const walk = [part({ number: 1, length: 12, width: 1.24 })]
    const scale = stripScale(phone, walk)
    const [one] = placeParts(walk, scale)
    if (!one) throw new Error('nothing placed')
    expect(one.start.y - one.end.y).toBeCloseTo(12 * scale.along)
    const [startLeft, startRight] = one.corners
    expect(startRight.x - startLeft.x).toBeCloseTo(1.24 * scale.across)
    expect(scale.across).toBeGreaterThan(scale.along)
  })

  test('a left turn of 45 degrees bends to the left by 45 degrees and shares its corners', () => {
    const [one, two] = placeParts(
      [part({ number: 1, length: 4, turn: 45 * degree, turnText: 'left 45°' }), part({ number: 2, length: 4 })],
      stripScale(phone, []),
    )
    if (!one || !two) throw new Error('nothing placed')
    expect(two.broken).toBeNull()
    expect(two.heading).toBeCloseTo(45 * degree)
    expect(two.end.x).toBeLessThan(two.start.x)
    expect(two.corners[0].x).toBeCloseTo(one.corners[3].x)
    expect(two.corners[0].y).toBeCloseTo(one.corners[3].y)
    expect(two.corners[1].x).toBeCloseTo(one.corners[2].x)
  })

  test('a turn of 60 degrees is drawn, one of 61 is broken with its angle written', () => {
    const at = (angle: number) =>
      placeParts(
        [
          part({ number: 1, length: 3, turn: angle * degree, turnText: `left ${angle}°` }),
          part({ number: 2, length: 2 }),
        ],
        stripScale(phone, []),
      )[1]
    expect(at(60)?.broken).toBeNull()
    expect(at(61)?.broken).toBe('left 61°')
    expect(at(61)?.heading).toBe(0)
  })

  test('two turns that together pass 60 degrees break at the second', () => {
    const turned = { length: 2, turn: 40 * degree, turnText: 'left 40°' }
    const placed = placeParts(
      [part({ number: 1, ...turned }), part({ number: 2, ...turned }), part({ number: 3, length: 2 })],
      stripScale(phone, []),
    )
    expect(placed.map((one) => one.broken)).toEqual([null, null, 'left 40°'])
  })

  test('every part goes up and stays in the band, whatever the walk', () => {
    fc.assert(
      fc.property(anyWalk, anyView, (parts, view) => {
        const scale = stripScale({ ...view, current: 0 }, parts)
        const placed = placeParts(parts, scale)
        expect(placed).toHaveLength(parts.length)
        placed.forEach((one, i) => {
          expect(one.end.y).toBeLessThan(one.start.y)
          expect(Math.abs(one.heading)).toBeLessThanOrEqual(greatestBend + 1e-9)
          if (i > 0) expect(one.start.y).toBeLessThanOrEqual(placed[i - 1]?.end.y ?? 0)
          for (const end of [one.start, one.end]) {
            expect(end.x - one.halfWidth).toBeGreaterThan(scale.band.left - 1)
            expect(end.x + one.halfWidth).toBeLessThan(scale.band.right + 1)
          }
        })
      }),
    )
  })
})

describe('words beside the strip', () => {
  test('lines keep to their width and lose nothing while they have room', () => {
    fc.assert(
      fc.property(fc.stringMatching(/^[a-zA-Z0-9 .,]{1,80}$/), fc.integer({ min: 60, max: 300 }), (text, width) => {
        const lines = wrap(text, width, 16, 99)
        for (const line of lines) expect(lineWidth(line, 16)).toBeLessThanOrEqual(width)
        expect(lines.join('').replaceAll(' ', '')).toBe(text.replaceAll(' ', ''))
      }),
    )
  })

  test('past the most lines the last one ends in an ellipsis', () => {
    const lines = wrap('fire door beside the cloakroom with a closer', 80, 16, 2)
    expect(lines).toHaveLength(2)
    expect(lines[1]?.endsWith('…')).toBe(true)
    expect(lineWidth(lines[1] ?? '', 16)).toBeLessThanOrEqual(80)
  })

  test('a lone label stands level with its anchor', () => {
    const { labels } = spreadLabels([{ key: 'a', anchor: { x: 0, y: 100 }, height: 20, rank: 0 }], 0, 300)
    expect(labels).toEqual([{ key: 'a', top: 90, height: 20, anchor: { x: 0, y: 100 } }])
  })

  test('two that want the same place stand evenly above and below it', () => {
    const wish = (key: string) => ({ key, anchor: { x: 0, y: 100 }, height: 20, rank: 0 })
    const { labels } = spreadLabels([wish('a'), wish('b')], 0, 300)
    expect(labels.map((one) => one.top)).toEqual([78, 102])
  })

  test('what has no room is left out by rank and counted', () => {
    const wish = (key: string, rank: number) => ({ key, anchor: { x: 0, y: 50 }, height: 20, rank })
    const { labels, left } = spreadLabels([wish('c', 3), wish('a', 1), wish('b', 2)], 0, 50)
    expect(labels.map((one) => one.key)).toEqual(['a', 'b'])
    expect(left).toBe(1)
  })

  test('on any walk words never overlap or leave the box, leaders never cross, and at most 200 elements are drawn', () => {
    fc.assert(
      fc.property(anyWalk, anyView, fc.nat(), (parts, box, at) => {
        const view = { ...box, current: at % parts.length }
        const scene = layoutStrip(parts, view)
        const leading = Math.round(view.text * 1.3)
        expect(scene.nodes).toBeLessThanOrEqual(mostNodes)
        expect(scene.parts.some((one) => one.current)).toBe(true)
        const inOrder = [...scene.labels].sort((a, b) => a.top - b.top)
        inOrder.forEach((label, i) => {
          expect(label.top).toBeGreaterThanOrEqual(0)
          expect(label.top + label.lines.length * leading).toBeLessThanOrEqual(view.height)
          for (const line of label.lines)
            expect(label.x + lineWidth(line, view.text) * (label.strong ? boldIsWider : 1)).toBeLessThanOrEqual(
              view.width,
            )
          const next = inOrder[i + 1]
          if (!next) return
          expect(label.top + label.lines.length * leading).toBeLessThanOrEqual(next.top)
          expect(label.leader[1]?.y).toBeLessThanOrEqual(next.leader[1]?.y ?? 0)
          expect(label.leader[2]?.y).toBeLessThan(next.leader[2]?.y ?? 0)
        })
      }),
    )
  })
})

describe('where you stand', () => {
  const walk = Array.from({ length: 60 }, (_, i) => part({ number: i + 1, length: 8 }))

  test('the dot is in the lower third, at the start of the part you record', () => {
    const scene = layoutStrip(walk, { ...phone, current: 30 })
    expect(scene.you?.at.y).toBeGreaterThan((phone.height * 2) / 3)
    expect(scene.you?.at.y).toBeLessThan(phone.height)
    expect(scene.parts.find((one) => one.current)?.id).toBe('p31')
  })

  test('parts far away are not drawn', () => {
    const scene = layoutStrip(walk, { ...phone, current: 30 })
    expect(scene.parts.length).toBeLessThan(8)
    expect(scene.parts.map((one) => one.index)).toContain(30)
  })

  test('a thing 3 m along and on the left is 3 m up from the start and left of the line', () => {
    const item: StripItem = { id: 'bin', text: 'bin', along: 3, side: 'left', offset: 0.5, mark: 'note' }
    const scene = layoutStrip([part({ number: 1, items: [item] })], phone)
    const mark = scene.marks[0]
    if (!mark || !scene.you) throw new Error('nothing drawn')
    expect(scene.you.at.y - mark.at.y).toBeCloseTo(3 * scene.scale.along)
    expect(scene.you.at.x - mark.at.x).toBeCloseTo(0.5 * scene.scale.across)
  })

  test('an open part has no far end and its unmeasured sides are dashed', () => {
    const [open] = layoutStrip([part({ number: 1, length: null, width: null })], phone).parts
    expect(open).toMatchObject({ open: true, sidesUnsure: true })
  })
})
