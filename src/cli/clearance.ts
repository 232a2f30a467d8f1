import type { Scene, SceneForm } from '../geometry/scene.ts'
import { sayProblem } from '../geometry/scene-problem.ts'
import type { Bodies, ClearanceOptions, Motion, Tightest } from '../leash/answer.ts'
import { clearance } from '../leash/clearance.ts'
import { checkQuestion, referenceBodies } from '../leash/team.ts'
import { buildScene, reverseForm } from '../plan/scenes.ts'
import type { Metres, Radians } from '../units/quantity.ts'
import { readSceneFile } from './scene-file.ts'

/** The command's answer, as interface for other programs: metres, radians; clearances certified, null: none. */
export interface ClearanceResult {
  scene: string
  separation: Metres
  mTaut: Metres | null
  mTautHigh: Metres | null
  mSlack: Metres | null
  mSlackHigh: Metres | null
  pauses: number | null
  tightest: Pick<Tightest, 'body' | 'wall' | 'x' | 'y' | 'text'> | null
  swing: Radians
  milliseconds: number
}

export type ClearanceOutcome =
  | { ok: true; result: ClearanceResult; motionFile?: { path: string; text: string } }
  | { ok: false; message: string }

const letters: Record<SceneForm['kind'], readonly string[]> = {
  turn: ['w1', 'w2', 'angle'],
  sidedoor: ['w', 'p', 't'],
  indoor: ['w', 'p', 't', 'o'],
  uturn: ['w1', 'k', 'w2', 'e'],
  chicane: ['w', 'j', 's'],
}
const teamLetters = ['a', 'b', 'd', 'r', 'g']
const others = ['scene', 'separation', 'phi-max', 'sideways', 'lead', 'drift', 'direction', 'pauses-at', 'motion']

class Refused extends Error {}

/**
 * `clearance --scene turn|sidedoor|indoor|uturn|chicane|FILE --separation S ...`, without the word itself.
 * Lengths in metres, angles in degrees. `readText` reads a scene file and may throw. Nothing is written: a motion that
 * was asked for comes back beside the result.
 */
export function clearanceFromArgs(args: readonly string[], readText: (path: string) => string): ClearanceOutcome {
  try {
    return answerArgs(readFlags(args), readText)
  } catch (error) {
    if (error instanceof Refused) return { ok: false, message: error.message }
    throw error
  }
}

function answerArgs(flags: Map<string, string>, readText: (path: string) => string): ClearanceOutcome {
  const name = flags.get('scene')
  if (!name) throw new Refused(`--scene is missing: give ${Object.keys(letters).join(', ')} or a scene file`)
  const kind = Object.keys(letters).find((one) => one === name) as SceneForm['kind'] | undefined
  checkNames(flags, kind)
  const separation = numberOf(flags, 'separation')
  const bodies = bodiesOf(flags)
  const options: ClearanceOptions = {
    pausesAt: numberOf(flags, 'pauses-at', 0.05),
    drift: numberOf(flags, 'drift', 0),
  }
  const scene = kind ? namedScene(flags, kind, bodies, separation) : fileScene(flags, name, readText)
  const wrong = checkQuestion(scene, bodies, separation, options)
  if (wrong) throw new Refused(say(sayProblem(wrong)))
  const started = performance.now()
  const answer = clearance(scene, bodies, separation, options)
  const milliseconds = Math.round((performance.now() - started) * 10) / 10
  const result: ClearanceResult = {
    scene: name,
    separation,
    mTaut: answer.mTaut,
    mTautHigh: answer.mTautHigh,
    mSlack: answer.mSlack,
    mSlackHigh: answer.mSlackHigh,
    pauses: answer.pauses,
    tightest: answer.tightest && {
      body: answer.tightest.body,
      wall: answer.tightest.wall,
      x: answer.tightest.x,
      y: answer.tightest.y,
      text: answer.tightest.text,
    },
    swing: answer.swing,
    milliseconds,
  }
  const path = flags.get('motion')
  if (path === undefined) return { ok: true, result }
  return { ok: true, result, motionFile: { path, text: motionText(scene, bodies, separation, answer.motion) } }
}

function readFlags(args: readonly string[]): Map<string, string> {
  const flags = new Map<string, string>()
  for (let i = 0; i < args.length; i++) {
    const word = args[i] as string
    if (!word.startsWith('--')) throw new Refused(`"${word}" belongs to no option: write --NAME VALUE`)
    const equals = word.indexOf('=')
    const name = equals < 0 ? word.slice(2) : word.slice(2, equals)
    const value = equals < 0 ? args[++i] : word.slice(equals + 1)
    if (value === undefined || value === '') throw new Refused(`--${name} has no value: write --${name} VALUE`)
    if (flags.has(name)) throw new Refused(`--${name} is given twice: leave one out`)
    flags.set(name, value)
  }
  return flags
}

