import { heatBalance } from '../../bodies/heat-balance.ts'
import { defineCase, type Numbers, type Resolved } from '../../case.ts'
import type { Issue } from '../../errors.ts'
import { initialTemperature, solid } from '../../statement/fields.ts'
import { EPS } from '../../math/rounding.ts'
import type { OutputName } from '../../outputs.ts'
import { quantity } from '../../statement/quantity.ts'
import { fluxOf, passesNoHeat, type Side } from '../../statement/side.ts'
import { sideField } from '../../statement/side-field.ts'
import { lateNumbers } from '../../bodies/late-course.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { refuseSteady, sideWarnings } from '../../bodies/two-sided-case.ts'
import { lateOf } from './late.ts'
import { type HollowInput, momentOf, solve, wallOf } from './solve.ts'

type HollowResolved = HollowInput & Resolved

const size = { unit: 'm', min: 1e-9, max: 1e5, typical: [0.005, 5] } as const

const fields = {
  ...solid,
  innerRadius: quantity({ ...size, symbol: 'r₁', label: 'Inner radius', hint: 'of the hole' }),
  outerRadius: quantity({ ...size, symbol: 'r₂', label: 'Outer radius' }),
  initialTemperature,
  inner: sideField('Inner side'),
  outer: sideField('Outer side'),
}

const ALL: OutputName[] = [
  'temperature',
  'heatFlux',
  'innerHeatFlux',
  'outerHeatFlux',
  'heatGained',
  'meanTemperature',
  'steadyTemperature',
]

/** Below it the two radii, as they are given, no longer say how thick the wall is; above it the hole is a line. */
const THINNEST = 1.00001
const THICKEST = 1e4

const NO_END =
  'Neither side gives heat back, so what their fluxes bring in or take out has no end; see numbers.driftRate.'

export default defineCase<typeof fields, HollowResolved>({
  id: 'hollow-cylinder-convection',
  title: 'Hollow cylinder between two different sides',
  summary: 'A pipe, tube or round wall has a different temperature, fluid or heat flux inside and outside.',
  notes:
    'For pipes, insulation shells, chimneys, silos, tunnel linings and round tanks, long against their wall. Each face is held at a temperature, in a fluid behind a film (with a flux absorbed beside it, such as sun), heated by a flux, or insulated. Radii are measured from the axis; the local flux is positive outward, those of the faces into the body, each per m2 of its own face; heat is told per metre. Where neither side gives heat back there is no steady state: numbers.driftRate says how fast the mean goes on; where the two fluxes balance, the steady mean is the initial temperature. A wall thinner than 1/100000 of its radius is slab-two-sides, a hole smaller than 1/10000 of the body is cylinder-in-infinite-medium or cylinder-convection.',
  formula: [
    'T = T_\\infty(r) + \\sum_n c_n\\,\\varphi_n(r)\\,e^{-z_n^2 \\mathrm{Fo}}, \\qquad \\varphi_n = A_n J_0(z_n r/L) + B_n Y_0(z_n r/L)',
    '\\mathrm{Fo} = at/L^2, \\qquad L = r_2 - r_1',
    '-k\\,T\\prime(r_1) = h_1\\,(T_1 - T(r_1)) + q_1, \\qquad k\\,T\\prime(r_2) = h_2\\,(T_2 - T(r_2)) + q_2',
  ],
  sources: [
    'H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, sections 7.10 and 13.4',
    'J. A. C. Weideman, L. N. Trefethen, Mathematics of Computation 76 (2007), for the inversion at short times',
  ],
  family: 'round',
  sketch: { body: 'hollow-cylinder', boundary: 'two-sides' },
  fields,
  places: 'radii',
  depthsEndAt: 'outerRadius',
  radiiBeginAt: 'innerRadius',
  outputs: {
    temperature: {},
    heatFlux: { text: 'Local heat flux, positive outward.' },
    innerHeatFlux: {},
    outerHeatFlux: {},
    heatGained: { unit: 'J/m' },
    meanTemperature: {},
    steadyTemperature: { shape: 'places' },
  },
  absentOutputs: {
    surfaceHeatFlux: 'There are two faces: ask innerHeatFlux or outerHeatFlux.',
    remainingFraction: 'With two drives each place has its own end, and a share would mean something else at each.',
    completedFraction: 'With two drives each place has its own end, and a share would mean something else at each.',
    heatFraction: 'With two drives the heat gained may pass its end value and come back.',
    timeConstant: 'The body has many time constants; the slowest stands in numbers.slowestTimeConstant.',
  },
  weight: 20,
  setUp: 60,
  cautions: ['envelope', 'general'],
  example: {
    conductivity: 0.05,
    density: 90,
    specificHeat: 840,
    innerRadius: 0.057,
    outerRadius: 0.107,
    initialTemperature: 18,
    inner: { kind: 'temperature', surfaceTemperature: 85 },
    outer: { kind: 'convection', ambientTemperature: 18, filmCoefficient: 9 },
    radii: [0.057, 0.08, 0.107],
    times: [600, 7200],
  },
  variants: [
    {
      title: 'A concrete lining between hot gas and cool rock, all outputs',
      input: {
        conductivity: 1.8,
        volumetricHeatCapacity: 2.3e6,
        innerRadius: 3,
        outerRadius: 3.4,
        initialTemperature: 14,
        inner: { kind: 'convection', ambientTemperature: 55, filmCoefficient: 20, imposedHeatFlux: 30 },
        outer: { kind: 'convection', ambientTemperature: 12, filmCoefficient: 6 },
        radii: [3, 3.1, 3.4],
        times: [0, 3600, 864000],
        outputs: ALL,
      },
    },
    {
      title: 'A tube heated from outside, insulated within: it goes on warming',
      input: {
        conductivity: 50,
        density: 7800,
        specificHeat: 450,
        innerRadius: 0.04,
        outerRadius: 0.05,
        initialTemperature: 20,
        inner: { kind: 'insulated' },
        outer: { kind: 'flux', imposedHeatFlux: 5000 },
        radii: [0.04, 0.05],
        times: [5, 600],
        outputs: ['temperature', 'heatFlux', 'innerHeatFlux', 'outerHeatFlux', 'heatGained', 'meanTemperature'],
      },
    },
    {
      title: 'A wall held on both faces',
      input: {
        conductivity: 1.2,
        diffusivity: 6e-7,
        innerRadius: 0.2,
        outerRadius: 0.5,
        initialTemperature: 20,
        inner: { kind: 'temperature', surfaceTemperature: 60 },
        outer: { kind: 'temperature', surfaceTemperature: 20 },
        radii: [0.3],
        times: [3600, 86400],
        outputs: ALL,
      },
    },
  ],
  resolve(input, refuse): HollowResolved {
    const body = resolveSolid(input, refuse)
    const { innerRadius, outerRadius, inner, outer, initialTemperature, radii = [], times, outputs } = input
    const own = { innerRadius, outerRadius, inner, outer, initialTemperature, radii, times, outputs }
    const resolved = { ...body!, ...own }
    // Without a body there is nothing else to say of it.
    if (refuseShape(outerRadius / innerRadius, refuse)) return resolved
    if (driftOf(resolved) !== 0) refuseSteady(outputs, NO_END, refuse)
    refuseSingular(resolved, refuse)
    return resolved
  },
  solve,
  numbers,
  checks: (input) =>
    heatBalance(solve, input, {
      innerHeatFlux: 2 * Math.PI * input.innerRadius,
      outerHeatFlux: 2 * Math.PI * input.outerRadius,
    }),
  warnings: ({ inner, outer }) => sideWarnings(inner, outer),
})

