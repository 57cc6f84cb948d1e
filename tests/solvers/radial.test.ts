import { readFileSync } from 'node:fs'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { besselJ01 } from '../../solvers/math/bessel-j.ts'
import { UnitCylinder } from '../../solvers/math/cylinder.ts'
import { cylinderEigenvalue } from '../../solvers/math/cylinder-eigenvalues.ts'
import { EPS, type Estimate } from '../../solvers/math/rounding.ts'
import { UnitSphere } from '../../solvers/math/sphere.ts'
import { sphereEigenvalue } from '../../solvers/math/sphere-eigenvalues.ts'
import { filmFace, heldFace } from '../../solvers/math/sphere-faces.ts'
import { SphereImages } from '../../solvers/math/sphere-images.ts'
import type { OutputName } from '../../solvers/outputs.ts'
import { ask, askSingle, condition, contract, single, solveDirect } from './ask.ts'
import { proof, seed } from './counts.ts'
import { decades, uniform } from './draw.ts'
import { D } from './exact/functions.ts'
import { exactJ } from './exact/round.ts'
import { radialRows } from './radial-rows.ts'

const runs = { numRuns: proof ? 1000 : 60, seed }
const near = (a: Estimate, b: Estimate) => expect(Math.abs(a.value - b.value)).toBeLessThanOrEqual(a.error + b.error)

const places = (delta: number) => ({
  deltas: Float64Array.of(delta),
  inner: Float64Array.of(1 - delta),
  shifts: Float64Array.of(0),
})
const moment = (fourier: number) => ({ fourier, root: Math.sqrt(fourier) })

describe.each(Object.entries(radialRows))('bounds of %s', (_id, { arbitrary, count }) => {
  it('hold, are no more than ten times the promise, and follow the true error', { timeout: 3_600_000 }, () => {
    const failures: string[] = []
    const ratios: number[] = []
    for (const row of fc.sample(arbitrary, { numRuns: proof ? 50 * count : count, seed })) {
      const names = Object.keys(row.exact) as OutputName[]
      const solution = solveDirect(row.caseId, { ...row.body, outputs: names })
      for (const name of names) {
        const { values, bound: told } = solution.outputs[name]!
        const value = single(values)
        const bound = told.absolute + told.relative * Math.abs(value)
        const error = Number(new D(value).minus(row.exact[name]!).abs())
        if (!(error <= bound)) failures.push(`${name} off ${error}, bound ${bound}: ${row.label}`)
        const promised = contract(name, value, condition(row.caseId, row.body, name), row)
        // What is below 1e-280 may be answered as zero, times the unit that it has.
        if (!(bound <= 10 * promised) && Math.abs(value) > 1e-280)
          failures.push(`${name} bound ${bound}, promised ${promised}: ${row.label}`)
        if (error > 0) ratios.push(bound / error)
      }
    }
    ratios.sort((a, b) => a - b)
    expect(failures).toEqual([])
    expect(ratios[Math.floor(ratios.length / 2)]).toBeLessThan(1000)
  })
})

describe('a planted error', () => {
  it.each([
    ['cylinder', (p: ReturnType<typeof places>) => new UnitCylinder({ biot: 2, ...p })],
    ['sphere', (p: ReturnType<typeof places>) => new UnitSphere({ biot: 2, ...p })],
  ])('of 1e-10 in the first coefficient of the %s is beyond its error', (_name, make) => {
    const unit = make(places(0.4))
    const before = unit.remaining(0, moment(0.25))
    const part = unit.series.mode(0).parts[0]! as { value: number }
    part.value *= 1 + 1e-10
    const after = unit.remaining(0, moment(0.25))
    expect(Math.abs(after.value - before.value)).toBeGreaterThan(before.error + after.error)
  })
})

