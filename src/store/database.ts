import { type DBSchema, type IDBPDatabase, type IDBPTransaction, openDB, type StoreNames } from 'idb'
import type { Fact } from '../record/facts.ts'

/** What the phone keeps. Facts are only ever added. */
export interface Schema extends DBSchema {
  facts: { key: FactKey; value: Fact }
  /** The highest number of each device in a survey: where the next one is handed out. */
  marks: { key: [survey: string, device: string]; value: Mark }
  surveys: { key: string; value: SurveyRow }
  snapshots: { key: string; value: Snapshot }
  drafts: { key: string; value: unknown }
  settings: { key: string; value: unknown }
  memo: { key: string; value: unknown }
  photos: { key: string; value: Photo }
  /** What this phone knows of its office. */
  office: { key: string; value: unknown }
}

export type FactKey = [survey: string, device: string, n: number]

export interface Mark {
  survey: string
  device: string
  n: number
}

/** One line of the list of venues. */
export interface SurveyRow {
  survey: string
  name: string
  /** When a fact of it last came in here, ISO. */
  changed: string
}

/** All facts up to some number of each device, as one text: one read instead of thousands. */
export interface Snapshot {
  survey: string
  upTo: [device: string, n: number][]
  facts: string
}

/** A photo by the hash of its bytes. Bytes, not a Blob: some engines refuse Blobs here. */
export interface Photo {
  id: string
  type: string
  bytes: ArrayBuffer
}

export type Database = IDBPDatabase<Schema>
export type Writing = IDBPTransaction<Schema, StoreNames<Schema>[], 'readwrite'>

/** Each change of the stores has a number; a phone catches up from whichever it is at. */
const version = 2

/** Opens the database; rejects where the browser keeps none (private mode of some browsers). */
export function openDatabase(name: string): Promise<Database> {
  return openDB<Schema>(name, version, {
    upgrade(database, from) {
      if (from < 1) makeFirstStores(database)
      if (from < 2) database.createObjectStore('office')
    },
    // Another tab with a newer app wants to change the database: step aside, reads reopen it.
    blocking(_current, _blocked, event) {
      ;(event.target as IDBDatabase).close()
    },
  })
}

/** Every key that begins with these parts. */
export function keysUnder(...parts: string[]): IDBKeyRange {
  return IDBKeyRange.bound(parts, [...parts, []])
}

/** A transaction over some stores whose completion means that the bytes are on the disk. */
export function openWriting(database: Database, stores: StoreNames<Schema>[]): Writing {
  const tx = database.transaction(stores, 'readwrite', { durability: 'strict' })
  // Whoever writes awaits `done`; without this an abort would also be reported as unhandled.
  tx.done.catch(() => undefined)
  return tx
}

function makeFirstStores(database: Database): void {
  database.createObjectStore('facts', { keyPath: ['survey', 'device', 'n'] })
  database.createObjectStore('marks', { keyPath: ['survey', 'device'] })
  database.createObjectStore('surveys', { keyPath: 'survey' })
  database.createObjectStore('snapshots', { keyPath: 'survey' })
  database.createObjectStore('drafts')
  database.createObjectStore('settings')
  database.createObjectStore('memo')
  database.createObjectStore('photos', { keyPath: 'id' })
}
