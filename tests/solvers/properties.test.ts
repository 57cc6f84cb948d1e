import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { ask, askSingle, single } from './ask.ts'
import { proof, seed } from './counts.ts'
import { decades, uniform as share } from './draw.ts'

/* Relations that hold whatever the numbers are. They need no source. */

const runs = { numRuns: proof ? 2000 : 150, seed }
const wall = { conductivity: 1.3, density: 2000, specificHeat: 950, initialTemperature: 15, ambientTemperature: -7 }
const value = (id: string, body: object, output = 'temperature') =>
  askSingle(id, body as Record<string, unknown>, output).value
const near = (a: number, b: number, tolerance: number) => expect(Math.abs(a - b)).toBeLessThanOrEqual(tolerance)

describe('similarity', () => {
  it('of the slab: length by s, time by s², film by 1/s change nothing', () => {
    fc.assert(
      fc.property(decades(1e-2, 1), decades(1, 1e4), decades(10, 1e7), share, decades(1e-3, 1e3), (d, h, t, x, s) => {
        const body = { ...wall, thickness: d, exposedFaces: 1, filmCoefficient: h, depths: [x * d], times: [t] }
        const scaled = {
          ...body,
          thickness: d * s,
          filmCoefficient: h / s,
          depths: [Math.min(x * d * s, d * s)],
          times: [t * s * s],
        }
        near(value('slab-convection', body), value('slab-convection', scaled), 22e-12)
      }),
      runs,
    )
  })
  it('of the half space: the answer depends on x²/t and h²t alone', () => {
    fc.assert(
      fc.property(decades(1, 1e4), decades(10, 1e7), decades(1e-3, 3), decades(1e-3, 1e3), (h, t, x, s) => {
        const body = { ...wall, filmCoefficient: h, depths: [x], times: [t] }
        const scaled = { ...wall, filmCoefficient: h / s, depths: [x * s], times: [t * s * s] }
        near(value('semi-infinite-convection', body), value('semi-infinite-convection', scaled), 22e-12)
      }),
      runs,
    )
  })
})

describe('symmetry', () => {
  it('both faces exposed: depth x and thickness − x are alike, and the flux turns its sign', () => {
    fc.assert(
      fc.property(decades(1, 1e4), decades(10, 1e7), fc.integer({ min: 0, max: 32 }), (h, t, i) => {
        const x = i / 64
        const body = { ...wall, thickness: 1, exposedFaces: 2, filmCoefficient: h, times: [t] }
        expect(value('slab-convection', { ...body, depths: [x] })).toBe(
          value('slab-convection', { ...body, depths: [1 - x] }),
        )
        const flux = value('slab-convection', { ...body, depths: [x] }, 'heatFlux')
        expect(value('slab-convection', { ...body, depths: [1 - x] }, 'heatFlux') + flux).toBeCloseTo(0, 10)
      }),
      runs,
    )
  })
  it('one insulated face is half of a body twice as thick, exposed at both', () => {
    fc.assert(
      fc.property(decades(1e-2, 1), decades(1, 1e4), decades(10, 1e7), share, (d, h, t, x) => {
        const body = { ...wall, filmCoefficient: h, depths: [x * d], times: [t] }
        near(
          value('slab-convection', { ...body, thickness: d, exposedFaces: 1 }),
          value('slab-convection', { ...body, thickness: 2 * d, exposedFaces: 2 }),
          22e-13,
        )
      }),
      runs,
    )
  })
  it('heating and cooling mirror each other', () => {
    const body = { ...wall, thickness: 0.3, exposedFaces: 1, filmCoefficient: 12, depths: [0.1], times: [20000] }
    const mirrored = { ...body, initialTemperature: -15, ambientTemperature: 7 }
    expect(value('slab-convection', mirrored)).toBeCloseTo(-value('slab-convection', body), 12)
  })
})