describe('roots and functions', () => {
  it('J₀ and J₁ are those of the power series', () => {
    for (const x of [1e-6, 0.01, 0.5, 2.4048255576957727, 5, 20, 24.999999, 25, 25.000001, 61.5, 99.75]) {
      const { j0, j1 } = exactJ(binary(x))
      const found = besselJ01(x)
      const size = Math.hypot(Number(j0), Number(j1))
      expect(Math.abs(found.j0 - Number(j0))).toBeLessThanOrEqual(EPS * (9 + x) * size)
      expect(Math.abs(found.j1 - Number(j1))).toBeLessThanOrEqual(EPS * (9 + x) * (x < 1 ? Number(j1) : size))
    }
  })
  it('are roots, in their order, from Bi 1e-22 to 1e18', () => {
    for (const biot of [1e-22, 1e-9, 1e-3, 0.3, 0.999999, 1, 1.000001, 3, 100, 1e9, 1e18]) {
      for (let n = 0; n < 60; n++) {
        const { root: z } = cylinderEigenvalue(biot, n)
        const y = sphereEigenvalue(biot, n)
        const { j0, j1 } = besselJ01(z)
        // What z·10ε moves; the slopes are of the size of the terms.
        const slope = z * Math.abs(j0) + (biot + 1) * Math.abs(j1)
        expect(Math.abs(z * j1 - biot * j0)).toBeLessThanOrEqual(30 * EPS * (z + 1) * slope)
        const tan = Math.abs(y * Math.cos(y) - (1 - biot) * Math.sin(y))
        expect(tan).toBeLessThanOrEqual(10 * EPS * y * (y + 1 + biot))
        expect(z).toBeGreaterThan(n * Math.PI)
        expect(z).toBeLessThan((n + 0.8) * Math.PI)
        expect(y).toBeGreaterThan(n * Math.PI)
        expect(y).toBeLessThanOrEqual((n + 1) * Math.PI * (1 + 4 * EPS))
      }
    }
    expect(sphereEigenvalue(1, 0)).toBeCloseTo(Math.PI / 2, 14)
    expect(cylinderEigenvalue(Infinity, 0).root).toBeCloseTo(2.404825557695773, 14)
  })
  it('are the printed roots and coefficients (Incropera & DeWitt, table 5.1, recalled)', () => {
    const file = new URL('../reference/published.json', import.meta.url)
    const { kept } = JSON.parse(readFileSync(file, 'utf8')) as {
      kept: { inputs: Record<string, string>; quantity: string; printed: string; source: string }[]
    }
    const rows = kept.filter(
      ({ inputs, quantity }) =>
        ['infinite cylinder', 'sphere'].includes(inputs['geometry']!) && ['zeta1', 'C1'].includes(quantity),
    )
    expect(rows.length).toBeGreaterThan(60)
    for (const { inputs, quantity, printed } of rows) {
      const body = { biot: Number(inputs['biot']), ...places(1) }
      const unit = inputs['geometry'] === 'sphere' ? new UnitSphere(body) : new UnitCylinder(body)
      const { root, parts } = unit.series.mode(0)
      expect(Math.abs((quantity === 'C1' ? parts[0]!.value : root) - Number(printed))).toBeLessThanOrEqual(5.001e-5)
    }
  })
})

describe('two routes', () => {
  const all = fc.tuple(fc.oneof(decades(1e-9, 1e15), fc.constant(Infinity)), uniform)
  it('contour and series of the cylinder agree within their errors', () => {
    fc.assert(
      fc.property(all, decades(0.0005, 0.2), ([biot, delta], fourier) => {
        const unit = new UnitCylinder({ biot, ...places(delta) })
        const m = moment(fourier)
        near(unit.contour.completed(0, m), unit.series.completed(0, m))
        near(unit.contour.remaining(0, m), unit.series.remaining(0, m))
        near(unit.contour.flux(0, m), unit.series.flux(0, m))
        near(unit.contour.heatFraction(m), unit.series.heatFraction(m))
      }),
      runs,
    )
  })
  it('images and series of the sphere agree within their errors', () => {
    fc.assert(
      fc.property(all, decades(0.01, 0.06), ([biot, delta], fourier) => {
        const { series } = new UnitSphere({ biot, ...places(delta) })
        const images = new SphereImages(biot === Infinity ? heldFace : filmFace(biot), places(delta))
        const m = moment(fourier)
        near(images.completed(0, m), series.completed(0, m))
        near(images.remaining(0, m), series.remaining(0, m))
        near(images.flux(0, m), series.flux(0, m))
        near(images.heatFraction(m), series.heatFraction(m))
      }),
      runs,
    )
  })
  it('depths and radii give the same temperatures', () => {
    fc.assert(
      fc.property(decades(1, 1e4), decades(1, 1e6), uniform, (filmCoefficient, time, share) => {
        const body = { ...rod, filmCoefficient, times: [time] }
        for (const id of ['cylinder-convection', 'sphere-convection']) {
          const a = askSingle(id, { ...body, depths: [0.1 * share] }, 'temperature')
          const b = askSingle(id, { ...body, radii: [0.1 - 0.1 * share] }, 'temperature')
          expect(Math.abs(a.value - b.value)).toBeLessThanOrEqual(a.bound + b.bound)
        }
      }),
      runs,
    )
  })
})

