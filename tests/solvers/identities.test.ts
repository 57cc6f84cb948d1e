import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type Case, outputNamesOf, placeFields, shapeOf } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { DomainError } from '../../solvers/errors.ts'
import { solve } from '../../solvers/operations/solve.ts'
import type { OutputName } from '../../solvers/outputs.ts'
import type { Bound } from '../../solvers/solution.ts'
import { admissible, type Field, propertiesOf, schemaOf } from './admissible.ts'
import { proof, seed } from './counts.ts'
import { decades, uniform } from './draw.ts'

/*
 * What holds for every case whatever its numbers: similarity, superposition, rest, and for single steps monotony. Each is read from the units of
 * the fields and outputs, and held to the bounds that the answers give themselves.
 */

const count = proof ? 2000 : 40
const runs = { numRuns: count, seed, endOnFailure: true }
type Input = Record<string, unknown>

interface Answer {
  result: Partial<Record<OutputName, number | number[] | number[][]>>
  units: Record<string, string>
  accuracy: { bound: Partial<Record<OutputName, Bound>> }
}

/** A value as stated, each number of it changed by what its unit is. */
function changed(stated: unknown, field: Field | undefined, change: (value: number, unit: string) => number): unknown {
  if (typeof stated === 'number') return field?.['x-ucum'] ? change(stated, field['x-ucum']) : stated
  if (Array.isArray(stated)) return stated.map((one) => changed(one, field?.items, change))
  if (typeof stated !== 'object' || stated === null) return stated
  const own = propertiesOf(field, stated as Input)
  return Object.fromEntries(Object.entries(stated).map(([key, one]) => [key, changed(one, own[key], change)]))
}

/** What the case answers of the outputs asked for, without those that the input does not have; undefined where it refuses altogether. */
function answerTo(c: Case, body: Input, outputs: readonly OutputName[]): Answer | undefined {
  if (outputs.length === 0) return undefined
  try {
    return solve.prepare(c, { ...body, outputs }, 'full').run() as Answer
  } catch (error) {
    if (!(error instanceof DomainError)) throw error
    const named = error.issues.map(({ pointer }) => pointer)
    const singular = error.issues.some(({ code }) => code === 'singular-at-time-zero')
    const left = outputs.filter((name, i) => !named.includes(`#/outputs/${i}`) && !(singular && /eatFlux$/.test(name)))
    return left.length < outputs.length ? answerTo(c, body, left) : undefined
  }
}

/** A rate and sensitivities are made from temperatures, and need places. */
function outputsOf(c: Case, body: Input): OutputName[] {
  const placeless = c.places !== 'none' && placeFields[c.places].every((name) => !body[name])
  return outputNamesOf(c).filter(
    (name) =>
      name !== 'rate' && name !== 'sensitivities' && !(placeless && ['grid', 'places'].includes(shapeOf(c, name))),
  )
}

interface Number_ {
  name: OutputName
  unit: string
  value: number
  bound: number
}

function numbersOf({ result, units, accuracy }: Answer): Number_[] {
  return (Object.keys(result) as OutputName[]).flatMap((name) => {
    const { absolute, relative } = accuracy.bound[name]!
    return [result[name]!]
      .flat(2)
      .map((value) => ({ name, unit: units[name]!, value, bound: absolute + relative * Math.abs(value) }))
  })
}

/** By which power of a length a quantity grows, when lengths grow by it and times by its square, and materials and temperatures stay. */
const LENGTHS: Record<string, number> = {
  m: 1,
  m2: 2,
  m3: 3,
  s: 2,
  'K/s': -2,
  'W/(m2.K)': -1,
  'W/m2': -1,
  'W/m3': -2,
  'W/m': 0,
  W: 1,
  J: 3,
  'J/m': 2,
  'J/m2': 1,
  'J/K': 3,
  'J/(m2.K)': 1,
  ...Object.fromEntries(
    ['1', 'Cel', 'K', 'W/(m.K)', 'kg/m3', 'J/(kg.K)', 'J/(m3.K)', 'm2/s'].map((unit) => [unit, 0] as const),
  ),
}
const lengthsOf = (unit: string): number => {
  const power = LENGTHS[unit]
  if (power === undefined) throw new Error(`say how ${unit} grows with lengths`)
  return power
}

/** What moves a body beside temperatures. */
const DRIVES = ['K', 'K/s', 'W/m2', 'W/m3', 'W/m', 'W', 'J']
const LINEAR = ['Cel', 'K', 'W/m2', 'J', 'J/m', 'J/m2']

/** Numbers of the second answer, to be compared one by one with those of the first; as many, since both answer the same question. */
function paired(one: Answer, other: Answer): [Number_, Number_][] {
  const names = Object.keys(one.result).filter((name) => name in other.result)
  const [a, b] = [one, other].map((answer) => numbersOf(answer).filter(({ name }) => names.includes(name)))
  expect(a!.length).toBe(b!.length)
  return a!.map((number, k) => [number, b![k]!])
}

