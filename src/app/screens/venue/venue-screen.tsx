import { PageHead } from '../../components/page-head.tsx'
import type { Session } from '../../state/session.ts'

export function VenueScreen({ session }: { session: Session }) {
  return (
    <main class="page">
      <PageHead title={session.survey.value.view.name} back={{ href: '/', label: 'Venues' }} />
      {session.survey.value.view.walks.map((walk) => (
        <p key={walk.id}>
          <a href={`/venue/${session.survey.value.survey}/walk/${walk.id}`}>{walk.name}</a>
        </p>
      ))}
    </main>
  )
}
