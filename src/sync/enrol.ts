import { type Answer, ask, type Line } from './line.ts'
import { agree, type EnrolReply, type EnrolRequest, type Hello, spoken } from './messages.ts'

/** Turns a one-time code into a token, after making sure that app and office speak the same version. */
export async function enrol(line: Line, request: EnrolRequest): Promise<Answer<EnrolReply>> {
  const hello = await ask<Hello>(line, 'GET', '/api/hello')
  if (!hello.ok) return hello
  if (hello.body.office !== 'tautline')
    return refused('no-office', 'There is no Tautline office at this address.', 'Check the address of the code.')
  const agreed = agree(spoken, hello.body.protocol)
  if (agreed.protocol === null)
    return agreed.older === 'own'
      ? refused('app-too-old', 'This app is too old for the office.', 'Renew the app, then enrol.')
      : refused('app-too-new', 'This app is newer than the office.', 'Ask the administrator to renew the office.')
  return ask<EnrolReply>(line, 'POST', '/api/enrol', request)
}

function refused(error: string, what: string, whatToDo: string): Answer<never> {
  return { ok: false, again: false, status: 426, refusal: { error, what, whatToDo } }
}