describe('limits', () => {
  const slab = { ...wall, thickness: 0.3, exposedFaces: 1, depths: [0, 0.1, 0.3], times: [0, 1, 1e4, 1e9] }
  it('without a film nothing changes', () => {
    for (const [id, body] of [
      ['slab-convection', { ...slab, filmCoefficient: 0 }],
      ['semi-infinite-convection', { ...wall, filmCoefficient: 0, depths: [0, 1], times: [0, 5, 1e9] }],
      [
        'lumped-convection',
        {
          heatCapacity: 5,
          area: 2,
          filmCoefficient: 0,
          initialTemperature: 15,
          ambientTemperature: -7,
          times: [0, 1e9],
        },
      ],
    ] as const) {
      const answered = ask(id, { ...body, outputs: ['temperature', 'heatGained'] }).result
      expect([answered['temperature']].flat(2).every((v) => v === 15)).toBe(true)
      expect([answered['heatGained']].flat(2).every((v) => v === 0)).toBe(true)
    }
  })
  it('a film without end holds the face at the ambient temperature: erfc for the half space, Σ 2(−1)ⁿ… for the slab', () => {
    // From the definitions: erfc(0.5) and the series of a slab with fixed faces at Fo 0.1, 20 terms.
    const half = {
      conductivity: 1,
      diffusivity: 1,
      filmCoefficient: 1e9,
      initialTemperature: 0,
      ambientTemperature: 1,
      depths: [1],
      times: [1],
    }
    expect(value('semi-infinite-convection', half)).toBeCloseTo(0.4795001221869535, 8)
    const slabs = {
      conductivity: 1,
      diffusivity: 1,
      filmCoefficient: 1e9,
      initialTemperature: 1,
      ambientTemperature: 0,
      thickness: 1,
      exposedFaces: 1,
      depths: [1],
      times: [0.1],
    }
    const series = Array.from(
      { length: 20 },
      (_, n) => (2 * (-1) ** n * Math.exp(-(((n + 0.5) * Math.PI) ** 2) * 0.1)) / ((n + 0.5) * Math.PI),
    )
    expect(value('slab-convection', slabs)).toBeCloseTo(
      series.reduce((a, b) => a + b, 0),
      8,
    )
  })
  it('at time 0 the body is as it was, the film flux at its face', () => {
    const { result } = ask('slab-convection', {
      ...slab,
      filmCoefficient: 10,
      times: [0],
      outputs: [
        'temperature',
        'heatFlux',
        'surfaceHeatFlux',
        'heatGained',
        'remainingFraction',
        'completedFraction',
        'heatFraction',
        'meanTemperature',
      ],
    })
    expect(result).toEqual({
      temperature: [[15, 15, 15]],
      heatFlux: [[-220, 0, 0]],
      surfaceHeatFlux: [-220],
      heatGained: [0],
      remainingFraction: [[1, 1, 1]],
      completedFraction: [[0, 0, 0]],
      heatFraction: [0],
      meanTemperature: [15],
    })
  })
  it('after long the slab is at the ambient temperature and has taken all its heat', () => {
    const body = { ...slab, filmCoefficient: 10, times: [1e9] }
    expect(value('slab-convection', body)).toBe(-7)
    expect(value('slab-convection', body, 'heatGained')).toBeCloseTo(2000 * 950 * 0.3 * -22, 6)
  })
  it('a small Biot number gives the lumped body', () => {
    const body = { ...wall, thickness: 0.01, exposedFaces: 1, filmCoefficient: 1e-4, times: [1e8] }
    near(
      value('slab-convection', { ...body, depths: [0.005] }),
      value('lumped-convection', { ...body, body: 'slab' }),
      1e-5,
    )
  })
  it('the corrected lumped body follows the mean of the slab to 0.02 % at Biot 0.1 and 0.9 % at 1 (computed)', () => {
    for (const [biot, most] of [
      [0.1, 0.0002],
      [1, 0.009],
    ] as const) {
      const length = 0.1
      const body = {
        conductivity: 1,
        diffusivity: 1e-6,
        thickness: length,
        exposedFaces: 1,
        filmCoefficient: biot / length,
        initialTemperature: 1,
        ambientTemperature: 0,
      }
      const times = Array.from({ length: 60 }, (_, i) => 100 * 1.2 ** i)
      const mean = ask('slab-convection', { ...body, times, outputs: ['meanTemperature'] }).result[
        'meanTemperature'
      ] as number[]
      const lumped = ask('lumped-convection', { ...body, body: 'slab', correction: 'mean', times }).result[
        'temperature'
      ] as number[]
      const worst = mean.reduce((w, m, i) => Math.max(w, Math.abs(m - lumped[i]!)), 0)
      expect(worst).toBeLessThan(most * 1.15)
      expect(worst).toBeGreaterThan(most / 4)
    }
  })
})

