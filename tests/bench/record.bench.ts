import { attributeOf } from '../../src/catalogue/attribute-of.ts'
import { readSurveyFile } from '../../src/record/file/index.ts'
import { foldSurvey } from '../../src/record/fold.ts'
import { allFacts, appendDrafts, emptyLog, mergeFacts } from '../../src/record/log.ts'
import { addReading } from '../../src/record/operations/index.ts'
import { calibrate, median, time } from './calibrate.ts'
import { largeVenue } from './large-venue.ts'

/** Script of opening a venue of 1,000 segments, and of adding a reading to it before the transaction. */
export function* bench() {
  const unit = calibrate()
  const text = largeVenue()
  const row = (what: string, milliseconds: number, budget?: number) => ({
    what,
    milliseconds: Number(milliseconds.toFixed(2)),
    units: Number((milliseconds / unit).toFixed(3)),
    ...(budget === undefined ? {} : { budgetMilliseconds: budget }),
  })
  yield { what: 'calibration unit', milliseconds: Number(unit.toFixed(1)) }

  const read = readSurveyFile(text, attributeOf)
  if (!read.ok) throw new Error(JSON.stringify(read.problems[0]))
  const facts = allFacts(read.log)
  yield { what: 'facts of 1,000 segments', count: facts.length }
  yield row(
    'read a hand-written file of 1,000 segments',
    time(() => readSurveyFile(text, attributeOf), 3),
  )
  yield row(
    'open 1,000 segments: facts to view, without a snapshot',
    time(() => {
      const log = emptyLog(read.survey.survey, 'bench')
      mergeFacts(log, facts)
      foldSurvey(log)
    }, 5),
  )

  const log = emptyLog(read.survey.survey, 'bench')
  mergeFacts(log, facts)
  foldSurvey(log)
  const times: number[] = []
  for (let i = 0; i < 200; i++) {
    const holder = `w${i % 20}s${i % 50}`
    const segment = foldSurvey(log).view.walks[i % 20]?.segments[i % 50]?.id
    if (!segment?.startsWith(holder)) throw new Error(`no segment ${holder}`)
    const before = performance.now()
    const drafts = addReading(log, segment, 'width', {
      id: `bench-${i}`,
      raw: '1.31 m',
      value: 1.31,
      bound: 'exact',
      instrument: 'tape',
      place: 'another',
    })
    appendDrafts(log, drafts, { device: 'bench', clock: '2026-11-30T12:00:00.000Z', person: 'Ada' })
    foldSurvey(log)
    times.push(performance.now() - before)
  }
  yield row('append a reading to 1,000 segments and show it, median of 200', median(times), 10)
}
