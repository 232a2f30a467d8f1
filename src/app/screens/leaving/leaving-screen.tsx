import { useState } from 'preact/hooks'
import type { LeavingFinding } from '../../../judge/leaving.ts'
import { writeSurveyFile } from '../../../record/file/index.ts'
import { takeSafeSide } from '../../../record/operations/reading.ts'
import type { Reading, Walk } from '../../../record/survey.ts'
import { FileKey } from '../../components/file-key.tsx'
import { PageHead } from '../../components/page-head.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import { TapeProgress } from '../../components/tape-rule.tsx'
import { textOf } from '../../state/file-choice.ts'
import { fileName, saveFile, shareFile, sharesFiles, type TextFile } from '../../state/hand-over.ts'
import type { Session } from '../../state/session.ts'
import { useWriter } from '../strip/recorder.ts'
import { checkCopy } from './copy-check.ts'
import { unfinished } from './unfinished.ts'

const harmWords = {
  fall: 'Fall',
  head: 'Head',
  trap: 'Trap',
  road: 'Road or people',
  comfort: 'Comfort and finding the way',
} as const

/** What is not finished, worst harm first, each one tap from its entry; then the copy, made and read back. */
export function LeavingScreen(props: { session: Session; walk: string }) {
  const { session } = props
  const { survey, view } = session.survey.value
  const walk = view.walks.find((one) => one.id === props.walk)
  if (!walk)
    return (
      <main class="page">
        <p>This walk is not on this phone.</p>
      </main>
    )
  const judgement = session.judgement.value
  const assessment = judgement.stale ? null : judgement.assessment
  const address = `/venue/${survey}/walk/${walk.id}`
  return (
    <main class="page">
      <PageHead
        title="Before you leave"
        back={{ href: address, label: walk.name }}
        about={<p>Everything entered is saved on this phone. What has no answer stands as not looked at.</p>}
      />
      {judgement.progress && (
        <TapeProgress
          share={judgement.progress.done / Math.max(judgement.progress.total, 1)}
          label="Judging the walk"
        />
      )}
      {judgement.problem && <p class="trouble">The walk could not be judged: {judgement.problem}</p>}
      {judgement.stale && <p class="soft">Being judged: readings too close to call are added when it is done.</p>}
      <LeftToDo
        session={session}
        walk={walk}
        judged={assessment !== null}
        list={unfinished(session.survey.value, walk, assessment)}
        address={address}
      />
      <Copy session={session} />
    </main>
  )
}

function LeftToDo(props: {
  session: Session
  walk: Walk
  judged: boolean
  list: readonly LeavingFinding[]
  address: string
}) {
  const writer = useWriter(props.session)
  const { list } = props
  if (list.length === 0)
    return (
      <p>
        <b>
          {props.judged ? 'Nothing is left open on this walk.' : 'Every question has an answer; it is not judged yet.'}
        </b>
      </p>
    )
  const groups = (Object.keys(harmWords) as (keyof typeof harmWords)[]).filter((harm) =>
    list.some((one) => one.harm === harm),
  )
  return (
    <section class="part" aria-labelledby="left-title">
      <h2 id="left-title">
        {list.length} {list.length === 1 ? 'thing' : 'things'} not finished
      </h2>
      <StatusLine text={writer.said?.text ?? ''} failed={writer.said?.failed ?? false} />
      {groups.map((harm) => (
        <div key={harm} class="stack">
          <h3>{harmWords[harm]}</h3>
          <ul class="rows">
            {list
              .filter((one) => one.harm === harm)
              .map((one) => {
                const close = one.kind === 'too-close' ? readingsAt(props.walk, one) : []
                return (
                  <li key={`${one.kind} ${one.holder} ${one.quantity} ${one.text}`}>
                    <span>{one.text}</span>
                    <span class="keys">
                      {one.segment && (
                        <a class="key" href={entryAddress(props.address, one)}>
                          Go to it<span class="hidden">: {one.text}</span>
                        </a>
                      )}
                      {close.length > 0 && (
                        <button
                          type="button"
                          class="key"
                          onClick={() =>
                            void writer.write(
                              (log) => close.flatMap((reading) => takeSafeSide(log, reading.id)),
                              'the safe side is taken',
                            )
                          }
                        >
                          Take the safe side<span class="hidden">: {one.text}</span>
                        </button>
                      )}
                    </span>
                  </li>
                )
              })}
          </ul>
        </div>
      ))}
    </section>
  )
}

/** Readings that do not yet count at their unsafe end. */
function readingsAt(walk: Walk, one: LeavingFinding): Reading[] {
  const holders = walk.segments.flatMap((part) => [part, ...part.features, ...(part.turn ? [part.turn] : [])])
  const readings = holders.find(({ id }) => id === one.holder)?.readings[one.quantity ?? ''] ?? []
  return readings.filter((reading) => !reading.safeSide)
}

function entryAddress(address: string, one: LeavingFinding): string {
  const parts = [one.segment, one.holder, one.quantity].filter((part) => part !== null)
  return `${address}?open=${parts.map((part) => encodeURIComponent(part)).join('/')}`
}

function Copy({ session }: { session: Session }) {
  const [said, setSaid] = useState({ text: '', failed: false })
  const [made, setMade] = useState(false)

  const check = (text: string, words: (facts: number) => string) => {
    const checked = checkCopy(text, session.log())
    setSaid(
      checked.ok
        ? { text: words(checked.facts), failed: false }
        : { text: `${checked.what} ${checked.whatToDo}`, failed: true },
    )
  }
  const make = async (hand: (file: TextFile) => Promise<boolean>) => {
    const text = writeSurveyFile(session.log())
    const now = new Date().toISOString().slice(0, 16).replace(/[:T]/g, '-')
    const name = fileName(session.survey.value.view.name, 'json', now)
    if (!(await hand({ name, type: 'application/json', text })))
      return setSaid({ text: 'No copy was made. Make it before you leave.', failed: true })
    setMade(true)
    check(text, (facts) => `Ready to leave: copy checked. ${facts} entries written and read back the same.`)
  }
  const save = async (file: TextFile) => {
    saveFile(file)
    return true
  }

  return (
    <section class="part" aria-labelledby="copy-title">
      <h2 id="copy-title">The copy</h2>
      <p class="soft">A file with every entry. A phone can be lost: send it, or keep it elsewhere.</p>
      <button type="button" class="key primary wide" onClick={() => void make(save)}>
        Make the copy
      </button>
      {sharesFiles() && (
        <button type="button" class="key wide" onClick={() => void make(shareFile)}>
          Send the copy
        </button>
      )}
      <StatusLine text={said.text} failed={said.failed} />
      {made && (
        <>
          <p>Surer still: open the file where it was saved, and it is compared with this phone.</p>
          <FileKey
            label="Check the saved file"
            accept=".json,application/json"
            chosen={async (file) => {
              const read = await textOf(file)
              if (read.ok) check(read.text, (facts) => `The saved file holds the same ${facts} entries as this phone.`)
              else setSaid({ text: read.what, failed: true })
            }}
          />
        </>
      )}
    </section>
  )
}
