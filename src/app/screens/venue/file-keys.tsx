import { BigKey } from '../../components/big-key.tsx'
import { fileName, saveFile, shareFile, sharesFiles } from '../../state/hand-over.ts'
import type { Session } from '../../state/session.ts'
import { copyMade, surveyFile } from '../../state/surveys.ts'

/** The survey as a file: saved on this phone, or handed to another app. */
export function FileKeys({ session, say }: { session: Session; say(text: string): void }) {
  const { survey, view } = session.survey.value
  const file = async () => {
    const { text, facts } = await surveyFile(survey)
    return { name: fileName(view.name, 'json'), type: 'application/json', text, facts }
  }
  return (
    <>
      <BigKey
        press={async () => {
          const made = await file()
          saveFile(made)
          await copyMade(survey, made.facts)
          say(`Given to the browser to save: ${made.name}, ${made.facts} entries.`)
        }}
      >
        Save as a file
      </BigKey>
      {sharesFiles() && (
        <BigKey
          press={async () => {
            const made = await file()
            if (await shareFile(made)) await copyMade(survey, made.facts)
          }}
        >
          Share the file
        </BigKey>
      )}
    </>
  )
}
