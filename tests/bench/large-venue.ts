import museum from '../../demo-venues/museum.json'

/** Text of a hand-written venue file of 20 walks of 50 segments: the museum's plain stretches and square turns, again and again. */
export function largeVenue(): string {
  const file = structuredClone(museum) as unknown as { view: { walks: Walk[] } }
  const source = file.view.walks.flatMap((walk) => walk.segments).filter(isPlain)
  if (source.length < 3) throw new Error('the museum has too few plain stretches for the bench')
  const [first] = file.view.walks
  if (!first) throw new Error('the museum has no walk')
  file.view.walks = Array.from({ length: 20 }, (_, w) => ({
    ...first,
    id: `walk-${w}`,
    name: `Walk ${w}`,
    states: [],
    overrides: [],
    segments: Array.from({ length: 50 }, (_, s) =>
      renamed(source[(w * 50 + s) % source.length] as Segment, `w${w}s${s}`),
    ),
  }))
  return JSON.stringify(file)
}

interface Walk {
  id: string
  name: string
  segments: Segment[]
  states: unknown[]
  overrides?: unknown[]
}

interface Segment {
  id: string
  ledBy: string
  features: unknown[]
  turn?: { kind: string; readings: Record<string, { raw: string }[]> }
}

/** No feature on it; straight on, or a square turn, which the closed form answers. */
function isPlain(segment: Segment): boolean {
  const square =
    segment.turn === undefined ||
    (segment.turn.readings.angle?.length === 1 && segment.turn.readings.angle[0]?.raw.includes('90'))
  return segment.ledBy === 'robot' && segment.features.length === 0 && square === true
}

/** The same with ids of its own: every id in a file is unique. */
function renamed(segment: Segment, prefix: string): Segment {
  return JSON.parse(JSON.stringify(segment).replaceAll(/"id":"([^"]+)"/g, `"id":"${prefix}-$1"`)) as Segment
}
