import { heatBalance } from '../../bodies/heat-balance.ts'
import { z } from 'zod'
import { defineCase, type Resolved } from '../../case.ts'
import { exposedFaces, film, solid, thickness } from '../../statement/fields.ts'
import { filmWarnings } from '../../statement/film.ts'
import { resolveStart } from '../../statement/initial-profile.ts'
import { start } from '../../statement/initial-profile-field.ts'
import { quantity } from '../../statement/quantity.ts'
import { resolveSolid } from '../../statement/solid.ts'
import { insideCheck, refuseFluxAtJump, refuseSteady, twoSidedNumbers } from '../../bodies/two-sided-case.ts'
import type { Warning } from '../../warnings.ts'
import { type InternalHeatInput, lengthOf, problemOf, releasedBy, solve } from './solve.ts'

type InternalHeatResolved = InternalHeatInput & Resolved

const constantSource = z
  .strictObject({
    kind: z.literal('constant'),
    powerDensity: quantity({
      symbol: 'p',
      unit: 'W/m3',
      label: 'Power density',
      min: -1e12,
      max: 1e12,
      typical: [-1e6, 1e6],
      hint: 'released everywhere alike, from time 0 on',
    }),
  })
  .meta({ title: 'Constant', 'x-hint': 'electric heating, decay, respiration' })

const hydrationSource = z
  .strictObject({
    kind: z.literal('hydration'),
    adiabaticRise: quantity({
      symbol: 'ΔTₐ',
      unit: 'K',
      label: 'Adiabatic rise',
      min: 0,
      max: 1e4,
      typical: [10, 80],
      hint: 'of a body that loses nothing; concrete 35 to 60',
    }),
    timeConstant: quantity({
      symbol: 'τ',
      unit: 's',
      label: 'Time constant',
      min: 1e-6,
      max: 1e12,
      typical: [10_000, 400_000],
      hint: 'the rest to come falls to 1/e in it; concrete 12 to 30 h',
    }),
    elapsed: quantity({
      symbol: 'tₑ',
      unit: 's',
      label: 'Elapsed',
      min: 0,
      max: 1e17,
      hint: 'how long it has run at time 0, for a restart; default 0',
    }).optional(),
  })
  .meta({ title: 'Hydration', 'x-hint': 'a heat that dies out, as of cement' })

const fields = {
  ...solid,
  thickness,
  exposedFaces,
  ...start,
  ...film,
  source: z.discriminatedUnion('kind', [constantSource, hydrationSource]).meta({
    title: 'Source',
    description:
      'Source: heat released in the body, of kind constant (powerDensity) or hydration (adiabaticRise, timeConstant).',
    'x-hint': 'heat released in the body, evenly',
  }),
}

const NO_END = 'Without a film a constant power warms the body for ever; see driftRate.'

const filmStays = (value: number): Warning => ({
  code: 'film-constant',
  text: 'The film stays the same from start to end. If forms or covers come off on the way, solve to that time, then start again with the new film from the profile there (initialProfile, and elapsed in the source).',
  value,
})

