import { useMemo, useState } from 'preact/hooks'
import { lazy } from 'preact-iso'
import type { WalkResult } from '../../../judge/result.ts'
import type { SurveyView, Walk } from '../../../record/survey.ts'
import { SelectField } from '../../components/field.tsx'
import { lengthOf, shown, turnWords, widthOf } from '../../components/strip/strip-words.ts'
import { VerdictMark } from '../../components/verdict-mark.tsx'
import { choices } from '../../state/settings.ts'
import { layOut, placeAt } from './lay-out.ts'

const PlanMap = lazy(() => import('./plan-map.tsx').then((module) => module.PlanMap))

/** One walk on the plan, and the same as a list. `results`: only those of the survey as it is now. */
export function PlanPart({ view, results }: { view: SurveyView; results: readonly WalkResult[] }) {
  const drawable = view.walks.filter((walk) => walk.segments.length > 0)
  const [chosen, setChosen] = useState('')
  const walk = drawable.find((one) => one.id === chosen) ?? drawable[0]
  const result = results.find((one) => one.id === walk?.id)
  const laid = useMemo(() => (walk ? layOut(view, walk, result?.segments ?? []) : null), [view, walk, result])
  const places = useMemo(
    () =>
      [...new Set([walk?.from, walk?.to])].flatMap((id) => {
        const at = placeAt(view, id)
        const name = view.places.find((one) => one.id === id)?.name
        return at && name ? [{ ...at, name }] : []
      }),
    [view, walk],
  )
  if (!walk || !laid) return <p>Nothing to draw yet: measure a part of a walk first.</p>
  return (
    <div class="columns">
      <div class="stack">
        <SelectField
          label="Walk drawn"
          value={walk.id}
          change={setChosen}
          choices={drawable.map((one) => ({ value: one.id, label: one.name }))}
        />
        <PlanMap label={`Plan of ${walk.name}; the list says the same`} legs={laid.legs} places={places} />
        <p class="soft">Squares of 1 m. Laid out by lengths and turns, not by a survey of the building.</p>
        {laid.notes.map((note) => (
          <p key={note} class="soft">
            {note}
          </p>
        ))}
      </div>
      <Parts walk={walk} result={result ?? null} />
    </div>
  )
}

function Parts({ walk, result }: { walk: Walk; result: WalkResult | null }) {
  return (
    <ol class="rows" aria-label={`Parts of ${walk.name}`}>
      {walk.segments.map((segment, i) => {
        const [length, width] = [lengthOf(segment), widthOf(segment)]
        const verdict = result?.segments.find((one) => one.id === segment.id)?.verdict
        const sizes = [
          length === null ? 'length not measured' : `${shown(length, choices.value.units)} long`,
          width === null ? 'width not measured' : `${shown(width, choices.value.units)} wide`,
          turnWords(segment.turn) ?? '',
        ]
        return (
          <li key={segment.id}>
            <span>
              <b>
                {i + 1} {segment.name}
              </b>
              : {sizes.filter((one) => one !== '').join(', ')}
            </span>
            {verdict && <VerdictMark verdict={verdict} />}
          </li>
        )
      })}
    </ol>
  )
}
