const keys = [
  ['1', '1'],
  ['2', '2'],
  ['3', '3'],
  ['<', 'less than'],
  ['>', 'more than'],
  ['4', '4'],
  ['5', '5'],
  ['6', '6'],
  ["'", 'feet mark'],
  ['"', 'inch mark'],
  ['7', '7'],
  ['8', '8'],
  ['9', '9'],
  ['/', 'slash'],
  [':', 'to, colon'],
  ['.', 'point'],
  ['0', '0'],
  [',', 'comma'],
] as const

/** The big keys of the keypad sheet. A space is needed between feet, inches and fractions. */
export function Keypad(props: { type(mark: string): void; rubOut(): void }) {
  return (
    // biome-ignore lint/a11y/useSemanticElements: a group of keys is no set of form fields
    <div class="keypad" role="group" aria-label="Keypad">
      {keys.map(([mark, name]) => (
        <button key={mark} type="button" class="key" aria-label={name} onClick={() => props.type(mark)}>
          {mark}
        </button>
      ))}
      <button type="button" class="key word" onClick={() => props.type(' ')}>
        space
      </button>
      <button type="button" class="key" aria-label="rub out" onClick={props.rubOut}>
        ⌫
      </button>
    </div>
  )
}
