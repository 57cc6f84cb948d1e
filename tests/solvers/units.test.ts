import { readFileSync } from 'node:fs'
import fc from 'fast-check'
import { Decimal } from 'decimal.js'
import { describe, expect, it, test } from 'vitest'
import { z } from 'zod'
import { referencePages } from '../../scripts/reference-pages.ts'
import { cases } from '../../solvers/cases/index.ts'
import { DomainError } from '../../solvers/errors.ts'
import { caseOperations } from '../../solvers/operations/index.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { fractionOf, numberOf, productOf } from '../../solvers/units/exact.ts'
import { conversionOf } from '../../solvers/units/convert.ts'
import { acceptedUnits, dimensions } from '../../solvers/units/units.ts'
import { cycle as fieldsOfCycle } from '../../solvers/statement/fields.ts'
import { ask, caseOf } from './ask.ts'

const slab = caseOf('slab-convection').example

interface Refused {
  pointer: string
  code: string
  detail: string
  accepted?: string
}
function issuesOf(body: Record<string, unknown>, id = 'slab-convection'): Refused[] {
  try {
    solve.prepare(caseOf(id), body, 'full')
  } catch (error) {
    if (!(error instanceof DomainError)) throw error
    return [...error.issues]
  }
  return []
}
const named = (issues: Refused[]) => issues.map(({ pointer, code }) => `${pointer} ${code}`)

const pages = await referencePages()
const every = Object.entries(dimensions).flatMap(([si, { units }]) =>
  Object.keys(units).map((code) => [code, si] as const),
)

describe('the list of units', () => {
  /* The first use of a code compares the list with the UCUM library and throws where they differ. */
  test.each(every)('%s is by the library what the list says, in %s', (code, si) => {
    expect(conversionOf(si, code)?.(1)).toBeTypeOf('number')
  })

  test('a list that is wrong is found out by the library', () => {
    const units = dimensions['m']!.units as Record<string, { factor: string }>
    units['[mi_i]'] = { factor: '1609.34' }
    units['s'] = { factor: '1' }
    try {
      expect(() => conversionOf('m', '[mi_i]')).toThrow('1609.344')
      expect(() => conversionOf('m', 's')).toThrow('not convertible')
    } finally {
      delete units['[mi_i]']
      delete units['s']
    }
  })

  test('has every quantity of every case and operation', () => {
    const codes = new Set<string>()
    const collect = (at: unknown): void => {
      if (typeof at !== 'object' || at === null) return
      const { 'x-ucum': code, type } = at as { 'x-ucum'?: string; type?: string }
      if (code !== undefined && type === 'number') codes.add(code)
      Object.values(at).forEach(collect)
    }
    for (const c of cases) for (const o of caseOperations) collect(z.toJSONSchema(o.input(c), { io: 'input' }))
    expect(codes.size).toBeGreaterThan(8)
    expect([...codes].filter((code) => !(code in dimensions))).toEqual([])
  })

  test('names each quantity once, and holds no scale with a zero of its own in a product', () => {
    const names = Object.values(dimensions).map(({ name }) => name)
    expect(new Set(names).size).toBe(names.length)
    expect(every.map(([code]) => code).filter((code) => /Cel.|.Cel|\[degF\].|.\[degF\]/.test(code))).toEqual([])
  })

  test.each(pages)('is what %s says', (path, text) => {
    expect(readFileSync(new URL(`../../${path}`, import.meta.url), 'utf8')).toBe(text)
  })
})

