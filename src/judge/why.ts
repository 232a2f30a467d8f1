import type { Finding } from './finding.ts'
import type { Gap } from './gap.ts'

/** What the checks themselves leave not known: told, differing, too close, help missing. Differing readings are always listed. */
export function whysOf(findings: readonly Finding[]): Gap[] {
  return findings.flatMap((one) => {
    const found: Gap[] = []
    const say = (kind: Gap['kind'], text: string, blocks: boolean) =>
      found.push({ kind, text, readings: [...one.readings], harm: one.harm, blocks })
    // Help that stands settles a check whatever its readings say; hearsay it does not make known.
    if (one.told && one.state !== 'fails' && one.state !== 'stop-item')
      say('told', `${one.subject}: told or by eye, nobody measured.`, true)
    if (one.differs) say('differs', `${one.subject}: readings differ.`, one.state === 'unsure')
    if (one.state === 'unsure' && one.id === 'allowed') return found
    if (one.state === 'unsure' && !one.differs) {
      const measured = one.ratio !== null || one.readings.length > 0
      if (measured) say('too-close', `${one.subject}: too close to call.`, true)
      else say('unanswered', `${one.subject}: ${one.detail()}.`, true)
    }
    if (one.state === 'needs-help')
      say('help', `${one.subject}: help ${one.begun ? 'not complete' : 'not named'}.`, true)
    return found
  })
}