const rod = {
  conductivity: 1.3,
  density: 2000,
  specificHeat: 950,
  radius: 0.1,
  initialTemperature: 15,
  ambientTemperature: -7,
}
const outputs = [
  'temperature',
  'heatFlux',
  'surfaceHeatFlux',
  'heatGained',
  'meanTemperature',
  'remainingFraction',
  'completedFraction',
  'heatFraction',
]
const volumes = { cylinder: Math.PI * 0.01, sphere: ((4 * Math.PI) / 3) * 0.001 }
const faces = { cylinder: 2 * Math.PI * 0.1, sphere: 4 * Math.PI * 0.01 }
const forms = ['cylinder', 'sphere'] as const

describe.each(forms)('limits of the %s', (form) => {
  const film = `${form}-convection`
  it.each([1e-30, 1.01e-36, 0.99e-36, 1e-150, 1e-199, 1e-260])(
    'a weak film has given what it carries at once, however early: Fo %s',
    (fourier) => {
      // The share of all heat is 2 or 3 times Bi Fo.
      const body = { conductivity: 100, diffusivity: 1e-6, radius: 1e-3, initialTemperature: 0, ambientTemperature: 1 }
      const names: OutputName[] = ['heatFraction', 'completedFraction']
      const input = { ...body, filmCoefficient: 1e-4, depths: [0], times: [fourier], outputs: names }
      const { result, accuracy } = ask(film, input)
      const heat = (form === 'cylinder' ? 2 : 3) * 1e-9 * fourier
      const face = 2e-9 * Math.sqrt(fourier / Math.PI)
      expect(Math.abs((result.heatFraction as number[])[0]! / heat - 1)).toBeLessThan(1e-12)
      expect(Math.abs((result.completedFraction as number[][])[0]![0]! / face - 1)).toBeLessThan(1e-12)
      expect(accuracy.bound.heatFraction!.relative).toBeLessThan(1e-12)
    },
  )

  it('at time 0 the body is as it was, the film flux at its face', () => {
    const { result } = ask(film, { ...rod, filmCoefficient: 10, depths: [0, 0.05, 0.1], times: [0], outputs })
    expect(result).toEqual({
      temperature: [[15, 15, 15]],
      heatFlux: [[-220, 0, 0]],
      surfaceHeatFlux: [-220],
      heatGained: [0],
      meanTemperature: [15],
      remainingFraction: [[1, 1, 1]],
      completedFraction: [[0, 0, 0]],
      heatFraction: [0],
    })
  })
  it('without a film nothing changes', () => {
    const body = {
      ...rod,
      filmCoefficient: 0,
      radii: [0, 0.1],
      times: [0, 1e9],
      outputs: ['temperature', 'heatGained'],
    }
    expect(ask(film, body).result).toEqual({
      temperature: [
        [15, 15],
        [15, 15],
      ],
      heatGained: [0, 0],
    })
  })
  it('after long the body is at the fluid and has taken all its heat', () => {
    const body = { ...rod, filmCoefficient: 10, radii: [0], times: [1e9] }
    expect(askSingle(film, body, 'temperature').value).toBe(-7)
    const whole = 2000 * 950 * volumes[form] * -22
    expect(askSingle(film, body, 'heatGained').value / whole).toBeCloseTo(1, 12)
  })
  it('an endless film holds the face', () => {
    for (const times of [[30], [3000], [30000]]) {
      const body = { ...rod, radii: [0.03], times }
      const strong = askSingle(film, { ...body, filmCoefficient: 1e9 }, 'temperature').value
      const { ambientTemperature: surfaceTemperature, ...rest } = body
      const held = askSingle(`${form}-surface-temperature`, { ...rest, surfaceTemperature }, 'temperature').value
      expect(Math.abs(strong - held)).toBeLessThan(1e-6)
    }
  })
  it('a weak film is the lumped body', () => {
    const body = { ...rod, filmCoefficient: 1e-4, times: [1e8] }
    const fraction = askSingle(film, { ...body, radii: [0.05] }, 'completedFraction').value
    const lumped = askSingle('lumped-convection', { ...body, body: form }, 'completedFraction').value
    expect(Math.abs(fraction / lumped - 1)).toBeLessThan(2e-5)
  })
  it('in the first moments the face is that of a half space', () => {
    const body = { ...rod, filmCoefficient: 50, depths: [0, 1e-6], times: [1e-8] }
    const { radius: _radius, ...half } = body
    const round = ask(film, { ...body, outputs: ['completedFraction'] }).result['completedFraction'] as number[][]
    const flat = ask('semi-infinite-convection', { ...half, outputs: ['completedFraction'] }).result[
      'completedFraction'
    ] as number[][]
    round[0]!.forEach((value, j) => expect(Math.abs(value / flat[0]![j]! - 1)).toBeLessThan(2e-5))
  })
})

