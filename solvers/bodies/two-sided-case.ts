import type { Check, Numbers } from '../case.ts'
import type { Issue } from '../errors.ts'
import { filmWarnings } from '../statement/film.ts'
import { lateNumbers } from './late-course.ts'
import { jumpsAt, startAtFaces } from './profile-along.ts'
import { profileOf } from '../statement/initial-profile.ts'
import type { OutputName } from '../outputs.ts'
import { fluxOf, passesNoHeat, type Side } from '../statement/side.ts'
import { TwoSided, type TwoSidedProblem } from './two-sided.ts'
import { twoSidedCourse } from './two-sided-late-course.ts'
import type { Warning } from '../warnings.ts'

/* What the descriptions of the cases with two sides share. */

interface Asked {
  times: readonly number[]
  depths: readonly number[]
  outputs: readonly OutputName[]
}

type Refuse = (issue: Issue) => void

const leftFluxes: readonly OutputName[] = ['leftHeatFlux', 'surfaceHeatFlux']
const rightFluxes: readonly OutputName[] = ['rightHeatFlux', 'backHeatFlux']

/** At time 0 a flux is infinite at a face that is stepped in temperature, and where the initial profile jumps. */
export function refuseFluxAtJump(problem: TwoSidedProblem, { times, depths, outputs }: Asked, refuse: Refuse): void {
  const profile = profileOf(problem.start, problem.length)
  const { first, last } = startAtFaces(profile)
  const stepped = (side: Side, T: number) => side.kind === 'temperature' && side.surfaceTemperature !== T
  const left = stepped(problem.left, first)
  const right = stepped(problem.right, last)
  const infinite = (depth: number) => {
    if (depth === 0) return left
    return depth === problem.length ? right : jumpsAt(profile, depth)
  }
  const asked =
    (left && leftFluxes.some((name) => outputs.includes(name))) ||
    (right && rightFluxes.some((name) => outputs.includes(name))) ||
    (outputs.includes('heatFlux') && depths.some(infinite))
  if (!asked) return
  times.forEach((time, i) => {
    if (time !== 0) return
    const detail =
      'The heat flux is infinite at time 0 where the temperature jumps: at a face that is stepped, or in the profile.'
    refuse({ pointer: `#/times/${i}`, code: 'singular-at-time-zero', detail, accepted: 'a time above 0 s' })
  })
}

/** Heat that enters for ever, W/m2, where neither side gives any back; undefined where one does. */
export function netFlux({ left, right }: Pick<TwoSidedProblem, 'left' | 'right'>): number | undefined {
  return passesNoHeat(left) && passesNoHeat(right) ? fluxOf(left) + fluxOf(right) : undefined
}

export function refuseSteady(outputs: readonly OutputName[], reason: string, refuse: Refuse): void {
  const at = outputs.indexOf('steadyTemperature')
  const accepted = 'the other outputs'
  if (at >= 0)
    refuse({
      pointer: `#/outputs/${at}`,
      code: 'output-not-defined',
      detail: `"steadyTemperature": ${reason}`,
      accepted,
    })
}

export function twoSidedNumbers(problem: TwoSidedProblem): Numbers {
  const { length, diffusivity, times } = problem
  const scale = diffusivity / (length * length)
  return { fourier: times.map((time) => scale * time), length, ...lateNumbers(twoSidedCourse(new TwoSided(problem))) }
}

export function insideCheck(depths: readonly number[], thickness: number): Check {
  const value = depths.reduce((most, depth) => Math.max(most, depth), 0)
  const text = 'Every depth lies inside the body.'
  return { id: 'depth-inside-body', holds: true, value, limit: thickness, text }
}

export function sideWarnings(...sides: readonly Side[]): Warning[] {
  return sides.flatMap((side) => (side.kind === 'convection' ? filmWarnings(side.filmCoefficient) : [])).slice(0, 1)
}
