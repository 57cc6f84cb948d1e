import { momentsOf } from './body-step.ts'
import type { Check } from '../case.ts'
import { balanceOf } from './heat-balance.ts'
import { UnitCylinder } from '../math/cylinder.ts'
import { SlabFilm } from '../math/slab-film.ts'
import { SlabFixed } from '../math/slab-fixed.ts'
import { driveTemperature } from './product-films.ts'
import type { ProductInput } from './product-step.ts'
import type { Solution } from '../solution.ts'

/** A direction of a product: how far from its mid-plane, insulated face or axis to its face, and the film there. */
export interface Direction {
  shape: 'slab' | 'cylinder'
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
  const unit =
    shape === 'cylinder' ? new UnitCylinder(body) : film === Infinity ? new SlabFixed(body) : new SlabFilm(body)
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
    const { values, bound } = solve({ ...input, points: [], times, outputs: ['heatGained'] }).outputs.heatGained!
    const single = directions.map((direction) => alone(input, direction, times))
    const areas = directions.map(({ shape, reach }) => ((shape === 'cylinder' ? 2 : 1) * volume) / reach)
    const flows = times.map((_, i) =>
      single.map((own, d) => {
        const others = single.reduce((left, one, k) => (k === d ? left : left * one[i]!.mean), 1)
        return step * areas[d]! * own[i]!.flux * others
      }),
    )
    const heats = (values as number[]).map((value) => ({
      value,
      error: bound.absolute + bound.relative * Math.abs(value),
    }))
    return { heats, flows, flowError: 0 }
  })
}