function refuseShape(ratio: number, refuse: (issue: Issue) => void): boolean {
  // Either end of the range is given in decimals, and the ratio of two rounded radii may miss it.
  if (ratio >= THINNEST * (1 - 4 * EPS) && ratio <= THICKEST * (1 + 4 * EPS)) return false
  const thin = ratio < THINNEST
  const hint = thin
    ? 'A wall as thin as that is flat: ask slab-two-sides.'
    : 'A hole as small as that is a line: ask cylinder-in-infinite-medium or cylinder-convection.'
  const detail = `outerRadius is ${ratio.toPrecision(7)} times innerRadius. ${ratio <= 1 ? 'It must be the larger.' : hint}`
  const accepted = `${THINNEST} to ${THICKEST} times innerRadius`
  refuse({ pointer: '#/outerRadius', code: 'sizes-do-not-fit', detail, accepted })
  return true
}

/** Rate at which the mean goes on where neither side gives heat back, K/s; 0 where the fluxes balance or a side does. */
function driftOf({ inner, outer, innerRadius, outerRadius, volumetricHeatCapacity }: HollowResolved): number {
  if (!passesNoHeat(inner) || !passesNoHeat(outer)) return 0
  const [entering, leaving] = [innerRadius * fluxOf(inner), outerRadius * fluxOf(outer)]
  // Fluxes that balance in decimals do so in doubles but for their rounding.
  if (Math.abs(entering + leaving) <= 4 * EPS * Math.abs(entering)) return 0
  const area = (outerRadius - innerRadius) * (outerRadius + innerRadius)
  return (2 * (entering + leaving)) / area / volumetricHeatCapacity
}

/** A face stepped in temperature takes an infinite flux at time 0. */
function refuseSingular(input: HollowResolved, refuse: (issue: Issue) => void): void {
  const { inner, outer, innerRadius, outerRadius, initialTemperature, radii, times, outputs } = input
  const stepped = (side: Side) => side.kind === 'temperature' && side.surfaceTemperature !== initialTemperature
  const asks = (name: OutputName, radius: number) =>
    outputs.includes(name) || (outputs.includes('heatFlux') && radii.includes(radius))
  const infinite =
    (stepped(inner) && asks('innerHeatFlux', innerRadius)) || (stepped(outer) && asks('outerHeatFlux', outerRadius))
  if (!infinite) return
  times.forEach((time, i) => {
    if (time !== 0) return
    const detail = 'The heat flux at a face that is stepped in temperature is infinite at time 0.'
    refuse({ pointer: `#/times/${i}`, code: 'singular-at-time-zero', detail, accepted: 'a time above 0 s' })
  })
}

function numbers(input: HollowResolved): Numbers {
  const length = wallOf(input)
  const drift = driftOf(input)
  return {
    fourier: input.times.map((time) => momentOf(input, time).fourier),
    length,
    ...lateNumbers(lateOf(input)),
    ...(drift === 0 ? {} : { driftRate: drift }),
  }
}
