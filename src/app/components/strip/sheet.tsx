import type { ComponentChildren } from 'preact'
import { useEffect, useId, useRef } from 'preact/hooks'
import { sentence } from './sentence.ts'

/**
 * A real modal dialog from the bottom of the screen. The browser keeps the focus inside; on closing it goes back to
 * where it was. Escape closes. `back` shows a key to the sheet before this one.
 */
export function Sheet(props: {
  title: string
  /** Which part it is about, over the title. */
  over: string
  close(): void
  back?: (() => void) | undefined
  said: { text: string; failed: boolean } | null
  children: ComponentChildren
}) {
  const dialog = useRef<HTMLDialogElement>(null)
  const heading = useRef<HTMLHeadingElement>(null)
  const titleId = useId()

  useEffect(() => {
    const before = document.activeElement
    const shown = dialog.current
    shown?.showModal()
    return () => {
      shown?.close()
      if (before instanceof HTMLElement && before.isConnected) before.focus()
    }
  }, [])

  // A sheet that changes into another one says so: the focus goes to its first field or its heading.
  useEffect(() => {
    dialog.current?.scrollTo(0, 0)
    const first = dialog.current?.querySelector<HTMLElement>('[data-first]')
    ;(first ?? heading.current)?.focus()
  }, [props.title])

  return (
    <dialog
      ref={dialog}
      class="strip-sheet"
      aria-labelledby={titleId}
      onCancel={(event) => {
        event.preventDefault()
        props.close()
      }}
    >
      <header class="strip-sheet-head">
        <h2 id={titleId} ref={heading} tabIndex={-1}>
          <small>{props.over}</small> {sentence(props.title)}
        </h2>
        {props.back && (
          <button type="button" class="key" onClick={props.back}>
            Back
          </button>
        )}
        <button type="button" class="key" onClick={props.close}>
          Close
        </button>
      </header>
      <p class={props.said?.failed ? 'said failed' : 'said'} role={props.said?.failed ? 'alert' : 'status'}>
        {props.said?.text ?? ''}
      </p>
      {props.children}
    </dialog>
  )
}
