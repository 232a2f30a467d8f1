import { attributeOf } from '../../src/catalogue/attribute-of.ts'
import { judgeSurvey, runToEnd } from '../../src/judge/judge.ts'
import { clearance } from '../../src/leash/clearance.ts'
import { readSurveyFile } from '../../src/record/file/index.ts'
import { remembering } from '../../src/workers/remembering.ts'
import { calibrate, time } from './calibrate.ts'
import { largeVenue } from './large-venue.ts'

/** A venue of 1,000 segments of closed forms, judged cold and with the planner's memory warm. */
export function* bench() {
  const unit = calibrate()
  const read = readSurveyFile(largeVenue(), attributeOf)
  if (!read.ok) throw new Error(JSON.stringify(read.problems[0]))
  const { survey } = read
  const row = (what: string, milliseconds: number) => ({
    what,
    milliseconds: Number(milliseconds.toFixed(1)),
    units: Number((milliseconds / unit).toFixed(3)),
  })
  const cold = performance.now()
  const memory = remembering(clearance, 'bench')
  const first = runToEnd(judgeSurvey(survey, { planner: memory.planner }))
  yield row('judge 1,000 segments cold, first run', performance.now() - cold)
  const verdicts = new Map<string, number>()
  for (const walk of first.walks)
    for (const one of walk.segments) verdicts.set(one.verdict, (verdicts.get(one.verdict) ?? 0) + 1)
  yield { what: 'verdicts of the 1,000', ...Object.fromEntries(verdicts) }
  yield {
    ...row(
      'judge 1,000 segments, planner warm',
      time(() => void runToEnd(judgeSurvey(survey, { planner: memory.planner })), 5),
    ),
    budgetUnits: 6,
    budgetMilliseconds: 150,
  }
}
