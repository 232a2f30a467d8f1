import { type Opened, openStore, type Store } from '../../store/open-store.ts'

let opening: Promise<Opened> | null = null

/** This phone's store, opened once a page; where the browser keeps none, the reason and what to do. */
export function openPhone(): Promise<Opened> {
  opening ??= openStore()
  return opening
}

/** The store, or an error with the reason in words: for what cannot go on without one. */
export async function phoneStore(): Promise<Store> {
  const opened = await openPhone()
  if (!opened.ok) throw new PhoneKeepsNothing(opened.what, opened.whatToDo)
  return opened.store
}

export class PhoneKeepsNothing extends Error {
  readonly whatToDo: string

  constructor(what: string, whatToDo: string) {
    super(what)
    this.whatToDo = whatToDo
  }
}
