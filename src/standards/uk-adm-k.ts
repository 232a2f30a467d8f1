import type { CodePack, Limit } from './pack.ts'

const adm = 'Approved Document M, volume 2 (England)'
const adk = 'Approved Document K (England)'
const row = (
  id: string,
  value: number,
  unit: Limit['unit'],
  clause: string,
  source: string,
  edition: string,
  seen: boolean,
): Limit => ({ id, value, unit, clause, edition, source, seen })

/** Where `seen` is true the figure was read on secondary pages of mixed date, not in the document. */
export const ukAdmK: CodePack = {
  id: 'uk-adm-k',
  name: 'Approved Documents M and K',
  limits: [
    row('headroom', 2.0, 'm', 'AD K ramps', adk, '2013', true),
    row('projection-wall', 0.1, 'm', 'AD M 3.14', adm, '2015', false),
    row('projection-post', 0.1, 'm', 'AD M 3.14', adm, '2015', false),
    row('projection-band-low', 0.3, 'm', 'AD M 3.14', adm, '2015', false),
    row('projection-band-high', 2.1, 'm', 'AD M 3.14', adm, '2015', false),
    row('lip', 0.005, 'm', 'AD M 2.7', adm, '2015', false),
    row('bevel', 0.015, 'm', 'AD M 2.7', adm, '2015', false),
    row('slope', 1 / 12, 'rise/run', 'AD M table 1', adm, '2015', false),
    row('cross-fall', 1 / 40, 'rise/run', 'AD M 1.26', adm, '2015', true),
    row('slot', 0.013, 'm', 'AD M 1.13', adm, '2015', false),
    row('door-force', 22.5, 'N', 'AD M 2.17a', adm, '2015', true),
    row('door-pull-side', 0.3, 'm', 'AD M 2.17', adm, '2015', true),
    row('door-push-side', 0, 'm', 'AD M 2.17', adm, '2015', false),
  ],
}
