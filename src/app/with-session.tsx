import type { ComponentType } from 'preact'
import { useEffect, useState } from 'preact/hooks'
import { PageHead } from './components/page-head.tsx'
import { openSession } from './state/open-session.ts'
import { PhoneKeepsNothing } from './state/phone.ts'
import type { Session } from './state/session.ts'

interface RouteParts {
  params?: Record<string, string>
}

/** A page of one venue: opens its session from the address, then shows the screen. */
export function inVenue(Screen: ComponentType<{ session: Session }>) {
  return (route: RouteParts) => (
    <Open survey={route.params?.survey ?? ''}>{(session) => <Screen session={session} />}</Open>
  )
}

/** A page of one walk. */
export function inWalk(Screen: ComponentType<{ session: Session; walk: string }>) {
  return (route: RouteParts) => {
    const walk = route.params?.walk ?? ''
    return (
      <Open survey={route.params?.survey ?? ''}>
        {(session) => <Screen key={walk} session={session} walk={walk} />}
      </Open>
    )
  }
}

type Opening = { at: 'opening' } | { at: 'open'; session: Session } | { at: 'failed'; what: string; whatToDo: string }

function Open(props: { survey: string; children: (session: Session) => preact.ComponentChildren }) {
  const [opening, setOpening] = useState<Opening>({ at: 'opening' })
  useEffect(() => {
    let wanted = true
    openSession(props.survey).then(
      (session) => wanted && setOpening({ at: 'open', session }),
      (error: unknown) => wanted && setOpening(failed(error)),
    )
    return () => {
      wanted = false
    }
  }, [props.survey])

  if (opening.at === 'opening')
    return (
      <main class="page">
        <p role="status">Opening</p>
      </main>
    )
  if (opening.at === 'failed')
    return (
      <main class="page">
        <PageHead title="This venue cannot be opened" back={{ href: '/', label: 'Venues' }} />
        <p class="trouble" role="alert">
          {opening.what} {opening.whatToDo}
        </p>
      </main>
    )
  if (opening.session.survey.value.view.name === '')
    return (
      <main class="page">
        <PageHead title="This venue is not on this phone" back={{ href: '/', label: 'Venues' }} />
        <p>It may be on another phone. Open its file from the list of venues.</p>
      </main>
    )
  return <>{props.children(opening.session)}</>
}

function failed(error: unknown): Opening {
  if (error instanceof PhoneKeepsNothing) return { at: 'failed', what: error.message, whatToDo: error.whatToDo }
  return { at: 'failed', what: String(error), whatToDo: 'Load the page again. Nothing on this phone was changed.' }
}
