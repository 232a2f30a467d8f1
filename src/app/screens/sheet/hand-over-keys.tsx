import type { ComponentChildren } from 'preact'
import { BigKey } from '../../components/big-key.tsx'
import { type HandedFile, saveFile, shareFile, sharesFiles } from '../../state/hand-over.ts'

/** Save and Share for one file. `children`: further keys beside them. */
export function HandOverKeys(props: { file: HandedFile; say(text: string): void; children?: ComponentChildren }) {
  const { file, say } = props
  return (
    <div class="keys">
      <BigKey
        primary
        press={() => {
          saveFile(file)
          say(`Given to the browser to save: ${file.name}`)
        }}
      >
        Save
      </BigKey>
      {sharesFiles(file.type, file.name) && (
        <BigKey press={async () => say((await shareFile(file)) ? 'Handed over.' : 'Not handed over.')}>Share</BigKey>
      )}
      {props.children}
    </div>
  )
}
