import { heatBalance } from '../../bodies/heat-balance.ts'
import { defineCase, type Resolved } from '../../case.ts'
import { solid, thickness } from '../../statement/fields.ts'
import { resolveStart } from '../../statement/initial-profile.ts'
import { start } from '../../statement/initial-profile-field.ts'
import { sideField } from '../../statement/side-field.ts'
import { resolveSolid } from '../../statement/solid.ts'
import {
  insideCheck,
  netFlux,
  refuseFluxAtJump,
  refuseSteady,
  sideWarnings,
  twoSidedNumbers,
} from '../../bodies/two-sided-case.ts'
import { problemOf, solve, type TwoSidesInput } from './solve.ts'

type TwoSidesResolved = TwoSidesInput & Resolved

const fields = { ...solid, thickness, ...start, left: sideField('Left side'), right: sideField('Right side') }

const NO_END =
  'Both sides pass no heat of themselves, so what their fluxes bring in or take out has no end; see driftRate.'

export default defineCase<typeof fields, TwoSidesResolved>({
  id: 'slab-two-sides',
  title: 'Slab between two different sides',
  summary: 'A flat body has a different temperature, fluid or heat flux on either side.',
  notes:
    'For walls, windows, tank walls, doors and floors between two rooms or a room and the weather. Each side is held at a temperature, in a fluid behind a film (with a flux absorbed beside it, such as sun), heated by a flux, or insulated. Depths count from the left face. The body starts at one temperature or from an initialProfile; a change of film in mid-history is two solves, the second from the profile that the first ends with. Where neither side passes heat of itself there is no steady state: numbers.driftRate says how fast the mean goes on; where the two fluxes balance, the steady mean is the initial one.',
  formula: [
    'T = T_\\infty(x) + \\sum_n c_n\\,\\varphi_n(x/d)\\,e^{-z_n^2 \\mathrm{Fo}}, \\qquad \\varphi_n(X) = \\cos z_n X + \\frac{\\mathrm{Bi}_1}{z_n} \\sin z_n X',
    'z_n - n\\pi - \\arctan\\frac{\\mathrm{Bi}_1}{z_n} - \\arctan\\frac{\\mathrm{Bi}_2}{z_n} = 0, \\qquad \\mathrm{Bi} = \\frac{hd}{k}, \\qquad \\mathrm{Fo} = \\frac{at}{d^2}',
    'k\\,T\\prime(0) + q_1 = h_1\\,(T(0) - T_1)\\ \\text{at the left}, \\qquad -k\\,T\\prime(d) + q_2 = h_2\\,(T(d) - T_2)\\ \\text{at the right}',
  ],
  sources: [
    'H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 3.10',
    'H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 12.5',
  ],
  family: 'slab',
  sketch: { body: 'slab', boundary: 'two-sides' },
  fields,
  places: 'depths',
  depthsEndAt: 'thickness',
  outputs: {
    temperature: {},
    heatFlux: {},
    leftHeatFlux: {},
    rightHeatFlux: {},
    heatGained: {},
    meanTemperature: {},
    steadyTemperature: { shape: 'places' },
  },
  absentOutputs: {
    surfaceHeatFlux: 'There are two faces: ask leftHeatFlux or rightHeatFlux.',
    remainingFraction: 'With two drives each place has its own end, and a share would mean something else at each.',
    completedFraction: 'With two drives each place has its own end, and a share would mean something else at each.',
    heatFraction: 'With two drives the heat gained may pass its end value and come back.',
    timeConstant: 'The body has many time constants; the slowest stands in numbers.slowestTimeConstant.',
  },
  weight: 1,
  setUp: 3,
  cautions: ['envelope', 'general'],
  example: {
    conductivity: 0.81,
    density: 1800,
    specificHeat: 1000,
    thickness: 0.36,
    initialTemperature: 12,
    left: { kind: 'convection', ambientTemperature: 20, filmCoefficient: 7.7 },
    right: { kind: 'convection', ambientTemperature: -5, filmCoefficient: 25 },
    depths: [0, 0.18, 0.36],
    times: [3600, 86400],
  },
  variants: [
    {
      title: 'Sun on one side, the other held, all outputs',
      input: {
        conductivity: 1.6,
        volumetricHeatCapacity: 2.2e6,
        thickness: 0.2,
        initialTemperature: 18,
        left: { kind: 'convection', ambientTemperature: 24, filmCoefficient: 20, imposedHeatFlux: 450 },
        right: { kind: 'temperature', surfaceTemperature: 18 },
        depths: [0, 0.1],
        times: [1800, 14400],
        outputs: [
          'temperature',
          'heatFlux',
          'leftHeatFlux',
          'rightHeatFlux',
          'heatGained',
          'meanTemperature',
          'steadyTemperature',
        ],
      },
    },
    {
      title: 'A flux on one side, insulated on the other: it goes on warming',
      input: {
        conductivity: 50,
        density: 7800,
        specificHeat: 450,
        thickness: 0.04,
        initialTemperature: 20,
        left: { kind: 'flux', imposedHeatFlux: 12_000 },
        right: { kind: 'insulated' },
        depths: [0, 0.04],
        times: [60, 1200],
        outputs: ['temperature', 'heatFlux', 'leftHeatFlux', 'heatGained', 'meanTemperature'],
      },
    },
    {
      title: 'After a change of film, from the profile it found',
      input: {
        conductivity: 2.3,
        volumetricHeatCapacity: 2.4e6,
        thickness: 1,
        initialProfile: { depths: [0, 0.25, 0.5, 1], temperatures: [36, 52, 59, 62] },
        left: { kind: 'convection', ambientTemperature: 10, filmCoefficient: 25 },
        right: { kind: 'insulated' },
        depths: [0, 0.5, 1],
        times: [3600, 43200],
      },
    },
  ],
  resolve(input, refuse): TwoSidesResolved {
    const body = resolveSolid(input, refuse)
    const { thickness, left, right, times, outputs } = input
    const from = resolveStart(input, thickness, refuse)
    const resolved = { ...body!, thickness, left, right, ...from!, depths: input.depths ?? [], times, outputs }
    const net = netFlux(resolved)
    if (net !== undefined && net !== 0) refuseSteady(outputs, NO_END, refuse)
    if (from) refuseFluxAtJump(problemOf(resolved), resolved, refuse)
    return resolved
  },
  solve,
  numbers(input) {
    const net = netFlux(input)
    const drift = net ? { driftRate: net / (input.volumetricHeatCapacity * input.thickness) } : {}
    return { ...twoSidedNumbers(problemOf(input)), ...drift }
  },
  checks: (input) => [
    insideCheck(input.depths, input.thickness),
    ...heatBalance(solve, input, { leftHeatFlux: 1, rightHeatFlux: 1 }),
  ],
  warnings: ({ left, right }) => sideWarnings(left, right),
})
