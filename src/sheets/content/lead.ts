import { conditionsOf } from './basis.ts'
import { markOf } from './gate.ts'
import { helpsOf, meetings, whoOnly, whoWhere } from './help.ts'
import { wordsIn } from './lint.ts'
import { own } from './own.ts'
import type { Scope } from './scope.ts'
import { count, dayWords, hoursWords } from './words.ts'

/** The first 200 characters that a client meets carry the verdict; a sentence has 15 words at most. */
const firstCharacters = 200
const mostWords = 15

export interface Lead {
  /** The first heading: who must be with you. */
  heading: string
  /** Whether it was walked together, and until when it is good. */
  rest: string
}

/** Room for the mark of a draft before the heading is kept. `cautions`: how many the parts tell. */
export function leadOf(scope: Scope, goodUntil: string | null, cautions: number): Lead {
  const until = goodUntil
    ? `Good until ${dayWords(goodUntil)}, ${hoursWords(scope.view.hours)}.`
    : 'End date not known.'
  const walked = markOf(scope, 'walked')
  const dry = conditionsOf(scope).includes('dry floor only') ? ' Dry floor only.' : ''
  const mark = scope.options.draft ? 'DRAFT: '.length : 0
  const named = walked ? own(walked.name, 24) : 'an instructor'
  const rest = `You have ${walked ? '' : 'not yet '}walked it with ${named}. ${until}${dry}`
  const heading = headings(scope, cautions).find(
    (text) => wordsIn(text) <= mostWords && mark + text.length + 1 + rest.length <= firstCharacters,
  )
  return { heading: heading ?? 'Use this walk only with help.', rest }
}

/** From the fullest sentence to the shortest. */
function headings(scope: Scope, cautions: number): string[] {
  const { verdict } = scope.result
  if (verdict === 'usable') return ['Use this walk as this sheet says.']
  if (verdict === 'with-cautions') return [`Use this walk with ${count(cautions, 'caution')}, as this sheet says.`]
  const helps = meetings(helpsOf(scope).filter((help) => help.needed))
  if (helps.length === 0) return []
  const places = new Set(helps.map(({ place }) => place)).size
  return [
    `Use this walk only with ${whoWhere(helps)}.`,
    `Use this walk only with ${whoOnly(helps)} at ${count(places, 'place')}.`,
    `Use this walk only with help at ${count(places, 'place')}.`,
  ]
}
