import type { OutputName } from '../../../solvers/outputs.ts'

/* How rows of tests/reference/values become questions: what the files of this folder share. */

export type Ask = (i: Record<string, number>) => { caseId: string; body: Record<string, unknown> }
export type Names = Record<string, OutputName>

export const solidOf = (i: Record<string, number>) => ({
  conductivity: i['conductivity_W_mK'],
  density: i['density_kg_m3'],
  specificHeat: i['specific_heat_J_kgK'],
})
export const filmOf = (i: Record<string, number>) => ({
  filmCoefficient: i['film_W_m2K'],
  initialTemperature: i['initial_C'],
  ambientTemperature: i['ambient_C'],
})
export const heldOf = (i: Record<string, number>) => ({
  initialTemperature: i['initial_C'],
  surfaceTemperature: i['surface_C'],
})
export const unitSolid = { conductivity: 1, diffusivity: 1 }

/** By the kind of the rows: their file, the question each is, and the output behind each name they have. */
export type Kinds = Record<string, { file: string; ask: Ask; names: Names }>

/** Half thickness less position in decimals, as the row states it: a difference in doubles would be another depth. */
export function depthOf(half: number, position: number): number {
  return Number((half - position).toPrecision(12))
}
