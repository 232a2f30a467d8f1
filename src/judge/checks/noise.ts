import { epsilon, type Finding, finding } from '../finding.ts'
import type { Site } from '../site.ts'

/** Bands in dB(A): cues may be missed above, masked above, no voice cue relied on above. From memory. */
const missed = 55
const masked = 65
const noVoice = 73

/** Noise never fails and has no ratio. */
export function noise({ around, segment, led }: Site): Finding[] {
  if (!led || around.noise === null) return []
  const level = around.noise
  const says =
    level > noVoice + epsilon
      ? 'no voice cue is relied on'
      : level > masked + epsilon
        ? 'cues masked'
        : level > missed + epsilon
          ? 'cues may be missed'
          : null
  const readings = around.noiseReadings
  return [
    {
      ...finding({
        id: 'noise',
        feature: segment.id,
        subject: `Noise on ${segment.name}`,
        detail: () => `up to ${Math.ceil(level)} dB(A)${says ? `, ${says}` : ''}`,
        harm: 'comfort',
        source: 'common practice, from memory',
        raw: says ? 'tight' : 'passes',
        demand: level,
        caution: says ? 'Loud noise. Feel the leash; expect no speech.' : null,
      }),
      readings,
    },
  ]
}
