import { readFileSync } from 'node:fs'
import erf from '@stdlib/math-base-special-erf'
import erfcx from '@stdlib/math-base-special-erfcx'
import { describe, expect, it } from 'vitest'
import { besselJ01 } from '../../solvers/math/bessel-j.ts'
import { cylinderEigenvalue } from '../../solvers/math/cylinder-eigenvalues.ts'
import { exponentialIntegral } from '../../solvers/math/exponential-integral.ts'
import { i2erfcx } from '../../solvers/math/i2erfcx.ts'
import { ierfcx } from '../../solvers/math/ierfcx.ts'
import { slabEigenvalue } from '../../solvers/math/slab-eigenvalues.ts'
import { sphereEigenvalue } from '../../solvers/math/sphere-eigenvalues.ts'
import { askSingle } from './ask.ts'
import { cases } from '../../solvers/cases/index.ts'

/*
 * Every row of the printed and recomputed values is asked for by a check here, or is of a case that does not exist yet. The sources
 * stand in the rows.
 */

type Inputs = Record<string, number | string>
interface Row {
  id: string
  case: string
  inputs: Inputs
  verified_value: number
}
interface Kept {
  source: string
  item: string
  quantity: string
  inputs: Inputs
  printed: string
  recomputed: string
}
const read = (name: string): unknown =>
  JSON.parse(readFileSync(new URL(`../reference/${name}.json`, import.meta.url), 'utf8'))
const { kept } = read('published') as { kept: Kept[] }
const checks = read('checks') as Row[]

const solid = { conductivity: 1, diffusivity: 1 }
const step = { initialTemperature: 0, surfaceTemperature: 1 }
const behind = (biot: number) => ({ ...solid, filmCoefficient: biot, initialTemperature: 1, ambientTemperature: 0 })

/** First coefficient: what is left at the centre late, over the first exponential. */
function coefficient(shape: string, biot: number): number {
  const [id, body, z] = {
    slab: ['slab-convection', { thickness: 1, exposedFaces: 1, depths: [1] }, slabEigenvalue(biot, 0)],
    cylinder: ['cylinder-convection', { radius: 1, radii: [0] }, cylinderEigenvalue(biot, 0).root],
    sphere: ['sphere-convection', { radius: 1, radii: [0] }, sphereEigenvalue(biot, 0)],
  }[shape] as [string, object, number]
  // The second mode has faded by e^(−40) more.
  const time = 8
  const left = askSingle(id, { ...behind(biot), ...body, times: [time] }, 'remainingFraction').value
  return left * Math.exp(z * z * time)
}
const rootOf = (shape: string, biot: number, n: number) =>
  shape === 'slab'
    ? slabEigenvalue(biot, n)
    : shape === 'cylinder'
      ? cylinderEigenvalue(biot, n).root
      : sphereEigenvalue(biot, n)

/** Where a rising function of a positive number is a value. */
function rootIn(of: (x: number) => number, value: number, low: number, high: number): number {
  for (let n = 0; n < 60; n++) {
    const middle = (low + high) / 2
    if (of(middle) < value) low = middle
    else high = middle
  }
  return (low + high) / 2
}

const shapes: Record<string, string> = { 'plane wall': 'slab', 'infinite cylinder': 'cylinder', sphere: 'sphere' }
const frostDepth = (i: Inputs) =>
  rootIn(
    (depth) =>
      askSingle(
        'semi-infinite-surface-temperature',
        {
          conductivity: 1,
          diffusivity: Number(i['diffusivity_m2_s']),
          initialTemperature: Number(i['initial_C']),
          surfaceTemperature: Number(i['surface_C']),
          depths: [depth],
          times: [Number(i['time_s'])],
        },
        'temperature',
      ).value,
    Number(i['target_C']),
    0.01,
    5,
  )
const lumpedTime = (i: Inputs) => {
  const [tau, from, ambient, target] = [
    Number(
      i['time_constant_s'] ??
        (Number(i['density_kg_m3']) * Number(i['specific_heat_J_kgK']) * Number(i['radius_m'])) /
          3 /
          Number(i['film_W_m2K']),
    ),
    Number(i['initial_C']),
    Number(i['ambient_C']),
    Number(i['target_C']),
  ]
  const body = { heatCapacity: tau, area: 1, filmCoefficient: 1, initialTemperature: from, ambientTemperature: ambient }
  const sign = Math.sign(ambient - from)
  const at = (t: number) => sign * askSingle('lumped-convection', { ...body, times: [t] }, 'temperature').value
  return rootIn(at, sign * target, 0, 20 * tau)
}

