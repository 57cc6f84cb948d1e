import { expect, test } from 'vitest'
import { describedCase } from '../../api/catalogue/describe.ts'
import { refusalAt } from '../../portal/src/features/cases/refusals.ts'
import { bodyOf, isComplete, valuesOf } from '../../portal/src/features/cases/form-values.ts'
import type { Field } from '../../portal/src/features/cases/fields.ts'
import { type Operation, ownNames, ownText, questionOf } from '../../portal/src/features/cases/asking.ts'
import type { Case } from '../../portal/src/features/cases/described.ts'
import { rowsOf, rowsText } from '../../portal/src/features/cases/number-text.ts'
import { cases } from '../../solvers/cases/index.ts'

const described = cases.map(({ id }) => describedCase(id)!)
const fieldsOf = (c: (typeof described)[number]) => c.fields as unknown as Field[]

/** The order of outputs says nothing. */
const sorted = ({ outputs, ...rest }: Record<string, unknown>) => ({ ...rest, outputs: (outputs as string[])?.sort() })

test('the form of each case sends its example and each of its variants as they are', () => {
  for (const c of described) {
    const bodies = [c.example, ...c.variants.map(({ input }) => input)]
    for (const body of bodies) {
      const values = valuesOf(fieldsOf(c), body)
      expect(sorted(bodyOf(fieldsOf(c), values)), `${c.id} ${JSON.stringify(body)}`).toEqual(sorted(body))
      expect(isComplete(fieldsOf(c), values), c.id).toBe(true)
    }
  }
})

test('every field that a case describes has a title or a symbol, and a control', () => {
  for (const c of described)
    for (const field of fieldsOf(c)) {
      const inside = [...(field.fields ?? []), ...(field.kinds ?? []).flatMap(({ fields }) => fields)]
      for (const one of [field, ...inside]) expect(one.title, `${c.id} ${one.name}`).toBeDefined()
    }
})

test('another question of each case is asked with the body that was solved and what is its own', () => {
  for (const c of described)
    for (const operation of c.operations.filter(({ id }) => id !== 'solve')) {
      const [about, one] = [c as unknown as Case, operation as unknown as Operation]
      const typed = Object.fromEntries(ownNames(about, one).map((name) => [name, ownText(about, one.example[name])]))
      expect(questionOf(about, one, c.example, typed), `${c.id} ${operation.id}`).toEqual(operation.example)
      expect(ownNames(about, one).length, `${c.id} ${operation.id} has fields of its own`).toBeGreaterThan(0)
    }
})

const number = (name: string, required = true): Field => ({ name, required, schema: { type: 'number' } })
const side: Field = {
  name: 'left',
  required: true,
  schema: {},
  kinds: [
    { kind: 'temperature', fields: [number('surfaceTemperature')] },
    { kind: 'convection', fields: [number('ambientTemperature'), number('filmCoefficient')] },
    { kind: 'insulated', fields: [] },
  ],
}
const other: Field = {
  name: 'other',
  required: true,
  schema: { type: 'object' },
  fields: [number('density', false), number('specificHeat', false), number('diffusivity', false)],
}
const films: Field = { ...other, name: 'films', required: false, fields: [number('width'), number('height')] }

test('an object is sent by its kind alone, whatever stands in the boxes of other kinds', () => {
  const values = valuesOf([side], { left: { kind: 'convection', ambientTemperature: 5, filmCoefficient: 8 } })
  const left = values.fields['left'] as ReturnType<typeof valuesOf>
  left.fields['surfaceTemperature'] = '30'
  expect(bodyOf([side], values)).toEqual({ left: { kind: 'convection', ambientTemperature: 5, filmCoefficient: 8 } })
  left.kind = 'temperature'
  expect(bodyOf([side], values)).toEqual({ left: { kind: 'temperature', surfaceTemperature: 30 } })
  left.kind = 'insulated'
  expect(bodyOf([side], values)).toEqual({ left: { kind: 'insulated' } })
  expect(isComplete([side], values)).toBe(true)
  left.kind = ''
  expect(bodyOf([side], values)).toEqual({})
  expect(isComplete([side], values)).toBe(false)
})

test('each solid states its heat capacity in its own way, and an object that may be left out is', () => {
  const values = valuesOf([other, films], { other: { diffusivity: 1e-6 } })
  expect(bodyOf([other, films], values)).toEqual({ other: { diffusivity: 1e-6 } })
  const own = values.fields['other'] as ReturnType<typeof valuesOf>
  own.fields['density'] = '7'
  expect(bodyOf([other, films], values)).toEqual({ other: { diffusivity: 1e-6 } })
  own.solid = 'density+specificHeat'
  expect(isComplete([other], values), 'half of the way is missing').toBe(false)
  expect(bodyOf([other, films], values)).toEqual({ other: { density: 7 } })
  const partly = values.fields['films'] as ReturnType<typeof valuesOf>
  partly.fields['width'] = '4'
  expect(bodyOf([other, films], values)).toEqual({ other: { density: 7 }, films: { width: 4 } })
  expect(isComplete([other, films], values), 'its height is missing').toBe(false)
})

test('points are typed as rows, by order or by name, and what does not fit is sent for the service to refuse', () => {
  const xy = [number('x'), number('y')]
  expect(rowsOf(xy, '0, 0.1; 0.2 0.3\n\u22121,2;')).toEqual([
    { x: 0, y: 0.1 },
    { x: 0.2, y: 0.3 },
    { x: -1, y: 2 },
  ])
  expect(rowsOf(xy, '1')).toEqual([{ x: 1 }])
  expect(rowsOf(xy, '1, 2, 3')).toEqual([{ x: 1, y: 2, 'value 3': 3 }])
  expect(rowsOf(xy, '1, much')).toEqual([{ x: 1, y: 'much' }])
  expect(
    rowsText(xy, [
      { x: 0, y: 0.1 },
      { x: 1e-7, y: 2 },
    ]),
  ).toBe('0, 0.1; 1e-7, 2')
  const either = [number('x'), number('y', false), number('r', false)]
  expect(rowsText(either, [{ x: 0, r: 0.1 }])).toBe('x 0, r 0.1')
  expect(rowsOf(either, 'x 0, r 0.1; x=1 y=2')).toEqual([
    { x: 0, r: 0.1 },
    { x: 1, y: 2 },
  ])
})

test('a refusal lands on the field it is about, and on the group only where no field of it is', () => {
  const refusals = [
    { path: 'left/filmCoefficient', text: 'film' },
    { path: 'left/kind', text: 'kind' },
    { path: 'times/3', text: 'times' },
    { path: 'leftover', text: 'no' },
  ]
  expect(refusalAt(refusals, 'left/filmCoefficient')).toBe('film')
  expect(refusalAt(refusals, 'left', ['left/filmCoefficient'])).toBe('kind')
  expect(refusalAt(refusals, 'times')).toBe('times')
  expect(refusalAt(refusals, 'left/film')).toBeUndefined()
})
