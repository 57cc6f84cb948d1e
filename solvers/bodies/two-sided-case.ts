import type { Check, Numbers } from '../case.ts'
import type { Issue } from '../errors.ts'
import { filmWarnings } from '../statement/film.ts'
import { jumpsAt, startAtFaces } from './profile-along.ts'
import { profileOf } from '../statement/initial-profile.ts'
import { EPS } from '../math/rounding.ts'
import { faceOf } from '../math/two-sided-body.ts'
import { twoSidedModes } from '../math/two-sided-modes.ts'
import type { OutputName } from '../outputs.ts'
import { fluxOf, passesNoHeat, type Side, sideBiot } from '../statement/side.ts'
import { TwoSided, type TwoSidedProblem } from './two-sided.ts'
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
  const { left, right, length, conductivity, diffusivity, times } = problem
  const body = {
    left: faceOf(sideBiot(left, length, conductivity)),
    right: faceOf(sideBiot(right, length, conductivity)),
  }
  const slowest = twoSidedModes(body, 1).roots[0]!
  const scale = diffusivity / (length * length)
  return {
    fourier: times.map((time) => scale * time),
    length,
    ...(slowest > 0 ? { slowestTimeConstant: 1 / (slowest * slowest * scale) } : {}),
  }
}

export function insideCheck(depths: readonly number[], thickness: number): Check {
  const value = depths.reduce((most, depth) => Math.max(most, depth), 0)
  const text = 'Every depth lies inside the body.'
  return { id: 'depth-inside-body', holds: true, value, limit: thickness, text }
}

/**
 * The mean must rise as fast as what enters and is released says: at the last time, by a central difference over a thousandth of it, as a
 * share of all that passes.
 */
export function balanceCheck(problem: TwoSidedProblem, released: (time: number) => number = () => 0): Check[] {
  const last = problem.times.reduce((most, t) => Math.max(most, t), 0)
  const step = last * 1e-3
  const pulse = problem.pulse ?? Infinity
  const turns = last - step <= pulse && last + step > pulse
  if (!(step > 1e-290) || turns) return []
  const slab = new TwoSided({ ...problem, depths: [], times: [last - step, last, last + step] })
  const [before, after] = [slab.at(0).heat(), slab.at(2).heat()]
  const [left, right] = [slab.at(1).leftFlux().value, slab.at(1).rightFlux().value]
  const source = (released(last + step) - released(last - step)) / (2 * step)
  const stored = (after.value - before.value) / (2 * step)
  const size = Math.abs(left) + Math.abs(right) + Math.abs(source)
  if (!(size > 1e-280)) return []
  const rounding =
    (before.error + after.error + 8 * EPS * (Math.abs(before.value) + Math.abs(after.value))) / (2 * step)
  const value = Math.abs(stored - left - right - source) / size
  const limit = 1e-4 + rounding / size
  const text = 'Heat is stored as fast as it enters and is released, at the last time, as a share of all that passes.'
  return [{ id: 'heat-balance', holds: value <= limit, value, limit, text }]
}

export function sideWarnings(...sides: readonly Side[]): Warning[] {
  return sides.flatMap((side) => (side.kind === 'convection' ? filmWarnings(side.filmCoefficient) : [])).slice(0, 1)
}
