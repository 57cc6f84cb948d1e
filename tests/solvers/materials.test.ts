import { readFileSync } from 'node:fs'
import { describe, expect, it, test } from 'vitest'
import type { Case } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { DomainError } from '../../solvers/errors.ts'
import { genericMaterial, genericMaterials } from '../../solvers/materials/generic.ts'
import { type Material, derivedOf, uncertaintyOf } from '../../solvers/materials/material.ts'
import { OwnMaterial, withOwnMaterials } from '../../solvers/materials/own-material.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { caseOf } from './ask.ts'

interface Row {
  id: string
  name: string
  group: string
  density_kg_m3: number
  conductivity_W_mK: number
  specific_heat_J_kgK: number
  volumetric_heat_capacity_J_m3K: number
  diffusivity_m2_s: number
  effusivity_W_s05_m2K: number
  state: string
  source: string
  confidence: 'high' | 'medium' | 'low'
}
const file = readFileSync(new URL('../reference/materials.json', import.meta.url), 'utf8')
const reference = JSON.parse(file) as {
  materials: Row[]
  constants: { default_relative_uncertainty: Record<string, Record<string, number>> }
}

describe('the catalogue', () => {
  it('has the entries of the reference', () => {
    const ids = (list: readonly { id: string }[]) => list.map(({ id }) => id).sort()
    expect(ids(genericMaterials)).toEqual(ids(reference.materials))
    expect(genericMaterials).toHaveLength(90)
    expect(genericMaterials.filter(({ id }) => !/^[a-z][a-z0-9]*(-[a-z0-9]+)*$/.test(id))).toEqual([])
  })

  test.each(reference.materials.map((row) => [row.id, row] as const))('%s', (id, row) => {
    const material = genericMaterial(id)!
    expect(material).toEqual({
      id,
      name: row.name,
      group: row.group,
      conductivity: row.conductivity_W_mK,
      density: row.density_kg_m3,
      specificHeat: row.specific_heat_J_kgK,
      state: row.state,
      source: `${row.source}, from memory`,
      confidence: row.confidence,
    })
    const derived = derivedOf(material)
    expect(derived.volumetricHeatCapacity / row.volumetric_heat_capacity_J_m3K).toBeCloseTo(1, 3)
    expect(derived.diffusivity / row.diffusivity_m2_s).toBeCloseTo(1, 3)
    expect(derived.effusivity / row.effusivity_W_s05_m2K).toBeCloseTo(1, 3)
  })

  it('names an uncertainty for each confidence', () => {
    for (const [confidence, shares] of Object.entries(uncertaintyOf))
      expect({ ...shares }).toEqual({
        conductivity: reference.constants.default_relative_uncertainty[confidence]!['conductivity'],
        volumetricHeatCapacity:
          reference.constants.default_relative_uncertainty[confidence]!['volumetric_heat_capacity'],
      })
  })
})

const properties = ['conductivity', 'density', 'specificHeat', 'volumetricHeatCapacity', 'diffusivity']
const isObject = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

/** A body whose solids, wherever they stand, are all one material; or all its properties. */
function withSolids(value: unknown, solid: Record<string, unknown>): unknown {
  if (Array.isArray(value)) return value.map((one) => withSolids(one, solid))
  if (!isObject(value)) return value
  const rest = Object.entries(value).filter(([name]) => !properties.includes(name) && name !== 'material')
  const changed = Object.fromEntries(rest.map(([name, inner]) => [name, withSolids(inner, solid)]))
  return 'conductivity' in value || 'material' in value ? { ...changed, ...solid } : changed
}

interface Full {
  input: Record<string, unknown>
  result: unknown
  warnings: { code: string; text: string; value: number }[]
}
const answerOf = (c: Case, body: unknown) => solve.prepare(c, body, 'full').run() as Full
const stated = (c: Case) =>
  [c.example, ...(c.variants ?? []).map(({ input }) => input)].find((one) => 'conductivity' in one)
const withSolid = cases.flatMap((c) => {
  const body = 'material' in c.fields ? stated(c) : undefined
  return body ? [[c.id, c, body] as const] : []
})

describe.each(withSolid)('%s', (_, c, body) => {
  const { conductivity, density, specificHeat, ...about } = genericMaterial('clay-brick-solid-1800')!
  const named = withSolids(body, { material: about.id })

  it('is solved by a material as by its properties, and says what was used', () => {
    const answer = answerOf(c, named)
    const explicit = answerOf(c, withSolids(body, { conductivity, density, specificHeat }))
    expect(answer.result).toEqual(explicit.result)
    const { id, name, state, source, confidence } = about
    const used = { conductivity, density, specificHeat, volumetricHeatCapacity: density * specificHeat }
    expect(answer.input).toMatchObject({ ...used, material: { id, name, state, source, confidence } })
    expect(answer.warnings.map(({ code }) => code)).toContain('moisture-state-unspecified')
    expect(explicit.warnings.map(({ code }) => code)).not.toContain('moisture-state-unspecified')
  })

  it.each(['conductivity', 'density', 'volumetricHeatCapacity', 'diffusivity'])(
    'takes no %s beside a material',
    (name) => {
      expect(() => answerOf(c, { ...(named as object), [name]: 1 })).toThrow(DomainError)
    },
  )
})

