import { useRef } from 'preact/hooks'

/** A key that lets a person choose a file. The same file can be chosen again. */
export function FileKey(props: { label: string; accept: string; chosen(file: File): void; primary?: boolean }) {
  const input = useRef<HTMLInputElement>(null)
  return (
    <>
      <button type="button" class={props.primary ? 'key primary' : 'key'} onClick={() => input.current?.click()}>
        {props.label}
      </button>
      <input
        ref={input}
        type="file"
        class="hidden"
        tabIndex={-1}
        aria-hidden="true"
        accept={props.accept}
        onChange={(event) => {
          const file = event.currentTarget.files?.[0]
          event.currentTarget.value = ''
          if (file) props.chosen(file)
        }}
      />
    </>
  )
}
