/** What could not be kept, in words for the screen. Nothing that was there before is lost by it. */
export interface Trouble {
  saved: false
  what: string
  whatToDo: string
}

/** The browser's error as a value; an error of our own making is thrown on. */
export function troubleOf(error: unknown): Trouble {
  const name = error instanceof Error || error instanceof DOMException ? error.name : ''
  if (name === 'QuotaExceededError')
    return {
      saved: false,
      what: 'Not saved: the phone has no room left.',
      whatToDo:
        'Leave this page open. Free some room on the phone, then save again; make a back-up before you close it.',
    }
  if (error instanceof DOMException)
    return {
      saved: false,
      what: `Not saved: the phone's store did not take it (${name}).`,
      whatToDo: 'Leave this page open, write the reading down, and save again.',
    }
  throw error
}
