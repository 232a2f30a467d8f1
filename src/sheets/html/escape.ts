import { isolate, isolateEnd } from '../content/own.ts'

const entities: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
}

/** Text for a quoted attribute or a title, where no element can stand: isolating marks stay as letters. */
export function escapePlain(text: string): string {
  return text.replace(/[&<>"']/g, (letter) => entities[letter] ?? letter)
}

/** Text for an element, with a right-to-left piece in its own `bdi`. An isolate without its end is left out. */
export function escapeIsolated(text: string): string {
  let open = 0
  let html = ''
  for (const piece of text.split(new RegExp(`([${isolate}${isolateEnd}])`, 'u'))) {
    if (piece === isolate) {
      html += '<bdi>'
      open++
    } else if (piece === isolateEnd) {
      if (open > 0) {
        html += '</bdi>'
        open--
      }
    } else html += escapePlain(piece)
  }
  return html + '</bdi>'.repeat(open)
}
