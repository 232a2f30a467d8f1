import type { ComponentChildren } from 'preact'
import { useEffect, useRef } from 'preact/hooks'
import { TapeRule } from './tape-rule.tsx'

/** Set once the first page has been shown: only a later page takes the focus. */
let arrived = false

/** Names the page in the title bar, and brings the focus to its heading when one page follows another. */
export function usePageHead(title: string) {
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => {
    document.title = `${title} · Tautline`
  }, [title])
  useEffect(() => {
    if (arrived) {
      scrollTo(0, 0)
      heading.current?.focus({ preventScroll: true })
    }
    arrived = true
  }, [])
  return heading
}

/** The head of a page: the way back, its one h1, a line of what it is about, the tape. */
export function PageHead(props: { title: string; back?: { href: string; label: string }; about?: ComponentChildren }) {
  const heading = usePageHead(props.title)
  return (
    <header class="page-head">
      {props.back && (
        <nav aria-label="Back">
          <a class="back" href={props.back.href}>
            ← {props.back.label}
          </a>
        </nav>
      )}
      <h1 ref={heading} tabIndex={-1}>
        {props.title}
      </h1>
      {props.about}
      <TapeRule />
    </header>
  )
}