describe('a conversion', () => {
  it.each([
    ['m', 'cm', 12, 0.12],
    ['m', '[in_i]', 1, 0.0254],
    ['m', '[ft_i]', 3, 0.9144],
    ['kg/m3', 'g/cm3', 2.4, 2400],
    ['Cel', '[degF]', 212, 100],
    ['Cel', '[degF]', -459.67, -273.15],
    ['Cel', '[degF]', 98.6, 37],
    ['Cel', 'K', 300, 26.85],
    ['K', '[degR]', 1.8, 1],
    ['K/s', 'K/h', 7.2, 0.002],
    ['J/(kg.K)', '[Btu_IT]/([lb_av].[degR])', 1, 4186.8],
    ['K.s', 'K.d', 1000, 86_400_000],
    ['1', '%', 7, 0.07],
  ])('to %s from %s: %s is exactly %s', (si, code, value, expected) => {
    expect(conversionOf(si, code)!(value)).toBe(expected)
  })

  it('is rounded once, whatever the number', () => {
    Decimal.set({ precision: 60 })
    const factors = { cm: '0.01', '[in_i]': '0.0254', '[yd_i]': '0.9144', km: '1000' }
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e300, max: 1e300 }),
        fc.constantFrom(...(Object.keys(factors) as (keyof typeof factors)[])),
        (value, code) => {
          expect(conversionOf('m', code)!(value) + 0).toBe(new Decimal(value).times(factors[code]).toNumber() + 0)
        },
      ),
    )
  })

  it('rounds a half to even, and keeps the least and the largest', () => {
    const half = 2n ** 53n + 1n
    expect(numberOf({ over: half, under: 1n })).toBe(2 ** 53)
    expect(numberOf({ over: half * 10n ** 40n + 1n, under: 10n ** 40n })).toBe(2 ** 53 + 2)
    expect(numberOf(fractionOf(Number.MIN_VALUE))).toBe(Number.MIN_VALUE)
    expect(numberOf(fractionOf(-Number.MAX_VALUE))).toBe(-Number.MAX_VALUE)
    expect(numberOf(productOf('1/3*3'))).toBe(1)
    expect(() => fractionOf('Infinity')).toThrow('no decimal')
  })
})

