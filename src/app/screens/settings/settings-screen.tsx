import { PageHead } from '../../components/page-head.tsx'

export function SettingsScreen() {
  return (
    <main class="page">
      <PageHead title="Settings" back={{ href: '/', label: 'Venues' }} />
    </main>
  )
}