/** How each kind of printed row is asked. */
const printedKinds: { takes: (k: Kept) => boolean; of: (k: Kept) => number }[] = [
  { takes: (k) => k.quantity === 'E1', of: (k) => exponentialIntegral(Number(k.inputs['x'])) },
  { takes: (k) => k.quantity === 'erf', of: (k) => erf(Number(k.inputs['x'])) },
  { takes: (k) => k.quantity === 'J0', of: (k) => besselJ01(Number(k.inputs['x'])).j0 },
  { takes: (k) => k.quantity === 'J1', of: (k) => besselJ01(Number(k.inputs['x'])).j1 },
  {
    takes: (k) => k.quantity === 'zero of J0',
    of: (k) => cylinderEigenvalue(Infinity, Number(k.inputs['n']) - 1).root,
  },
  {
    takes: (k) => k.quantity === 'zero of J1',
    // J₁ changes its sign there.
    of: (k) => {
      const near = Number(k.recomputed)
      const sign = Math.sign(besselJ01(near + 0.1).j1)
      return rootIn((x) => sign * besselJ01(x).j1, 0, near - 0.1, near + 0.1)
    },
  },
  {
    takes: (k) => k.quantity === '2 ierfc(x)',
    of: ({ inputs: { x } }) => 2 * Math.exp(-(Number(x) ** 2)) * ierfcx(Number(x)),
  },
  {
    takes: (k) => k.quantity === '4 i2erfc(x)',
    of: ({ inputs: { x } }) => 4 * Math.exp(-(Number(x) ** 2)) * i2erfcx(Number(x)),
  },
  { takes: (k) => k.quantity === 'exp(x^2) erfc(x)', of: (k) => erfcx(Number(k.inputs['x'])) },
  {
    takes: (k) => k.inputs['equation'] === 'alpha tan alpha = C',
    of: (k) => slabEigenvalue(Number(k.inputs['C']), Number(k.inputs['root']) - 1),
  },
  {
    takes: (k) => k.inputs['equation'] === 'alpha cot alpha + C = 0',
    of: (k) => sphereEigenvalue(Number(k.inputs['C']) + 1, Number(k.inputs['root']) - 1),
  },
  {
    takes: (k) => k.inputs['equation'] === 'alpha J1(alpha) = C J0(alpha)',
    of: (k) => cylinderEigenvalue(Number(k.inputs['C']), Number(k.inputs['root']) - 1).root,
  },
  {
    takes: (k) => k.quantity === 'zeta1',
    of: (k) => rootOf(shapes[k.inputs['geometry']!]!, Number(k.inputs['biot']), 0),
  },
  {
    takes: (k) => k.quantity === 'C1',
    of: (k) => coefficient(shapes[k.inputs['geometry']!]!, Number(k.inputs['biot'])),
  },
  {
    takes: (k) => k.quantity === 'fourier',
    of: ({ inputs: i }) =>
      (Number(i['diffusivity_m2_s']) * Number(i['time_s'])) / Number(i['half_thickness_m'] ?? i['radius_m']) ** 2,
  },
  {
    takes: (k) => k.quantity === 'temperature_axis_C',
    of: ({ inputs: i }) =>
      askSingle(
        'cylinder-convection',
        {
          conductivity: Number(i['conductivity_W_mK']),
          diffusivity: Number(i['diffusivity_m2_s']),
          radius: Number(i['radius_m']),
          filmCoefficient: Number(i['film_W_m2K']),
          initialTemperature: Number(i['initial_C']),
          ambientTemperature: Number(i['ambient_C']),
          radii: [0],
          times: [Number(i['time_s'])],
        },
        'temperature',
      ).value,
  },
  { takes: (k) => k.quantity === 'depth_m', of: (k) => frostDepth(k.inputs) },
  { takes: (k) => k.quantity === 'time_s', of: (k) => lumpedTime(k.inputs) },
]
/** Of melting, for which there is no case yet. */
const laterKept = (k: Kept) => k.quantity === 'lambda' && 'stefan_number' in k.inputs

