export type Address = { ok: true; address: string } | { ok: false; what: string; whatToDo: string }

/**
 * The office's address as a person typed it. This app may only talk to where it was itself opened from (`own`, an origin):
 * any other office is reached by opening the app there.
 */
export function officeAddress(typed: string, own: string): Address {
  const text = typed.trim()
  if (text === '') return { ok: true, address: own }
  const scheme = own.startsWith('http:') ? 'http' : 'https'
  const whole = /^[a-z]+:\/\//i.test(text) ? text : `${scheme}://${text}`
  const origin = URL.canParse(whole) ? new URL(whole).origin : 'null'
  if (origin === own) return { ok: true, address: own }
  if (origin === 'null')
    return { ok: false, what: `“${text}” is no address.`, whatToDo: `Type it like this one: ${own}` }
  return {
    ok: false,
    what: `This app was opened from ${own} and talks to that address alone.`,
    whatToDo: `Open ${origin} in this phone's browser and enrol there. What is on this phone stays here: take it along as a back-up.`,
  }
}

/** The one-time code behind the # of an address, where no server's log sees it; '' where there is none. */
export function codeInAddress(fragment: string): string {
  const text = fragment.replace(/^#/, '').replace(/^code=/, '')
  return /^[A-Za-z0-9-]{8,40}$/.test(text) ? text : ''
}
