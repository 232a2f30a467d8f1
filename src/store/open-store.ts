import { deleteDB } from 'idb'
import type { Fact, FactDraft } from '../record/facts.ts'
import { type FactLog, mergeFacts } from '../record/log.ts'
import { backUp, type Restored, restore } from './back-up.ts'
import { openDatabase, type Photo, type SurveyRow } from './database.ts'
import { keepDraft, readDraft } from './drafts.ts'
import { appendFacts, factsAfter, type Saved, seenOf, type TakenIn, takeInFacts } from './facts.ts'
import { clearMemo, keepMemo, readMemo, readWholeMemo } from './memo.ts'
import { forgetOffice, recall, remember } from './office.ts'
import { keepPhoto, readPhoto } from './photos.ts'
import { reissue } from './reissue.ts'
import { removeSurvey } from './remove-survey.ts'
import { changeSettings, deviceId, readSettings, renewDeviceId, type Settings } from './settings.ts'
import { catchUp, openLog } from './snapshots.ts'
import { askToPersist, type StorageState, storageState } from './storage-state.ts'
import { openTabs } from './tabs.ts'
import type { Trouble } from './trouble.ts'

/** What this phone keeps. Every writing call resolves when it is durable, never before. */
export interface Store {
  /** This phone's id in facts. */
  device(): string
  /**
   * Parts this phone from its copy: what `from` wrote in the survey from number `first` on goes under an id that only this
   * phone has. Load the page again afterwards.
   */
  partFromCopy(survey: string, from: string, first: number): Promise<{ saved: true; facts: number } | Trouble>
  /** Lines of the list of venues, the last changed first. */
  surveys(): Promise<SurveyRow[]>
  openSurvey(survey: string): Promise<FactLog>
  /** Keeps drafts as this phone's facts, and only then takes them into the log, with what other tabs have added. */
  commit(log: FactLog, drafts: readonly FactDraft[], person: string): Promise<Saved>
  /** Keeps drafts as this phone's facts, for a log held elsewhere. */
  append(survey: string, drafts: readonly FactDraft[], person: string): Promise<Saved>
  /** Keeps facts from a file or another phone: all or none. */
  takeIn(facts: readonly Fact[]): Promise<TakenIn>
  /** Takes into an open log what the store holds beyond it. */
  catchUp(log: FactLog): Promise<Fact[]>
  factsAfter(survey: string, have: ReadonlyMap<string, number>): Promise<Fact[]>
  /** How far each device of a survey is held. */
  seen(survey: string): Promise<[device: string, n: number][]>
  /** Hears that another tab has added to a survey; returns how to stop. */
  listen(heard: (survey: string) => void): () => void
  keepDraft(survey: string, draft: unknown): Promise<{ saved: true } | Trouble>
  readDraft(survey: string): Promise<unknown>
  settings(): Promise<Settings>
  changeSettings(change: Settings): Promise<{ saved: true } | Trouble>
  readMemo(key: string): Promise<unknown>
  readWholeMemo(): Promise<Map<string, unknown>>
  keepMemo(entries: ReadonlyMap<string, unknown>): Promise<void>
  clearMemo(): Promise<void>
  keepPhoto(photo: Photo): Promise<{ saved: true } | Trouble>
  readPhoto(id: string): Promise<Photo | null>
  /** A note about the office, or null. */
  recall(key: string): Promise<unknown>
  remember(key: string, value: unknown): Promise<{ saved: true } | Trouble>
  forgetOffice(): Promise<void>
  state(): Promise<StorageState>
  askToPersist(): Promise<boolean | null>
  backUp(): Promise<string>
  restore(text: string): Promise<Restored>
  close(): void
  /** Deletes a survey and the photos given from this phone for good. */
  removeSurvey(survey: string, photos: readonly string[]): Promise<{ saved: true } | Trouble>
  /** Deletes everything this phone keeps. Other tabs can keep nothing more until they are loaded again. */
  wipe(): Promise<void>
}

export type Opened = { ok: true; store: Store } | { ok: false; what: string; whatToDo: string }

/** Opens this phone's store; a browser that keeps none is told in words. */
export async function openStore(name = 'tautline'): Promise<Opened> {
  if (typeof indexedDB === 'undefined') return keepsNothing()
  try {
    const database = await openDatabase(name)
    let device = await deviceId(database)
    const tabs = openTabs(name)
    const append: Store['append'] = async (survey, drafts, person) => {
      const saved = await appendFacts(database, survey, drafts, { device, person })
      if (saved.saved) tabs.tell(survey)
      return saved
    }
    const store: Store = {
      device: () => device,
      async partFromCopy(survey, from, first) {
        if (device === from) device = await renewDeviceId(database)
        return reissue(database, survey, { from, first, to: device })
      },
      surveys: async () =>
        (await database.getAll('surveys')).sort((a, b) => (a.changed < b.changed ? 1 : a.changed > b.changed ? -1 : 0)),
      openSurvey: (survey) => openLog(database, survey, device),
      append,
      async commit(log, drafts, person) {
        const saved = await append(log.survey, drafts, person)
        if (!saved.saved) return saved
        const { refused } = mergeFacts(log, saved.facts)
        // Another tab of this phone has written in between.
        if (refused.length > 0) await catchUp(database, log)
        return saved
      },
      async takeIn(facts) {
        const taken = await takeInFacts(database, facts)
        if (taken.saved) for (const survey of new Set(facts.map((fact) => fact.survey))) tabs.tell(survey)
        return taken
      },
      catchUp: (log) => catchUp(database, log),
      factsAfter: (survey, have) => factsAfter(database, survey, have),
      seen: (survey) => seenOf(database, survey),
      listen: tabs.listen,
      keepDraft: (survey, draft) => keepDraft(database, survey, draft),
      readDraft: (survey) => readDraft(database, survey),
      settings: () => readSettings(database),
      changeSettings: (change) => changeSettings(database, change),
      readMemo: (key) => readMemo(database, key),
      readWholeMemo: () => readWholeMemo(database),
      keepMemo: (entries) => keepMemo(database, entries),
      clearMemo: () => clearMemo(database),
      keepPhoto: (photo) => keepPhoto(database, photo),
      readPhoto: (id) => readPhoto(database, id),
      recall: (key) => recall(database, key),
      remember: (key, value) => remember(database, key, value),
      forgetOffice: () => forgetOffice(database),
      state: () => storageState(),
      askToPersist: () => askToPersist(),
      backUp: () => backUp(database),
      restore: (text) => restore(database, text),
      close() {
        tabs.close()
        database.close()
      },
      removeSurvey: (survey, photos) => removeSurvey(database, survey, photos),
      async wipe() {
        store.close()
        await deleteDB(name)
      },
    }
    return { ok: true, store }
  } catch (error) {
    if (error instanceof DOMException) return keepsNothing(error.name)
    throw error
  }
}

function keepsNothing(why = 'no IndexedDB'): Opened {
  return {
    ok: false,
    what: `This browser keeps nothing (${why}): a private window, or storage switched off. What is typed here would be lost.`,
    whatToDo: 'Open the app in an ordinary window, or allow it to keep data, before you start.',
  }
}
