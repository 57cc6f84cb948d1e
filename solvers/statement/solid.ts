import type { Issue } from '../errors.ts'
import { type MaterialInput, findMaterial } from '../materials/find-material.ts'
import { type Material, type MaterialUsed, derivedOf, usedOf } from '../materials/material.ts'

export interface SolidInput {
  material?: MaterialInput | undefined
  conductivity?: number | undefined
  density?: number | undefined
  specificHeat?: number | undefined
  volumetricHeatCapacity?: number | undefined
  diffusivity?: number | undefined
}

/** A solid as solvers use it: all of what was given, and what follows from it. */
export interface Solid {
  conductivity: number
  density?: number
  specificHeat?: number
  volumetricHeatCapacity: number
  diffusivity: number
  effusivity: number
  /** Where its properties are from, if they were not given. */
  material?: MaterialUsed
}

const properties = ['conductivity', 'density', 'specificHeat', 'volumetricHeatCapacity', 'diffusivity'] as const

const ways = 'density with specificHeat, or volumetricHeatCapacity, or diffusivity'

export interface HeatCapacity {
  density?: number
  specificHeat?: number
  volumetricHeatCapacity: number
  material?: MaterialUsed
}

/** The material that is named, alone: properties beside it are a second statement, consistent or not. */
function materialOf(input: SolidInput, named: MaterialInput, refuse: (issue: Issue) => void): Material | undefined {
  const second = properties.find((name) => input[name] !== undefined)
  if (!second) return findMaterial(named, refuse)
  const detail = `The solid is given twice: by material and by ${second}.`
  refuse({ pointer: '#/material', code: 'conflicting-fields', detail, accepted: 'material or its properties' })
  return undefined
}

function heatOf(material: Material): HeatCapacity {
  const { density, specificHeat } = material
  return { density, specificHeat, volumetricHeatCapacity: density * specificHeat, material: usedOf(material) }
}

function solidOf(material: Material): Solid {
  return { conductivity: material.conductivity, ...heatOf(material), ...derivedOf(material) }
}

/** Volumetric heat capacity from exactly one of its statements, diffusivity aside. */
export function resolveHeatCapacity(
  input: SolidInput,
  refuse: (issue: Issue) => void,
  accepted = 'density with specificHeat, or volumetricHeatCapacity',
): HeatCapacity | undefined {
  const { density, specificHeat, volumetricHeatCapacity } = input
  if (input.material !== undefined) {
    const material = materialOf(input, input.material, refuse)
    return material && heatOf(material)
  }
  const pair = density !== undefined || specificHeat !== undefined
  if (pair && volumetricHeatCapacity !== undefined) {
    const pointer = '#/volumetricHeatCapacity'
    const detail = 'The heat capacity is given twice: by density and specificHeat, and by volumetricHeatCapacity.'
    refuse({ pointer, code: 'conflicting-fields', detail, accepted: `exactly one of ${accepted}` })
    return undefined
  }
  if (volumetricHeatCapacity !== undefined) return { volumetricHeatCapacity }
  if (density !== undefined && specificHeat !== undefined)
    return { density, specificHeat, volumetricHeatCapacity: density * specificHeat }
  const missing = pair ? (density === undefined ? 'density' : 'specificHeat') : 'volumetricHeatCapacity'
  const detail = pair
    ? 'density and specificHeat must be given together.'
    : 'The heat capacity of the solid is missing.'
  refuse({ pointer: `#/${missing}`, code: 'missing-field', detail, accepted: `exactly one of ${accepted}` })
  return undefined
}

/** A material, or conductivity and exactly one statement of the heat capacity; refuses a missing and a second one. */
export function resolveSolid(input: SolidInput, refuse: (issue: Issue) => void): Solid | undefined {
  if (input.material !== undefined) {
    const material = materialOf(input, input.material, refuse)
    return material && solidOf(material)
  }
  const { conductivity, density, specificHeat, volumetricHeatCapacity, diffusivity } = input
  if (conductivity === undefined)
    refuse({
      pointer: '#/conductivity',
      code: 'missing-field',
      detail: 'The conductivity of the solid is missing.',
      accepted: `material, or conductivity with exactly one of ${ways}`,
    })
  if (diffusivity === undefined) {
    const heat = resolveHeatCapacity(input, refuse, ways)
    if (conductivity === undefined || heat === undefined) return undefined
    const capacity = heat.volumetricHeatCapacity
    return {
      conductivity,
      ...heat,
      diffusivity: conductivity / capacity,
      effusivity: Math.sqrt(conductivity * capacity),
    }
  }
  const second = Object.entries({ density, specificHeat, volumetricHeatCapacity }).find(([, v]) => v !== undefined)
  if (second) {
    const detail = `The heat capacity is given twice: by diffusivity and by ${second[0]}.`
    refuse({ pointer: '#/diffusivity', code: 'conflicting-fields', detail, accepted: `exactly one of ${ways}` })
  }
  if (conductivity === undefined) return undefined
  const capacity = conductivity / diffusivity
  return {
    conductivity,
    volumetricHeatCapacity: capacity,
    diffusivity,
    effusivity: conductivity / Math.sqrt(diffusivity),
  }
}
