import { expect, test } from 'vitest'
import { describedCase } from '../../api/catalogue/describe.ts'
import { type Field, allInside, controlOf, unitsOf } from '../../portal/src/features/cases/fields.ts'
import { addressOf, formIn } from '../../portal/src/features/cases/form-address.ts'
import { bodyOf, valuesOf } from '../../portal/src/features/cases/form-values.ts'
import { cases } from '../../solvers/cases/index.ts'

const fieldsOf = (id: string) => describedCase(id)?.fields as unknown as Field[]

test.each(cases.map(({ id }) => id))('what stands in the form of %s stands whole in its address', (id) => {
  const fields = fieldsOf(id)
  const { example, variants } = describedCase(id)!
  for (const body of [example, ...variants.map(({ input }) => input)]) {
    const values = valuesOf(fields, body)
    const read = formIn(fields, new URLSearchParams(addressOf(fields, values).toString()))
    expect(read && bodyOf(fields, read)).toEqual(bodyOf(fields, values))
  }
})

test('units stand behind the numbers, in the address and in the call', () => {
  const fields = fieldsOf('slab-convection')
  const body = {
    material: 'concrete-dense-2400',
    thickness: { value: 20, unit: 'cm' },
    exposedFaces: 2,
    filmCoefficient: { value: 2, unit: '[Btu_IT]/(h.[ft_i]2.[degR])' },
    initialTemperature: { value: 68, unit: '[degF]' },
    ambientTemperature: -5,
    depths: [
      { value: 0, unit: 'mm' },
      { value: 100, unit: 'mm' },
    ],
    times: [
      { value: 1, unit: 'h' },
      { value: 10, unit: 'h' },
    ],
  }
  const address = addressOf(fields, valuesOf(fields, body))
  expect(address.get('thickness')).toBe('20 cm')
  expect(address.get('times')).toBe('1, 10 h')
  const read = formIn(fields, new URLSearchParams(address.toString()))
  expect(read && bodyOf(fields, read)).toEqual(body)
})

test('every unit of every field is told from the number before it', () => {
  for (const { id } of cases)
    for (const field of fieldsOf(id).flatMap((one) => [one, ...allInside(one)]))
      for (const unit of unitsOf(field)) {
        const values = valuesOf([field], {
          [field.name]: controlOf(field) === 'list' ? [{ value: 3, unit }] : { value: 3, unit },
        })
        const read = formIn([field], addressOf([field], values))
        expect(read && bodyOf([field], read), `${id} ${field.name}`).toEqual(bodyOf([field], values))
      }
})

test('an address that says nothing of the form, or a kind that nobody knows, leaves it alone', () => {
  const fields = fieldsOf('slab-two-sides')
  expect(formIn(fields, new URLSearchParams('from=mail'))).toBeUndefined()
  expect(formIn(fields, new URLSearchParams('left.kind=windy'))).toBeUndefined()
  const typed = formIn(fields, new URLSearchParams('thickness=thick'))
  expect(typed && bodyOf(fields, typed)['thickness']).toBe('thick')
})
