import { effect } from '@preact/signals'
import { currentValue } from '../../record/log.ts'
import { root } from '../../record/placement.ts'
import type { Store } from '../../store/open-store.ts'
import { photosNamed, saysWhere } from '../../sync/client.ts'
import { dayAndHour } from '../components/day-words.ts'
import { keepForm } from './form-draft.ts'
import type { Copied, Told } from './office-outcome.ts'
import { officeTrouble, surveyIs } from './office-said.ts'
import { type Enrolment, type OfficeWork, officeWork, type Phone } from './office-work.ts'
import { catchUpSessions } from './open-session.ts'
import { phoneStore } from './phone.ts'
import { listSurveys } from './surveys.ts'

/** Longest one request may take, milliseconds: a slow line is tried again, a dead one is noticed. */
const patience = 60_000
/** How often this phone looks whether something waits while the app is open, milliseconds. */
const lookEvery = 60_000

let watching: Promise<OfficeWork> | null = null

/** This phone's exchange with its office, begun once a page: it sends by itself when the app is opened, comes back or finds a network. */
export function office(): Promise<OfficeWork> {
  watching ??= phoneStore().then(watch)
  // Where the browser keeps nothing, the page says so by itself; the next call tries again.
  watching.catch(() => {
    watching = null
  })
  return watching
}

async function watch(store: Store): Promise<OfficeWork> {
  const work = officeWork(phoneOf(store))
  await work.begin()
  effect(() => tellFirstPage(work))
  work.send('all')
  addEventListener('online', () => work.send('all'))
  document.addEventListener('visibilitychange', () => {
    if (document.visibilityState === 'visible') work.send('all')
  })
  setInterval(() => {
    if (document.visibilityState === 'visible') work.send('waiting')
  }, lookEvery)
  return work
}

/** Signs out and deletes everything this phone keeps, then begins anew. */
export async function wipePhone(): Promise<void> {
  await (await phoneStore()).wipe()
  location.replace('/')
}

/** Keeps both phones' entries of a survey: this one's go under an id of its own, and the page begins anew with it. */
export async function keepBoth(survey: string, { device, first }: Copied): Promise<Told | null> {
  const parted = await (await phoneStore()).partFromCopy(survey, device, first)
  if (!parted.saved) return parted
  location.reload()
  return null
}

/** Deletes a survey from this phone, as the office has, and begins the page anew. Photos that another survey names stay. */
export async function removeHere(survey: string): Promise<Told | null> {
  const store = await phoneStore()
  const named = async (id: string) => photosNamed(await store.factsAfter(id, new Map()))
  const others = (await store.surveys()).filter((row) => row.survey !== survey)
  const kept = new Set((await Promise.all(others.map((row) => named(row.survey)))).flat())
  const removed = await store.removeSurvey(
    survey,
    (await named(survey)).filter((photo) => !kept.has(photo)),
  )
  if (!removed.saved) return removed
  await Promise.all([store.remember(`sync/${survey}`, null), keepForm(`team ${survey}`, null)])
  location.reload()
  return null
}

function tellFirstPage({ enrolment, where, stuck }: OfficeWork): void {
  const office = enrolment.value
  const says = [...where.value].map(([survey, one]): [string, string] => {
    const held = stuck.value.get(survey)
    return [survey, held ? `${saysWhere(one, dayAndHour)} ${held.what}` : saysWhere(one, dayAndHour)]
  })
  surveyIs.value = new Map(office ? says : [])
  officeTrouble.value = office?.ended ? `${office.ended.what} ${office.ended.whatToDo}` : null
}

function phoneOf(store: Store): Phone {
  // Kept, so that a long survey is not read whole at each start for this alone.
  const isInvented = async (survey: string) => {
    const known = await store.recall(`invented/${survey}`)
    if (typeof known === 'boolean') return known
    const isDemo = currentValue(await store.openSurvey(survey), root, 'demo') === true
    await store.remember(`invented/${survey}`, isDemo)
    return isDemo
  }
  return {
    store: {
      seen: store.seen,
      factsAfter: store.factsAfter,
      readPhoto: store.readPhoto,
      async takeIn(facts) {
        const taken = await store.takeIn(facts)
        if (taken.saved) await Promise.all([catchUpSessions(), listSurveys()])
        return taken
      },
      recall: store.recall,
      // A note that found no room is no harm: the survey then counts as being on this phone only.
      remember: async (key, value) => void (await store.remember(key, value)),
    },
    device: store.device,
    keep: (enrolment) => store.remember('enrolment', enrolment),
    recallEnrolment: async () => (await store.recall('enrolment')) as Enrolment | null,
    forgetOffice: store.forgetOffice,
    async surveys() {
      const rows = await store.surveys()
      const told = await Promise.all(rows.map(async ({ survey }) => ({ survey, invented: await isInvented(survey) })))
      return told.filter((one) => !one.invented).map(({ survey }) => survey)
    },
    fetch: (address, init, stop) =>
      fetch(address, {
        ...init,
        cache: 'no-store',
        credentials: 'omit',
        signal: AbortSignal.any([stop, AbortSignal.timeout(patience)]),
      }),
    now: () => new Date().toISOString(),
    after(milliseconds, call) {
      const timer = setTimeout(call, milliseconds)
      return () => clearTimeout(timer)
    },
  }
}
