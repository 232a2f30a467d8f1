import { useEffect, useRef, useState } from 'preact/hooks'
import { Field } from './field.tsx'

/** Idle time after which what was typed is saved without leaving the field, milliseconds. */
const idle = 800

/**
 * A line of text that saves itself: on leaving the field, or after a moment without a key. What is being typed is never
 * overwritten by what comes in meanwhile.
 */
export function SavedText(props: {
  label: string
  hint?: string
  value: string
  save(value: string): void
  type?: 'text' | 'date' | 'time'
  unit?: string
  trouble?: string | null
  autocomplete?: string
}) {
  const [typed, setTyped] = useState<string | null>(null)
  const latest = useRef(props.save)
  latest.current = props.save

  const save = (value: string) => {
    if (value !== props.value) latest.current(value)
  }
  useEffect(() => {
    if (typed === null || props.type === 'date' || props.type === 'time') return
    const later = setTimeout(() => save(typed), idle)
    return () => clearTimeout(later)
  }, [typed])

  return (
    <Field
      {...props}
      value={typed ?? props.value}
      change={setTyped}
      leave={() => {
        if (typed === null) return
        save(typed)
        setTyped(null)
      }}
    />
  )
}
