import { KeyLink } from '../components/big-key.tsx'
import { PageHead } from '../components/page-head.tsx'

export function NotFound() {
  return (
    <main class="page">
      <PageHead title="No such page" />
      <p>
        <KeyLink href="/" primary>
          To the list of venues
        </KeyLink>
      </p>
    </main>
  )
}