describe('agreement of two cases', () => {
  it('the slab is a half space while the Fourier number is small', () => {
    fc.assert(
      fc.property(decades(1e-9, 0.01), decades(1e-4, 1e6), share, (fourier, biot, x) => {
        const body = {
          conductivity: 1,
          diffusivity: 1,
          filmCoefficient: biot,
          initialTemperature: 0,
          ambientTemperature: 1,
          times: [fourier],
        }
        const slab = askSingle(
          'slab-convection',
          { ...body, thickness: 1, exposedFaces: 1, depths: [x * 0.5] },
          'temperature',
        )
        const half = askSingle('semi-infinite-convection', { ...body, depths: [x * 0.5] }, 'temperature')
        // The image adds erfc(1.5/(2√Fo)), at Fo 0.01 less than 1e-24.
        near(slab.value, half.value, slab.bound + half.bound)
      }),
      runs,
    )
  })
})

describe('energy balance', () => {
  /** ∫₀ᵗ q dt as ∫₀^√t 2s·q(s²) ds, smooth at 0, by Gauss of 8 points on a graded mesh. */
  function absorbed(id: string, body: object, until: number): number {
    const nodes = [
      -0.9602898564975363, -0.7966664774136267, -0.525532409916329, -0.1834346424956498, 0.1834346424956498,
      0.525532409916329, 0.7966664774136267, 0.9602898564975363,
    ]
    const weights = [
      0.1012285362903763, 0.2223810344533745, 0.3137066458778873, 0.362683783378362, 0.362683783378362,
      0.3137066458778873, 0.2223810344533745, 0.1012285362903763,
    ]
    const panels = 60
    const edges = Array.from({ length: panels + 1 }, (_, i) => (i === 0 ? 0 : Math.sqrt(until) * 0.72 ** (panels - i)))
    const points = edges.slice(1).flatMap((right, i) =>
      nodes.map((node, n) => ({
        s: (right + edges[i]!) / 2 + (node * (right - edges[i]!)) / 2,
        w: (weights[n]! * (right - edges[i]!)) / 2,
      })),
    )
    const flux = ask(id, { ...body, times: points.map(({ s }) => s * s), outputs: ['surfaceHeatFlux'] }).result[
      'surfaceHeatFlux'
    ] as number[]
    return points.reduce((sum, { s, w }, i) => sum + 2 * s * w * flux[i]!, 0)
  }
  it('surface flux integrated in √t = heat gained = mean rise times heat capacity, to 1e-9', () => {
    fc.assert(
      fc.property(decades(1e-3, 1e3), decades(1e-3, 3), fc.constantFrom(1, 2), (biot, fourier, exposedFaces) => {
        const thickness = 0.2 * exposedFaces
        const body = { ...wall, thickness, exposedFaces, filmCoefficient: (biot * 1.3) / 0.2, depths: [0] }
        const until = (fourier * 0.2 * 0.2 * 2000 * 950) / 1.3
        const gained = value('slab-convection', { ...body, times: [until] }, 'heatGained')
        near(absorbed('slab-convection', body, until) / gained, 1, 1e-9)
        const mean = value('slab-convection', { ...body, times: [until] }, 'meanTemperature')
        if (fourier > 0.05 && biot > 0.1) near(((mean - 15) * 2000 * 950 * 0.2) / gained, 1, 1e-9)
      }),
      { ...runs, numRuns: proof ? 300 : 40 },
    )
  })
  it('holds in the half space', () => {
    fc.assert(
      fc.property(decades(1, 1e4), decades(10, 1e6), (h, until) => {
        const body = { ...wall, filmCoefficient: h, depths: [0] }
        near(
          absorbed('semi-infinite-convection', body, until) /
            value('semi-infinite-convection', { ...body, times: [until] }, 'heatGained'),
          1,
          1e-9,
        )
      }),
      { ...runs, numRuns: proof ? 300 : 40 },
    )
  })
  it('of a lumped body with a source: what is stored is what the film and the source brought', () => {
    const body = {
      heatCapacity: 5e4,
      area: 2,
      filmCoefficient: 6,
      power: 300,
      initialTemperature: 10,
      ambientTemperature: 20,
    }
    const at = (t: number) => value('lumped-convection', { ...body, times: [t] })
    const film = Array.from({ length: 4000 }, (_, i) => 12 * (20 - at((i + 0.5) * 2))).reduce(
      (sum, q) => sum + q * 2,
      0,
    )
    near(value('lumped-convection', { ...body, times: [8000] }, 'heatGained') / (film + 300 * 8000), 1, 1e-6)
  })
})

