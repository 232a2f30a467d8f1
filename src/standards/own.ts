import type { CodePack, Limit } from './pack.ts'

const row = (id: string, value: number, unit: Limit['unit']): Limit => ({
  id,
  value,
  unit,
  clause: 'common practice',
  edition: '1',
  source: 'common practice, no source',
  seen: false,
})

/** Figures of common practice, for a place without a code: on each line the strictest in use. */
export const own: CodePack = {
  id: 'own',
  name: 'own figures',
  limits: [
    row('headroom', 2.1, 'm'),
    row('projection-wall', 0.1, 'm'),
    row('projection-post', 0.1, 'm'),
    row('projection-band-low', 0.3, 'm'),
    row('projection-band-high', 2.1, 'm'),
    row('lip', 0.005, 'm'),
    row('bevel', 0.013, 'm'),
    row('slope', 1 / 12, 'rise/run'),
    row('cross-fall', 1 / 50, 'rise/run'),
    row('slot', 0.013, 'm'),
    row('door-force', 22.2, 'N'),
    row('door-pull-side', 0.6, 'm'),
    row('door-push-side', 0.305, 'm'),
  ],
}
