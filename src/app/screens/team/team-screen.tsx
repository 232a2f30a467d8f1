import { useEffect, useState } from 'preact/hooks'
import { type Problem, readTeamFile, writeTeamFile } from '../../../record/file/index.ts'
import { setTeam } from '../../../record/operations/venue.ts'
import { defaultTeamCard, type TeamCard } from '../../../record/team-card.ts'
import { BigKey, SubmitKey } from '../../components/big-key.tsx'
import { dayWords } from '../../components/day-words.ts'
import { FileKey } from '../../components/file-key.tsx'
import { PageHead } from '../../components/page-head.tsx'
import { Problems } from '../../components/problems.tsx'
import { StatusLine } from '../../components/status-line.tsx'
import { textOf } from '../../state/file-choice.ts'
import { keepForm, readForm } from '../../state/form-draft.ts'
import { fileName, saveFile } from '../../state/hand-over.ts'
import type { Session } from '../../state/session.ts'
import { today } from '../../state/today.ts'
import { useWriter } from '../strip/recorder.ts'
import { CardFieldInput } from './card-field.tsx'
import { cardOf, type Texts, type Troubles, textsOf } from './card-texts.ts'
import { nameOf } from './field-names.ts'
import { cardFields } from './schema-fields.ts'

/** Idle time after which a half-filled form is kept, milliseconds. */
const idle = 500

const groups = [
  { id: 'handler', title: 'Handler' },
  { id: 'robot', title: 'Robot' },
  { id: 'leash', title: 'Leash' },
] as const

/** The team card: robot, handler, leash. Every figure editable; each saving is a new revision. */
export function TeamScreen({ session }: { session: Session }) {
  const { survey, view } = session.survey.value
  const card: TeamCard = view.team ?? defaultTeamCard
  const [typed, setTyped] = useState<Texts>({})
  const [troubles, setTroubles] = useState<Troubles>({})
  const [problems, setProblems] = useState<readonly Problem[]>([])
  const act = useWriter(session)
  const form = `team ${survey}`

  useEffect(() => {
    void readForm(form).then((kept) => {
      if (!kept) return
      setTyped(kept)
      act.say('What you had typed and not saved is here again.')
    })
  }, [form])
  useEffect(() => {
    if (Object.keys(typed).length === 0) return
    const later = setTimeout(() => void keepForm(form, typed), idle)
    return () => clearTimeout(later)
  }, [typed])

  const texts = { ...textsOf(card), ...typed }
  const keep = async (next: TeamCard) => {
    if (!(await act.write((log) => setTeam(log, next), `team card ${next.name}, revision ${next.revision}`))) return
    setTyped({})
    setTroubles({})
    await keepForm(form, null)
  }
  const submit = async () => {
    const read = cardOf(texts, card, today())
    if (read.ok) return keep(read.card)
    setTroubles(read.troubles)
    const missing = Object.keys(read.troubles).map((path) => nameOf(path).label)
    act.say(`Not saved: look at ${missing.slice(0, 3).join(', ')}${missing.length > 3 ? ' and more' : ''}.`)
  }
  const read = async (file: File) => {
    const chosen = await textOf(file)
    if (!chosen.ok) return act.say(chosen.what)
    const team = readTeamFile(chosen.text)
    setProblems(team.ok ? [] : team.problems)
    if (team.ok) await keep(team.team)
  }

  return (
    <main class="page">
      <PageHead
        title="Team card"
        back={{ href: `/venue/${survey}`, label: view.name }}
        about={
          <p class="soft">
            {view.team
              ? `${card.name}, revision ${card.revision} of ${dayWords(card.date)}.`
              : 'Not saved yet. The default figures stand: common practice, none of them measured on your team.'}{' '}
            Every result holds for this revision alone.
          </p>
        }
      />
      <StatusLine text={act.said?.text ?? ''} failed={act.said?.failed ?? false} />
      <Problems title="The card was not read in." problems={problems} />
      <form
        class="stack"
        noValidate
        onSubmit={(event) => {
          event.preventDefault()
          void submit()
        }}
      >
        {cardFields
          .filter((field) => !field.path.includes('.'))
          .map((field) => (
            <CardFieldInput
              key={field.path}
              field={field}
              text={texts[field.path] ?? ''}
              change={(text) => setTyped({ ...typed, [field.path]: text })}
              trouble={troubles[field.path] ?? null}
            />
          ))}
        {groups.map(({ id, title }) => (
          <details key={id} open={id === 'handler' || Object.keys(troubles).some((path) => path.startsWith(`${id}.`))}>
            <summary>
              <h2>{title}</h2>
            </summary>
            <div class="columns card-fields">
              {ordered(id).map((field) => (
                <CardFieldInput
                  key={field.path}
                  field={field}
                  text={texts[field.path] ?? ''}
                  change={(text) => setTyped({ ...typed, [field.path]: text })}
                  trouble={troubles[field.path] ?? null}
                />
              ))}
            </div>
          </details>
        ))}
        <SubmitKey wide>Save as a new revision</SubmitKey>
      </form>
      <div class="keys">
        <FileKey label="Read a team file" accept=".json,application/json" chosen={(file) => void read(file)} />
        <BigKey
          press={() =>
            saveFile({
              name: fileName(`team ${card.name}`, 'json'),
              type: 'application/json',
              text: writeTeamFile(card),
            })
          }
        >
          Save the team as a file
        </BigKey>
      </div>
    </main>
  )
}

/** The fields of a group; what must be asked of the handler comes first. */
function ordered(group: string) {
  const own = cardFields.filter((field) => field.path.startsWith(`${group}.`))
  return [...own.filter((field) => field.nullable), ...own.filter((field) => !field.nullable)]
}
