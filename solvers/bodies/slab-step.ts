import { type BodyStepInput, type Drive, solveBody } from './body-step.ts'
import type { Numbers } from '../case.ts'
import type { Moment, UnitBody, UnitPlaces } from '../math/unit-body.ts'
import { lateNumbers, slabCourse } from './late-course.ts'
import type { Solution } from '../solution.ts'

/** What the slab cases share: a uniform body, one drive, one exposed face or two alike. */
export interface SlabStepInput extends BodyStepInput {
  thickness: number
  exposedFaces: 1 | 2
  depths: readonly number[]
}

/** Half the thickness when both faces are exposed, all of it when one is. */
export function characteristicLength(input: Pick<SlabStepInput, 'thickness' | 'exposedFaces'>): number {
  return input.thickness / input.exposedFaces
}

/** The body in units of its length, with the face as the place after the last. */
export function slabPlaces(input: SlabStepInput): UnitPlaces {
  const length = characteristicLength(input)
  const places = [...input.depths, 0].map((depth) => placeOf(input, depth))
  return {
    deltas: Float64Array.from(places, ({ near }) => Math.min(1, near / length)),
    inner: Float64Array.from(places, ({ near }) => Math.max(0, (length - near) / length)),
    shifts: Float64Array.from(places, ({ mirrored }) => (mirrored ? 6 : 0)),
  }
}

/** Behind the mid-plane a body with two exposed faces mirrors its front. */
function placeOf(
  { thickness, exposedFaces }: Pick<SlabStepInput, 'thickness' | 'exposedFaces'>,
  depth: number,
): { near: number; mirrored: boolean } {
  const mirrored = exposedFaces === 2 && depth > thickness / 2
  return { near: mirrored ? thickness - depth : depth, mirrored }
}

/** Distance of each place asked for from the mid-plane or insulated face. */
export function fromFarFace(input: Pick<SlabStepInput, 'thickness' | 'exposedFaces' | 'depths'>): number[] {
  const length = characteristicLength(input)
  return input.depths.map((depth) => length - placeOf(input, depth).near)
}

/** What the slowest mode says of a slab with its film, or held. */
export function slabLateNumbers(input: SlabStepInput, biot: number): Numbers {
  if (biot === 0) return {}
  return lateNumbers(
    slabCourse({ diffusivity: input.diffusivity, length: characteristicLength(input), biot }, fromFarFace(input)),
  )
}

export function solveSlab(input: SlabStepInput, unit: UnitBody, moments: readonly Moment[], drive: Drive): Solution {
  const { thickness, exposedFaces, depths } = input
  const body = {
    capacity: input.volumetricHeatCapacity * characteristicLength(input),
    faces: depths.map((depth) => depth === 0 || (exposedFaces === 2 && depth === thickness)),
    directions: depths.map((depth) => (placeOf(input, depth).mirrored ? -1 : 1)),
  }
  return solveBody(input, body, unit, moments, drive)
}