describe('a body', () => {
  it('may state every number of a quantity with a unit, and is answered as in SI', () => {
    const stated = {
      ...slab,
      conductivity: { value: 2000, unit: 'mW/(m.K)' },
      density: { value: 2.4, unit: 'g/cm3' },
      specificHeat: { value: 1, unit: 'kJ/(kg.K)' },
      thickness: { value: 20, unit: 'cm' },
      initialTemperature: { value: 68, unit: '[degF]' },
      ambientTemperature: { value: 268.15, unit: 'K' },
      depths: [0, { value: 100, unit: 'mm' }],
      times: [
        { value: 1, unit: 'h' },
        { value: 600, unit: 'min' },
      ],
    }
    expect(ask('slab-convection', stated)).toEqual(ask('slab-convection', slab))
  })

  it.each([
    [
      'a special unit in a product',
      { conductivity: { value: 1, unit: 'W/(m.Cel)' } },
      'conductivity',
      'Write W/(m.K).',
    ],
    [
      'an imperial product with [degF]',
      { conductivity: { value: 1, unit: '[Btu_IT]/(h.[ft_i].[degF])' } },
      'conductivity',
      'Write [Btu_IT]/(h.[ft_i].[degR]).',
    ],
    [
      'a special unit in a product that is not listed either way',
      { conductivity: { value: 1, unit: 'cal/(cm.s.Cel)' } },
      'conductivity',
      'Write K, or [degR] in imperial products.',
    ],
    ['a unit of another quantity', { thickness: { value: 1, unit: 's' } }, 'thickness', '"s" is not a unit'],
    ['a name in words', { thickness: { value: 1, unit: 'metre' } }, 'thickness', '"metre" is not'],
    ['a rankine temperature', { initialTemperature: { value: 500, unit: '[degR]' } }, 'initialTemperature', '[degR]'],
    ['a name that every object has', { thickness: { value: 1, unit: 'toString' } }, 'thickness', '"toString"'],
    ['a prototype', { thickness: { value: 1, unit: '__proto__' } }, 'thickness', '"__proto__"'],
    ['a long text', { thickness: { value: 1, unit: 'Cel'.repeat(100_000) } }, 'thickness', '"CelCel'],
  ])('is refused %s', (_, change, field, words) => {
    const issues = issuesOf({ ...slab, ...change })
    expect(named(issues)).toEqual([`#/${field}/unit unit-not-accepted`])
    expect(issues[0]!.detail).toContain(words)
    expect(issues[0]!.detail.length).toBeLessThan(400)
    expect(issues[0]!.accepted).toContain(
      acceptedUnits(field === 'thickness' ? 'm' : field === 'conductivity' ? 'W/(m.K)' : 'Cel')[0],
    )
  })

  it.each(['Cel', '[degF]'])('is told that a difference takes no %s', (unit) => {
    const cycle = { cycleMean: 10, amplitude: { value: 5, unit }, period: 86400, timeOfMaximum: 0 }
    const c = { ...caseOf('slab-convection'), id: 'planted-cycle', fields: fieldsOfCycle }
    try {
      solve.prepare(c, { ...cycle, depths: [0], times: [0] }, 'full')
      expect.unreachable()
    } catch (error) {
      expect((error as DomainError).issues[0]).toMatchObject({ pointer: '#/amplitude/unit', code: 'unit-not-accepted' })
      expect((error as DomainError).issues[0]!.detail).toContain('takes K or [degR], never Cel')
    }
  })

  it.each([
    ['no unit', { value: 1 }, ['#/thickness/unit missing-field']],
    ['no value', { unit: 'cm' }, ['#/thickness/value missing-field']],
    ['a text for the value', { value: '1', unit: 'cm' }, ['#/thickness/value wrong-type']],
    ['a number for the unit', { value: 1, unit: 3 }, ['#/thickness/unit wrong-type']],
    ['something beside', { value: 1, unit: 'cm', 'a/b': 1 }, ['#/thickness/a~1b unknown-field']],
    ['neither', { size: 1 }, ['#/thickness wrong-type']],
    ['a list', [1, 'cm'], ['#/thickness wrong-type']],
    ['what is outside the range once converted', { value: 1e6, unit: 'km' }, ['#/thickness out-of-range']],
    ['what no double holds once converted', { value: 1e308, unit: 'km' }, ['#/thickness out-of-range']],
  ])('is refused a quantity with %s', (_, thickness, expected) => {
    expect(named(issuesOf({ ...slab, thickness }))).toEqual(expected)
  })

  it('is refused elements by their place, and a list with one unit for all', () => {
    const times = [1, { value: 2, unit: 'h' }, { value: 1, unit: 'm' }, { value: -1, unit: 'h' }, { value: 1 }]
    expect(named(issuesOf({ ...slab, times }))).toEqual([
      '#/times/2/unit unit-not-accepted',
      '#/times/3 out-of-range',
      '#/times/4/unit missing-field',
    ])
    expect(named(issuesOf({ ...slab, times: { values: [1], unit: 'h' } }))).toEqual(['#/times wrong-type'])
  })

  it('lists at most 50 issues of units', () => {
    const times = Array.from({ length: 9000 }, () => ({ value: 1, unit: 'm' }))
    expect(issuesOf({ ...slab, times })).toHaveLength(50)
    const thickness = Object.fromEntries(Array.from({ length: 400 }, (_, i) => [`x${i}`, 1]))
    expect(issuesOf({ ...slab, thickness: { ...thickness, value: 1, unit: 'cm' } })).toHaveLength(50)
  })

  it('is left as it was', () => {
    const times = [{ value: 1, unit: 'h' }, 7200]
    const body = { ...slab, times }
    const before = structuredClone(body)
    solve.prepare(caseOf('slab-convection'), body, 'full')
    expect(body).toEqual(before)
  })

  it('of plain numbers is read about as fast as before', () => {
    const times = Array.from({ length: 100_000 }, (_, i) => i + 1)
    const took = Array.from({ length: 5 }, () => {
      const started = performance.now()
      solve.prepare(caseOf('slab-convection'), { ...slab, times, outputs: ['meanTemperature'] }, 'full')
      return performance.now() - started
    })
    // The least of five: what else the machine does is not looked at.
    expect(Math.min(...took)).toBeLessThan(200)
  })
})
