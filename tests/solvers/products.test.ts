import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { product, union } from '../../solvers/math/product.ts'
import { EPS, type Estimate } from '../../solvers/math/rounding.ts'
import { ask, askSingle, solveDirect } from './ask.ts'
import { proof, seed } from './counts.ts'
import { decades, uniform } from './draw.ts'

/* A product of one-dimensional answers, held to those answers, to the equation it solves and to its limits. */

const runs = { numRuns: proof ? 500 : 40, seed }

const solid = { conductivity: 1.3, density: 2000, specificHeat: 950, initialTemperature: 15 }
const film = { filmCoefficient: 20, ambientTemperature: -7 }
const fractions = ['remainingFraction', 'completedFraction', 'temperature'] as const
const wholes = ['heatFraction', 'meanTemperature', 'heatGained'] as const

interface Bounded {
  value: number
  bound: number
}
const one = (id: string, body: object, output: string): Bounded =>
  askSingle(id, body as Record<string, unknown>, output)
const agree = (a: Bounded, b: Bounded) =>
  expect(Math.abs(a.value - b.value)).toBeLessThanOrEqual(a.bound + b.bound + 8 * EPS * Math.abs(a.value))

describe('the sum of parts', () => {
  const closed = (value: number): Estimate => ({ value, error: EPS * value, method: 'closed-form' })
  it('keeps the digits of small ones, which 1 − the product would lose', () => {
    const parts = [1e-12, 3e-13, 2e-20].map((u) => ({ done: closed(u), left: closed(1 - u) }))
    const { value, error } = union(parts)
    expect(Math.abs(value - (1e-12 + 3e-13 + 2e-20 - 3e-25))).toBeLessThan(1e-27)
    expect(error / value).toBeLessThan(20 * EPS)
  })
  it('adds to 1 with the product, within their errors', () => {
    fc.assert(
      fc.property(fc.array(uniform, { minLength: 2, maxLength: 3 }), (done) => {
        const sum = union(done.map((u) => ({ done: closed(u), left: closed(1 - u) })))
        const left = product(done.map((u) => closed(1 - u)))
        expect(Math.abs(sum.value + left.value - 1)).toBeLessThanOrEqual(sum.error + left.error + 2 * EPS)
      }),
      runs,
    )
  })
})

describe('a direction that passes no heat', () => {
  const time = decades(10, 1e6)
  it('leaves the slab of a bar, a brick and a short cylinder', () => {
    fc.assert(
      fc.property(time, decades(1, 1e4), uniform, (t, h, share) => {
        const x = 0.1 * share
        const common = { ...solid, ambientTemperature: -7, times: [t] }
        const slab = { ...common, thickness: 0.1, exposedFaces: 1, filmCoefficient: h, depths: [0.1 - x] }
        const bar = {
          ...common,
          width: 0.1,
          height: 0.4,
          widthFaces: 1,
          heightFaces: 2,
          filmCoefficients: { width: h, height: 0 },
          points: [{ x, y: 0.1 }],
        }
        const can = {
          ...common,
          radius: 0.2,
          height: 0.1,
          heightFaces: 1,
          filmCoefficients: { side: 0, ends: h },
          points: [{ r: 0.1, z: x }],
        }
        for (const output of fractions) {
          agree(one('bar-rectangular', bar, output), one('slab-convection', slab, output))
          agree(one('short-cylinder-convection', can, output), one('slab-convection', slab, output))
        }
        for (const output of ['heatFraction', 'meanTemperature'])
          agree(one('bar-rectangular', bar, output), one('slab-convection', slab, output))
      }),
      runs,
    )
  })
  it('leaves the cylinder of a can and of a rod end, and the half space of an edge and a corner', () => {
    fc.assert(
      fc.property(time, decades(1, 1e4), uniform, (t, h, share) => {
        const r = 0.1 * share
        const common = { ...solid, ambientTemperature: -7, times: [t] }
        const round = { ...common, radius: 0.1, filmCoefficient: h, radii: [r] }
        const can = { radius: 0.1, height: 0.3, heightFaces: 2, filmCoefficients: { side: h, ends: 0 } }
        const rod = { radius: 0.1, filmCoefficients: { side: h, end: 0 } }
        const half = { ...common, filmCoefficient: h, depths: [r] }
        for (const output of fractions) {
          const alone = one('cylinder-convection', round, output)
          agree(one('short-cylinder-convection', { ...common, ...can, points: [{ r, z: 0.1 }] }, output), alone)
          agree(one('semi-infinite-bar-end', { ...common, ...rod, points: [{ x: 0, r }] }, output), alone)
          const flat = one('semi-infinite-convection', half, output)
          const edge = { ...common, filmCoefficients: { x: h, y: 0 }, points: [{ x: r, y: 0 }] }
          const corner = { ...common, filmCoefficients: { x: 0, y: h, z: 0 }, points: [{ x: 0, y: r, z: 9 }] }
          agree(one('edge-quarter-space', edge, output), flat)
          agree(one('corner-octant', corner, output), flat)
        }
      }),
      runs,
    )
  })
  it('in all directions leaves the body as it was', () => {
    const body = {
      ...solid,
      width: 1,
      height: 1,
      widthFaces: 1,
      heightFaces: 1,
      points: [{ x: 0, y: 1 }],
      times: [1e9],
    }
    const idle = { filmCoefficient: 0, ambientTemperature: -7 }
    const outputs = ['temperature', 'heatGained', 'completedFraction']
    const { result } = ask('bar-rectangular', { ...body, ...idle, outputs })
    expect(result).toEqual({ temperature: [[15]], heatGained: [0], completedFraction: [[0]] })
  })
})

