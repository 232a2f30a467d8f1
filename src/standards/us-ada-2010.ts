import type { CodePack, Limit } from './pack.ts'

const source = '2010 ADA Standards for Accessible Design'
const row = (id: string, value: number, unit: Limit['unit'], clause: string, seen = true): Limit => ({
  id,
  value,
  unit,
  clause,
  edition: '2010',
  source,
  seen,
})

/** Metric figures as the document prints them; gradients from its ratios. */
export const usAda2010: CodePack = {
  id: 'us-ada-2010',
  name: '2010 ADA Standards',
  limits: [
    row('headroom', 2.03, 'm', 'ADA 307.4'),
    row('projection-wall', 0.1, 'm', 'ADA 307.2'),
    row('projection-post', 0.305, 'm', 'ADA 307.3'),
    row('projection-band-low', 0.685, 'm', 'ADA 307.2'),
    row('projection-band-high', 2.03, 'm', 'ADA 307.2'),
    row('lip', 0.0064, 'm', 'ADA 303.2'),
    row('bevel', 0.013, 'm', 'ADA 303.3'),
    row('slope', 1 / 12, 'rise/run', 'ADA 405.2'),
    row('cross-fall', 1 / 48, 'rise/run', 'ADA 403.3'),
    row('slot', 0.013, 'm', 'ADA 302.3'),
    row('door-force', 22.2, 'N', 'ADA 404.2.9'),
    row('door-pull-side', 0.455, 'm', 'ADA 404.2.4.1', false),
    row('door-push-side', 0.305, 'm', 'ADA 404.2.4.1', false),
  ],
}
