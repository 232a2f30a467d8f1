import type { CodePack, Limit } from './pack.ts'

const row = (id: string, value: number, unit: Limit['unit'], clause: string): Limit => ({
  id,
  value,
  unit,
  clause: `ISO 21542 ${clause}, from memory`,
  edition: '2021',
  source: 'ISO 21542, from memory throughout',
  seen: false,
})

/** From memory throughout: only a preview of the document was ever at hand. */
export const iso21542: CodePack = {
  id: 'iso-21542',
  name: 'ISO 21542 (from memory)',
  limits: [
    row('headroom', 2.1, 'm', 'circulation'),
    row('projection-wall', 0.1, 'm', 'circulation'),
    row('projection-post', 0.3, 'm', 'circulation'),
    row('projection-band-low', 0.3, 'm', 'circulation'),
    row('projection-band-high', 2.1, 'm', 'circulation'),
    row('lip', 0.005, 'm', 'surfaces'),
    row('bevel', 0.015, 'm', 'doors'),
    row('slope', 1 / 12, 'rise/run', 'ramps'),
    row('cross-fall', 1 / 50, 'rise/run', 'paths'),
    row('slot', 0.013, 'm', 'surfaces'),
    row('door-force', 25, 'N', 'doors'),
    row('door-pull-side', 0.6, 'm', 'doors'),
    row('door-push-side', 0.3, 'm', 'doors'),
  ],
}