describe.each(forms)('energy of the %s', (form) => {
  const nodes = [-0.9602898564975363, -0.7966664774136267, -0.525532409916329, -0.1834346424956498]
  const weights = [0.1012285362903763, 0.2223810344533745, 0.3137066458778873, 0.362683783378362]
  /** ∫₀ᵗ q dt as ∫₀^√t 2s·q(s²) ds, by Gauss of 8 points on a graded mesh. */
  const absorbed = (id: string, body: object, until: number) => {
    const edges = Array.from({ length: 41 }, (_, i) => (i === 0 ? 0 : Math.sqrt(until) * 0.65 ** (40 - i)))
    const points = edges.slice(1).flatMap((right, i) =>
      [...nodes, ...nodes.map((n) => -n)].map((node, n) => {
        const half = (right - edges[i]!) / 2
        return { s: edges[i]! + half + node * half, w: weights[n % 4]! * half }
      }),
    )
    const body_ = { ...body, times: points.map(({ s }) => s * s), outputs: ['surfaceHeatFlux'] }
    const flux = ask(id, body_).result['surfaceHeatFlux'] as number[]
    return points.reduce((sum, { s, w }, i) => sum + 2 * s * w * flux[i]!, 0)
  }
  it('surface flux over time and area = heat gained = mean rise times capacity, to 1e-9', () => {
    fc.assert(
      fc.property(decades(1, 1e4), decades(30, 3e5), (filmCoefficient, until) => {
        const body = { ...rod, filmCoefficient }
        const id = `${form}-convection`
        const gained = askSingle(id, { ...body, times: [until] }, 'heatGained').value
        expect(Math.abs((absorbed(id, body, until) * faces[form]) / gained - 1)).toBeLessThan(1e-9)
        const mean = askSingle(id, { ...body, times: [until] }, 'meanTemperature').value
        expect(Math.abs((mean - 15) * 1.9e6 * volumes[form] - gained)).toBeLessThan(1e-9 * Math.abs(gained) + 1e-6)
      }),
      { seed, numRuns: proof ? 100 : 10 },
    )
  })
})

describe('late numbers', () => {
  it('are the slope and start of the straight line of the centre', () => {
    for (const form of forms) {
      const body = { ...rod, filmCoefficient: 30, radii: [0, 0.1], times: [40000], outputs: ['remainingFraction'] }
      const { numbers, result } = ask(`${form}-convection`, body) as unknown as {
        numbers: { slowestTimeConstant: number; lagTime: number; fValue: number; jValue: number[] }
        result: { remainingFraction: number[][] }
      }
      const line = numbers.jValue.map((j) => j * Math.exp(-40000 / numbers.slowestTimeConstant))
      line.forEach((value, j) => expect(result.remainingFraction[0]![j]! / value).toBeCloseTo(1, 9))
      expect(numbers.fValue / numbers.slowestTimeConstant).toBeCloseTo(Math.LN10, 12)
      expect(numbers.lagTime / numbers.slowestTimeConstant).toBeCloseTo(Math.log(numbers.jValue[0]!), 12)
    }
  })
})

describe('refusals', () => {
  const body = { ...rod, filmCoefficient: 10, times: [60] }
  const issuesOf = (id: string, input: object) => {
    try {
      ask(id, input as Record<string, unknown>)
    } catch (error) {
      return (error as { issues: { pointer: string; code: string }[] }).issues.map((i) => `${i.pointer} ${i.code}`)
    }
    return []
  }
  it('name the field', () => {
    const id = 'cylinder-convection'
    expect(issuesOf(id, { ...body, depths: [0], radii: [0] })).toEqual(['#/radii conflicting-fields'])
    expect(issuesOf(id, { ...body, radii: [0.05, 0.2] })).toEqual(['#/radii/1 depth-outside-body'])
    expect(issuesOf(id, body)).toEqual(['#/depths missing-field'])
    const { ambientTemperature: surfaceTemperature, ...rest } = rod
    const held = { ...rest, surfaceTemperature, times: [0], outputs: ['heatFlux'] }
    expect(issuesOf('sphere-surface-temperature', { ...held, radii: [0.1] })).toEqual([
      '#/times/0 singular-at-time-zero',
    ])
    expect(issuesOf('sphere-surface-temperature', { ...held, radii: [0.05] })).toEqual([])
  })
})

/** A double as the binary fraction it is. */
function binary(x: number): D {
  let power = 0
  for (; !Number.isInteger(x); power++) x *= 2
  return new D(x).div(new D(2).pow(power))
}
