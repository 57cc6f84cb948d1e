import type { Case, Resolved } from '../case.ts'
import type { Asked } from './curve/curve.ts'
import type { Course } from './curve/grid.ts'

/** Fields that hold an instant at which what drives a case changes its law. */
export const instantNames: readonly string[] = ['pulseDuration', 'rampDuration', 'fireDuration']

const isObject = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null

/** Objects in an input, outside first; long lists of numbers are passed over. */
function objectsIn(value: unknown): Record<string, unknown>[] {
  if (!isObject(value)) return []
  if (Array.isArray(value)) return isObject(value[0]) ? value.flatMap(objectsIn) : []
  return [value, ...Object.values(value).flatMap(objectsIn)]
}

/**
 * The instants and the period of a case, read from its fields by the names that cases share; a period that is no field
 * stands in the resolved input.
 */
export function courseOf(c: Case, asked: Asked, resolved: Resolved): Course {
  const objects = objectsIn(asked)
  const instants = objects.flatMap((at) => [
    ...instantNames.flatMap((name) => (typeof at[name] === 'number' ? [at[name]] : [])),
    // A history: values at its own times.
    ...(Array.isArray(at['times']) && Array.isArray(at['values']) ? (at['times'] as number[]) : []),
  ])
  const periods = [...objects, ...objectsIn(resolved)].map((at) => at['period'])
  const period = periods.find((value) => typeof value === 'number')
  return { instants, period, settled: c.clock === true }
}

/** Depths at which a profile has a kink: joints of layers, and the points of a start. */
export function jointsOf(asked: Asked): number[] {
  const layers = asked['layers'] ?? asked['coatings']
  const profile = asked['initialProfile']
  const kinks = isObject(profile) && Array.isArray(profile['depths']) ? (profile['depths'] as number[]) : []
  if (!Array.isArray(layers)) return kinks
  let depth = 0
  return [...kinks, ...layers.map((layer) => (depth += Number((layer as Record<string, unknown>)['thickness'] ?? 0)))]
}

/** How deep, or between which radii, a body reaches, by the names that cases share. */
export function extentOf(c: Case, asked: Asked, axis: 'depths' | 'radii'): [number, number] {
  const number = (name: string) => (typeof asked[name] === 'number' ? asked[name] : undefined)
  if (axis === 'radii') {
    const begin = c.radiiBeginAt && number(c.radiiBeginAt)
    const end = c.depthsEndAt && number(c.depthsEndAt)
    return [typeof begin === 'number' ? begin : LEAST, typeof end === 'number' ? end : MOST]
  }
  if (c.signedDepths) return [-MOST, MOST]
  const end = c.depthsEndAt && number(c.depthsEndAt)
  // The other half mirrors this one.
  if (end !== undefined && end !== '') return [0, asked['exposedFaces'] === 2 ? end / 2 : end]
  return [0, Array.isArray(asked['layers']) ? jointsOf(asked).reduce((most, d) => Math.max(most, d), 0) : MOST]
}

const LEAST = 1e-9
const MOST = 1e5
