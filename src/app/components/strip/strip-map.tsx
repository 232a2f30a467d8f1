import { useEffect, useRef, useState } from 'preact/hooks'
import { layoutStrip, nose, type SceneMark, type ScenePart, type StripScene } from './layout.ts'
import type { Point, StripPart } from './layout-part.ts'
import { VerdictShape } from './verdict-shape.tsx'

/**
 * The drawing. It says nothing that the list of parts does not say: it is one picture to a screen reader, and a tap on
 * it picks the part at that height.
 */
export function StripMap(props: { parts: readonly StripPart[]; current: number; pick(index: number): void }) {
  const box = useRef<HTMLDivElement>(null)
  const [size, setSize] = useState({ width: 0, height: 0, text: 15 })

  useEffect(() => {
    const element = box.current
    if (!element) return
    const measure = () => {
      const rem = Number.parseFloat(getComputedStyle(document.documentElement).fontSize) || 16
      const { width, height } = element.getBoundingClientRect()
      setSize({ width, height, text: Math.max(14, Math.round(rem * 0.834)) })
    }
    const watch = new ResizeObserver(measure)
    watch.observe(element)
    measure()
    return () => watch.disconnect()
  }, [])

  const scene = size.width > 0 ? layoutStrip(props.parts, { ...size, current: props.current }) : null
  return (
    <div class="strip-map" ref={box}>
      {scene && (
        // biome-ignore lint/a11y/useKeyWithClickEvents: the list of parts below does the same by keyboard
        <svg
          class="strip-drawing"
          width={size.width}
          height={size.height}
          viewBox={`0 0 ${size.width} ${size.height}`}
          font-size={size.text}
          role="img"
          aria-label={`Strip map, part ${props.current + 1} of ${props.parts.length}. Everything on it is in the list of parts.`}
          onClick={(event) => {
            const y = event.clientY - event.currentTarget.getBoundingClientRect().top
            const hit = scene.parts.find((one) => y <= one.corners[0].y && y >= one.corners[3].y)
            if (hit) props.pick(hit.index)
          }}
        >
          {scene.parts.map((part) => (
            <PartShape key={part.id} part={part} />
          ))}
          {scene.breaks.map((gap) => (
            <text
              key={`${gap.at.x} ${gap.at.y}`}
              class="strip-turn"
              x={gap.at.x}
              y={gap.at.y + size.text / 3}
              text-anchor="middle"
            >
              {gap.text}
            </text>
          ))}
          {scene.labels.map((label) => (
            <path key={label.key} class="strip-leader" d={path(label.leader)} />
          ))}
          {scene.marks.map((mark) => (
            <Mark key={mark.key} mark={mark} />
          ))}
          <Words scene={scene} text={size.text} />
          <You scene={scene} />
          <AcrossScale scene={scene} height={size.height} />
          {scene.unsaid > 0 && (
            <text class="strip-unsaid" x="8" y={size.height - 7}>
              {scene.unsaid} more in the list
            </text>
          )}
        </svg>
      )}
    </div>
  )
}

function path(points: readonly Point[]): string {
  return points.map((p, i) => `${i === 0 ? 'M' : 'L'}${p.x.toFixed(1)} ${p.y.toFixed(1)}`).join('')
}

function PartShape({ part }: { part: ScenePart }) {
  const [startLeft, startRight, endRight, endLeft] = part.corners
  return (
    <g class={`strip-part verdict-${part.verdict ?? 'open'}`}>
      <path
        d={`${path(part.corners)}z`}
        fill={
          part.verdict && part.verdict !== 'usable' && part.verdict !== 'not-known'
            ? `url(#pattern-${part.verdict})`
            : 'var(--sheet)'
        }
      />
      <path
        class={part.sidesUnsure || part.verdict === 'not-known' || part.open ? 'strip-side unsure' : 'strip-side'}
        d={`${path([startLeft, endLeft])}${path([startRight, endRight])}`}
      />
      <path
        class={part.current ? 'strip-end current' : 'strip-end'}
        d={path([startLeft, startRight]) + (part.open ? '' : path([endLeft, endRight]))}
      />
      <path class="strip-tape" d={path(part.tape)} />
      <path class="strip-tick" d={part.ticks.map((tick) => path([tick.from, tick.to])).join('')} />
      {part.figures.map((figure) => (
        <text key={figure.text} class="strip-figure" x={figure.at.x} y={figure.at.y + 5} text-anchor="end">
          {figure.text}
        </text>
      ))}
    </g>
  )
}

function Mark({ mark }: { mark: SceneMark }) {
  const { x, y } = mark.at
  const shape =
    mark.mark === 'stop'
      ? `M${x - 6} ${y - 6}l12 12m0 -12l-12 12`
      : mark.mark === 'caution'
        ? `M${x} ${y - 7}l7 12h-14z`
        : `M${x - 5} ${y - 5}h10v10h-10z`
  return (
    <g class={`strip-mark ${mark.mark}`}>
      {mark.across && <path class="strip-across" d={path(mark.across)} />}
      <path d={shape} />
    </g>
  )
}

function Words({ scene, text }: { scene: StripScene; text: number }) {
  const leading = Math.round(text * 1.3)
  return (
    <>
      {scene.labels.map((label) => {
        const x = label.x + (label.verdict ? text + 4 : 0)
        return (
          <g key={label.key} class={label.strong ? 'strip-words strong' : 'strip-words'}>
            {label.verdict && <VerdictShape verdict={label.verdict} x={label.x} y={label.top + 2} size={text} />}
            <text x={x} y={label.top + text}>
              {label.lines.map((line, i) => (
                <tspan key={line} x={x} dy={i === 0 ? 0 : leading}>
                  {line}
                </tspan>
              ))}
            </text>
          </g>
        )
      })}
    </>
  )
}

function You({ scene }: { scene: StripScene }) {
  if (!scene.you) return null
  return (
    <g class="strip-you">
      <circle cx={scene.you.at.x} cy={scene.you.at.y} r="9" />
      <path d={`${path(nose(scene.you))}z`} />
    </g>
  )
}

/** One metre across, as a piece of tape with ticks every 0.1 m. */
function AcrossScale({ scene, height }: { scene: StripScene; height: number }) {
  const { left } = scene.scale.words
  const y = height - 16
  const metre = scene.scale.across
  const ticks = Array.from({ length: 11 }, (_, i) => `M${left + (i * metre) / 10} ${y}v${i % 5 === 0 ? 9 : 5}`).join('')
  return (
    <g>
      <rect class="strip-tape-fill" x={left} y={y} width={metre} height="9" />
      <path class="strip-tick" d={ticks} />
      <text class="strip-figure" x={left + metre + 6} y={y + 9}>
        1 m across
      </text>
    </g>
  )
}
