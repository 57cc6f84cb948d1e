import { momentsOf } from './body-step.ts'
import type { Check } from '../case.ts'
import { balanceOf, heatsOf } from './heat-balance.ts'
import { driveTemperature } from './product-films.ts'
import { type ProductInput, type DirectionShape, unitAcross } from './product-step.ts'
import type { Solution } from '../solution.ts'

/** A direction of a product: how far from its mid-plane, insulated face or axis to its face, and the film there. */
export interface Direction {
  shape: DirectionShape
  reach: number
  film: number
}

/** The face of a body of size 1. */
const face = { deltas: Float64Array.of(0), inner: Float64Array.of(1), shifts: Float64Array.of(0) }

/** The flux per kelvin at the faces across a direction, as if it were alone, and the mean that is left of it. */
function alone(input: ProductInput, { shape, reach, film }: Direction, times: number[]) {
  if (film === 0) return times.map(() => ({ flux: 0, mean: 1 }))
  const moments = momentsOf({ ...input, times }, reach)
  const body = { biot: (film * reach) / input.conductivity, ...face }
  const unit = unitAcross(shape, body)
  const fluxUnit = film === Infinity ? input.conductivity / reach : film
  return moments.map((m) => ({ flux: fluxUnit * unit.flux(0, m).value, mean: unit.meanRemaining(m).value }))
}

/** The faces across a direction take its flux times the mean that the other directions have left over them. */
export function productBalance<I extends ProductInput>(
  solve: (input: I) => Solution,
  input: I,
  volume: number,
  directions: readonly Direction[],
): Check[] {
  const step = driveTemperature(input) - input.initialTemperature
  return balanceOf(input.times, (times) => {
    const { heatGained } = solve({ ...input, points: [], times, outputs: ['heatGained'] }).outputs
    const single = directions.map((direction) => alone(input, direction, times))
    const areas = directions.map(({ shape, reach }) => ((shape === 'cylinder' ? 2 : 1) * volume) / reach)
    const flows = times.map((_, i) =>
      single.map((own, d) => {
        const others = single.reduce((left, one, k) => (k === d ? left : left * one[i]!.mean), 1)
        return step * areas[d]! * own[i]!.flux * others
      }),
    )
    return { heats: heatsOf(heatGained!), flows, flowError: 0 }
  })
}
