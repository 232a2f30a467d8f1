import { useEffect, useState } from 'preact/hooks'
import { dayAndHour } from '../../components/day-words.ts'
import { VerdictMark } from '../../components/verdict-mark.tsx'
import { worstVerdict } from '../../components/verdict-word.ts'
import { openSession } from '../../state/open-session.ts'
import type { Session } from '../../state/session.ts'
import type { OnPhone } from '../../state/surveys.ts'

/** One venue: its worst verdict, when it was last changed. */
export function VenueRow({ row }: { row: OnPhone }) {
  const [session, setSession] = useState<Session | null>(null)
  useEffect(() => {
    void openSession(row.survey).then(setSession)
  }, [row.survey])

  const walks = session?.survey.value.view.walks.length ?? null
  return (
    <li>
      <a class="row-link" href={`/venue/${row.survey}`}>
        {row.name || 'Venue without a name'}
      </a>
      {session && <Worst session={session} />}
      <p class="soft">
        {walks === null ? '' : `${walks === 1 ? '1 walk' : `${walks} walks`} · `}last entry {dayAndHour(row.changed)}
      </p>
    </li>
  )
}

function Worst({ session }: { session: Session }) {
  const judgement = session.judgement.value
  if (session.survey.value.view.walks.length === 0) return null
  if (judgement.problem) return <p>{judgement.problem}</p>
  if (judgement.stale) return <p class="soft">Judging</p>
  const worst = worstVerdict(judgement.walks.map((walk) => walk.verdict))
  const at = judgement.walks.find((walk) => walk.verdict === worst)
  return worst && at ? (
    <p>
      <VerdictMark verdict={worst} /> <span class="soft">{at.name}</span>
    </p>
  ) : null
}
