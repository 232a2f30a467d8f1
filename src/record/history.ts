import { type Fact, type FactDraft, type FactId, factId } from './facts.ts'
import { signed } from './fold-answer.ts'
import { type FactLog, factOf, headsOf } from './log.ts'
import { factsWithin, isGone, removalNow } from './presence.ts'

/**
 * What can be undone and redone, plain data that a store can keep. Undo never rewrites: it adds facts that restore what
 * was there before. Each person takes back what they did themselves, as far as they like.
 */
export interface History {
  readonly done: readonly Step[]
  readonly undone: readonly Step[]
}

/** One act of one person. */
export interface Step {
  readonly label: string
  readonly person: string
  readonly facts: readonly FactId[]
}

export type Reversal =
  | { ok: true; drafts: FactDraft[]; label: string }
  /** Somebody else has changed it since: their work stands. */
  | { ok: false; what: string; whatToDo: string }

export const emptyHistory: History = { done: [], undone: [] }

/** After a new act: what its person had undone can no longer be redone. */
export function recordStep(history: History, facts: readonly Fact[], label: string, person: string): History {
  if (facts.length === 0) return history
  const step = { label, person, facts: facts.map(factId) }
  return { done: [...history.done, step], undone: history.undone.filter((one) => one.person !== person) }
}

/** What the person's undo (or redo) would take back; null: nothing. */
export function nextStep(history: History, way: 'undo' | 'redo', person: string): Step | null {
  return (way === 'undo' ? history.done : history.undone).findLast((step) => step.person === person) ?? null
}

/** The facts that take a step back. Undoing and redoing are the same act on different steps. */
export function reverseStep(log: FactLog, step: Step): Reversal {
  const facts = step.facts.map((id) => factOf(log, id)).filter((fact) => fact !== undefined)
  if (facts.length < step.facts.length) return refused(step, 'its facts are not on this phone')
  const made = new Set(facts.filter((fact) => fact.field === 'in' && isFirst(fact)).map((fact) => fact.entity))
  const drafts: FactDraft[] = []
  for (const fact of facts.toReversed()) {
    if (made.has(fact.entity)) continue
    const { heads, others } = standingFor(log, fact, (one) => isOthers(one, fact, step))
    if (others) return refused(step, others.person ?? 'somebody')
    drafts.push(...restoring(log, fact, heads))
  }
  for (const entity of made) {
    const other = [...factsWithin(log, entity)].find((fact) => isOthers(fact, facts[0], step))
    if (other) return refused(step, other.person ?? 'somebody')
    if (!isGone(log, entity)) drafts.push(goneDraft(log, entity, true))
  }
  return { ok: true, drafts, label: step.label }
}

/** After the facts that reversed `step` are in the log: it moves to the other side. */
export function recordReversal(history: History, way: 'undo' | 'redo', step: Step, facts: readonly Fact[]): History {
  const reversed = { ...step, facts: facts.map(factId) }
  const { done, undone } = history
  return way === 'undo'
    ? { done: done.filter((one) => one !== step), undone: [...undone, reversed] }
    : { done: [...done, reversed], undone: undone.filter((one) => one !== step) }
}

function isFirst(fact: Fact): boolean {
  return fact.replaces.length === 0
}

/**
 * The heads that stand where `fact` put a value: itself, or what took its place in turn (an undo puts a value back by new
 * facts). `others`: one of those that is somebody else's.
 */
function standingFor(
  log: FactLog,
  fact: Fact,
  isOther: (fact: Fact) => boolean,
): { heads: Fact[]; others: Fact | null } {
  const slot = log.entities.get(fact.entity)?.get(fact.field)
  const reached = new Set([factId(fact)])
  const heads: Fact[] = []
  for (const id of reached) {
    const successors = slot?.facts.filter((one) => one.replaces.includes(id)) ?? []
    const others = successors.find(isOther)
    if (others) return { heads, others }
    for (const one of successors) reached.add(factId(one))
    const head = headsOf(log, fact.entity, fact.field).find((one) => factId(one) === id)
    if (head) heads.push(head)
  }
  return { heads, others: null }
}

/** What was there before `fact`: one draft for each value it replaced, so that rivals come back as rivals. */
function restoring(log: FactLog, fact: Fact, heads: readonly Fact[]): FactDraft[] {
  const { entity, field } = fact
  const replaces = heads.map(factId)
  if (field === 'gone') return [goneDraft(log, entity, fact.value === false)]
  const before = fact.replaces.map((id) => factOf(log, id)).filter((one) => one !== undefined)
  if (before.length === 0) return [{ entity, field, value: null, replaces }]
  return before.map((one) => ({ entity, field, value: asItWas(one), replaces }))
}

/** An answer comes back under the name and time it was given, not those of the undo. */
function asItWas(fact: Fact): unknown {
  const isAnswer = fact.field.startsWith('word/') && typeof fact.value === 'object' && fact.value !== null
  return isAnswer ? signed(fact.value as object, fact) : fact.value
}

function goneDraft(log: FactLog, entity: string, gone: boolean): FactDraft {
  const replaces = headsOf(log, entity, 'gone').map(factId)
  return { entity, field: 'gone', value: gone ? removalNow(log) : false, replaces }
}

function isOthers(fact: Fact, own: Fact | undefined, step: Step): boolean {
  return fact.person === undefined ? fact.device !== own?.device : fact.person !== step.person
}

function refused(step: Step, who: string): Reversal {
  return {
    ok: false,
    what: `“${step.label}” cannot be taken back: changed since by ${who}.`,
    whatToDo: 'Enter what is right now; both versions are kept.',
  }
}