describe('printed rows', () => {
  it('are each asked for once, or of a later case', () => {
    const takers = kept.map((k) => printedKinds.filter(({ takes }) => takes(k)).length + Number(laterKept(k)))
    expect(kept.filter((_, i) => takers[i] !== 1)).toEqual([])
    expect(kept.filter(laterKept)).toHaveLength(2)
  })

  it('are met to their recomputed digits', () => {
    const off = kept.flatMap((k) => {
      const kind = printedKinds.find(({ takes }) => takes(k))
      if (!kind) return []
      const [value, exact] = [kind.of(k), Number(k.recomputed)]
      return Math.abs(value / exact - 1) <= 2e-10 ? [] : [`${k.quantity} ${k.item}: ${value}, not ${exact}`]
    })
    expect(off).toEqual([])
  })
})

/** Checks of cases and operations that do not exist yet, and what of them is older than a case. */
const later = new Set(
  checks
    .filter(({ case: id }) =>
      /^(nominal-fire|freezing|hydration|flash-method|steady-rectangle|ground-annual|layered-wall)/.test(id),
    )
    .map(({ id }) => id),
)

describe('recomputed checks', () => {
  it('are of cases that exist, of a piece of one, or of a later one', () => {
    const known = new Set([...cases.map(({ id }) => id), 'slab-one-face-insulated', 'semi-infinite-periodic'])
    expect(checks.filter(({ case: id, id: row }) => !known.has(id) && !later.has(row))).toEqual([])
    for (const { case: id } of checks.filter(({ id: row }) => later.has(row))) expect(known.has(id)).toBe(false)
  })

  const byId = new Map(checks.map((row) => [row.id, row]))
  const asked = new Set<string>()
  const exactOf = (id: string) => {
    asked.add(id)
    return byId.get(id)!.verified_value
  }
  const met = (id: string, value: number, digits = 1e-10) => {
    const exact = exactOf(id)
    expect(Math.abs(value / exact - 1), `${id}: ${value}, not ${exact}`).toBeLessThanOrEqual(digits)
  }

  it('of roots and coefficients are met', () => {
    const rows = checks.filter(({ id }) => /^(eig|coef)-/.test(id))
    expect(rows.length).toBeGreaterThan(15)
    for (const { id, inputs } of rows) {
      const [, kind, shape] = /^(eig|coef)-(slab|cylinder|sphere)/.exec(id)!
      const biot = Number(inputs['biot'])
      met(id, kind === 'eig' ? rootOf(shape!, biot, 0) : coefficient(shape!, biot))
    }
  })

  it('of the short cylinders, the end of a long one, and shaft and aluminium are met', () => {
    const brass = { conductivity: 110, diffusivity: 3.39e-5, radius: 0.05, height: 0.12, heightFaces: 2 }
    const cooled = { filmCoefficient: 60, initialTemperature: 120, ambientTemperature: 25, times: [900] }
    const short = (z: number) =>
      askSingle('short-cylinder-convection', { ...brass, ...cooled, points: [{ r: 0, z }] }, 'temperature').value
    met('cen-short-brass-centre', short(0))
    met('cen-short-brass-end', short(0.06))
    const long = { conductivity: 237, diffusivity: 9.71e-5, radius: 0.1, filmCoefficient: 120, times: [300] }
    const end = { ...long, initialTemperature: 200, ambientTemperature: 15, points: [{ x: 0.15, r: 0 }] }
    met('cen-long-cylinder-end', askSingle('semi-infinite-bar-end', end, 'temperature').value)
    const aluminium = { conductivity: 215, diffusivity: 8.4e-5, initialTemperature: 200, surfaceTemperature: 70 }
    const heat = askSingle('semi-infinite-surface-temperature', { ...aluminium, times: [37.72] }, 'heatGained').value
    met('hol-aluminium-heat', -heat)
    const reached = { ...aluminium, depths: [0.04], times: [exactOf('hol-aluminium-time')] }
    expect(askSingle('semi-infinite-surface-temperature', reached, 'temperature').value).toBeCloseTo(120, 8)
    const steel = { conductivity: 45, diffusivity: 1.4e-5, initialTemperature: 35, surfaceTemperature: 250 }
    met(
      'hol-steel-step',
      askSingle('semi-infinite-surface-temperature', { ...steel, depths: [0.025], times: [30] }, 'temperature').value,
    )
  })

  it('of contact, of a line against its logarithm and against a cylinder, and of cycles are met', () => {
    const body = (T: number) => ({ conductivity: 1, volumetricHeatCapacity: 1e6, initialTemperature: T })
    const touch = { ...body(34), other: body(20), times: [1] }
    met('contact-equal-effusivity', askSingle('semi-infinite-contact', touch, 'contactTemperature').value)
    const line = { ...solid, initialTemperature: 0, linePower: 4 * Math.PI, radii: [1] }
    const rise = askSingle('line-source', { ...line, times: [5] }, 'temperature').value
    met('line-source-log-20', (Math.log(20) - 0.5772156649015329) / rise - 1, 1e-9)
    const cylinder = { ...solid, initialTemperature: 0, radius: 1, radii: [1], times: [5] }
    const boundary = { kind: 'line-power', linePower: 4 * Math.PI }
    const around = askSingle('cylinder-in-infinite-medium', { ...cylinder, boundary }, 'temperature').value
    expect(
      [Math.abs(rise / around - 1), Math.abs(around / rise - 1)].some(
        (d) => Math.abs(d - exactOf('line-vs-cylinder-fo5')) < 1e-8,
      ),
    ).toBe(true)
    const concrete = {
      conductivity: 2,
      density: 2400,
      specificHeat: 1000,
      cycleMean: 0,
      amplitude: 1,
      timeOfMaximum: 0,
    }
    const day = { ...concrete, period: 86_400, depths: [0], times: [0] }
    met('iso13786-delta-concrete', askSingle('semi-infinite-periodic-surface', day, 'dampingDepth').value)
    const wave = { ...solid, cycleMean: 0, amplitude: 1, timeOfMaximum: 0, period: Math.PI, times: [0] }
    met(
      'periodic-phase-reversal',
      askSingle('semi-infinite-periodic-surface', { ...wave, depths: [2 * Math.PI] }, 'amplitude').value,
    )
  })

  it('of bodies held at their face are met', () => {
    const wall = { ...solid, ...step, thickness: 1, exposedFaces: 2, depths: [0.5] }
    const half = { ...wall, times: [exactOf('crank-half-time')] }
    expect(askSingle('slab-surface-temperature', half, 'heatFraction').value).toBeCloseTo(0.5, 10)
    for (const [id, body] of [
      ['slab-surface-temperature', { thickness: 2, exposedFaces: 2, depths: [1] }],
      ['sphere-surface-temperature', { radius: 1, radii: [0] }],
    ] as const) {
      const z = id.startsWith('slab') ? Math.PI / 2 : Math.PI
      const late = askSingle(id, { ...solid, ...step, ...body, times: [4] }, 'remainingFraction').value
      met(id.startsWith('slab') ? 'food-j-slab' : 'food-j-sphere', late * Math.exp(z * z * 4))
    }
  })

  it('of repeated integrals, a sunlit block, a shaft, an egg, a main and the age of the earth are met', () => {
    for (const { id, inputs } of checks.filter(({ id }) => id.startsWith('cj-ierfc')))
      met(id, Math.exp(-(Number(inputs['x']) ** 2)) * ierfcx(Number(inputs['x'])))
    met('cj-4i2erfc-0.5', 4 * Math.exp(-0.25) * i2erfcx(0.5))
    const block = { conductivity: 237, diffusivity: 9.71e-5, imposedHeatFlux: 1250, initialTemperature: 20 }
    met(
      'cen-flux-aluminium',
      askSingle('semi-infinite-surface-flux', { ...block, depths: [0], times: [1200] }, 'temperature').value,
    )
    const shaft = { conductivity: 14.9, diffusivity: 3.95e-6, radius: 0.1, filmCoefficient: 80, radii: [0] }
    const hot = { ...shaft, initialTemperature: 600, ambientTemperature: 200, times: [2700] }
    met('cen-steel-shaft-centre', askSingle('cylinder-convection', hot, 'temperature').value)
    const egg = { conductivity: 0.627, diffusivity: 1.51e-7, radius: 0.025, filmCoefficient: 1200, radii: [0] }
    const boiled = { ...egg, initialTemperature: 5, ambientTemperature: 95, times: [exactOf('cen-egg-time')] }
    expect(askSingle('sphere-convection', boiled, 'temperature').value).toBeCloseTo(70, 8)
    const soil = { conductivity: 1, diffusivity: 1.38e-7, initialTemperature: 20, surfaceTemperature: -15 }
    const main = { ...soil, depths: [exactOf('inc-water-main-depth')], times: [5_184_000] }
    expect(askSingle('semi-infinite-surface-temperature', main, 'temperature').value).toBeCloseTo(0, 8)
    // In feet and hundredths of a year: the gradient at the face is 0.02 °F a foot.
    const earth = { conductivity: 1, diffusivity: 4, initialTemperature: 7000, surfaceTemperature: 0 }
    const old = { ...earth, times: [100 * exactOf('kelvin-age')] }
    expect(askSingle('semi-infinite-surface-temperature', old, 'surfaceHeatFlux').value).toBeCloseTo(-0.02, 12)
  })

  it('of a pipeline, a stubby cylinder, walls and food are met', () => {
    const pipe = { conductivity: 63.9, density: 7832, specificHeat: 434, thickness: 0.04, exposedFaces: 1 }
    const wet = { ...pipe, diffusivity: 1.88e-5, density: undefined, specificHeat: undefined, filmCoefficient: 500 }
    const oil = { ...wet, initialTemperature: -20, ambientTemperature: 60, times: [480] }
    const at = (depth: number) => askSingle('slab-convection', { ...oil, depths: [depth] }, 'temperature').value
    met('inc-pipeline-wetted-face', at(0))
    met('inc-pipeline-insulated-face', at(0.04))
    const share = askSingle('slab-convection', oil, 'heatFraction').value
    met('inc-pipeline-energy', share * 7832 * 434 * 0.04 * 80 * Math.PI)
    const stubby = { conductivity: 17.4, density: 7900, specificHeat: 526, radius: 0.04, height: 0.06, heightFaces: 2 }
    const cooled = { ...stubby, filmCoefficient: 500, initialTemperature: 600, ambientTemperature: 300, times: [180] }
    const there = (z: number) =>
      askSingle('short-cylinder-convection', { ...cooled, points: [{ r: 0, z }] }, 'temperature').value
    met('inc-short-cylinder-centre', there(0))
    met('inc-short-cylinder-end-axis', there(0.03))
    for (const [id, thickness, unit] of [
      ['aci-wall-stable-0.1524m', 0.1524, 3600],
      ['aci-wall-stable-15.24m', 15.24, 365.25 * 86_400],
    ] as const) {
      const wall = { conductivity: 1, diffusivity: 1.03e-6, ...step, thickness, exposedFaces: 2 }
      const lost = askSingle('slab-surface-temperature', { ...wall, times: [unit * exactOf(id)] }, 'heatFraction').value
      expect(lost).toBeCloseTo(0.95, 3)
    }
    met('food-f-slab', Math.LN10 / (Math.PI / 2) ** 2)
    met('food-f-cylinder', Math.LN10 / cylinderEigenvalue(Infinity, 0).root ** 2)
  })

  /** Rows that other files ask for, by their name or by that of their case. */
  const elsewhere: [RegExp, string, string][] = [
    [
      /^(inc-(sphere-air|thermocouple)|cj-(exp-erfc|root)|cen-(steak|brass-plate)|one-term)/,
      'published.test.ts',
      "'semi-infinite-convection', 'slab-convection'",
    ],
    [/^crank-time-lag$/, 'slabs.test.ts', 'crank-time-lag'],
  ]
  /** Rows of no solver, each with the reason. */
  const none: Record<string, string> = {
    'egg-williams': 'a printed formula with a rounded coefficient of its own',
    'inc-qstar-sphere-short': 'what an approximation is off that is not used here',
    'iso13786-effective-thickness': 'a thickness at which the admittance is largest; no question asks for it',
  }

  it('are each asked for here or in another file, or left out for a reason', () => {
    for (const [, file, text] of elsewhere) expect(readFileSync(new URL(file, import.meta.url), 'utf8')).toContain(text)
    const open = checks.filter(
      ({ id }) => !asked.has(id) && !later.has(id) && !elsewhere.some(([ids]) => ids.test(id)) && !(id in none),
    )
    expect(open.map(({ id }) => id)).toEqual([])
    expect(Object.keys(none).every((id) => byId.has(id) && !asked.has(id))).toBe(true)
  })
})
