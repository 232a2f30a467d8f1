import type { WalkResult } from '../../../judge/result.ts'
import type { Walk } from '../../../record/survey.ts'
import { KeyLink } from '../../components/big-key.tsx'
import { VerdictMark } from '../../components/verdict-mark.tsx'
import { StateMarks } from './state-marks.tsx'
import { verdictDetail } from './verdict-detail.ts'
import { WalkAnswers } from './walk-answers.tsx'
import type { Writer } from './writer.ts'

/** One walk: what the judge says of it now, and the pages that lead on. `result` null: not judged as it is now. */
export function WalkCard({ writer, walk, result }: { writer: Writer; walk: Walk; result: WalkResult | null }) {
  const { survey, view } = writer.session.survey.value
  const place = (id: string | undefined) => view.places.find((one) => one.id === id)?.name
  const [from, to] = [place(walk.from), place(walk.to)]
  const address = `/venue/${survey}/walk/${walk.id}`
  const parts = walk.segments.length
  return (
    <li class="walk-card">
      <h3>{walk.name}</h3>
      <p class="soft">
        {from && to ? `${from} to ${to} · ` : ''}
        {parts === 0 ? 'no part yet' : parts === 1 ? '1 part' : `${parts} parts`}
      </p>
      {parts > 0 && (result ? <Result walk={walk} result={result} /> : <p class="soft">Judging</p>)}
      <div class="keys walk-keys">
        <KeyLink href={address} primary>
          {parts === 0 ? 'Start recording' : 'Record'}
        </KeyLink>
        <KeyLink href={`${address}/ladder`}>Ladder</KeyLink>
        <KeyLink href={`${address}/sheet`}>Sheet</KeyLink>
        <KeyLink href={`${address}/leave`}>Before you leave</KeyLink>
      </div>
      <details>
        <summary>Alarm, help and rest</summary>
        <WalkAnswers writer={writer} walk={walk} />
      </details>
      <details>
        <summary>{walk.states.length === 0 ? 'Marks: none' : `Marks: ${walk.states.at(-1)?.state}`}</summary>
        <StateMarks writer={writer} walk={walk} />
      </details>
    </li>
  )
}

function Result({ walk, result }: { walk: Walk; result: WalkResult }) {
  const reasons = result.why.slice(0, 2)
  const worst = result.segments.find((one) => one.verdict === result.verdict)
  return (
    <div class="stack tight">
      <p>
        <VerdictMark verdict={result.verdict} detail={verdictDetail(walk, result)} line />
      </p>
      {worst && <p>{worst.sentence}</p>}
      {result.verdict === 'not-known' && reasons.length > 0 && (
        <ul class="plain-list">
          {reasons.map((why) => (
            <li key={why.text}>{why.text}</li>
          ))}
          {result.why.length > reasons.length && (
            <li>and {result.why.length - reasons.length} more, under Before you leave</li>
          )}
        </ul>
      )}
    </div>
  )
}
