import { type Folded, foldEntity, type Issues } from './fold-entity.ts'
import type { FactLog } from './log.ts'
import { root } from './placement.ts'
import type { Conflict, SetAside, Survey, SurveyView } from './survey.ts'

interface Cache {
  /** Folded entities that are still good. */
  readonly folded: Map<string, Folded>
  /** Those of them with something to tell. */
  readonly issues: Map<string, Issues>
  survey: Survey | null
}

const caches = new WeakMap<FactLog, Cache>()

/**
 * The view of a log. Only entities touched since the last fold, and what they stand in, are built anew; every other part is
 * the same object as before, so that a screen can compare by identity. What it returns is never changed later.
 */
export function foldSurvey(log: FactLog): Survey {
  const cache = caches.get(log) ?? { folded: new Map(), issues: new Map(), survey: null }
  caches.set(log, cache)
  if (cache.survey && log.touched.size === 0) return cache.survey
  forget(log, cache)
  const { folded, issues } = cache
  const fold = (entity: string): Folded => {
    const good = folded.get(entity)
    if (good) return good
    const fresh = foldEntity(log, entity, fold)
    folded.set(entity, fresh)
    if (fresh.issues) issues.set(entity, fresh.issues)
    return fresh
  }
  const view = fold(root).node as SurveyView
  const conflicts = gather(log, cache, 'conflicts') as Conflict[]
  const setAside = gather(log, cache, 'setAside') as SetAside[]
  cache.survey = {
    survey: log.survey,
    view,
    ...(conflicts.length > 0 ? { conflicts } : {}),
    ...(setAside.length > 0 ? { setAside } : {}),
  }
  return cache.survey
}

/** Drops what is out of date: every touched entity and all that it stands in. */
function forget(log: FactLog, { folded, issues }: Cache): void {
  const visited = new Set<string>()
  for (const touched of log.touched) {
    let entity: string | undefined = touched
    while (entity !== undefined && !visited.has(entity)) {
      visited.add(entity)
      folded.delete(entity)
      issues.delete(entity)
      entity = log.places.of.get(entity)?.parent
    }
  }
  folded.delete(root)
  issues.delete(root)
  log.touched.clear()
}

function gather(log: FactLog, { folded, issues }: Cache, kind: keyof Issues): unknown[] {
  return [...issues.keys()]
    .filter((entity) => isInView(log, folded, entity))
    .sort()
    .flatMap((entity): readonly unknown[] => issues.get(entity)?.[kind] ?? [])
}

/** An entity's issues are told while everything it stands in is shown. */
function isInView(log: FactLog, folded: ReadonlyMap<string, Folded>, entity: string): boolean {
  const visited = new Set<string>()
  let at: string | undefined = log.places.of.get(entity)?.parent
  while (at !== undefined && !visited.has(at)) {
    visited.add(at)
    if (folded.get(at)?.node == null) return false
    at = log.places.of.get(at)?.parent
  }
  return true
}
