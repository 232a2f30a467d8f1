import { useEffect, useRef, useState } from 'preact/hooks'
import { Field } from './field.tsx'

/** Idle time after which what was typed is saved without leaving the field, milliseconds. */
const idle = 800

/**
 * A line of text that saves itself: on leaving the field, or after a moment without a key. What is being typed is never
 * overwritten by what comes in meanwhile, and what could not be saved stays in the field.
 */
export function SavedText(props: {
  label: string
  hint?: string
  value: string
  /** False: not saved. */
  save(value: string): boolean | Promise<boolean>
  type?: 'text' | 'date' | 'time'
  unit?: string
  trouble?: string | null
  autocomplete?: string
}) {
  const [typed, setTyped] = useState<string | null>(null)
  const latest = useRef(props.save)
  latest.current = props.save
  const running = useRef<{ value: string; done: Promise<boolean> } | null>(null)

  const save = (value: string): Promise<boolean> => {
    if (running.current?.value === value) return running.current.done
    const done = Promise.resolve(value === props.value || latest.current(value))
    running.current = { value, done }
    // Leaving the field just after the idle time must not save the same text twice.
    return done.finally(() => {
      if (running.current?.done === done) running.current = null
    })
  }
  useEffect(() => {
    if (typed === null || props.type === 'date' || props.type === 'time') return
    const later = setTimeout(() => void save(typed), idle)
    return () => clearTimeout(later)
  }, [typed])

  return (
    <Field
      {...props}
      value={typed ?? props.value}
      change={setTyped}
      leave={async () => {
        if (typed === null || !(await save(typed))) return
        // Typing may have gone on meanwhile.
        setTyped((now) => (now === typed ? null : now))
      }}
    />
  )
}
