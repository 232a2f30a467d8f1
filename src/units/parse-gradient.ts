import { ask, type Body, type Bound, type Choice, type Question, refuse } from './parse-answer.ts'
import { type NumberRead, readNumber } from './parse-number.ts'

const number = '(\\d[\\d.,]*|[.,]\\d+)'
const ratio = new RegExp(`^${number} ?(?::|in|/) ?${number}$`)
const single = new RegExp(`^${number} ?(.*)$`)

/** Above this a bare number is a run (1:n): no slope that is walked has as many per cent or degrees. */
const steepestPercent = 30

const names: Readonly<Record<string, GradientUnit>> = {
  '': '',
  '%': '%',
  percent: '%',
  'per cent': '%',
  '‰': '‰',
  deg: 'deg',
  '°': 'deg',
  degree: 'deg',
  degrees: 'deg',
}

type GradientUnit = '' | '%' | '‰' | 'deg'

/** The spellings a field may name as its unit: '1:n', '%', 'deg', or '' for rise / run as a plain number. */
export function isGradientUnit(unit: string): boolean {
  return unit === '1:n' || unit in names
}

/** "1:12", "1 in 12", "8.3 %", "4.8°", "0.083" -> rise / run. `bare` is the unit of a number without one. */
export function readGradient(body: string, bound: Bound, bare: string): Body {
  const pair = ratio.exec(body)
  if (pair) return readRatio(pair[1] ?? '', pair[2] ?? '', bound)
  const one = single.exec(body)
  const read = one === null ? null : readNumber(one[1] ?? '')
  if (one === null || read === null) return refuse(`“${body}” is not a gradient: type 1:12, 8.3 % or 4.8°`)
  const typed = (one[2] ?? '').trim()
  if (!read.ok) {
    if (read.kind === 'refused') return read
    return ask(read.readings.map((text) => withUnit(text, typed === '' ? bare : typed)))
  }
  if (typed !== '') {
    const unit = names[typed]
    return unit === undefined
      ? refuse(`“${typed}” is not a unit of gradient: type 1:12, 8.3 % or 4.8°`)
      : toGradient(read, unit)
  }
  return readBare(read, bare)
}

function readRatio(rise: string, run: string, bound: Bound): Body {
  const up = readNumber(rise)
  const along = readNumber(run)
  if (!up.ok) return up.kind === 'refused' ? up : refuse(`“${rise}” can be read in two ways`)
  if (!along.ok) return along.kind === 'refused' ? along : ask(along.readings.map((text) => `${up.text}:${text}`))
  if (along.value === 0) return refuse('a run of nothing is a wall, not a slope')
  const value = up.value / along.value
  if (bound === 'exact') return { ok: true, value, unit: '1:n' }
  // ">1:12" is steeper to one reader and a longer run, so gentler, to another. The choices say it in per cent.
  return askBound(`${up.text}:${along.text}`, 100 * value)
}

function askBound(shown: string, percent: number): Question {
  const choices: Choice[] = [
    { label: `steeper than ${shown}`, text: `>${percent} %` },
    { label: `gentler than ${shown}`, text: `<${percent} %` },
  ]
  return ask(choices)
}

/** A number alone, asked wherever per cent and 1:n, or per cent and rise / run, are both likely. */
function readBare(read: NumberRead, bare: string): Body {
  if (read.value === 0) return { ok: true, value: 0, unit: bare }
  if (bare === '1:n') {
    if (read.form === 'whole' && read.value > steepestPercent) return { ok: true, value: 1 / read.value, unit: '1:n' }
    if (read.value < 1) return ask([asPercent(read), `1:${read.text}`])
    return ask([`1:${read.text}`, `${read.text} %`, `${read.text}°`])
  }
  const unit = names[bare] ?? ''
  if (unit === '') {
    return read.value <= 1 ? toGradient(read, '') : ask([`1:${read.text}`, `${read.text} %`, `${read.text}°`])
  }
  const decimals = read.text.split('.')[1]?.length ?? 0
  if (read.value < 0.5 && decimals > 1) return ask([asPercent(read), withUnit(read.text, unit)])
  if (read.value > steepestPercent) return ask([`1:${read.text}`, withUnit(read.text, unit)])
  return toGradient(read, unit)
}

function asPercent(read: NumberRead): string {
  return `${Number((100 * read.value).toPrecision(12))} %`
}

function withUnit(text: string, unit: string): string {
  return unit === '1:n' ? `1:${text}` : `${text} ${unit}`.trim()
}

function toGradient(read: NumberRead, unit: GradientUnit): Body {
  switch (unit) {
    case '':
      return { ok: true, value: read.value, unit }
    case '%':
      return { ok: true, value: read.value / 100, unit }
    case '‰':
      return { ok: true, value: read.value / 1000, unit }
    case 'deg':
      return read.value < 90
        ? { ok: true, value: Math.tan((read.value * Math.PI) / 180), unit }
        : refuse(`${read.text}° is a wall, not a slope`)
  }
}
