import './venue.css'
import { useState } from 'preact/hooks'
import { useLocation } from 'preact-iso'
import { BigKey, KeyLink } from '../../components/big-key.tsx'
import { dayWords } from '../../components/day-words.ts'
import { PageHead } from '../../components/page-head.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import type { Session } from '../../state/session.ts'
import { dayOf } from '../../state/today.ts'
import { useWriter } from '../strip/recorder.ts'
import { FileKeys } from './file-keys.tsx'
import { FloorsAndPlaces } from './floors-places.tsx'
import { JudgingLine } from './judging-line.tsx'
import { NewWalk } from './new-walk.tsx'
import { PlanPart } from './plan-part.tsx'
import { VenueFacts } from './venue-facts.tsx'
import { WalkCard } from './walk-card.tsx'
import type { Writer } from './writer.ts'
import { Zones } from './zones.tsx'

/** One venue: its walks and what is said of each, the plan, and what surrounds them. */
export function VenueScreen({ session }: { session: Session }) {
  const { route } = useLocation()
  const act = useWriter(session)
  const writer: Writer = { session, write: act.write, say: act.say }
  const survey = session.survey.value
  const { view } = survey
  const judgement = session.judgement.value
  const results = judgement.stale ? [] : judgement.walks
  const undo = session.undoLabel.value
  // A desk has room for it from the start; a phone loads it when it is asked for.
  const [planOpen, setPlanOpen] = useState(() => matchMedia('(min-width: 60rem)').matches)

  return (
    <main class="page wide">
      <PageHead
        title={view.name}
        back={{ href: '/', label: 'Venues' }}
        about={
          <p class="soft">
            {view.demo ? 'Invented, for trying the app. ' : ''}Judged for {dayWords(dayOf(survey))}
            {view.hours ? `, ${view.hours.from} to ${view.hours.to}` : ''}
            {view.team ? `, ${view.team.name}, card ${view.team.revision}` : ', no team card yet'}
          </p>
        }
      />
      <StatusLine text={act.said?.text ?? ''} failed={act.said?.failed ?? false} />
      {undo !== null && (
        <p>
          <BigKey press={() => void act.undo()}>Undo: {undo}</BigKey>
        </p>
      )}
      <JudgingLine judgement={judgement} />
      {session.person.value === '' && (
        <p class="trouble">
          This phone does not know your name: what you enter stands without it. <a href="/settings">Give your name</a>
        </p>
      )}
      {!view.team && (
        <p class="trouble">
          No team card yet: what is judged holds for the default figures.{' '}
          <a href={`/venue/${survey.survey}/team`}>Fill in the team card</a>
        </p>
      )}
      <section class="part" aria-labelledby="walks">
        <h2 id="walks">Walks</h2>
        {view.walks.length === 0 && <p>No walk yet. A walk leads from one place to another.</p>}
        <ul class="walk-cards">
          {view.walks.map((walk) => (
            <WalkCard
              key={walk.id}
              writer={writer}
              walk={walk}
              result={results.find((one) => one.id === walk.id) ?? null}
            />
          ))}
        </ul>
        <details open={view.walks.length === 0}>
          <summary>New walk</summary>
          <NewWalk writer={writer} view={view} made={(walk) => route(`/venue/${survey.survey}/walk/${walk}`)} />
        </details>
      </section>
      <section class="part" aria-labelledby="venue">
        <h2 id="venue">Venue</h2>
        <div class="keys">
          <KeyLink href={`/venue/${survey.survey}/team`}>Team card</KeyLink>
          <FileKeys session={session} say={act.say} />
        </div>
        <details open={planOpen} onToggle={(event) => setPlanOpen((event.currentTarget as HTMLDetailsElement).open)}>
          <summary>Plan</summary>
          {planOpen && <PlanPart view={view} results={results} />}
        </details>
        <details>
          <summary>Zones: surroundings, and who allows the robot</summary>
          <Zones writer={writer} view={view} />
        </details>
        <details>
          <summary>Floors and places</summary>
          <FloorsAndPlaces writer={writer} view={view} />
        </details>
        <details>
          <summary>Name, contact, hours, published limits</summary>
          <VenueFacts writer={writer} view={view} />
        </details>
      </section>
      {judgement.assessment && (
        <footer class="soft">
          {judgement.assessment.cautions.map((text) => (
            <p key={text}>{text}</p>
          ))}
        </footer>
      )}
    </main>
  )
}