describe.each(cases.map((c) => [c.id, c] as const))('%s', (_id, c) => {
  const schema = schemaOf(c)
  // What is next to nothing cannot be halved without loss.
  const inputs = admissible(c).map(
    (body) => changed(body, schema, (v) => (v !== 0 && Math.abs(v) < 1e-250 ? 1e-250 : v)) as Input,
  )

  it('is similar to the body of twice or half its lengths, at four times or a quarter of its times', () => {
    let compared = 0
    fc.assert(
      fc.property(inputs, (body) => {
        const outputs = outputsOf(c, body)
        const own = answerTo(c, body, outputs)
        const scaledBy = (s: number) =>
          answerTo(c, changed(body, schema, (v, unit) => v * s ** lengthsOf(unit)) as Input, outputs)
        const twice = own && scaledBy(2)
        const [s, other] = twice ? [2, twice] : [0.5, own && scaledBy(0.5)]
        if (!own || !other) return
        compared++
        for (const [a, b] of paired(own, other)) {
          const factor = s ** -lengthsOf(a.unit)
          const most = a.bound + factor * b.bound
          expect(Math.abs(factor * b.value - a.value), `${a.name} ${a.value}`).toBeLessThanOrEqual(most)
        }
      }),
      runs,
    )
    expect(compared).toBeGreaterThan(count / 4)
  })

  it('adds up: half the sum of two sets of temperatures and drives answers half the sum', () => {
    let compared = 0
    fc.assert(
      fc.property(inputs, fc.array(uniform, { minLength: 40, maxLength: 40 }), (body, shares) => {
        let k = 0
        const second: number[] = []
        const other = changed(body, schema, (v, unit) => {
          const share = shares[k++ % shares.length]!
          const drawn = unit === 'Cel' ? 100 * share - 50 : DRIVES.includes(unit) ? v * share : v
          second.push(drawn)
          return drawn
        }) as Input
        k = 0
        const middle = changed(body, schema, (v) => (v + second[k++]!) / 2) as Input
        const outputs = outputsOf(c, body)
        const [u, v, w] = [body, other, middle].map((one) => answerTo(c, one, outputs))
        if (!u || !v || !w) return
        compared++
        const halves = paired(u, v)
        const numbers = numbersOf(w).filter(({ name }) => name in u.result && name in v.result)
        const both = halves.filter(([{ name }]) => name in w.result)
        numbers.forEach(({ name, unit, value, bound }, i) => {
          const [a, b] = both[i]!
          if (!LINEAR.includes(unit)) return
          const rounded = 1e-15 * (Math.abs(a.value) + Math.abs(b.value))
          expect(Math.abs((a.value + b.value) / 2 - value), `${name} ${value}`).toBeLessThanOrEqual(
            (a.bound + b.bound) / 2 + bound + rounded,
          )
        })
      }),
      runs,
    )
    expect(compared).toBeGreaterThan(count / 4)
  })

  it('rests where all is at one temperature and nothing drives it', () => {
    let compared = 0
    fc.assert(
      fc.property(inputs, uniform, (body, share) => {
        const common = 100 * share - 50
        const still = changed(body, schema, (v, unit) =>
          unit === 'Cel' ? common : DRIVES.includes(unit) ? 0 : v,
        ) as Input
        const answer = answerTo(c, still, outputsOf(c, still))
        if (!answer) return
        compared++
        for (const { name, unit, value, bound } of numbersOf(answer)) {
          if (!LINEAR.includes(unit)) continue
          const expected = unit === 'Cel' ? common : 0
          expect(Math.abs(value - expected), `${name} ${value} of ${expected}`).toBeLessThanOrEqual(bound)
        }
      }),
      runs,
    )
    expect(compared).toBeGreaterThan(count / 4)
  })
})

/* A body after a single step, which alone has fractions of a change, goes one way; one with two drives may turn. */
const decadesOfTime = fc.array(decades(1e-3, 1e3), { minLength: 5, maxLength: 5 })
const stepped = cases.filter((c) => outputNamesOf(c).includes('completedFraction'))

describe.each(stepped.map((c) => [c.id, c] as const))('%s after its step', (_id, c) => {
  it('goes one way, and never back', () => {
    let compared = 0
    fc.assert(
      fc.property(admissible(c), decadesOfTime, (body, spread) => {
        const [first = 0] = body['times'] as number[]
        const times = [0, ...spread.map((factor) => Math.min(1e17, first * factor))].sort((a, b) => a - b)
        const asked = outputsOf(c, body).filter((name) => ['completedFraction', 'heatFraction'].includes(name))
        const answer = answerTo(c, { ...body, times }, asked)
        if (!answer) return
        compared++
        for (const name of asked) {
          const rows = answer.result[name]
          if (!rows) continue
          const { absolute, relative } = answer.accuracy.bound[name]!
          const series = (rows as (number | number[])[]).map((row) => [row].flat())
          series.slice(1).forEach((row, i) =>
            row.forEach((value, j) => {
              const before = series[i]![j]!
              expect(value, `${name} after ${before}`).toBeGreaterThanOrEqual(
                before - 2 * absolute - relative * (value + before),
              )
            }),
          )
        }
      }),
      runs,
    )
    expect(compared).toBeGreaterThan(count / 4)
  })
})
