import * as v from 'valibot'

/** What is wrong with a file, where, and what to do about it. */
export interface Problem {
  /** Keys and indexes from the file's root, joined by '/'; '' is the whole file. */
  path: string
  expected: string
  found: string
  whatToDo: string
}

/** More than these tell nobody more. */
export const mostProblems = 50

/** A validator's findings as problems. */
export function problemsOf(issues: readonly v.BaseIssue<unknown>[], under = ''): Problem[] {
  return issues.slice(0, mostProblems).map((issue) => {
    const inner = v.getDotPath(issue)?.replaceAll('.', '/') ?? ''
    const path = [under, inner].filter((part) => part !== '').join('/')
    const expected = expectationOf(issue)
    return {
      path,
      expected,
      found: issue.received === 'undefined' ? 'nothing' : shorten(issue.received),
      whatToDo: `Write ${expected} there.`,
    }
  })
}

/** A text cut to what a line can show. */
export function shorten(text: string, most = 80): string {
  return text.length > most ? `${text.slice(0, most)}…` : text
}

function expectationOf(issue: v.BaseIssue<unknown>): string {
  // A pattern tells a person nothing; its message does.
  if (issue.type === 'regex') return issue.message
  const words = issue.expected ?? issue.message
  if (words === 'finite') return 'a finite number'
  return shorten(words, 200)
}