const slab = caseOf('slab-convection')
const solidOf = (material: unknown, more: object = {}) => ({
  ...(withSolids(slab.example, { material }) as object),
  ...more,
})
function refusalOf(body: unknown) {
  try {
    solve.prepare(slab, body, 'full')
  } catch (error) {
    if (!(error instanceof DomainError)) throw error
    return error.issues.map(({ pointer, code, detail }) => ({ at: `${pointer} ${code}`, detail }))
  }
  return []
}
const warned = (body: unknown) => answerOf(slab, body).warnings.filter(({ code }) => !code.startsWith('film'))

describe('a material', () => {
  it.each([
    ['that is in no catalogue', 'lime-wash', '#/material material-unknown', 'no material "lime-wash"'],
    ['named like a member of every object', 'constructor', '#/material material-unknown', '"constructor"'],
    [
      'of an account, with nobody to look it up',
      'mat_0123456789abcdefghijk',
      '#/material material-unknown',
      'own keys',
    ],
    ['that is no text', 7, '#/material wrong-type', 'a number'],
    ['that is an object', { id: 'mat_x', conductivity: 1 }, '#/material wrong-type', 'an object'],
    ['without a name', '', '#/material wrong-length', 'at least 1'],
  ])('%s is refused', (_, material, at, words) => {
    const [issue, ...more] = refusalOf(solidOf(material))
    expect(more).toEqual([])
    expect(issue!.at).toBe(at)
    expect(issue!.detail).toContain(words)
  })

  it('with a property beside it is refused, consistent or not', () => {
    expect(refusalOf(solidOf('concrete-dense-2400', { conductivity: 2 }))).toEqual([
      { at: '#/material conflicting-fields', detail: 'The solid is given twice: by material and by conductivity.' },
    ])
  })

  it('states the heat capacity of a lumped body by its volume', () => {
    const { heatCapacity: _, ...rest } = caseOf('lumped-convection').example
    const answer = answerOf(caseOf('lumped-convection'), { ...rest, volume: 0.1, material: 'steel' })
    expect(answer.input).toMatchObject({ heatCapacity: 351000, material: { id: 'steel', state: 'design' } })
  })
})

describe('warnings of a material', () => {
  it('say that its figures are rough, and how rough', () => {
    const [rough] = warned(solidOf('aac-500'))
    expect(rough).toMatchObject({ code: 'material-confidence-low', value: 0.25 })
    expect(rough!.text).toContain('25 % of the conductivity and 15 % of the heat capacity')
  })

  it('say nothing of moisture where there is none, or where the state is known', () => {
    expect(warned(solidOf('steel', { initialTemperature: 30 }))).toEqual([])
    expect(warned(solidOf('mineral-wool'))).toEqual([])
  })

  it('tell of a wet material that would freeze, with its Stefan number', () => {
    const [crossed] = warned(solidOf('water-10c'))
    expect(crossed).toMatchObject({ code: 'phase-change-crossed', value: -5 })
    expect(crossed!.text).toContain(`Stefan number is ${((4190e3 * 5) / 333.6e6).toPrecision(2)}.`)
    expect(warned(solidOf('concrete-fresh'))[0]!.text).not.toContain('Stefan')
    expect(warned(solidOf('water-10c', { ambientTemperature: 1 }))).toEqual([])
  })

  it('tell of a frozen material that would thaw', () => {
    expect(warned(solidOf('soil-iso13793-frozen'))).toMatchObject([{ code: 'phase-change-crossed', value: 20 }])
    expect(warned(solidOf('ice-0c', { initialTemperature: -1 }))).toEqual([])
  })
})

describe('a material of an account', () => {
  const own: Material = {
    ...genericMaterial('steel')!,
    id: 'mat_own',
    name: 'Our render',
    conductivity: 0.7,
    state: 'unspecified',
    source: 'Our laboratory, report 12',
  }
  const known = new Map([[own.id, own]])

  it('is put in the place of its id wherever that stands, and used', () => {
    const body = withOwnMaterials(solidOf('mat_own'), known)
    const { density, specificHeat } = own
    const explicit = answerOf(slab, withSolids(slab.example, { conductivity: 0.7, density, specificHeat }))
    const answer = answerOf(slab, body)
    expect(answer.result).toEqual(explicit.result)
    expect(answer.input['material']).toEqual({
      id: 'mat_own',
      name: 'Our render',
      state: 'unspecified',
      source: 'Our laboratory, report 12',
      confidence: 'high',
    })
    expect(warned(body)).toMatchObject([{ code: 'moisture-state-unspecified', value: 0.7 }])
    expect(
      withOwnMaterials({ other: { material: 'mat_own' }, layers: [{ material: 'mat_own' }] }, known),
    ).toMatchObject({
      other: { material: { conductivity: 0.7 } },
      layers: [{ material: { conductivity: 0.7 } }],
    })
  })

  it('stays an id where it is not known, and a body without one is not copied', () => {
    const body = solidOf('mat_other')
    expect(withOwnMaterials(body, known)).toEqual(body)
    expect(withOwnMaterials(body, new Map())).toBe(body)
  })

  it('cannot be brought by a body that comes as text', () => {
    const text = JSON.parse(JSON.stringify(solidOf(new OwnMaterial(own)))) as unknown
    expect(refusalOf(text).map(({ at }) => at)).toEqual(['#/material wrong-type'])
  })
})
