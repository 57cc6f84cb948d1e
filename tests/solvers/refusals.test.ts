import { describe, expect, it } from 'vitest'
import { cases } from '../../solvers/cases/index.ts'
import { DomainError } from '../../solvers/errors.ts'
import { solve } from '../../solvers/operations/solve.ts'
import { ask, askSingle, caseOf } from './ask.ts'

/* What a case refuses: each thing by its pointer and code, with what would be accepted. */

function refusalOf(id: string, body: unknown): string[] {
  try {
    solve.prepare(caseOf(id), body, 'full')
  } catch (error) {
    if (!(error instanceof DomainError)) throw error
    for (const issue of error.issues) expect(issue.detail.length).toBeGreaterThan(10)
    return error.issues.map((issue) => `${issue.pointer} ${issue.code}`)
  }
  return []
}
const without = (body: Record<string, unknown>, ...names: string[]) =>
  Object.fromEntries(Object.entries(body).filter(([name]) => !names.includes(name)))

const slab = caseOf('slab-convection').example
const lumped = caseOf('lumped-convection').example
const sphere = {
  ...without(lumped, 'heatCapacity', 'area'),
  body: 'sphere',
  radius: 0.01,
  conductivity: 15,
  density: 7800,
  specificHeat: 460,
}

describe('the solid', () => {
  it.each([
    ['no conductivity', without(slab, 'conductivity'), ['#/conductivity missing-field']],
    ['no heat capacity', without(slab, 'density', 'specificHeat'), ['#/volumetricHeatCapacity missing-field']],
    ['half of the pair', without(slab, 'density'), ['#/density missing-field']],
    [
      'a second way, consistent or not',
      { ...slab, volumetricHeatCapacity: 2.4e6 },
      ['#/volumetricHeatCapacity conflicting-fields'],
    ],
    ['diffusivity beside the pair', { ...slab, diffusivity: 1e-6 }, ['#/diffusivity conflicting-fields']],
    [
      'diffusivity beside one of the pair',
      { ...without(slab, 'density'), diffusivity: 1e-6 },
      ['#/diffusivity conflicting-fields'],
    ],
  ])('%s', (_what, body, issues) => {
    expect(refusalOf('slab-convection', body)).toEqual(issues)
  })

  it('may be stated in three ways that agree', () => {
    const temperature = (heat: object) =>
      askSingle(
        'slab-convection',
        { ...without(slab, 'density', 'specificHeat'), ...heat, depths: [0], times: [3600] },
        'temperature',
      ).value
    const pair = temperature({ density: 2400, specificHeat: 1000 })
    expect(temperature({ volumetricHeatCapacity: 2.4e6 })).toBe(pair)
    expect(temperature({ diffusivity: 2 / 2.4e6 })).toBeCloseTo(pair, 12)
  })

  it('is echoed whole, derived properties included', () => {
    const { input } = ask('slab-convection', slab) as unknown as { input: Record<string, number> }
    expect(input).toMatchObject({ conductivity: 2, volumetricHeatCapacity: 2.4e6, diffusivity: 2 / 2.4e6 })
    expect(input['effusivity']).toBeCloseTo(Math.sqrt(4.8e6), 9)
  })
})

