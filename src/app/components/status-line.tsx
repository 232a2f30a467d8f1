/** A polite live region: stays in the page, so that a change of its words is read out. `failed` interrupts instead. */
export function StatusLine(props: { text: string; failed?: boolean }) {
  return (
    <p class={props.failed ? 'status trouble' : 'status'} role={props.failed ? 'alert' : 'status'}>
      {props.text}
    </p>
  )
}
