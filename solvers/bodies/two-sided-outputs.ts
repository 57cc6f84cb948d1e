import { type Field, fieldOutputs, grid, history, profile } from './field-outputs.ts'
import { TwoSided, type TwoSidedProblem } from './two-sided.ts'
import type { OutputName } from '../outputs.ts'
import { filmOf, fluxOf, passesNoHeat, type Side, temperatureOf } from '../statement/side.ts'
import { profileOf } from '../statement/initial-profile.ts'
import type { Solution } from '../solution.ts'
import { latestOf } from '../math/latest.ts'

/** The outputs of a slab between two sides, under their names in the cases; `also` gives a case's own. */
export function solveTwoSided(
  problem: TwoSidedProblem,
  outputs: readonly OutputName[],
  scale: number,
  also: (slab: TwoSided) => Partial<Record<OutputName, Field>> = () => ({}),
): Solution {
  const slab = new TwoSided(problem)
  const alone = slab.drives() <= 1
  // What a drive does at the face behind it keeps its digits only where nothing else has to be told from it.
  const kept = (face: 'left' | 'right') =>
    alone && (slab.driven(face) || slab.crosses(face)) ? 'relative' : 'absolute'
  const left = history((i) => slab.at(i).leftFlux(), kept('left'))
  const right = history((i) => slab.at(i).rightFlux(), kept('right'))
  const fields: Partial<Record<OutputName, Field>> = {
    temperature: grid((i, j) => slab.at(i).temperature(j)),
    heatFlux: grid((i, j) => slab.at(i).flux(j)),
    surfaceHeatFlux: left,
    leftHeatFlux: left,
    rightHeatFlux: right,
    backHeatFlux: right,
    heatGained: history((i) => slab.at(i).heat(), alone ? 'relative' : 'absolute'),
    meanTemperature: history((i) => slab.at(i).mean()),
    steadyTemperature: profile((j) => slab.steady(j)),
    ...also(slab),
  }
  const asked = { times: problem.times, places: problem.depths.length, outputs }
  return { ...fieldOutputs(asked, fields), terms: slab.terms(), scale }
}

/** The largest rise by each flux, and the spread of all temperatures. */
export function twoSidedScale(problem: TwoSidedProblem): number {
  const { left, right, start, length, times } = problem
  const longest = latestOf(times)
  const acting = Math.min(longest, problem.pulse ?? Infinity)
  const given = [...profileOf(start, length).temperatures, temperatureOf(left), temperatureOf(right)]
  const temperatures = given.filter((T) => T !== undefined)
  const spread =
    temperatures.reduce((most, T) => Math.max(most, T), -Infinity) -
    temperatures.reduce((least, T) => Math.min(least, T), Infinity)
  return spread + riseBy(problem, left, right, acting) + riseBy(problem, right, left, longest)
}

function riseBy(problem: TwoSidedProblem, side: Side, other: Side, time: number): number {
  const flux = Math.abs(fluxOf(side))
  if (flux === 0) return 0
  const { conductivity: k, diffusivity: a, volumetricHeatCapacity: C, length } = problem
  const near = (Math.sqrt(4 / Math.PI) * Math.sqrt(a) * Math.sqrt(time)) / k
  if (passesNoHeat(other)) return flux * (near + time / (C * length))
  return flux * Math.min(near, length / k + 1 / filmOf(other))
}
