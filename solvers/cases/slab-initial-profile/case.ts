import { heatBalance } from '../../bodies/heat-balance.ts'
import { defineCase, type Resolved } from '../../case.ts'
import { solid, thickness } from '../../statement/fields.ts'
import { isSound } from '../../statement/initial-profile.ts'
import { initialProfile } from '../../statement/initial-profile-field.ts'
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
import { problemOf, type ProfileInput, solve } from './solve.ts'

type ProfileResolved = ProfileInput & Resolved

const fields = { ...solid, thickness, initialProfile, left: sideField('Left side'), right: sideField('Right side') }

const NO_END =
  'Both sides pass no heat of themselves, so what their fluxes bring in or take out has no end; see driftRate.'

export default defineCase<typeof fields, ProfileResolved>({
  id: 'slab-initial-profile',
  title: 'Slab from an initial profile',
  summary: 'A flat body starts from a temperature that differs along it, between any two sides.',
  notes:
    'For a body that was measured at several depths, two plates at their own temperatures brought together, a pane after a wash of heat on one side, and every restart after a change. The profile is linear between its depths, from 0 to the thickness; a jump is the same depth twice, and at time 0 the temperature there is the mean of both. Each side is held at a temperature, in a fluid behind a film, heated by a flux, or insulated. Depths count from the left face. The properties are those of one material throughout.',
  formula: [
    'T = T_\\infty(x) + \\sum_n c_n\\,\\varphi_n(x/d)\\,e^{-z_n^2 \\mathrm{Fo}}, \\qquad c_n = \\frac{\\int (f - T_\\infty)\\,\\varphi_n\\,dX}{\\int \\varphi_n^2\\,dX}, \\qquad \\mathrm{Fo} = \\frac{at}{d^2}',
    '\\varphi_n(X) = \\cos z_n X + \\frac{\\mathrm{Bi}_1}{z_n} \\sin z_n X, \\qquad z_n - n\\pi - \\arctan\\frac{\\mathrm{Bi}_1}{z_n} - \\arctan\\frac{\\mathrm{Bi}_2}{z_n} = 0',
  ],
  sources: [
    'H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, sections 3.3 and 3.10',
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
    remainingFraction: 'The start differs from place to place, so there is no one difference to give a share of.',
    completedFraction: 'The start differs from place to place, so there is no one difference to give a share of.',
    heatFraction: 'The heat gained may pass its end value and come back.',
    timeConstant: 'The body has many time constants; the slowest stands in numbers.slowestTimeConstant.',
  },
  weight: 1,
  setUp: 3,
  cautions: ['envelope', 'concrete', 'general'],
  example: {
    conductivity: 2.3,
    volumetricHeatCapacity: 2.4e6,
    thickness: 0.8,
    initialProfile: { depths: [0, 0.2, 0.4, 0.6, 0.8], temperatures: [31, 44, 49, 45, 33] },
    left: { kind: 'convection', ambientTemperature: 8, filmCoefficient: 22 },
    right: { kind: 'convection', ambientTemperature: 8, filmCoefficient: 6 },
    depths: [0, 0.4, 0.8],
    times: [3600, 86400],
  },
  variants: [
    {
      title: 'A hot plate laid on a cold one, both insulated outside, all outputs',
      input: {
        conductivity: 45,
        density: 7800,
        specificHeat: 470,
        thickness: 0.03,
        initialProfile: { depths: [0, 0.01, 0.01, 0.03], temperatures: [400, 400, 20, 20] },
        left: { kind: 'insulated' },
        right: { kind: 'insulated' },
        depths: [0, 0.01, 0.03],
        times: [1, 10],
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
      title: 'A wall that was steady in winter, after both sides changed',
      input: {
        conductivity: 0.6,
        diffusivity: 4e-7,
        thickness: 0.3,
        initialProfile: { depths: [0, 0.3], temperatures: [17.4, -3.2] },
        left: { kind: 'temperature', surfaceTemperature: 22 },
        right: { kind: 'flux', imposedHeatFlux: 120 },
        depths: [0, 0.15, 0.3],
        times: [7200, 172_800],
      },
    },
  ],
  resolve(input, refuse): ProfileResolved {
    const body = resolveSolid(input, refuse)
    const { thickness, left, right, initialProfile, times, outputs } = input
    const resolved = { ...body!, thickness, left, right, initialProfile, depths: input.depths ?? [], times, outputs }
    const net = netFlux(resolved)
    if (net !== undefined && net !== 0) refuseSteady(outputs, NO_END, refuse)
    if (isSound(initialProfile, thickness, refuse)) refuseFluxAtJump(problemOf(resolved), resolved, refuse)
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
