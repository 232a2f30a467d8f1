import type { SurveySynced } from '../../sync/client.ts'

/** What happened, and what to do. */
export interface Told {
  what: string
  whatToDo: string
}

/** Where two phones wrote under one id: from `first` of `device` on. */
export interface Copied {
  device: string
  first: number
}

/** A survey that did not get through. */
export interface Stuck extends Told {
  copied: Copied | null
  /** The office deleted it for good, and this phone should. */
  erased: boolean
}

export const notTold = {
  what: 'Signed out on this phone; the office could not be told.',
  whatToDo: 'Ask the administrator to end this phone’s access.',
  failed: true,
}

export const stopped = {
  what: 'Stopped.',
  whatToDo: 'What had arrived is at the office; the rest stays on this phone and goes with the next sending.',
  failed: false,
}

/** What stands in the way of each survey after an exchange; one that got through is free again. */
export function stuckAfter(before: ReadonlyMap<string, Stuck>, results: readonly SurveySynced[]): Map<string, Stuck> {
  const after = new Map(before)
  for (const { survey, entries, photos } of results) {
    after.delete(survey)
    if (!entries.ok && (entries.kind === 'refused' || entries.kind === 'erased')) {
      const { what, whatToDo, kind } = entries
      after.set(survey, { what, whatToDo, copied: null, erased: kind === 'erased' })
    }
    if (!entries.ok && entries.kind === 'copied')
      after.set(survey, {
        what: `This phone is a copy of another, or the other of this: both wrote entry ${entries.first} and on. Nothing is lost.`,
        whatToDo: 'Keep both: this phone’s entries then stand beside the other’s, and go to the office.',
        copied: { device: entries.device, first: entries.first },
        erased: false,
      })
    const refused = photos?.refused[0]
    if (refused)
      after.set(survey, {
        what: `${photos.refused.length === 1 ? 'A photo was' : `${photos.refused.length} photos were`} not taken: ${refused.what}`,
        whatToDo: 'It stays on this phone: make a back-up, and take the photo again.',
        copied: null,
        erased: false,
      })
  }
  return after
}

/** How an exchange ended, in words. `stuck`: how many surveys something stands in the way of. */
export function outcome(results: readonly SurveySynced[], stuck: number): Told & { failed: boolean } {
  const failed = results.find(
    ({ entries }) => !entries.ok && (entries.kind === 'later' || entries.kind === 'signed-out'),
  )
  if (failed && !failed.entries.ok)
    return { what: failed.entries.what, whatToDo: failed.entries.whatToDo, failed: failed.entries.kind !== 'later' }
  const sum = (of: 'sent' | 'got') => results.reduce((all, { entries }) => all + (entries.ok ? entries[of] : 0), 0)
  const [sent, got] = [sum('sent'), sum('got')]
  const what =
    sent + got === 0 ? 'Nothing new on either side.' : `Exchanged: ${counted(sent)} sent, ${counted(got)} got.`
  if (stuck === 0) return { what, whatToDo: '', failed: false }
  return {
    what,
    whatToDo: `${stuck === 1 ? 'One venue' : `${stuck} venues`} did not get through: it stands below with what to do.`,
    failed: true,
  }
}

function counted(n: number): string {
  return n === 1 ? '1 entry' : `${n} entries`
}
