import type { Survey } from '../../record/survey.ts'

/** The day by this phone's clock and its own time zone, as 2026-11-30. */
export function today(now = new Date()): string {
  const two = (n: number) => String(n).padStart(2, '0')
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`
}

/** The day a survey is judged for: an invented one stands still on its own day. */
export function dayOf({ view }: Survey): string {
  return view.demo && view.asOn ? view.asOn : today()
}
