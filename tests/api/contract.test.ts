import { describe, expect, test } from 'vitest'
import { cases } from '../../solvers/cases/index.ts'
import { problemsOf } from '../../api/operation.ts'
import { operations } from '../../api/operations.ts'
import { domainCodes, problemCodes, problems } from '../../api/problems.ts'
import { bodyFaults, documents } from './harness/documents.ts'

type Paths = Record<string, Record<string, { operationId: string; 'x-problem-codes': string[] }>>
const pathsOf = (name: keyof typeof documents) => documents[name]['paths'] as Paths

test('the documents hold exactly the operations of the list', () => {
  const written = Object.keys(documents).flatMap((name) =>
    Object.entries(pathsOf(name as keyof typeof documents)).flatMap(([path, methods]) =>
      Object.entries(methods).map(([method, o]) => `${name} ${method} ${path} ${o.operationId}`),
    ),
  )
  expect(written.sort()).toEqual(operations.map((o) => `${o.document} ${o.method} ${o.path} ${o.id}`).sort())
})

test('each problem can be met by some operation', () => {
  const met = new Set(operations.flatMap(problemsOf))
  expect(problemCodes.filter((code) => !met.has(code))).toEqual([])
})

test('the public document tells every problem and every code of a fault', () => {
  expect(documents.openapi['x-problems']).toEqual(problems)
  expect(documents.openapi['x-error-codes']).toEqual(domainCodes)
})

describe.each(operations.filter((o) => o.body).map((o) => [o.id, o] as const))('%s', (_, o) => {
  test('has an example that its document accepts', () => {
    expect(bodyFaults(o, o.example?.body)).toEqual([])
  })

  test('has a document that refuses what is not a field', () => {
    expect(bodyFaults(o, { ...o.example?.body, nonsense: 1 })).not.toEqual([])
  })
})

test('each case stands in each document that asks it, and its fields say what they are', () => {
  for (const c of cases) {
    expect(pathsOf('openapi')[`/v1/cases/${c.id}/solve`]).toBeDefined()
    expect(pathsOf('portal')[`/portal/v1/try/${c.id}/solve`]).toBeDefined()
  }
  const text = JSON.stringify(documents.openapi)
  for (const word of ['x-symbol', 'x-ucum', 'x-typical', 'x-accepted', 'x-hint']) expect(text).toContain(`"${word}"`)
})

test('a number of a quantity may be stated with a unit that the quantity takes, and with no other', () => {
  const o = operations.find(({ id }) => id === 'solve-slab-convection')!
  const stated = (thickness: unknown, times: unknown) => bodyFaults(o, { ...o.example?.body, thickness, times })
  expect(stated({ value: 20, unit: 'cm' }, [{ value: 1, unit: 'h' }, 7200])).toEqual([])
  expect(stated({ value: 20, unit: 'h' }, [3600])).not.toEqual([])
  expect(stated({ value: 20 }, [3600])).not.toEqual([])
  expect(stated(0.2, { values: [1], unit: 'h' })).not.toEqual([])
  expect(stated(1e6, [3600])).not.toEqual([])
  expect(JSON.stringify(documents)).not.toContain('x-units')
})
