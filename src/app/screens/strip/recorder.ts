import { useRef, useState } from 'preact/hooks'
import type { FactDraft } from '../../../record/facts.ts'
import type { FactLog } from '../../../record/log.ts'
import type { Answer, Segment, Walk } from '../../../record/survey.ts'
import type { Units } from '../../components/strip/units-offered.ts'
import type { Committed, Session } from '../../state/session.ts'

/** What is said of the last act: read out politely, and kept on screen until the next. */
export interface Said {
  text: string
  failed: boolean
}

/** The one way in which the sheets of the recording screen write. */
export interface Recorder {
  session: Session
  units: Units
  walk: Walk
  segment: Segment
  index: number
  before: Segment | undefined
  /** Writes and says "Saved: <label>" once the facts are durable. False: not saved, and it is said what to do. */
  write(make: (log: FactLog) => FactDraft[], label: string): Promise<boolean>
  /** Says something that saved nothing. */
  say(text: string): void
  /** An answer by this person, now. */
  answer(says: string, how: Answer['how'], more?: Partial<Answer>): Answer
}

/** Who and when, for an answer or a reading; nobody's name where none was given. */
export function stamp(session: Session): { person?: string; time: string } {
  const person = session.person.value
  return { ...(person === '' ? {} : { person }), time: new Date().toISOString() }
}

/** Commits, reads back, shakes the phone a little. `said` is null until something happened. */
export function useWriter(session: Session) {
  const [said, setSaid] = useState<Said | null>(null)
  const busy = useRef<Promise<unknown>>(Promise.resolve())

  const tell = (committed: Committed, words: string) => {
    if (committed.saved) {
      setSaid({ text: words, failed: false })
      navigator.vibrate?.(30)
    } else setSaid({ text: `Not saved: ${committed.what}. ${committed.whatToDo}`, failed: true })
    return committed.saved
  }

  /** One after the other, so that each draft is made from the log with the one before it in. */
  const write: Recorder['write'] = (make, label) => {
    const turn = busy.current.then(async () => {
      try {
        return tell(await session.commit(make(session.log()), label), `Saved: ${label}`)
      } catch (error) {
        return tell({ saved: false, what: String(error), whatToDo: 'Write it down on paper and go on.' }, '')
      }
    })
    busy.current = turn
    return turn
  }

  const step = async (act: () => Promise<Committed | null>, word: string) => {
    const done = await act()
    if (done) tell(done, `${word}: ${done.saved ? done.label : ''}`)
    else setSaid({ text: `Nothing to ${word === 'Undone' ? 'undo' : 'redo'}`, failed: false })
  }

  return {
    said,
    say: (text: string) => setSaid({ text, failed: false }),
    /** What was said belongs to the sheet before. */
    hush: () => setSaid(null),
    write,
    undo: () => step(() => session.undo(), 'Undone'),
    redo: () => step(() => session.redo(), 'Done again'),
  }
}
