import type { Interval } from '../record/interval.ts'
import type { Feature } from '../record/survey.ts'
import type { Metres } from '../units/quantity.ts'
import { type Dimension, free, type Lacking, type Pinch, type PinchSite, thinnest, wide, width } from './pinch.ts'
import { inLine, leadAfter, leadBefore } from './pinch-lead.ts'

export function ofFrame(site: PinchSite, feature: Feature): Pinch | Lacking {
  const { read, segment } = site
  const clear = read(feature, 'clearWidth', 'low')
  if (!clear) return { feature, lacking: 'clear width' }
  const position = feature.words.position?.says
  if (position === undefined) return { feature, lacking: 'where it opens' }
  const along = read(segment, 'width', 'low')
  if (!along) return { feature, lacking: 'clear width of the stretch' }
  const depth = read(feature, 'wallThickness', 'both')
  const lead = leadBefore(site, feature)
  if (position === 'ahead') {
    const thick = depth ? free(depth) : { low: 0.15, value: 0.15, high: 0.15 }
    return line(feature, along, clear, thick, offCentre(feature), lead, [along, clear, ...(depth ? [depth] : [])])
  }
  if (!depth) return { feature, lacking: 'depth of the frame' }
  return {
    feature,
    widths: { w: width(along), p: width(clear) },
    free: { t: free(depth) },
    from: [along, clear, depth],
    leadBack: leadAfter(site, feature),
    offLow: 0,
    build: ({ w = 0, p = 0, t = 0 }) => ({ kind: 'sidedoor', w, p: Math.min(p, 3), t, lead, reverse: false }),
  }
}

/** How far an opening's middle lies off the walking line, where that was said. */
function offCentre(feature: Feature): Metres {
  return feature.side === 'left' || feature.side === 'right' ? Math.abs(feature.offset ?? wide) : 0
}

export function line(
  feature: Feature,
  along: Dimension,
  clear: Dimension,
  depth: Dimension,
  off: Metres,
  lead: Metres,
  from: Interval[],
): Pinch {
  return {
    feature,
    widths: { w: width(along), p: width(clear) },
    free: { t: depth },
    from,
    leadBack: lead,
    offLow: 0,
    build: ({ w = 0, p = 0, t = 0 }) => {
      const gap = Math.min(p, w)
      return { kind: 'indoor', w, p: gap, t, o: Math.min(off, (w - gap) / 2), lead, reverse: false }
    },
  }
}

export function ofSqueeze(site: PinchSite, feature: Feature): Pinch | Lacking {
  const { read, segment } = site
  const clear = read(feature, 'clearWidth', 'low')
  if (!clear) return { feature, lacking: 'clear width' }
  const along = read(segment, 'width', 'low')
  if (!along) return { feature, lacking: 'clear width of the stretch' }
  const length = read(feature, 'length', 'both')
  const usual = inLine[feature.kind] ?? 0.3
  const depth = length ? free(length) : { low: usual, value: usual, high: usual }
  // The stretch's least width may be this very place: it is at least as wide as what is passed.
  const around = { ...along, low: Math.max(along.low, clear.low), high: Math.max(along.high, clear.high) }
  const from = [along, clear, ...(length ? [length] : [])]
  return line(feature, around, clear, depth, offCentre(feature), leadBefore(site, feature), from)
}

export function ofObstruction(site: PinchSite, feature: Feature): Pinch | Lacking {
  const { read, segment } = site
  const depth = read(feature, 'depth', 'size')
  if (!depth) return { feature, lacking: 'how far it stands out' }
  const along = read(segment, 'width', 'low')
  if (!along) return { feature, lacking: 'clear width of the stretch' }
  const length = read(feature, 'length', 'both')
  const lead = leadBefore(site, feature)
  return {
    feature,
    widths: { w: width(along) },
    free: { j: free(depth), t: length ? free(length) : { low: 0.3, value: 0.3, high: 0.3 } },
    from: [along, depth, ...(length ? [length] : [])],
    leadBack: leadAfter(site, feature),
    offLow: 0,
    build: ({ w = 0, j = 0, t = 0 }) => ({
      kind: 'indoor',
      w,
      p: Math.max(thinnest, w - j),
      t,
      o: Math.min(j, w - thinnest) / 2,
      lead,
      reverse: false,
    }),
  }
}

export function ofChicane(site: PinchSite, feature: Feature): Pinch | Lacking {
  const { read, segment } = site
  const depth = read(feature, 'depth', 'size')
  const spacing = read(feature, 'spacing', 'both')
  const along = read(segment, 'width', 'low')
  if (!depth || !spacing) return { feature, lacking: depth ? 'distance between the two' : 'how far they stand out' }
  if (!along) return { feature, lacking: 'clear width of the stretch' }
  const lead = leadBefore(site, feature)
  return {
    feature,
    widths: { w: width(along) },
    free: { j: free(depth), s: free(spacing) },
    from: [along, depth, spacing],
    leadBack: leadAfter(site, feature),
    offLow: 0,
    build: ({ w = 0, j = 0, s = 0 }) => ({
      kind: 'chicane',
      w,
      j: Math.min(j, w - thinnest),
      s,
      lead,
      reverse: false,
    }),
  }
}