describe('the order of an answer', () => {
  it('temperatures move one way in time and outward in depth', () => {
    fc.assert(
      fc.property(decades(1e-2, 1e3), fc.array(decades(1e-4, 10), { minLength: 2, maxLength: 6 }), (biot, fouriers) => {
        const times = [...fouriers].sort((a, b) => a - b)
        const body = {
          conductivity: 1,
          diffusivity: 1,
          thickness: 1,
          exposedFaces: 1,
          filmCoefficient: biot,
          initialTemperature: 0,
          ambientTemperature: 1,
          depths: [0, 0.25, 0.5, 0.75, 1],
          times,
        }
        const rows = ask('slab-convection', body).result['temperature'] as number[][]
        const slack = 1e-13
        rows.forEach((row, i) =>
          row.forEach((T, j) => {
            if (i > 0) expect(T).toBeGreaterThanOrEqual(rows[i - 1]![j]! - slack)
            if (j > 0) expect(T).toBeLessThanOrEqual(row[j - 1]! + slack)
          }),
        )
      }),
      runs,
    )
  })
  it('times and depths are kept as given, repeated ones too', () => {
    const body = {
      ...wall,
      thickness: 0.3,
      exposedFaces: 2,
      filmCoefficient: 10,
      depths: [0.3, 0, 0.3],
      times: [5000, 10, 5000],
    }
    const rows = ask('slab-convection', body).result['temperature'] as number[][]
    expect(rows[0]).toEqual(rows[2])
    expect(rows[0]![0]).toBe(rows[0]![2])
    expect(rows[1]![0]).toBeGreaterThan(rows[0]![0]!)
  })
  it('one point asked alone is the same number as within a grid', () => {
    const body = { ...wall, thickness: 0.3, exposedFaces: 1, filmCoefficient: 10 }
    const depths = Array.from({ length: 11 }, (_, i) => Math.min(0.3, 0.03 * i))
    const times = [60, 600, 6000, 60000]
    const grid = ask('slab-convection', { ...body, depths, times }).result['temperature'] as number[][]
    times.forEach((t, i) =>
      depths.forEach((x, j) =>
        expect(single(ask('slab-convection', { ...body, depths: [x], times: [t] }).result['temperature']!)).toBe(
          grid[i]![j]!,
        ),
      ),
    )
  })
})
