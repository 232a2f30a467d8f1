import type { ComponentChildren } from 'preact'

/** A key for the thumb: 56 px and more, a word on it. `primary`: the one first key of its group. */
export function BigKey(props: {
  children: ComponentChildren
  press(): void
  primary?: boolean
  wide?: boolean
  disabled?: boolean
  describedBy?: string
}) {
  return (
    <button
      type="button"
      class={keyClass(props)}
      disabled={props.disabled}
      aria-describedby={props.describedBy}
      onClick={props.press}
    >
      {props.children}
    </button>
  )
}

/** The key at the end of a form. */
export function SubmitKey(props: { children: ComponentChildren; wide?: boolean; disabled?: boolean }) {
  return (
    <button type="submit" class={keyClass({ ...props, primary: true })} disabled={props.disabled}>
      {props.children}
    </button>
  )
}

/** A place to go that looks like a key. */
export function KeyLink(props: { href: string; children: ComponentChildren; primary?: boolean; wide?: boolean }) {
  return (
    <a class={keyClass(props)} href={props.href}>
      {props.children}
    </a>
  )
}

function keyClass(props: { primary?: boolean; wide?: boolean }): string {
  return ['key', props.primary ? 'primary' : '', props.wide ? 'wide' : ''].filter((one) => one !== '').join(' ')
}