describe('fields', () => {
  it.each([
    ['no exposedFaces: there is no default', without(slab, 'exposedFaces'), ['#/exposedFaces missing-field']],
    ['three faces', { ...slab, exposedFaces: 3 }, ['#/exposedFaces not-in-list']],
    ['a film between 0 and its least', { ...slab, filmCoefficient: 1e-10 }, ['#/filmCoefficient out-of-range']],
    ['a negative film', { ...slab, filmCoefficient: -1 }, ['#/filmCoefficient out-of-range']],
    ['a temperature below absolute zero', { ...slab, initialTemperature: -300 }, ['#/initialTemperature out-of-range']],
    ['a text for a number', { ...slab, thickness: '0.2' }, ['#/thickness wrong-type']],
    ['a depth behind the body', { ...slab, depths: [0, 0.1, 0.21] }, ['#/depths/2 depth-outside-body']],
    [
      'a negative depth and a time beyond the range',
      { ...slab, depths: [-1], times: [1e18] },
      ['#/depths/0 out-of-range', '#/times/0 out-of-range'],
    ],
    ['no depths where temperatures need them', without(slab, 'depths'), ['#/depths missing-field']],
    ['no times', { ...slab, times: [] }, ['#/times wrong-length']],
    ['an unknown field', { ...slab, filmCoeficient: 3 }, ['#/filmCoeficient unknown-field']],
    ['a pointer that needs escaping', { ...slab, 'a/b~c': 3 }, ['#/a~1b~0c unknown-field']],
    ['an unknown output', { ...slab, outputs: ['warmth'] }, ['#/outputs/0 output-not-defined']],
    [
      'an output the case cannot have',
      { ...slab, outputs: ['temperature', 'timeConstant'] },
      ['#/outputs/1 output-not-defined'],
    ],
    ['an unknown detail', { ...slab, detail: 'brief' }, ['#/detail not-in-list']],
    ['a list for the body', [slab], ['# wrong-type']],
    ['nothing', undefined, ['# missing-field']],
  ])('%s', (_what, body, issues) => {
    expect(refusalOf('slab-convection', body)).toEqual(issues)
  })

  it('says why an output is absent, and which there are', () => {
    try {
      solve.prepare(
        caseOf('semi-infinite-convection'),
        { ...caseOf('semi-infinite-convection').example, outputs: ['meanTemperature'] },
        'full',
      )
      expect.unreachable()
    } catch (error) {
      const issue = (error as DomainError).issues[0]!
      expect(issue.detail).toContain('no end')
      expect(issue.accepted).toContain('completedFraction')
    }
  })

  it('lists at most 50 issues', () => {
    const names = Object.fromEntries(Array.from({ length: 400 }, (_, i) => [`x${i}`, 1]))
    expect(refusalOf('slab-convection', { ...slab, ...names })).toHaveLength(50)
    expect(refusalOf('slab-convection', { ...slab, times: Array.from({ length: 400 }, () => -1) })).toHaveLength(50)
  })

  it('looks at the length of a list before its entries, and stops at the fiftieth that is wrong', () => {
    const long = Array.from({ length: 99_000 }, () => -1)
    const started = performance.now()
    const found = refusalOf('slab-convection', { ...slab, times: long })
    expect(performance.now() - started).toBeLessThan(200)
    expect(found).toHaveLength(50)
    expect(found[49]).toBe('#/times/49 out-of-range')
    expect(refusalOf('slab-convection', { ...slab, times: [...long, ...long] })).toEqual(['#/times wrong-length'])
    expect(refusalOf('slab-convection', { ...slab, times: [1, {}], thickness: -1 })).toEqual([
      '#/thickness out-of-range',
      '#/times/1 wrong-type',
    ])
  })

  it.each([
    ['an object', [{ toString: 1 }], 'an object'],
    ['a name that every object has', ['toString'], 'no output of this name'],
    ['the name of a prototype', ['__proto__'], 'no output of this name'],
  ])('refuses %s as an output by its own words', (_what, outputs, words) => {
    try {
      solve.prepare(caseOf('slab-convection'), { ...slab, outputs }, 'full')
      expect.unreachable()
    } catch (error) {
      const [issue] = (error as DomainError).issues
      expect(issue!.pointer).toBe('#/outputs/0')
      expect(issue!.detail).toContain(words)
      expect(issue!.detail).not.toContain('native code')
    }
  })

  it.each([
    [{ ...slab, depths: 0.1 }, '#/depths wrong-type', 'a number; a list is expected'],
    [{ ...slab, exposedFaces: '2' }, '#/exposedFaces wrong-type', 'the text "2"'],
    [{ ...slab, times: [1e999] }, '#/times/0 out-of-range', 'not a finite number'],
  ])('says what was given and what is expected', (body, where, words) => {
    expect(refusalOf('slab-convection', body)).toEqual([where])
    try {
      solve.prepare(caseOf('slab-convection'), body, 'full')
    } catch (error) {
      expect((error as DomainError).issues[0]!.detail).toContain(words)
    }
  })

  it('asks whether a temperature is in kelvin', () => {
    const { warnings } = ask('slab-convection', { ...slab, initialTemperature: 293.15 }) as unknown as {
      warnings: { text: string }[]
    }
    expect(warnings.map((w) => w.text).join()).toContain('kelvin')
  })

  it('needs no depths for outputs without places', () => {
    const { result } = ask('slab-convection', {
      ...without(slab, 'depths'),
      outputs: ['heatGained', 'meanTemperature'],
    })
    expect(Object.keys(result)).toEqual(['heatGained', 'meanTemperature'])
  })
})