export default defineCase<typeof fields, InternalHeatResolved>({
  id: 'slab-internal-heat',
  title: 'Slab, heat released inside',
  summary: 'A flat body is heated evenly from within, by a constant power or by hydration, and cooled by a fluid.',
  notes:
    'For concrete pours, heated plates, batteries, fermenting and stored goods. A hydration gives off what is left of its adiabatic rise in proportion to that rest, whatever the temperature, so a time constant measured at 20 degrees understates the first day of a warm pour; an isothermal and an adiabatic heat are not the same figure. heatGained is what the body stores, heatReleased what the source gives off; the difference has left through the faces. To change the film in mid-history, as when forms come off, solve to that time and start again from the profile, with elapsed in the source. Ask extremes for the peak and for the largest difference of two depths. The far side of a body with one exposed face is insulated; ground would take heat and lower the peak.',
  formula: [
    '\\rho c\\,\\frac{\\partial T}{\\partial t} = k\\,\\frac{\\partial^2 T}{\\partial x^2} + p, \\qquad p = \\text{constant}\\ \\text{or}\\ \\rho c\\,\\frac{\\Delta T}{\\tau}\\,e^{-(t + t_e)/\\tau}',
    'T_\\infty = T_a + \\frac{p L^2}{k} \\left[\\frac{1}{\\mathrm{Bi}} + \\frac{1 - X^2}{2}\\right], \\qquad X = 1 - \\frac{x}{L}, \\qquad L = \\frac{d}{n}',
    'T = T_a + U(X)\\,e^{-t/\\tau} + \\sum_n c_n \\cos(z_n X)\\,e^{-z_n^2 \\mathrm{Fo}}, \\qquad z_n \\tan z_n = \\mathrm{Bi} = \\frac{hL}{k}, \\qquad \\mathrm{Fo} = \\frac{at}{L^2}',
  ],
  sources: [
    'H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 3.14',
    'H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 12.5',
  ],
  family: 'slab',
  sketch: { body: 'slab', boundary: 'source' },
  fields,
  places: 'depths',
  depthsEndAt: 'thickness',
  outputs: {
    temperature: {},
    heatFlux: {},
    surfaceHeatFlux: {},
    meanTemperature: {},
    heatGained: {},
    heatReleased: {},
    steadyTemperature: { shape: 'places' },
  },
  absentOutputs: {
    remainingFraction: 'A source drives the body beside its fluid, so there is no one difference to give a share of.',
    completedFraction: 'A source drives the body beside its fluid, so there is no one difference to give a share of.',
    heatFraction: 'The heat gained may pass its end value and come back.',
    timeConstant: 'The body has many time constants; the slowest stands in numbers.slowestTimeConstant.',
  },
  weight: 1,
  setUp: 3,
  cautions: ['concrete', 'general'],
  example: {
    conductivity: 2.2,
    density: 2380,
    specificHeat: 1020,
    thickness: 1.2,
    exposedFaces: 1,
    initialTemperature: 18,
    ambientTemperature: 12,
    filmCoefficient: 6.5,
    source: { kind: 'hydration', adiabaticRise: 44, timeConstant: 68_400 },
    depths: [0, 0.6, 1.2],
    times: [86_400, 259_200],
  },
  variants: [
    {
      title: 'A constant power, all outputs',
      input: {
        conductivity: 0.4,
        volumetricHeatCapacity: 1.9e6,
        thickness: 0.05,
        exposedFaces: 2,
        initialTemperature: 20,
        ambientTemperature: 20,
        filmCoefficient: 15,
        source: { kind: 'constant', powerDensity: 9000 },
        depths: [0, 0.025, 0.04],
        times: [600, 7200],
        outputs: [
          'temperature',
          'heatFlux',
          'surfaceHeatFlux',
          'meanTemperature',
          'heatGained',
          'heatReleased',
          'steadyTemperature',
        ],
      },
    },
    {
      title: 'After the forms came off, from the profile there',
      input: {
        conductivity: 2.3,
        volumetricHeatCapacity: 2.4e6,
        thickness: 1,
        exposedFaces: 2,
        initialProfile: { depths: [0, 0.25, 0.5, 0.75, 1], temperatures: [38, 51, 55, 51, 38] },
        ambientTemperature: 5,
        filmCoefficient: 25,
        source: { kind: 'hydration', adiabaticRise: 48, timeConstant: 72_000, elapsed: 172_800 },
        depths: [0, 0.5, 0.9],
        times: [3600, 43_200],
      },
    },
  ],
  resolve(input, refuse): InternalHeatResolved {
    const body = resolveSolid(input, refuse)
    const { thickness, exposedFaces, filmCoefficient, ambientTemperature, source, times, outputs } = input
    const from = resolveStart(input, thickness, refuse)
    const own = { thickness, exposedFaces, filmCoefficient, ambientTemperature, source }
    const resolved = { ...body!, ...own, ...from!, depths: input.depths ?? [], times, outputs }
    const grows = filmCoefficient === 0 && source.kind === 'constant' && source.powerDensity !== 0
    if (grows) refuseSteady(outputs, NO_END, refuse)
    if (from && body) refuseFluxAtJump(problemOf(resolved), resolved, refuse)
    return resolved
  },
  solve,
  numbers(input) {
    const { filmCoefficient, source, volumetricHeatCapacity, conductivity, diffusivity, times } = input
    const length = lengthOf(input)
    const grows = filmCoefficient === 0 && source.kind === 'constant' && source.powerDensity !== 0
    return {
      ...twoSidedNumbers(problemOf(input)),
      biot: (filmCoefficient * length) / conductivity,
      fourier: times.map((time) => (diffusivity / (length * length)) * time),
      length,
      ...(grows ? { driftRate: source.powerDensity / volumetricHeatCapacity } : {}),
    }
  },
  checks(input) {
    const length = lengthOf(input)
    // Of a body that is solved whole, heat is told for one of its two faces.
    const share = length / problemOf(input).length
    const released = (time: number) => releasedBy(input, time) * length
    return [
      insideCheck(input.depths, input.thickness),
      ...heatBalance(solve, input, { surfaceHeatFlux: share, rightHeatFlux: share }, { released }),
    ]
  },
  warnings: ({ filmCoefficient }) => [filmStays(filmCoefficient), ...filmWarnings(filmCoefficient)],
})
