import { type Answer, ask, type Line } from './line.ts'
import { agree, type EnrolReply, type EnrolRequest, type Hello, spoken } from './messages.ts'

/** Turns a one-time code into a token, after making sure that app and office speak the same version. */
export async function enrol(line: Line, request: EnrolRequest): Promise<Answer<EnrolReply>> {
  const hello = await ask<Hello>(line, 'GET', '/api/hello')
  if (!hello.ok || hello.body.office !== 'tautline')
    return refused(
      'no-office',
      'No office answers at this address.',
      'Look whether this phone has a network, and whether the app was opened from the address that came with the code.',
    )
  const agreed = agree(spoken, hello.body.protocol)
  if (agreed.protocol === null)
    return agreed.older === 'own'
      ? refused('app-too-old', 'This app is too old for the office.', 'Renew the app, then enrol.')
      : refused('app-too-new', 'This app is newer than the office.', 'Ask the administrator to renew the office.')
  return ask<EnrolReply>(line, 'POST', '/api/enrol', request)
}

/** Ends this phone's token at the office. */
export function signOut(line: Line): Promise<Answer<object>> {
  return ask(line, 'POST', '/api/me/sign-out')
}

function refused(error: string, what: string, whatToDo: string): Answer<never> {
  return { ok: false, again: false, status: 426, refusal: { error, what, whatToDo } }
}
