import type { SheetRoute } from './sheet-route.ts'

/** The keys in the thumb's reach. */
export function Keys(props: {
  segment: string
  go(route: SheetRoute): void
  undo: { label: string | null; press(): void }
  redo: { label: string | null; press(): void }
  leave(): void
}) {
  const small: readonly [string, SheetRoute][] = [
    ['Length', { at: 'reading', holder: props.segment, quantity: 'length' }],
    ['Width', { at: 'reading', holder: props.segment, quantity: 'width' }],
    ['Turn', { at: 'turn' }],
    ['Overhead', { at: 'aspect', aspect: 'overhead' }],
    ['Step or slope', { at: 'aspect', aspect: 'step' }],
    ['Edge', { at: 'aspect', aspect: 'edge' }],
    ['Surface', { at: 'surface' }],
    ['Door', { at: 'aspect', aspect: 'door' }],
    ['Sign', { at: 'sign' }],
    ['More', { at: 'more' }],
  ]
  return (
    <nav class="strip-keys" aria-label="Record">
      <button type="button" class="key primary" onClick={() => props.go({ at: 'plain' })}>
        Plain stretch
      </button>
      <div class="strip-small-keys">
        {small.map(([label, route]) => (
          <button key={label} type="button" class="key" onClick={() => props.go(route)}>
            {label === 'Overhead' ? (
              <>
                Over
                <wbr />
                head
              </>
            ) : (
              label
            )}
          </button>
        ))}
      </div>
      <div class="strip-acts">
        <button
          type="button"
          class="key"
          disabled={props.undo.label === null}
          aria-label={props.undo.label === null ? 'Undo' : `Undo ${props.undo.label}`}
          onClick={props.undo.press}
        >
          Undo
        </button>
        <button
          type="button"
          class="key"
          disabled={props.redo.label === null}
          aria-label={props.redo.label === null ? 'Redo' : `Redo ${props.redo.label}`}
          onClick={props.redo.press}
        >
          Redo
        </button>
        <button type="button" class="key" onClick={props.leave}>
          Leave now
        </button>
      </div>
    </nav>
  )
}
