import { useState } from 'preact/hooks'
import { demos } from '../../state/demo-venues.ts'

/** Invented venues to try the app on. */
export function DemoList(props: { open(text: string): Promise<void> }) {
  const [opening, setOpening] = useState<string | null>(null)
  return (
    <section class="part" aria-labelledby="demos">
      <h2 id="demos">Open a demo venue</h2>
      <p class="soft">Invented places, people and readings. Change what you like.</p>
      <ul class="stack demo-keys">
        {demos.map((demo) => (
          <li key={demo.name}>
            <button
              type="button"
              class="key wide told"
              disabled={opening !== null}
              onClick={async () => {
                setOpening(demo.name)
                await props.open(await demo.read())
                setOpening(null)
              }}
            >
              <span>{demo.name}</span>
              <small>{demo.about}</small>
            </button>
          </li>
        ))}
      </ul>
    </section>
  )
}
