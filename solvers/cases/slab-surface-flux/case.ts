import { heatBalance } from '../../bodies/heat-balance.ts'
import { defineCase, type Resolved } from '../../case.ts'
import { imposedHeatFlux, initialTemperature, solid, thickness } from '../../statement/fields.ts'
import { quantity } from '../../statement/quantity.ts'
import { passesNoHeat } from '../../statement/side.ts'
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
import { problemOf, solve, type SurfaceFluxInput } from './solve.ts'

type SurfaceFluxResolved = SurfaceFluxInput & Resolved

const fields = {
  ...solid,
  thickness,
  initialTemperature,
  imposedHeatFlux,
  pulseDuration: quantity({
    symbol: 'tₚ',
    unit: 's',
    label: 'Pulse duration',
    min: 1e-9,
    max: 1e17,
    typical: [1e-3, 1e8],
    hint: 'the flux acts as long, then the face is insulated; left out, it never ends',
  }).optional(),
  back: sideField('Back side'),
}

const NO_END =
  'The back passes no heat of itself, so there is no end that the sides would hold the body at; see driftRate.'

export default defineCase<typeof fields, SurfaceFluxResolved>({
  id: 'slab-surface-flux',
  title: 'Slab, constant heat flux',
  summary: 'A flat body takes up a constant heat flux at one face; its back is free, held, heated or insulated.',
  notes:
    'For heated screeds and panels, heating foils, sun on a sheet, hot plates and flash tests. The flux enters at depth 0, the back is at depth thickness and is held at a temperature, in a fluid behind a film, heated by a flux of its own, or insulated. With pulseDuration the flux acts for that long and the face is insulated afterwards; at the end of the pulse itself it still acts. With an insulated back the mean rises for ever at numbers.driftRate. A flux that a film carries away again at the same face is the slab between two sides with imposedHeatFlux.',
  formula: [
    'T - T_i = \\frac{q_0 d}{k} \\left[\\mathrm{Fo} + \\frac{3 (1 - X)^2 - 1}{6} - \\frac{2}{\\pi^2} \\sum_n \\frac{\\cos n\\pi X}{n^2}\\,e^{-n^2 \\pi^2 \\mathrm{Fo}}\\right]\\ \\text{with an insulated back}, \\qquad X = \\frac{x}{d}, \\qquad \\mathrm{Fo} = \\frac{at}{d^2}',
    'T = T_\\infty(x) + \\sum_n c_n \\cos(z_n X)\\,e^{-z_n^2 \\mathrm{Fo}}, \\qquad z_n \\tan z_n = \\mathrm{Bi} = \\frac{hd}{k}\\ \\text{of the back}',
    '\\text{after a pulse of duration } t_p:\\quad T(t) - T(t - t_p)',
  ],
  sources: [
    'H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, sections 3.8 and 3.10',
    'H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 12.5',
  ],
  family: 'slab',
  sketch: { body: 'slab', boundary: 'flux' },
  fields,
  places: 'depths',
  depthsEndAt: 'thickness',
  outputs: {
    temperature: {},
    heatFlux: {},
    surfaceHeatFlux: {},
    backHeatFlux: {},
    heatGained: {},
    meanTemperature: {},
    steadyTemperature: { shape: 'places' },
  },
  absentOutputs: {
    remainingFraction: 'Under a flux each place has its own end, or none, so there is no share to give.',
    completedFraction: 'Under a flux each place has its own end, or none, so there is no share to give.',
    heatFraction: 'Under a flux the heat gained has an end of its own for each back, or none.',
    timeConstant: 'The body has many time constants; the slowest stands in numbers.slowestTimeConstant.',
  },
  weight: 1,
  setUp: 3,
  cautions: ['control', 'general'],
  example: {
    conductivity: 1.4,
    volumetricHeatCapacity: 2e6,
    thickness: 0.07,
    initialTemperature: 17,
    imposedHeatFlux: 75,
    back: { kind: 'convection', ambientTemperature: 19, filmCoefficient: 10.8 },
    depths: [0, 0.07],
    times: [3600, 21600],
  },
  variants: [
    {
      title: 'A flash on a specimen with an insulated back',
      input: {
        conductivity: 14,
        density: 7900,
        specificHeat: 500,
        thickness: 0.002,
        initialTemperature: 25,
        imposedHeatFlux: 2e7,
        pulseDuration: 0.0005,
        back: { kind: 'insulated' },
        depths: [0, 0.002],
        times: [0.0004, 0.2, 2],
        outputs: ['temperature', 'heatFlux', 'surfaceHeatFlux', 'heatGained', 'meanTemperature'],
      },
    },
    {
      title: 'Two hours of heating, then cooling through the back, all outputs',
      input: {
        conductivity: 0.21,
        diffusivity: 3e-7,
        thickness: 0.025,
        initialTemperature: 20,
        imposedHeatFlux: 90,
        pulseDuration: 7200,
        back: { kind: 'convection', ambientTemperature: 20, filmCoefficient: 7.7 },
        depths: [0, 0.0125],
        times: [3600, 10_800],
        outputs: [
          'temperature',
          'heatFlux',
          'surfaceHeatFlux',
          'backHeatFlux',
          'heatGained',
          'meanTemperature',
          'steadyTemperature',
        ],
      },
    },
  ],
  resolve(input, refuse): SurfaceFluxResolved {
    const body = resolveSolid(input, refuse)
    const { thickness, initialTemperature, imposedHeatFlux, pulseDuration, back, times, outputs } = input
    const resolved = {
      ...body!,
      thickness,
      initialTemperature,
      imposedHeatFlux,
      ...(pulseDuration === undefined ? {} : { pulseDuration }),
      back,
      depths: input.depths ?? [],
      times,
      outputs,
    }
    if (passesNoHeat(back)) refuseSteady(outputs, NO_END, refuse)
    refuseFluxAtJump(problemOf(resolved), resolved, refuse)
    return resolved
  },
  solve,
  end({ back, pulseDuration, initialTemperature, imposedHeatFlux, volumetricHeatCapacity, thickness }) {
    if (back.kind !== 'insulated' || pulseDuration === undefined) return undefined
    return initialTemperature + (imposedHeatFlux * pulseDuration) / (volumetricHeatCapacity * thickness)
  },
  numbers(input) {
    const problem = problemOf(input)
    // After a pulse only the back goes on.
    const lasting =
      input.pulseDuration === undefined ? problem : { left: { kind: 'insulated' as const }, right: input.back }
    const net = netFlux(lasting)
    const drift = net ? { driftRate: net / (input.volumetricHeatCapacity * input.thickness) } : {}
    return { ...twoSidedNumbers(problem), ...drift }
  },
  checks: (input) => [
    insideCheck(input.depths, input.thickness),
    ...heatBalance(
      solve,
      input,
      { surfaceHeatFlux: 1, backHeatFlux: 1 },
      { instants: input.pulseDuration === undefined ? [] : [input.pulseDuration] },
    ),
  ],
  warnings: ({ back }) => sideWarnings(back),
})