describe('a product', () => {
  const brick = { width: 0.2, height: 0.15, length: 0.3, widthFaces: 2, heightFaces: 1, lengthFaces: 2 }
  const body = { ...solid, ...film, ...brick }
  it('is that of the three slabs, and its heat the sum form of theirs', () => {
    fc.assert(
      fc.property(decades(10, 1e6), uniform, uniform, uniform, (t, u, v, w) => {
        const point = { x: 0.1 - 0.1 * u, y: 0.15 - 0.15 * v, z: 0.15 - 0.15 * w }
        const slab = (thickness: number, exposedFaces: number, depth: number, output: string) =>
          one('slab-convection', { ...solid, ...film, thickness, exposedFaces, depths: [depth], times: [t] }, output)
        const left = [
          slab(0.2, 2, 0.1 * u, 'remainingFraction'),
          slab(0.15, 1, 0.15 * v, 'remainingFraction'),
          slab(0.3, 2, 0.15 * w, 'remainingFraction'),
        ]
        const found = one('brick-rectangular', { ...body, points: [point], times: [t] }, 'remainingFraction')
        const value = left.reduce((all, { value }) => all * value, 1)
        const bound = left.reduce((sum, part) => sum + (value * part.bound) / part.value, 0)
        agree(found, { value, bound })
      }),
      runs,
    )
  })
  it('does not know its directions by name: a brick turned is the same brick', () => {
    const turned = { width: 0.3, height: 0.2, length: 0.15, widthFaces: 2, heightFaces: 2, lengthFaces: 1 }
    for (const t of [100, 5000, 200000]) {
      const a = { ...body, points: [{ x: 0.05, y: 0.1, z: -0.02 }], times: [t] }
      const b = { ...solid, ...film, ...turned, points: [{ x: -0.02, y: 0.05, z: 0.1 }], times: [t] }
      for (const output of [...fractions, ...wholes])
        agree(one('brick-rectangular', a, output), one('brick-rectangular', b, output))
    }
  })
  it('with one exposed face is half of a body twice as large with two', () => {
    for (const t of [100, 5000, 200000]) {
      const half = { width: 0.1, height: 0.3, widthFaces: 1, heightFaces: 2, points: [{ x: 0.04, y: 0.1 }] }
      const whole = { ...half, width: 0.2, widthFaces: 2 }
      for (const output of [...fractions, 'meanTemperature', 'heatFraction'])
        agree(
          one('bar-rectangular', { ...solid, ...film, ...half, times: [t] }, output),
          one('bar-rectangular', { ...solid, ...film, ...whole, times: [t] }, output),
        )
    }
  })
  it('satisfies the equation of conduction, by differences of its temperatures', () => {
    const step = 2e-3
    const a = 1.3 / (2000 * 950)
    const at = (dx: number, dy: number, dz: number, t: number) =>
      one(
        'brick-rectangular',
        { ...body, points: [{ x: 0.06 + dx, y: 0.1 + dy, z: 0.08 + dz }], times: [t] },
        'temperature',
      ).value
    for (const t of [4000, 20000]) {
      const middle = at(0, 0, 0, t)
      const bends = [
        [step, 0, 0],
        [0, step, 0],
        [0, 0, step],
      ].map(([x, y, z]) => (at(x!, y!, z!, t) + at(-x!, -y!, -z!, t) - 2 * middle) / step ** 2)
      const rate = (at(0, 0, 0, t * 1.001) - at(0, 0, 0, t * 0.999)) / (0.002 * t)
      expect((a * (bends[0]! + bends[1]! + bends[2]!)) / rate).toBeCloseTo(1, 3)
    }
  })
  it('meets the film at its faces: k dT/dn = h (Ta − T)', () => {
    const inward = 1e-5
    for (const t of [2000, 20000]) {
      const profile = [0, 1, 2].map(
        (n) =>
          one(
            'short-cylinder-convection',
            {
              ...solid,
              ...film,
              radius: 0.1,
              height: 0.3,
              heightFaces: 2,
              points: [{ r: 0.1 - n * inward, z: 0.05 }],
              times: [t],
            },
            'temperature',
          ).value,
      )
      const slope = (3 * profile[0]! - 4 * profile[1]! + profile[2]!) / (2 * inward)
      expect((1.3 * slope) / (20 * (-7 - profile[0]!))).toBeCloseTo(1, 5)
    }
  })
  it('takes all the heat there is, volume times capacity times step', () => {
    const cases = [
      ['bar-rectangular', { width: 0.2, height: 0.1, widthFaces: 2, heightFaces: 1 }, 0.02],
      ['brick-rectangular', brick, 0.2 * 0.15 * 0.3],
      ['short-cylinder-convection', { radius: 0.1, height: 0.3, heightFaces: 2 }, Math.PI * 0.003],
    ] as const
    for (const [id, sizes, volume] of cases) {
      const late = one(id, { ...solid, ...film, ...sizes, times: [1e9] }, 'heatGained').value
      expect(late / (1.9e6 * volume * -22)).toBeCloseTo(1, 12)
      const { value } = one(id, { ...solid, ...film, ...sizes, times: [9000] }, 'meanTemperature')
      const gained = one(id, { ...solid, ...film, ...sizes, times: [9000] }, 'heatGained').value
      expect((value - 15) * 1.9e6 * volume).toBeCloseTo(gained, 3)
    }
  })
  it('is far from its end the section alone, and at early times deep in a corner the start', () => {
    const section = { ...solid, ...film, thickness: 0.1, thicknessFaces: 2, times: [20000] }
    const end = one('semi-infinite-bar-end', { ...section, points: [{ x: 50, y: 0.02 }] }, 'temperature')
    const slab = { ...solid, ...film, thickness: 0.1, exposedFaces: 2, depths: [0.03], times: [20000] }
    agree(end, one('slab-convection', slab, 'temperature'))
    const corner = { ...solid, ...film, points: [{ x: 1, y: 1, z: 1 }], times: [60] }
    expect(one('corner-octant', corner, 'temperature').value).toBe(15)
    expect(one('corner-octant', corner, 'completedFraction').value).toBe(0)
  })
  it('of an endless film is that of a held surface', () => {
    const shared = { ...solid, points: [{ x: 0.02, y: 0.03 }], times: [3000] }
    for (const [id, sizes] of [
      ['edge-quarter-space', {}],
      ['bar-rectangular', { width: 0.2, height: 0.2, widthFaces: 2, heightFaces: 2 }],
    ] as const) {
      const strong = { ...shared, ...sizes, filmCoefficient: 1e9, ambientTemperature: -7 }
      const held = { ...shared, ...sizes, surfaceTemperature: -7 }
      expect(Math.abs(one(id, strong, 'temperature').value - one(id, held, 'temperature').value)).toBeLessThan(1e-5)
    }
  })
  it('starts at the start', () => {
    const outputs = ['temperature', 'heatGained', 'meanTemperature', 'remainingFraction', 'completedFraction']
    const { result } = ask('brick-rectangular', { ...body, points: [{ x: 0.1, y: 0.15, z: 0 }], times: [0], outputs })
    expect(result).toEqual({
      temperature: [[15]],
      heatGained: [0],
      meanTemperature: [15],
      remainingFraction: [[1]],
      completedFraction: [[0]],
    })
  })
  it('has bounds within the promise over points and times', () => {
    fc.assert(
      fc.property(decades(1, 1e7), decades(1, 1e5), uniform, uniform, (t, h, u, v) => {
        const points = [{ r: 0.1 * u, z: 0.15 * v }]
        const { outputs } = solveDirect('short-cylinder-convection', {
          ...solid,
          radius: 0.1,
          height: 0.3,
          heightFaces: 2,
          filmCoefficient: h,
          ambientTemperature: -7,
          points,
          times: [t],
          outputs: ['temperature'],
        })
        expect(outputs.temperature!.bound.absolute).toBeLessThan(10 * 22e-12)
      }),
      runs,
    )
  })
})

