/** What the figures of a material hold for. `design`: of a design table, at the moisture usual in use. */
export const states = ['design', 'dry', 'moist', 'frozen', 'liquid', 'solid', 'gas', 'unspecified'] as const
export type State = (typeof states)[number]

/** How sure the figures are: a well-known table value, typical within a range, or the right order only. */
export const confidences = ['high', 'medium', 'low'] as const
export type Confidence = (typeof confidences)[number]

export interface Material {
  id: string
  name: string
  group: string
  /** W/(m.K) */
  conductivity: number
  /** kg/m3 */
  density: number
  /** J/(kg.K) */
  specificHeat: number
  state: State
  source: string
  confidence: Confidence
}

/** Of a material, what an answer says beside the properties that it used. */
export interface MaterialUsed {
  id: string
  name: string
  state: State
  source: string
  confidence: Confidence
}

export function usedOf({ id, name, state, source, confidence }: Material): MaterialUsed {
  return { id, name, state, source, confidence }
}

/** What follows from the three properties. */
export function derivedOf({ conductivity, density, specificHeat }: Material) {
  const volumetricHeatCapacity = density * specificHeat
  return {
    volumetricHeatCapacity,
    diffusivity: conductivity / volumetricHeatCapacity,
    effusivity: Math.sqrt(conductivity * volumetricHeatCapacity),
  }
}

/** Relative standard uncertainties to start from; engineering judgement. */
export const uncertaintyOf: Record<Confidence, { conductivity: number; volumetricHeatCapacity: number }> = {
  high: { conductivity: 0.05, volumetricHeatCapacity: 0.05 },
  medium: { conductivity: 0.1, volumetricHeatCapacity: 0.08 },
  low: { conductivity: 0.25, volumetricHeatCapacity: 0.15 },
}
