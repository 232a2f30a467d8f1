import { checkRings } from '../geometry/polygon-check.ts'
import type { Scene, SceneForm } from '../geometry/scene.ts'
import type { SceneProblem } from '../geometry/scene-problem.ts'
import type { Metres } from '../units/quantity.ts'
import {
  type Drawing,
  drawChicane,
  drawIndoor,
  drawSidedoor,
  drawTurn,
  drawUturn,
  type Reach,
} from './scene-drawings.ts'

/** What a builder needs of the team: the start stands a robot's length and a leash before the feature. */
export interface SceneTeam {
  /** Robot length. */
  a: Metres
  /** Leash attachment behind the robot's centre. */
  d: Metres
}

export type BuiltScene = { ok: true; scene: Scene } | { ok: false; problem: SceneProblem }

/** No venue has a wider corridor or a longer run-up that matters. */
const longest = 100

/**
 * Builds the scene of a named form for a team on a leash of the given separation: handler `separation + a + lead`
 * before the feature on the entry's centre line, goal 0.6 m past it. Lengths beyond that do not depend on the
 * separation up to 2.4 m, so that all separations on offer share one region. Bad measures come back as a problem.
 */
export function buildScene(form: SceneForm, team: SceneTeam, separation: Metres): BuiltScene {
  const wrong = checkForm(form) ?? checkTeam(team, separation)
  if (wrong) return { ok: false, problem: wrong }
  const long = separation <= 2.4 ? 2.4 : Math.ceil(separation)
  const reach = {
    before: separation + team.a + form.lead,
    entry: long + team.a + form.lead + 1,
    exit: long + team.a + team.d + 1.1,
  }
  const scene = { ...draw(form, reach), form }
  const crossed = checkRings(scene)
  return crossed ? { ok: false, problem: crossed } : { ok: true, scene }
}

/** The same pinch walked the other way, as a form of its own. */
export function reverseForm(form: SceneForm): SceneForm {
  switch (form.kind) {
    // Walked backwards a left turn is a right turn; mirrored it is a left turn again, its corridors exchanged.
    case 'turn':
      return { ...form, w1: form.w2, w2: form.w1 }
    case 'uturn':
      return { ...form, w1: form.w2, w2: form.w1 }
    default:
      return { ...form, reverse: !form.reverse }
  }
}

function draw(form: SceneForm, reach: Reach): Drawing {
  switch (form.kind) {
    case 'turn':
      return drawTurn(form, reach)
    case 'sidedoor':
      return drawSidedoor(form, reach)
    case 'indoor':
      return drawIndoor(form, reach)
    case 'uturn':
      return drawUturn(form, reach)
    case 'chicane':
      return drawChicane(form, reach)
  }
}

function checkForm(form: SceneForm): SceneProblem | null {
  for (const [name, value] of Object.entries(form)) {
    if (typeof value !== 'number') continue
    const least = name === 'o' ? -longest : 0
    const mayBeZero = name === 'o' || name === 'lead'
    if (!Number.isFinite(value) || value < least || value > longest || (value === 0 && !mayBeZero))
      return {
        path: name,
        expected: mayBeZero ? `a number up to ${longest}` : `a number above 0, up to ${longest}`,
        found: `${value}`,
        whatToDo: name === 'angle' ? 'Give the angle of the turn.' : 'Measure it in metres.',
      }
  }
  switch (form.kind) {
    case 'turn':
      // A hair of slack, so that 15 and 150 degrees themselves are taken after conversion.
      return form.angle >= Math.PI / 12 - 1e-9 && form.angle <= (Math.PI * 5) / 6 + 1e-9
        ? null
        : {
            path: 'angle',
            expected: 'a turn of 15 to 150 degrees',
            found: `${Math.round((form.angle * 1800) / Math.PI) / 10} degrees`,
            whatToDo: 'Draw a gentler bend as a straight, a sharper one as a U-turn.',
          }
    case 'sidedoor':
      return form.p <= 3 ? null : tooWide('p', 'a doorway no wider than the 3 m room wall', form.p)
    case 'indoor':
      return Math.abs(form.o) + form.p / 2 <= form.w / 2 + 1e-9
        ? null
        : tooWide('p', 'an opening that lies within its wall', form.p)
    case 'chicane':
      return form.j < form.w ? null : tooWide('j', 'an obstruction that leaves part of the corridor', form.j)
    case 'uturn':
      return null
  }
}

function checkTeam(team: SceneTeam, separation: Metres): SceneProblem | null {
  const bad = (path: string, value: number): SceneProblem => ({
    path,
    expected: 'a number of metres above 0, up to 10',
    found: `${value}`,
    whatToDo: 'Give it in metres.',
  })
  if (!(separation > 0 && separation <= 10)) return bad('separation', separation)
  if (!(team.a > 0 && team.a <= 10)) return bad('a', team.a)
  if (!(team.d >= 0 && team.d <= 10)) return bad('d', team.d)
  return null
}

function tooWide(path: string, expected: string, found: number): SceneProblem {
  return { path, expected, found: `${found}`, whatToDo: 'Check the reading and the wall it belongs to.' }
}