describe('late numbers', () => {
  it('of a product decay at the sum of the rates', () => {
    const body = { ...solid, ...film, width: 0.2, height: 0.1, widthFaces: 2, heightFaces: 1, points: [{ x: 0, y: 0 }] }
    const { numbers, result } = ask('bar-rectangular', {
      ...body,
      times: [40000, 50000],
      outputs: ['remainingFraction'],
    }) as unknown as { numbers: { slowestTimeConstant: number }; result: { remainingFraction: number[][] } }
    const [early, late] = result.remainingFraction.map(([value]) => value!)
    expect((Math.log(early! / late!) * numbers.slowestTimeConstant) / 10000).toBeCloseTo(1, 6)
  })
})

describe('refusals', () => {
  const refused = (id: string, input: object) => {
    try {
      ask(id, input as Record<string, unknown>)
    } catch (error) {
      return (error as { issues: { pointer: string; code: string }[] }).issues.map((i) => `${i.pointer} ${i.code}`)
    }
    return []
  }
  const bar = {
    ...solid,
    width: 0.2,
    height: 0.1,
    widthFaces: 2,
    heightFaces: 1,
    points: [{ x: 0, y: 0 }],
    times: [60],
  }
  const surfaceTemperature = 5
  it('of the drive: none, half, and two', () => {
    expect(refused('bar-rectangular', bar)).toEqual(['#/filmCoefficient missing-field'])
    expect(refused('bar-rectangular', { ...bar, filmCoefficient: 5 })).toEqual(['#/ambientTemperature missing-field'])
    expect(refused('bar-rectangular', { ...bar, ...film, surfaceTemperature })).toEqual([
      '#/filmCoefficient conflicting-fields',
    ])
    const both = { ...bar, ...film, filmCoefficients: { width: 5, height: 5 } }
    expect(refused('bar-rectangular', both)).toEqual(['#/filmCoefficients conflicting-fields'])
    const part = { ...bar, ambientTemperature: 5, filmCoefficients: { width: 5 } }
    expect(refused('bar-rectangular', part)).toEqual(['#/filmCoefficients/height missing-field'])
  })
  it('of points outside, and of faces not said', () => {
    const outside = {
      ...bar,
      ...film,
      points: [
        { x: 0, y: 0 },
        { x: -0.1001, y: -0.01 },
      ],
    }
    expect(refused('bar-rectangular', outside)).toEqual([
      '#/points/1/x depth-outside-body',
      '#/points/1/y depth-outside-body',
    ])
    const { widthFaces: _faces, ...unsaid } = bar
    expect(refused('bar-rectangular', { ...unsaid, ...film })).toEqual(['#/widthFaces missing-field'])
    expect(refused('edge-quarter-space', { ...solid, ...film, points: [{ x: 0, y: -1 }], times: [60] })).toEqual([
      '#/points/0/y depth-outside-body',
    ])
  })
  it('of the section of a bar end: none, half, two, and points of another', () => {
    const end = { ...solid, ...film, times: [60] }
    const id = 'semi-infinite-bar-end'
    expect(refused(id, { ...end, points: [{ x: 0, r: 0 }] })).toEqual(['#/radius missing-field'])
    expect(refused(id, { ...end, thickness: 1, points: [{ x: 0, y: 0 }] })).toEqual(['#/thicknessFaces missing-field'])
    const two = { ...end, radius: 1, thickness: 1, thicknessFaces: 2, points: [{ x: 0, r: 0 }] }
    expect(refused(id, two)).toEqual(['#/thickness conflicting-fields'])
    expect(refused(id, { ...end, radius: 1, points: [{ x: 0, y: 0 }] })).toEqual([
      '#/points/0/r missing-field',
      '#/points/0/y unknown-field',
    ])
  })
  it('of fluxes, which differ over the surface', () => {
    expect(refused('bar-rectangular', { ...bar, ...film, outputs: ['surfaceHeatFlux'] })).toEqual([
      '#/outputs/0 output-not-defined',
    ])
    expect(refused('corner-octant', { ...solid, ...film, times: [60], outputs: ['meanTemperature'] })).toEqual([
      '#/outputs/0 output-not-defined',
    ])
  })
})
