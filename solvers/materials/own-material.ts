import type { Confidence, Material, State } from './material.ts'

/**
 * A material of an account, put into a body in place of its id by who may look it up. A class, because no body that
 * comes as text can hold one.
 */
export class OwnMaterial implements Material {
  readonly id: string
  readonly name: string
  readonly group: string
  readonly conductivity: number
  readonly density: number
  readonly specificHeat: number
  readonly state: State
  readonly source: string
  readonly confidence: Confidence
  constructor(m: Material) {
    this.id = m.id
    this.name = m.name
    this.group = m.group
    this.conductivity = m.conductivity
    this.density = m.density
    this.specificHeat = m.specificHeat
    this.state = m.state
    this.source = m.source
    this.confidence = m.confidence
  }
}

/** Ids of own materials begin so; those of the catalogue never do. */
export const OWN_PREFIX = 'mat_'

/** A body with the own materials that it names in the place of their ids; ids that are not known stay. */
export function withOwnMaterials(body: unknown, own: ReadonlyMap<string, Material>): unknown {
  if (own.size === 0) return body
  const put = (name: string, value: unknown): unknown => {
    const material = name === 'material' && typeof value === 'string' ? own.get(value) : undefined
    return material ? new OwnMaterial(material) : walk(value)
  }
  const walk = (value: unknown): unknown => {
    if (typeof value !== 'object' || value === null) return value
    if (Array.isArray(value)) return typeof value[0] === 'object' ? value.map(walk) : value
    return Object.fromEntries(Object.entries(value).map(([name, inner]) => [name, put(name, inner)]))
  }
  return walk(body)
}
