import { PageHead } from '../../components/page-head.tsx'
import type { Session } from '../../state/session.ts'

export function SheetScreen({ session, walk }: { session: Session; walk: string }) {
  return (
    <main class="page">
      <PageHead
        title={walk}
        back={{ href: `/venue/${session.survey.value.survey}`, label: session.survey.value.view.name }}
      />
    </main>
  )
}
