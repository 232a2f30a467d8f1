import type { Outline, Refusal } from '../sheets/content/tree.ts'

/** A sheet to be written as a file, and from where its material is had. */
export interface SheetOrder {
  outline: Outline
  as: 'pdf' | 'word' | 'braille-contracted' | 'braille-uncontracted'
  /** Address of the folder of the offline extras: "/extras/0123456789ab/". */
  extras: string
}

/** What crosses between a page and the worker that writes sheets: plain data only. */
export type ToSheets = { number: number } & SheetOrder

export type SheetStage = 'loading' | 'writing'

export type SheetAnswer =
  | { kind: 'written'; bytes: Uint8Array<ArrayBuffer> }
  | Refusal
  | { kind: 'problem'; problem: string; whatToDo: string }

export type FromSheets =
  | { kind: 'stage'; number: number; stage: SheetStage }
  | { kind: 'answer'; number: number; answer: SheetAnswer }
