import type { Issue } from '../errors.ts'
import { resolveHeatCapacity, resolveSolid, type Solid, type SolidInput } from '../statement/solid.ts'

export interface BodyInput extends SolidInput {
  body?: 'slab' | 'cylinder' | 'sphere' | undefined
  thickness?: number | undefined
  exposedFaces?: 1 | 2 | undefined
  radius?: number | undefined
  heatCapacity?: number | undefined
  volume?: number | undefined
  area?: number | undefined
  correction?: 'none' | 'mean' | undefined
  power?: number | undefined
}

/** Heat capacity and exchanging area, however they were stated, and what is echoed of them. */
export interface LumpedBody {
  capacity: number
  area: number
  /** Unit of the heat: of the body, or of its m2 or m. */
  heatUnit: 'J' | 'J/m2' | 'J/m'
  solid?: Solid
  length?: number
  /** Dimension n of slab, cylinder or sphere: 1, 2, 3. */
  dimension?: 1 | 2 | 3
  echo: Record<string, unknown>
}

const WITHOUT = 'without body'

type Refuse = (issue: Issue) => void

export function resolveBody(input: BodyInput, refuse: Refuse): LumpedBody | undefined {
  return input.body === undefined ? byQuantities(input, refuse) : byShape(input, input.body, refuse)
}

function refuseGiven(input: BodyInput, names: readonly (keyof BodyInput)[], reason: string, refuse: Refuse): void {
  for (const name of names)
    if (input[name] !== undefined)
      refuse({
        pointer: `#/${name}`,
        code: 'conflicting-fields',
        detail: `${name} cannot stand ${reason}.`,
        accepted: reason === WITHOUT ? `body (slab, cylinder or sphere) beside it, or no ${name}` : `no ${name}`,
      })
}

function require<K extends keyof BodyInput>(
  input: BodyInput,
  name: K,
  accepted: string,
  refuse: Refuse,
): NonNullable<BodyInput[K]> | undefined {
  const value = input[name]
  if (value === undefined)
    refuse({ pointer: `#/${name}`, code: 'missing-field', detail: `${name} is missing.`, accepted })
  return value ?? undefined
}

const shapes = {
  slab: { dimension: 1, heatUnit: 'J/m2' },
  cylinder: { dimension: 2, heatUnit: 'J/m' },
  sphere: { dimension: 3, heatUnit: 'J' },
} as const

/** A slab, cylinder or sphere with a full solid; per m2 of one exposed face, per m, or the whole. */
function byShape(input: BodyInput, shape: keyof typeof shapes, refuse: Refuse): LumpedBody | undefined {
  refuseGiven(input, ['heatCapacity', 'volume', 'area', 'power'], 'beside body', refuse)
  const other = shape === 'slab' ? (['radius'] as const) : (['thickness', 'exposedFaces'] as const)
  refuseGiven(input, other, `with body "${shape}"`, refuse)
  const solid = resolveSolid(input, refuse)
  const length = shape === 'slab' ? halfOrWhole(input, refuse) : require(input, 'radius', 'a radius in m', refuse)
  if (solid === undefined || length === undefined) return undefined
  const { dimension, heatUnit } = shapes[shape]
  const area = { slab: 1, cylinder: 2 * Math.PI * length, sphere: 4 * Math.PI * length * length }[shape]
  const capacity = (solid.volumetricHeatCapacity * area * length) / dimension
  const size = shape === 'slab' ? { thickness: input.thickness, exposedFaces: input.exposedFaces } : { radius: length }
  const echo = { body: shape, ...size, correction: input.correction ?? 'none', ...solid }
  return { capacity, area, heatUnit, solid, length, dimension, echo }
}

function halfOrWhole(input: BodyInput, refuse: Refuse): number | undefined {
  const thickness = require(input, 'thickness', 'the whole thickness in m', refuse)
  const faces = require(input, 'exposedFaces', '1 or 2', refuse)
  return thickness === undefined || faces === undefined ? undefined : thickness / faces
}

const statements = 'heatCapacity, or volume with the heat capacity of the solid, or body'

/** Any body, by its heat capacity and exchanging area. */
function byQuantities(input: BodyInput, refuse: Refuse): LumpedBody | undefined {
  refuseGiven(input, ['thickness', 'exposedFaces', 'radius', 'correction'], WITHOUT, refuse)
  const area = require(input, 'area', 'the exchanging area in m2', refuse)
  refuseGiven(input, ['conductivity', 'diffusivity'], WITHOUT, refuse)
  const stated = capacityOf(input, refuse)
  if (area === undefined || stated === undefined) return undefined
  return {
    ...stated,
    area,
    heatUnit: 'J',
    echo: { ...stated.echo, area, ...(input.power === undefined ? {} : { power: input.power }) },
  }
}

function capacityOf(input: BodyInput, refuse: Refuse): Pick<LumpedBody, 'capacity' | 'echo'> | undefined {
  const { heatCapacity, volume } = input
  if (heatCapacity !== undefined) {
    const others = ['volume', 'material', 'density', 'specificHeat', 'volumetricHeatCapacity'] as const
    refuseGiven(input, others, 'beside heatCapacity', refuse)
    return { capacity: heatCapacity, echo: { heatCapacity } }
  }
  if (volume === undefined) {
    const detail = 'The heat capacity of the body is missing.'
    refuse({ pointer: '#/heatCapacity', code: 'missing-field', detail, accepted: `exactly one of ${statements}` })
    return undefined
  }
  const heat = resolveHeatCapacity(input, refuse)
  if (heat === undefined) return undefined
  const capacity = heat.volumetricHeatCapacity * volume
  return { capacity, echo: { volume, ...heat, heatCapacity: capacity } }
}

/** Stands in for a body that was refused, so that the rest of the input is still examined. */
export const noBody: LumpedBody = { capacity: 1, area: 1, heatUnit: 'J', echo: {} }
