import { heatBalance } from '../../bodies/heat-balance.ts'
import { defineCase, type Resolved } from '../../case.ts'
import { exposedFaces, film, initialTemperature, solid, thickness } from '../../statement/fields.ts'
import { filmWarnings } from '../../statement/film.ts'
import { bathCourse, lateNumbers } from '../../bodies/late-course.ts'
import { fromFarFace } from '../../bodies/slab-step.ts'
import { quantity } from '../../statement/quantity.ts'
import { refuseFluxAtStep } from '../../bodies/singular.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { insideCheck } from '../../bodies/two-sided-case.ts'
import { bathLength, type BathInput, biotOf, ratioOf, solve } from './solve.ts'

type BathResolved = BathInput & Resolved

const fields = {
  ...solid,
  thickness,
  exposedFaces,
  initialTemperature,
  bathTemperature: quantity({
    symbol: 'T₀',
    unit: 'Cel',
    label: 'Bath temperature',
    min: -273.15,
    max: 1e4,
    typical: [-40, 100],
    hint: 'of the stirred fluid at time 0',
  }),
  bathHeatCapacity: quantity({
    symbol: 'C₀',
    unit: 'J/(m2.K)',
    label: 'Bath heat capacity',
    min: 1e-9,
    max: 1e12,
    typical: [1e3, 1e8],
    hint: 'for each m2 of one exposed face; 1 mm of water is 4190',
  }),
  filmCoefficient: film.filmCoefficient.optional(),
}

export default defineCase<typeof fields, BathResolved>({
  id: 'slab-finite-bath',
  title: 'Slab in a bath of finite capacity',
  summary: 'A flat body is dipped into a stirred bath so small that the body changes its temperature.',
  notes:
    'For quenching in small tanks, cooling food in water, calorimeters, and absorption tests by analogy. The bath has one temperature throughout, loses nothing to elsewhere, and its heat capacity is given for each m2 of one exposed face: with two exposed faces, half the bath. Without filmCoefficient the face is at the temperature of the bath. Body and bath come to equilibriumTemperature; the face passes it on the way and comes back, so there is no remaining fraction.',
  formula: [
    'T_\\infty = \\frac{\\gamma T_0 + T_i}{1 + \\gamma}, \\qquad \\gamma = \\frac{C_0}{\\rho c L}, \\qquad L = \\frac{d}{n}, \\qquad \\mathrm{Fo} = \\frac{at}{L^2}, \\qquad \\mathrm{Bi} = \\frac{hL}{k}',
    '\\frac{Q}{Q_0} = 1 - \\sum_n \\frac{2\\gamma (1 + \\gamma)}{E_n}\\,e^{-q_n^2 \\mathrm{Fo}}, \\qquad E_n = \\gamma + \\frac{\\gamma^2 q_n^2}{\\mathrm{Bi}} + \\left(1 - \\frac{\\gamma q_n^2}{\\mathrm{Bi}}\\right)^2 + \\gamma^2 q_n^2',
    '\\tan q_n = \\frac{\\gamma q_n \\mathrm{Bi}}{\\gamma q_n^2 - \\mathrm{Bi}}, \\qquad \\tan q_n = -\\gamma q_n\\ \\text{without a film}',
  ],
  sources: ['J. Crank, The Mathematics of Diffusion, 2nd ed. 1975, section 4.3.5 (from memory), with a film added'],
  family: 'slab',
  sketch: { body: 'slab', boundary: 'bath' },
  fields,
  places: 'depths',
  depthsEndAt: 'thickness',
  outputs: {
    temperature: {},
    heatFlux: {},
    surfaceHeatFlux: {},
    heatGained: {},
    meanTemperature: {},
    heatFraction: {},
    bathTemperature: {},
    equilibriumTemperature: {},
  },
  absentOutputs: {
    remainingFraction:
      'The face passes the equilibrium and comes back, so a share of the change is no measure; ask heatFraction.',
    completedFraction:
      'The face passes the equilibrium and comes back, so a share of the change is no measure; ask heatFraction.',
    steadyTemperature: 'Body and bath end at one temperature: ask equilibriumTemperature.',
    timeConstant: 'The body has many time constants; the slowest stands in numbers.slowestTimeConstant.',
  },
  weight: 1,
  setUp: 3,
  cautions: ['food', 'general'],
  example: {
    conductivity: 0.5,
    density: 1040,
    specificHeat: 3700,
    thickness: 0.03,
    exposedFaces: 2,
    initialTemperature: 62,
    bathTemperature: 8,
    bathHeatCapacity: 170_000,
    filmCoefficient: 450,
    depths: [0, 0.015],
    times: [300, 1800],
  },
  variants: [
    {
      title: 'The face at the temperature of the bath, all outputs',
      input: {
        conductivity: 48,
        diffusivity: 1.3e-5,
        thickness: 0.02,
        exposedFaces: 1,
        initialTemperature: 840,
        bathTemperature: 40,
        bathHeatCapacity: 900_000,
        depths: [0, 0.01, 0.02],
        times: [0.5, 10],
        outputs: [
          'temperature',
          'heatFlux',
          'surfaceHeatFlux',
          'heatGained',
          'meanTemperature',
          'heatFraction',
          'bathTemperature',
          'equilibriumTemperature',
        ],
      },
    },
  ],
  resolve(input, refuse): BathResolved {
    const body = resolveSolid(input, refuse)
    const { thickness, exposedFaces, initialTemperature, bathTemperature, bathHeatCapacity, filmCoefficient } = input
    const { times, outputs, depths = [] } = input
    if (filmCoefficient === undefined)
      refuseFluxAtStep(input, (depth) => depth === 0 || (exposedFaces === 2 && depth === thickness), refuse)
    return {
      ...body!,
      thickness,
      exposedFaces,
      initialTemperature,
      bathTemperature,
      bathHeatCapacity,
      ...(filmCoefficient === undefined ? {} : { filmCoefficient }),
      depths,
      times,
      outputs,
    }
  },
  solve,
  end(input) {
    if (input.filmCoefficient === 0) return input.initialTemperature
    const gamma = ratioOf(input)
    return input.initialTemperature + (input.bathTemperature - input.initialTemperature) * (gamma / (1 + gamma))
  },
  numbers(input) {
    const length = bathLength(input)
    const fourier = input.times.map((time) => (input.diffusivity / (length * length)) * time)
    const biot = input.filmCoefficient === undefined ? {} : { biot: biotOf(input) }
    if (input.filmCoefficient === 0) return { ...biot, fourier, length }
    const body = { diffusivity: input.diffusivity, length, biot: biotOf(input), gamma: ratioOf(input) }
    return { ...biot, fourier, length, ...lateNumbers(bathCourse(body, fromFarFace(input))) }
  },
  checks: (input) => [
    insideCheck(input.depths, input.thickness),
    {
      id: 'bath-is-finite',
      holds: ratioOf(input) < 100,
      value: ratioOf(input),
      limit: 100,
      text: 'Below a hundred times the heat capacity of the body, the bath changes by more than 1 % of the difference.',
    },
    ...heatBalance(solve, input, { surfaceHeatFlux: 1 }),
  ],
  warnings: ({ filmCoefficient }) => (filmCoefficient === undefined ? [] : filmWarnings(filmCoefficient)),
})