describe('the lumped body', () => {
  it.each([
    ['no area', without(lumped, 'area'), ['#/area missing-field']],
    ['no heat capacity', without(lumped, 'heatCapacity'), ['#/heatCapacity missing-field']],
    ['two heat capacities', { ...lumped, volume: 1 }, ['#/volume conflicting-fields']],
    [
      'a volume without a solid',
      { ...without(lumped, 'heatCapacity'), volume: 1 },
      ['#/volumetricHeatCapacity missing-field'],
    ],
    ['a correction without body', { ...lumped, correction: 'mean' }, ['#/correction conflicting-fields']],
    ['an area with body', { ...sphere, area: 1 }, ['#/area conflicting-fields']],
    [
      'a power with body, corrected or not',
      { ...sphere, power: 5, correction: 'mean' },
      ['#/power conflicting-fields'],
    ],
    ['a sphere without radius', without(sphere, 'radius'), ['#/radius missing-field']],
    ['a sphere with a thickness', { ...sphere, thickness: 1 }, ['#/thickness conflicting-fields']],
    [
      'a slab without faces',
      { ...without(sphere, 'radius'), body: 'slab', thickness: 0.1 },
      ['#/exposedFaces missing-field'],
    ],
    ['depths', { ...lumped, depths: [0] }, ['#/depths unknown-field']],
    [
      'fractions that no end gives',
      { ...lumped, filmCoefficient: 0, power: 10, outputs: ['temperature', 'remainingFraction', 'steadyTemperature'] },
      ['#/outputs/1 output-not-defined', '#/outputs/2 output-not-defined'],
    ],
    [
      'a time constant without film',
      { ...lumped, filmCoefficient: 0, outputs: ['timeConstant'] },
      ['#/outputs/0 output-not-defined'],
    ],
  ])('refuses %s', (_what, body, issues) => {
    expect(refusalOf('lumped-convection', body)).toEqual(issues)
  })

  it('states its heat per m2 of one exposed face, per m, or whole', () => {
    const unit = (body: object) =>
      (ask('lumped-convection', { ...body, outputs: ['heatGained'] }) as unknown as { units: Record<string, string> })
        .units['heatGained']
    expect(unit(lumped)).toBe('J')
    expect(unit(sphere)).toBe('J')
    expect(unit({ ...sphere, body: 'cylinder' })).toBe('J/m')
    expect(unit({ ...without(sphere, 'radius'), body: 'slab', thickness: 0.01, exposedFaces: 2 })).toBe('J/m2')
  })

  it('as a sphere is the same body as by its volume and area', () => {
    const byShape = ask('lumped-convection', {
      ...sphere,
      outputs: ['temperature', 'heatGained', 'timeConstant'],
    }).result
    const volume = (4 / 3) * Math.PI * 0.01 ** 3
    const byVolume = ask('lumped-convection', {
      ...without(sphere, 'body', 'radius', 'conductivity'),
      volume,
      area: 4 * Math.PI * 1e-4,
      outputs: ['temperature', 'heatGained', 'timeConstant'],
    }).result
    for (const name of ['temperature', 'heatGained', 'timeConstant'])
      [byShape[name]]
        .flat()
        .forEach((v, i) => expect(([byVolume[name]].flat()[i] as number) / (v as number)).toBeCloseTo(1, 12))
  })

  it('with a source settles at Tₐ + P/(hA), and without a film rises by Pt/C', () => {
    const body = {
      heatCapacity: 1000,
      area: 2,
      filmCoefficient: 5,
      power: 100,
      initialTemperature: 10,
      ambientTemperature: 20,
    }
    expect(
      ask('lumped-convection', { ...body, times: [1e7], outputs: ['temperature', 'steadyTemperature'] }).result,
    ).toEqual({ temperature: [30], steadyTemperature: 30 })
    expect(ask('lumped-convection', { ...body, filmCoefficient: 0, times: [50] }).result['temperature']).toEqual([15])
    // A film so weak that P/(hA) is 1e16 K must not cost a digit.
    expect(
      askSingle('lumped-convection', { ...body, filmCoefficient: 1e-9, area: 1e-5, times: [50] }, 'temperature').value,
    ).toBeCloseTo(15, 12)
  })

  it('warns above a Biot number of 0.1 that it errs early', () => {
    const warned = (
      ask('lumped-convection', { ...sphere, filmCoefficient: 3000 }) as unknown as {
        warnings: { code: string; value: number }[]
      }
    ).warnings
    expect(warned.map((w) => w.code)).toEqual(['lumped-biot-high', 'lumped-errs-early'])
    expect(warned[0]!.value).toBe(2)
  })
})

