import type { FactDraft } from '../facts.ts'
import type { FactLog } from '../log.ts'
import { root } from '../placement.ts'
import { fieldOfMark } from '../shapes.ts'
import type { Answer, Help, Override, StateMark, Walk } from '../survey.ts'
import { setWord } from './answer.ts'
import { create, set, setKey } from './draft.ts'

export type WalkFields = Pick<Walk, 'id' | 'name' | 'from' | 'to' | 'loop' | 'heading' | 'startSign' | 'note'>

export function addWalk(log: FactLog, { id, ...fields }: WalkFields): FactDraft[] {
  return create(log, id, root, 'walks', fields)
}

/** A plain field of a walk: name, from, to, loop, heading, startSign, note; undefined clears it. */
export function setWalkField(log: FactLog, walk: string, field: keyof WalkFields, value: unknown): FactDraft[] {
  return [setKey(log, walk, field, value)]
}

export function setWalkWord(log: FactLog, walk: string, item: string, answer: Answer): FactDraft[] {
  return setWord(log, walk, item, answer)
}

/** Who comes when the alarm sounds; undefined clears it. */
export function setAlarm(log: FactLog, walk: string, help: Help | undefined): FactDraft[] {
  return [setKey(log, walk, 'alarm', help)]
}

/** Adds a mark to the walk's history of states; marks are never overwritten. */
export function markState(log: FactLog, walk: string, mark: StateMark): FactDraft[] {
  return [set(log, walk, fieldOfMark(mark), mark)]
}

/** A practitioner's last word on a segment, in the open. */
export function addOverride(log: FactLog, walk: string, override: Override): FactDraft[] {
  return [
    ...create(log, override.id, walk, 'overrides', {}),
    { entity: override.id, field: 'override', value: override, replaces: [] },
  ]
}