function checkNames(flags: Map<string, string>, kind: SceneForm['kind'] | undefined): void {
  const known = [...others, ...teamLetters, ...(kind ? letters[kind] : [])]
  for (const flag of flags.keys())
    if (!known.includes(flag))
      throw new Refused(`--${flag} is no option of this scene: it takes ${known.map((one) => `--${one}`).join(' ')}`)
}

function numberOf(flags: Map<string, string>, name: string, usual?: number): number {
  const text = flags.get(name)
  if (text === undefined) {
    if (usual !== undefined) return usual
    throw new Refused(`--${name} is missing: give it ${name === 'angle' ? 'in degrees' : 'in metres'}`)
  }
  const value = /^[+-]?(\d+\.?\d*|\.\d+)$/.test(text) ? Number(text) : Number.NaN
  if (!Number.isFinite(value)) throw new Refused(`--${name} is "${text}": write a plain number, as 1.2`)
  return value
}

function bodiesOf(flags: Map<string, string>): Bodies {
  const usual = referenceBodies
  const sideways = flags.get('sideways') ?? 'yes'
  if (sideways !== 'yes' && sideways !== 'no') throw new Refused(`--sideways is "${sideways}": write yes or no`)
  return {
    a: numberOf(flags, 'a', usual.a),
    b: numberOf(flags, 'b', usual.b),
    d: numberOf(flags, 'd', usual.d),
    r: numberOf(flags, 'r', usual.r),
    g: numberOf(flags, 'g', usual.g),
    phiMax: (numberOf(flags, 'phi-max', 90) * Math.PI) / 180,
    sideways: sideways === 'yes',
  }
}

function namedScene(flags: Map<string, string>, kind: SceneForm['kind'], bodies: Bodies, separation: Metres): Scene {
  const lead = numberOf(flags, 'lead', 0.5)
  const of = (name: string) => numberOf(flags, name)
  const direction = flags.get('direction') ?? 'forward'
  if (direction !== 'forward' && direction !== 'reverse')
    throw new Refused(`--direction is "${direction}": write forward or reverse`)
  const forward = formOf(kind, of, lead)
  const built = buildScene(direction === 'forward' ? forward : reverseForm(forward), bodies, separation)
  if (!built.ok) throw new Refused(say(sayProblem(built.problem)))
  return built.scene
}

function formOf(kind: SceneForm['kind'], of: (name: string) => number, lead: Metres): SceneForm {
  switch (kind) {
    case 'turn':
      return { kind, w1: of('w1'), w2: of('w2'), angle: (of('angle') * Math.PI) / 180, lead }
    case 'sidedoor':
      return { kind, w: of('w'), p: of('p'), t: of('t'), lead, reverse: false }
    case 'indoor':
      return { kind, w: of('w'), p: of('p'), t: of('t'), o: of('o'), lead, reverse: false }
    case 'uturn':
      return { kind, w1: of('w1'), k: of('k'), w2: of('w2'), e: of('e'), lead }
    case 'chicane':
      return { kind, w: of('w'), j: of('j'), s: of('s'), lead, reverse: false }
  }
}

function fileScene(flags: Map<string, string>, path: string, readText: (path: string) => string): Scene {
  for (const name of ['lead', 'direction'])
    if (flags.has(name)) throw new Refused(`--${name} does not go with a scene file: it has its own start and goal`)
  let text: string
  try {
    text = readText(path)
  } catch {
    throw new Refused(`${path} cannot be read: give turn, sidedoor, indoor, uturn, chicane or a scene file`)
  }
  const read = readSceneFile(text)
  if (!read.ok) throw new Refused(say(`${path}: ${sayProblem(read.problem)}`))
  return read.scene
}

/** The motion as a file: the flat samples of the certificate as rows. */
function motionText(scene: Scene, bodies: Bodies, separation: Metres, motion: Motion | null): string {
  const rows: number[][] = []
  const samples = motion?.samples ?? new Float64Array(0)
  for (let i = 0; i < samples.length; i += 6) rows.push(Array.from(samples.subarray(i, i + 6)))
  return `${JSON.stringify({
    kind: 'tautline-motion',
    version: 1,
    separation,
    bodies,
    scene,
    columns: ['attachmentX', 'attachmentY', 'heading', 'handlerX', 'handlerY', 'slack'],
    samples: rows,
  })}\n`
}

/** One line, whatever a file's own words were. */
function say(text: string): string {
  return text.replace(/\s+/g, ' ').trim()
}