describe('the answer', () => {
  it('is the same bytes for the same input', () => {
    const bytes = () => JSON.stringify(solve.prepare(caseOf('slab-convection'), slab, 'full').run())
    expect(bytes()).toBe(bytes())
  })
  it('is priced by its numbers and the set-up', () => {
    const points = (id: string, body: object) => solve.prepare(caseOf(id), body, 'full').points
    expect(points('slab-convection', slab)).toBe(7)
    expect(points('slab-convection', { ...slab, outputs: ['temperature', 'heatGained'] })).toBe(9)
    expect(points('semi-infinite-convection', caseOf('semi-infinite-convection').example)).toBe(6)
    expect(points('lumped-convection', { ...lumped, outputs: ['temperature', 'timeConstant'] })).toBe(3)
    expect(points('slab-convection', { ...slab, outputs: ['temperature', 'temperature'] })).toBe(7)
  })
  it('in compact form holds result, bound and warning codes', () => {
    const answer = solve
      .prepare(caseOf('slab-convection'), { ...slab, filmCoefficient: 2, detail: 'compact' }, 'full')
      .run()
    expect(answer).toEqual({
      result: { temperature: expect.any(Array) as number[][] },
      accuracy: { bound: { temperature: { absolute: expect.any(Number) as number, relative: 0 } } },
      warnings: ['film-includes-radiation-unknown', 'outside-typical-range'],
    })
  })
  it('echoes long series by count and digest, and holds them whole in its axes', () => {
    const times = Array.from({ length: 500 }, (_, i) => 60 * (i + 1))
    const answer = ask('slab-convection', { ...slab, times }) as unknown as {
      input: Record<string, unknown>
      axes: { times: number[] }
    }
    expect(answer.input['times']).toEqual({
      count: 500,
      digest: expect.stringMatching(/^sha-256=[0-9a-f]{64}$/) as string,
    })
    expect(answer.axes.times).toEqual(times)
  })
  it.each(
    cases.flatMap((c) =>
      [c.example, ...(c.variants ?? []).map((v) => v.input)].map((input) => [c.id, c, input] as const),
    ),
  )('of %s fits the schema it is published with', (_id, c, input) => {
    const full = solve.prepare(c, input, 'full').run()
    expect(solve.answer(c).safeParse(full).error?.issues).toBeUndefined()
    const compact = solve.prepare(c, input, 'compact').run()
    expect(solve.compactAnswer(c).safeParse(compact).error?.issues).toBeUndefined()
  })
})
