import { useEffect, useState } from 'preact/hooks'
import { worstVerdict } from '../../../judge/worst.ts'
import { allFacts } from '../../../record/log.ts'
import { dayAndHour, dayWords } from '../../components/day-words.ts'
import { VerdictMark } from '../../components/verdict-mark.tsx'
import { surveyIs } from '../../state/office-said.ts'
import { openSession } from '../../state/open-session.ts'
import type { Session } from '../../state/session.ts'
import { type Copy, lastCopy, type OnPhone } from '../../state/surveys.ts'

/** One venue: its worst verdict, when it was last changed. */
export function VenueRow({ row }: { row: OnPhone }) {
  const [session, setSession] = useState<Session | null>(null)
  const [copy, setCopy] = useState<Copy | null>(null)
  useEffect(() => {
    void openSession(row.survey).then(setSession)
    void lastCopy(row.survey).then(setCopy)
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
      {session && !session.survey.value.view.demo && (
        <p class="soft">{surveyIs.value.get(row.survey) ?? waiting(allFacts(session.log()).length, copy)}</p>
      )}
    </li>
  )
}

function Worst({ session }: { session: Session }) {
  const judgement = session.judgement.value
  const [expires, setExpires] = useState<string | null>(null)
  const { assessment, stale } = judgement
  useEffect(() => {
    if (!assessment || stale) return
    // The first page is drawn without the catalogue; this line needs it.
    void import('../../state/expiry.ts').then(({ firstToExpire }) => {
      const first = firstToExpire(session.survey.value, assessment)
      setExpires(first && expiryWords(first, assessment.on))
    })
  }, [assessment, stale])
  if (session.survey.value.view.walks.length === 0) return null
  if (judgement.problem) return <p>{judgement.problem}</p>
  if (judgement.stale) return <p class="soft">Judging</p>
  const worst = worstVerdict(judgement.walks.map((walk) => walk.verdict))
  const at = judgement.walks.find((walk) => walk.verdict === worst)
  return at ? (
    <div>
      <p>
        <VerdictMark verdict={worst} />
      </p>
      <p class="soft">
        {judgement.walks.length > 1 ? 'the worst of them: ' : ''}
        {at.name}
      </p>
      {expires && <p class="soft">{expires}</p>}
    </div>
  ) : null
}

/** What would be lost with this phone. */
function waiting(facts: number, copy: Copy | null): string {
  if (!copy) return `Only on this phone: no file made of it yet, ${facts} entries wait.`
  const newer = facts - copy.facts
  return newer <= 0
    ? `All of it is in the file of ${dayAndHour(copy.at)}.`
    : `${newer} entries since the file of ${dayAndHour(copy.at)} are only on this phone.`
}

function expiryWords({ walk, last }: { walk: string; last: string }, on: string): string {
  return last < on
    ? `Stale since ${dayWords(last)}: ${walk}. Look again.`
    : `First to go stale, after ${dayWords(last)}: ${walk}`
}
