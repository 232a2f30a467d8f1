import { expect, it } from 'vitest'
import { held } from '../../src/units/held.ts'

it.each([
  ['Width 820 mm for 913 mm', 'Width 820\u00a0mm for 913\u00a0mm'],
  ['walk 10 metres, 17 paces.', 'walk 10\u00a0metres, 17\u00a0paces.'],
  ['4.5 s, 22.5 N, 5 %', '4.5\u00a0s, 22.5\u00a0N, 5\u00a0%'],
  ['5 steps, 3 Nurses, 2 mmHg', '5 steps, 3 Nurses, 2 mmHg'],
  ['Part 2 of 5', 'Part 2 of 5'],
])('%s', (text, kept) => {
  expect(held(text)).toBe(kept)
})
