import type { Finding } from './finding.ts'
import type { Gap } from './gap.ts'
import { type AtPair, isClosed, type Judged } from './segment.ts'
import { creeping } from './team.ts'
import { type Decided, decide, governing as governingOf } from './verdict.ts'
import { whysOf } from './why.ts'

/** A judged segment at one length and pace, decided, with all its reasons. */
export interface At {
  findings: Finding[]
  gaps: Gap[]
  decided: Decided
  governing: Finding | null
}

/** Null: as it stands without length and pace. */
export function decideAt(judged: Judged, at: AtPair): At {
  const { site, plain, pairs, cautioned } = judged
  const paired = at
    ? pairs.flatMap((one) => [one.finding(at.leash, at.pace), ...(one.beside?.(at.leash, at.pace) ?? [])])
    : []
  const findings = [...plain, ...paired]
  const gaps = [...judged.gaps, ...whysOf(paired)]
  const closed = isClosed(judged)
  if (site.led && judged.choice === null && !closed && !gaps.some((one) => one.blocks)) gaps.push(noWindow(judged))
  const decided = decide({
    findings,
    gaps,
    ledOtherwise: !site.led,
    closed,
    cautioned,
    creeping: at !== null && at.pace <= creeping + 1e-9,
  })
  return { findings, gaps, decided, governing: governingOf(decided) }
}

/** Every pair leaves something not known. */
function noWindow({ site }: Judged): Gap {
  return {
    kind: 'too-close',
    text: `${site.segment.name}: no leash length and pace is known to hold.`,
    readings: [],
    harm: 'fall',
    blocks: true,
  }
}
