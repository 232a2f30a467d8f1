import { useMemo, useState } from 'preact/hooks'
import { useLocation } from 'preact-iso'
import { addSegment } from '../../../record/operations/segment.ts'
import type { Segment, Walk } from '../../../record/survey.ts'
import '../../components/strip/strip.css'
import { PageHead, usePageHead } from '../../components/page-head.tsx'
import { StripMap } from '../../components/strip/strip-map.tsx'
import { stripParts } from '../../components/strip/strip-words.ts'
import { TapeRule } from '../../components/tape-rule.tsx'
import { VerdictMark } from '../../components/verdict-mark.tsx'
import { verdictWord } from '../../components/verdict-word.ts'
import type { Session } from '../../state/session.ts'
import { choices } from '../../state/settings.ts'
import { askedFor } from './asked-for.ts'
import { placeOfDraft } from './draft-route.ts'
import { Keys } from './keys.tsx'
import { PartList } from './part-list.tsx'
import { nextPart } from './reading-sheet.tsx'
import { type Recorder, stamp, useWriter } from './recorder.ts'
import { ResumeCard } from './resume-card.tsx'
import type { SheetRoute } from './sheet-route.ts'
import { answersLeft, partLine } from './so-far-line.ts'
import { StripSheets } from './strip-sheets.tsx'

/** The recording screen: one walk as a strip map that grows upward from where you stand, and the keys to fill it. */
export function StripScreen(props: { session: Session; walk: string }) {
  const walk = props.session.survey.value.view.walks.find((one) => one.id === props.walk)
  if (!walk)
    return (
      <main class="page">
        <p>This walk is not on this phone.</p>
      </main>
    )
  if (walk.segments.length === 0) return <FirstPart session={props.session} walk={walk} />
  return <Recording session={props.session} walk={walk} />
}

function Recording({ session, walk }: { session: Session; walk: Walk }) {
  const { units } = choices.value
  const { query, route } = useLocation()
  const asked = useMemo(() => askedFor(walk, query.open), [walk.id])
  const [at, setAt] = useState<string>(asked.segment)
  const [trail, setTrail] = useState<readonly SheetRoute[]>(asked.trail)
  const writer = useWriter(session)
  const heading = usePageHead(walk.name)
  const index = Math.max(
    walk.segments.findIndex((one) => one.id === at),
    0,
  )
  const segment = walk.segments[index]
  if (!segment) throw new Error('strip/no-part')

  const { view } = session.survey.value
  const judgement = session.judgement.value
  /** No verdict on the map while an answer is missing. */
  const isWhole = ({ id }: { id: string }) => walk.segments.some((one) => one.id === id && answersLeft(one, view) === 0)
  const open = (route: SheetRoute) => {
    writer.hush()
    setTrail([route])
  }
  const results = judgement.walks.find((one) => one.id === walk.id)?.segments ?? []
  const parts = stripParts(walk, judgement.stale ? [] : results.filter(isWhole), units)
  const resultOf = (id: string) => results.find((one) => one.id === id)
  const line = partLine(segment, view, resultOf(segment.id), judgement.stale)
  /** In the list: short, and never a verdict word while something is missing. */
  const wordsOf = (part: Segment) => {
    const left = answersLeft(part, view)
    if (left > 0) return `${left} ${left === 1 ? 'answer' : 'answers'} left`
    const result = judgement.stale ? undefined : resultOf(part.id)
    return result ? verdictWord(result.verdict) : 'being judged'
  }
  const [draftSeen, setDraftSeen] = useState(false)
  const half = draftSeen || trail.length > 0 ? null : placeOfDraft(walk, session.draft.value)

  const recorder: Recorder = {
    session,
    units,
    walk,
    segment,
    index,
    before: walk.segments[index - 1],
    write: writer.write,
    say: writer.say,
    answer: (says, how, more) => ({
      says,
      how,
      ...stamp(session),
      ...more,
    }),
  }
  const pick = (i: number) => {
    const part = walk.segments[i]
    if (part) setAt(part.id)
  }

  return (
    <div class="strip-screen">
      <main class="strip-main">
        <div class="strip-fold">
          <header class="strip-top">
            <div class="top-row">
              <div>
                <p class="soft">
                  {walk.name}
                  {segment.name ? ` · ${segment.name}` : ''}
                </p>
                <h1 ref={heading} tabIndex={-1}>
                  Part {index + 1} of {walk.segments.length}
                </h1>
              </div>
              <a class="key" href={`/venue/${session.survey.value.survey}`}>
                Venue
              </a>
            </div>
            {session.person.value === '' && (
              <a class="key wide" href="/settings">
                Whose readings are these? Give your name
              </a>
            )}
            <p class="so-far">
              {line.verdict ? <VerdictMark verdict={line.verdict} line /> : <b>{line.text}</b>}{' '}
              <span class={line.complete ? '' : 'soft'}>{line.detail}</span>
            </p>
          </header>
          {half && session.draft.value && (
            <ResumeCard
              draft={session.draft.value}
              part={half.index + 1}
              name={half.name}
              goOn={() => {
                pick(half.index)
                setTrail([half.route])
              }}
              drop={() => {
                setDraftSeen(true)
                void session.keepDraft(null)
              }}
            />
          )}
          <StripMap parts={parts} current={index} pick={pick} />
        </div>
        <PartList
          recorder={recorder}
          parts={parts}
          words={wordsOf}
          pick={pick}
          openNext={async () => {
            const next = session.newId('segment')
            const label = `part ${walk.segments.length + 1} is open`
            if (await writer.write((log) => addSegment(log, walk.id, nextPart(next)), label)) setAt(next)
          }}
          go={open}
        />
      </main>
      <footer class="strip-foot">
        <TapeRule />
        <p class={writer.said?.failed ? 'said failed' : 'said'} role={writer.said?.failed ? 'alert' : 'status'}>
          {trail.length === 0 ? (writer.said?.text ?? '') : ''}
        </p>
        <Keys
          segment={segment.id}
          go={open}
          undo={{ label: session.undoLabel.value, press: () => void writer.undo() }}
          redo={{ label: session.redoLabel.value, press: () => void writer.redo() }}
          leave={() => route(`/venue/${session.survey.value.survey}/walk/${walk.id}/leave`)}
        />
      </footer>
      <StripSheets
        recorder={recorder}
        trail={trail}
        setTrail={setTrail}
        said={writer.said}
        opened={(id, onCard) => {
          setAt(id)
          setTrail(onCard ? [{ at: 'plain' }] : [])
        }}
      />
    </div>
  )
}

/** A walk without parts: the first one is opened with one key, so that nothing is written by looking. */
function FirstPart({ session, walk }: { session: Session; walk: Walk }) {
  const writer = useWriter(session)
  return (
    <main class="page">
      <PageHead
        title={walk.name}
        back={{ href: `/venue/${session.survey.value.survey}`, label: session.survey.value.view.name }}
        about={<p>No part of it is recorded yet. Stand where the walk starts.</p>}
      />
      <button
        type="button"
        class="key primary"
        onClick={() =>
          void writer.write((log) => addSegment(log, walk.id, nextPart(session.newId('segment'))), 'part 1 is open')
        }
      >
        Start part 1 here
      </button>
      <p role="status">{writer.said?.text ?? ''}</p>
    </main>
  )
}
