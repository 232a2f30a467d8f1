import { signal } from '@preact/signals'

/** What the first page says of the office; filled in once the office's own part of the app has been loaded. */
export const surveyIs = signal<ReadonlyMap<string, string>>(new Map())

/** What has to be seen to on the page of the exchange; null: nothing. */
export const officeTrouble = signal<string | null>(null)
