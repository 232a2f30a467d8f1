import './ladder.css'
import type { LadderCell, SegmentResult, WalkResult } from '../../../judge/result.ts'
import { formatLength } from '../../../units/format.ts'
import { PageHead } from '../../components/page-head.tsx'
import { TapeProgress } from '../../components/tape-rule.tsx'
import { VerdictSwatch } from '../../components/verdict-mark.tsx'
import { verdictWord } from '../../components/verdict-word.ts'
import type { Session } from '../../state/session.ts'
import { choices } from '../../state/settings.ts'
import { ladderWords } from './ladder-words.ts'

/** Leash lengths across, parts down, the room left in each cell: which one length serves the whole walk, or where to change it. */
export function LadderScreen({ session, walk: id }: { session: Session; walk: string }) {
  const { survey, view } = session.survey.value
  const judgement = session.judgement.value
  const walk = judgement.stale ? undefined : judgement.walks.find((one) => one.id === id)
  const name = view.walks.find((one) => one.id === id)?.name ?? 'Walk'
  return (
    <main class="page wide">
      <PageHead
        title={`Ladder: ${name}`}
        back={{ href: `/venue/${survey}`, label: view.name }}
        about={
          <p class="soft">
            {judgement.assessment
              ? `Team ${judgement.assessment.team.name}, card ${judgement.assessment.team.version}, code ${judgement.assessment.code}`
              : ''}
          </p>
        }
      />
      {judgement.problem && (
        <p class="trouble" role="alert">
          {judgement.problem}
        </p>
      )}
      {judgement.stale && (
        <div>
          <p role="status">Judging</p>
          {judgement.progress && (
            <TapeProgress share={judgement.progress.done / Math.max(1, judgement.progress.total)} label="Judging" />
          )}
        </div>
      )}
      {walk && walk.segments.length === 0 && <p>No part of this walk is recorded yet.</p>}
      {walk && walk.segments.length > 0 && <Ladder walk={walk} />}
    </main>
  )
}

function Ladder({ walk }: { walk: WalkResult }) {
  const system = choices.value.units
  const { lengths } = walk.ladder
  const best = walk.leash
  const mark = (leash: number) => formatLength(leash, { system, towards: 'nearest' })
  return (
    <>
      <section class="stack" aria-labelledby="says">
        <h2 id="says">What it says</h2>
        {ladderWords(walk, mark).map((sentence) => (
          <p key={sentence}>{sentence}</p>
        ))}
      </section>
      <p id="ladder-key" class="soft">
        Room left at the worst check of each part, as a share of what there is. A cell without a figure has no such
        check.
      </p>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a table wider than the screen is scrolled by keyboard */}
      <section class="ladder-scroll" aria-label="Ladder, scrolls sideways" tabIndex={0}>
        <table class="ladder" aria-describedby="ladder-key">
          <thead>
            <tr>
              <th scope="col">Part</th>
              {lengths.map((leash) => (
                <th key={leash} scope="col" class={leash === best ? 'best' : ''}>
                  {mark(leash)}
                  {leash === best && <small>recommended</small>}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {walk.segments.map((segment, i) => (
              <tr key={segment.id}>
                <th scope="row">
                  {i + 1} {segment.name}
                </th>
                {lengths.map((leash) => (
                  <Cell key={leash} segment={segment} cell={cellAt(segment, leash)} best={leash === best} />
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </section>
    </>
  )
}

function cellAt(segment: SegmentResult, leash: number): LadderCell | undefined {
  return segment.ladder.find((cell) => Math.abs(cell.leash - leash) < 1e-9)
}

function Cell({ segment, cell, best }: { segment: SegmentResult; cell: LadderCell | undefined; best: boolean }) {
  if (!cell) return <td class={best ? 'best' : ''}>{segment.ledBy === 'robot' ? 'not judged' : 'leash off'}</td>
  return (
    <td class={best ? 'best' : ''}>
      <span class={`cell verdict-${cell.verdict}`}>
        <VerdictSwatch verdict={cell.verdict} />
        <span>{verdictWord(cell.verdict)}</span>
      </span>
      {cell.room !== null && <span class="room">{roomWords(cell.room)}</span>}
      {cell.check !== null && <span class="soft">{cell.check.replaceAll('-', ' ')}</span>}
    </td>
  )
}

/** Never shown larger than it is. */
function roomWords(room: number): string {
  const hundredths = Math.floor(100 * room + 1e-9)
  return hundredths >= 0 ? `${hundredths} % left` : `${-hundredths} % short`
}
