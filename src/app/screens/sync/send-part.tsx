import { BigKey } from '../../components/big-key.tsx'
import { dayAndHour } from '../../components/day-words.ts'
import { StatusLine } from '../../components/status-line.tsx'
import { TapeProgress } from '../../components/tape-rule.tsx'
import type { Enrolment, OfficeWork, Under } from '../../state/office-work.ts'

/** Who this phone is at the office, what waits, the last success; sending by hand, its progress and how to stop it. */
export function SendPart({ work, enrolment }: { work: OfficeWork; enrolment: Enrolment }) {
  const under = work.under.value
  const said = work.said.value
  const waiting = [...work.where.value.values()].reduce(
    (all, one) => all + (one.where === 'office' ? 0 : one.waiting),
    0,
  )
  return (
    <section class="part" aria-labelledby="send">
      <h2 id="send">Sending</h2>
      <p class="soft">
        {enrolment.person}, {enrolment.role}, {enrolment.branch}. This phone is “{enrolment.label}” there since{' '}
        {dayAndHour(enrolment.since)}.
      </p>
      <p>
        {waiting === 0
          ? 'Nothing waits on this phone.'
          : `${waiting === 1 ? '1 entry waits' : `${waiting} entries wait`} on this phone.`}
      </p>
      <p>
        {enrolment.lastDone
          ? `Last exchanged in full: ${dayAndHour(enrolment.lastDone)}.`
          : 'Never yet exchanged in full since this phone enrolled.'}
      </p>
      {under ? (
        <>
          <TapeProgress share={shareOf(under)} label="Exchange with the office" />
          <p>{wordsOf(under)}</p>
          <BigKey wide press={work.cancel}>
            Stop sending
          </BigKey>
        </>
      ) : (
        <BigKey primary wide press={() => work.send('all')}>
          Send now
        </BigKey>
      )}
      <StatusLine
        text={said && !under ? [said.what, said.whatToDo].filter((one) => one !== '').join(' ') : ''}
        failed={said?.failed ?? false}
      />
    </section>
  )
}

function shareOf({ progress, survey, surveys }: Under): number {
  let own = 0
  if (progress?.doing === 'entries') own = progress.sent / Math.max(1, progress.sent + progress.waiting)
  if (progress?.doing === 'photos') own = progress.done / Math.max(1, progress.total)
  return (survey - 1 + own) / Math.max(1, surveys)
}

function wordsOf({ progress, survey, surveys }: Under): string {
  const at = `Venue ${survey} of ${surveys}`
  if (progress?.doing === 'photos')
    return `${at}: photo ${Math.min(progress.done + 1, progress.total)} of ${progress.total}`
  if (progress) return `${at}: ${progress.sent} sent, ${progress.got} got, ${progress.waiting} wait`
  return `${at}: asking the office`
}
