import { computed, signal } from '@preact/signals'
import { foldSurvey } from '../../record/fold.ts'
import {
  emptyHistory,
  type History,
  nextStep,
  recordReversal,
  recordStep,
  reverseStep,
  type Step,
} from '../../record/history.ts'
import type { FactLog } from '../../record/log.ts'
import type { Store } from '../../store/open-store.ts'
import { judgeOf } from './judging.ts'
import { newId } from './new-id.ts'
import { phoneStore } from './phone.ts'
import type { Committed, EntryDraft, Session } from './session.ts'
import { choices, readChoices } from './settings.ts'

const sessions = new Map<string, Promise<Session>>()
/** How each open session takes in what the store holds beyond it. */
const catchingUp = new Map<string, () => Promise<void>>()

/** After facts came in past the sessions (a file, a back-up): every open one shows them. */
export async function catchUpSessions(): Promise<void> {
  await Promise.all([...catchingUp.values()].map((catchUp) => catchUp()))
}

/** The session of a survey on this phone: one a page, so that going from screen to screen keeps undo and judgement. */
export function openSession(survey: string): Promise<Session> {
  const known = sessions.get(survey)
  if (known) return known
  const opening = readChoices().then(async () => start(await phoneStore(), survey))
  sessions.set(survey, opening)
  // A failed opening is tried again the next time.
  opening.catch(() => sessions.delete(survey))
  return opening
}

async function start(store: Store, id: string): Promise<Session> {
  const log = await store.openSurvey(id)
  const survey = signal(foldSurvey(log))
  const person = computed(() => choices.value.person)
  const history = signal<History>(emptyHistory)
  const draft = signal<EntryDraft | null>(((await store.readDraft(id)) as EntryDraft | null) ?? null)
  const seen = () => {
    survey.value = foldSurvey(log)
  }
  const catchUp = () => store.catchUp(log).then(seen)
  catchingUp.set(id, catchUp)
  store.listen((changed) => {
    if (changed === id) void catchUp()
  })

  // One act after the other, so that each is made durable against the log with the one before it in.
  let last: Promise<unknown> = Promise.resolve()
  const inTurn = <T>(act: () => Promise<T>): Promise<T> => {
    const turn = last.then(act, act)
    last = turn.catch(() => undefined)
    return turn
  }

  const step = (way: 'undo' | 'redo') => inTurn(() => stepBack(way))
  async function stepBack(way: 'undo' | 'redo'): Promise<Committed | null> {
    const next = nextStep(history.value, way, person.value)
    if (!next) return null
    const reversal = reverseStep(log, next)
    if (!reversal.ok) return { saved: false, what: reversal.what, whatToDo: reversal.whatToDo }
    const saved = await store.commit(log, reversal.drafts, person.value)
    if (!saved.saved) return saved
    history.value = recordReversal(history.value, way, next, saved.facts)
    seen()
    return { saved: true, label: next.label, at: saved.at }
  }

  return {
    survey,
    log: (): FactLog => log,
    person,
    commit: (drafts, label) =>
      inTurn(async (): Promise<Committed> => {
        const saved = await store.commit(log, drafts, person.value)
        if (!saved.saved) return saved
        history.value = recordStep(history.value, saved.facts, label, person.value)
        seen()
        return { saved: true, label, at: saved.at }
      }),
    undo: () => step('undo'),
    redo: () => step('redo'),
    undoLabel: computed(() => labelOf(nextStep(history.value, 'undo', person.value))),
    redoLabel: computed(() => labelOf(nextStep(history.value, 'redo', person.value))),
    judgement: judgeOf(survey),
    keepDraft: async (entry) => {
      draft.value = entry
      await store.keepDraft(id, entry)
    },
    draft,
    newId,
  }
}

function labelOf(step: Step | null): string | null {
  return step?.label ?? null
}
