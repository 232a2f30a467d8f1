import 'leaflet/dist/leaflet.css'
import './plan.css'
import {
  Control,
  CRS,
  divIcon,
  type LatLng,
  type LatLngExpression,
  LayerGroup,
  Map as LeafletMap,
  latLng,
  Marker,
  Polyline,
} from 'leaflet'
import { render } from 'preact'
import { useEffect, useRef } from 'preact/hooks'
import { VerdictShape } from '../../components/strip/verdict-shape.tsx'
import { verdictWord } from '../../components/verdict-word.ts'
import type { At, Leg } from './lay-out.ts'

/** The plan on blank graph paper, squares of 1 m. Everything on it stands in the list beside it. */
export function PlanMap(props: { label: string; legs: readonly Leg[]; places: readonly (At & { name: string })[] }) {
  const box = useRef<HTMLElement>(null)
  const shown = useRef<{ map: LeafletMap; layers: LayerGroup } | null>(null)

  useEffect(() => {
    if (!box.current) return
    const map = new LeafletMap(box.current, {
      crs: CRS.Simple,
      attributionControl: false,
      zoomControl: false,
      scrollWheelZoom: false,
      zoomSnap: 0.25,
      minZoom: -3,
      maxZoom: 7,
      fadeAnimation: false,
      zoomAnimation: false,
      markerZoomAnimation: false,
    })
    map.addControl(new Control.Zoom({ zoomInText: '+', zoomOutText: '−' }))
    shown.current = { map, layers: new LayerGroup().addTo(map) }
    const watch = new ResizeObserver(() => map.invalidateSize({ animate: false }))
    watch.observe(box.current)
    return () => {
      watch.disconnect()
      map.remove()
      shown.current = null
    }
  }, [])

  useEffect(() => {
    if (!shown.current) return
    const { map, layers } = shown.current
    layers.clearLayers()
    const points = [...props.legs.flatMap((leg) => [leg.from, leg.to]), ...props.places]
    const bounds = boundsOf(points)
    for (const line of graphPaper(bounds)) layers.addLayer(line)
    map.fitBounds(
      [
        [bounds.low.y, bounds.low.x],
        [bounds.high.y, bounds.high.x],
      ],
      { animate: false, padding: [8, 8] },
    )
    const overlays = new LayerGroup().addTo(layers)
    const draw = () => {
      overlays.clearLayers()
      for (const leg of props.legs) for (const layer of drawn(leg, map)) overlays.addLayer(layer)
      for (const place of props.places) overlays.addLayer(placeMark(place))
    }
    draw()
    map.on('zoomend resize', draw)
    return () => {
      map.off('zoomend resize', draw)
    }
  }, [props.legs, props.places])

  return <section ref={box} class="plan-map" aria-label={props.label} />
}

function boundsOf(points: readonly At[]): { low: At; high: At } {
  const xs = points.length > 0 ? points.map((one) => one.x) : [0, 10]
  const ys = points.length > 0 ? points.map((one) => one.y) : [0, 10]
  const [low, high] = [
    { x: Math.floor(Math.min(...xs)) - 2, y: Math.floor(Math.min(...ys)) - 2 },
    { x: Math.ceil(Math.max(...xs)) + 2, y: Math.ceil(Math.max(...ys)) + 2 },
  ]
  return { low, high }
}

function graphPaper({ low, high }: { low: At; high: At }): Polyline[] {
  const fine: LatLngExpression[][] = []
  const strong: LatLngExpression[][] = []
  const range = (from: number, to: number) => Array.from({ length: to - from + 1 }, (_, i) => from + i)
  const margin = 200
  for (const x of range(low.x - 20, high.x + 20))
    (x % 5 === 0 ? strong : fine).push([
      [low.y - margin, x],
      [high.y + margin, x],
    ])
  for (const y of range(low.y - 20, high.y + 20))
    (y % 5 === 0 ? strong : fine).push([
      [y, low.x - margin],
      [y, high.x + margin],
    ])
  return [
    new Polyline(fine, { className: 'plan-grid', interactive: false, weight: 1 }),
    new Polyline(strong, { className: 'plan-grid strong', interactive: false, weight: 1 }),
  ]
}

/** A part: its line in the verdict's pattern, and its number, shape and word beside the middle. */
function drawn(leg: Leg, map: LeafletMap): (Polyline | Marker)[] {
  const ends: LatLng[] = [latLng(leg.from.y, leg.from.x), latLng(leg.to.y, leg.to.x)]
  const verdict = leg.verdict ?? 'open'
  const line = (more: string, weight: number) =>
    new Polyline(ends, { className: `plan-line ${more} verdict-${verdict}`, interactive: false, weight })
  const label = new Marker(latLng((leg.from.y + leg.to.y) / 2, (leg.from.x + leg.to.x) / 2), {
    icon: divIcon({ className: 'plan-label', html: labelOf(leg, map), iconSize: [0, 0] }),
    interactive: false,
    keyboard: false,
  })
  const patterned = leg.verdict === 'with-cautions' || leg.verdict === 'with-help' || leg.verdict === 'do-not-use'
  return [line('base', patterned ? 12 : 5), ...(patterned ? [line('over', 8)] : []), label]
}

/** Beside a line that goes up, above one that goes across. A word that would reach into the next part is left to the list. */
function labelOf(leg: Leg, map: LeafletMap): HTMLElement {
  const across = Math.abs(leg.to.x - leg.from.x) > Math.abs(leg.to.y - leg.from.y)
  const scale = map.options.crs?.scale(map.getZoom()) ?? 1
  const room = scale * Math.abs(across ? leg.to.x - leg.from.x : leg.to.y - leg.from.y)
  const label = document.createElement('div')
  render(
    <span class={`plan-words ${across ? 'above' : 'beside'} verdict-${leg.verdict ?? 'open'}`}>
      {leg.number}
      {leg.verdict && (
        <svg width="16" height="16" aria-hidden="true">
          <VerdictShape verdict={leg.verdict} x={0} y={0} size={16} />
        </svg>
      )}
      {leg.verdict && room > (across ? 150 : 24) && verdictWord(leg.verdict)}
    </span>,
    label,
  )
  return label
}

function placeMark(place: At & { name: string }): Marker {
  const mark = document.createElement('div')
  render(<span class="plan-place">{place.name}</span>, mark)
  return new Marker([place.y, place.x], {
    icon: divIcon({ className: 'plan-label', html: mark, iconSize: [0, 0] }),
    interactive: false,
    keyboard: false,
  })
}
