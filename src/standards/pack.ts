import * as v from 'valibot'

/**
 * A code pack: published limits that give a caution, compared at the reading itself. Only the team's own limits are
 * taken at the unsafe end. Values in SI; `seen` false: from memory, check before relying on it.
 */
const limit = v.looseObject({
  id: v.string(),
  value: v.pipe(v.number(), v.finite()),
  unit: v.picklist(['m', 'N', 'rise/run', 'm/s']),
  clause: v.string(),
  edition: v.string(),
  source: v.string(),
  seen: v.boolean(),
})

export const packIds = ['us-ada-2010', 'uk-adm-k', 'iso-21542', 'own'] as const
export type PackId = (typeof packIds)[number]

export const codePack = v.looseObject({
  id: v.picklist(packIds),
  name: v.string(),
  limits: v.array(limit),
})

export type Limit = v.InferOutput<typeof limit>
export type CodePack = v.InferOutput<typeof codePack>

/** What the checks ask a pack for. */
export const limitIds = [
  'headroom',
  'projection-wall',
  'projection-post',
  'projection-band-low',
  'projection-band-high',
  'lip',
  'bevel',
  'slope',
  'cross-fall',
  'slot',
  'door-force',
  'door-pull-side',
  'door-push-side',
] as const
export type LimitId = (typeof limitIds)[number]
