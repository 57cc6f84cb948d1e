import { lumpedBalance } from '../../bodies/lumped-balance.ts'
import { type Check, defineCase, type Resolved } from '../../case.ts'
import type { Issue } from '../../errors.ts'
import { film, initialTemperature } from '../../statement/fields.ts'
import { filmWarnings } from '../../statement/film.ts'
import { biotWarnings, lumpedErrs, lumpedNumbers, oneTemperatureWillDo } from '../../bodies/lumped-biot.ts'
import { type LumpedBody, noBody, resolveBody } from '../../bodies/lumped-body.ts'
import { lumpedBody } from '../../statement/lumped-fields.ts'
import type { OutputName } from '../../outputs.ts'
import { quantity } from '../../statement/quantity.ts'
import { solve, type LumpedInput } from './solve.ts'

interface LumpedResolved extends LumpedInput, Resolved {
  times: number[]
  outputs: OutputName[]
  filmCoefficient: number
  /** Absent where the body was not stated by shape and solid. */
  biot?: number
  body: LumpedBody
}

/** What the variants share. */
const outside = { filmCoefficient: 12, initialTemperature: 60, ambientTemperature: 20, times: [600, 7200] }

const fields = {
  ...lumpedBody,
  power: quantity({
    symbol: 'P',
    unit: 'W',
    label: 'Heat source',
    min: -1e15,
    max: 1e15,
    hint: 'released inside; without body only',
  }).optional(),
  initialTemperature,
  ...film,
}

export default defineCase<typeof fields, LumpedResolved>({
  id: 'lumped-convection',
  title: 'One temperature, convection',
  summary: 'A body small or well mixed enough to have one temperature meets a fluid at another.',
  notes:
    'For sensors, thin sheets, small parts and stirred tanks. State the body by heatCapacity and area; or by volume, the heat capacity of its solid, and area; or as a slab, cylinder or sphere with a full solid. With a shape, correction "mean" uses Bi/(1 + Bi/(n + 2)), n = 1, 2, 3, which follows the mean temperature to 1 % up to Bi 1; it is the mean only. Heat is for the body; with a shape per m2 of one exposed face (slab), per m (cylinder), or whole (sphere).',
  formula: [
    'T = T_i + \\left(T_a - T_i + \\frac{P}{hA}\\right) \\left(1 - e^{-t/\\tau}\\right), \\qquad \\tau = \\frac{C}{hA}',
    '\\text{mean correction:}\\quad h \\to \\frac{h}{1 + \\mathrm{Bi}/(n+2)}',
  ],
  sources: [
    'F. P. Incropera, D. P. DeWitt, Fundamentals of Heat and Mass Transfer, chapter 5: the lumped capacitance method',
  ],
  family: 'lumped',
  sketch: { body: 'lumped', boundary: 'convection' },
  fields,
  places: 'none',
  drive: 'ambientTemperature',
  outputs: {
    temperature: {},
    heatGained: { unit: 'J' },
    remainingFraction: {},
    completedFraction: {},
    heatFraction: {},
    steadyTemperature: {},
    timeConstant: {},
  },
  absentOutputs: {
    heatFlux: 'A body with one temperature has no heat flux inside.',
    surfaceHeatFlux: 'Ask heatGained; the film carries h(Tₐ − T).',
    meanTemperature: 'The one temperature is the mean.',
  },
  weight: 1,
  setUp: 0,
  cautions: ['food', 'control', 'general'],
  example: {
    heatCapacity: 627000,
    area: 1.8,
    filmCoefficient: 8,
    initialTemperature: 60,
    ambientTemperature: 20,
    times: [3600, 36000],
  },
  variants: [
    {
      title: 'A heated tank by its volume',
      input: {
        volume: 0.15,
        volumetricHeatCapacity: 4.18e6,
        area: 1.8,
        power: 400,
        ...outside,
        outputs: ['temperature', 'heatGained', 'steadyTemperature', 'timeConstant'],
      },
    },
    {
      title: 'A steel ball with the mean correction',
      input: {
        body: 'sphere',
        radius: 0.02,
        conductivity: 15,
        density: 7800,
        specificHeat: 460,
        correction: 'mean',
        ...outside,
      },
    },
    {
      title: 'A rod by its diffusivity',
      input: {
        body: 'cylinder',
        radius: 0.01,
        conductivity: 15,
        diffusivity: 4e-6,
        ...outside,
        outputs: ['temperature', 'remainingFraction', 'completedFraction', 'heatFraction'],
      },
    },
    {
      title: 'A sheet exposed at both faces',
      input: {
        body: 'slab',
        thickness: 0.004,
        exposedFaces: 2,
        conductivity: 50,
        density: 7800,
        specificHeat: 450,
        ...outside,
        outputs: ['temperature', 'heatGained'],
      },
    },
  ],
  resolve(input, refuse): LumpedResolved {
    const { filmCoefficient, initialTemperature, ambientTemperature, times, outputs, power = 0 } = input
    const body = resolveBody(input, refuse) ?? noBody
    refuseEndless(filmCoefficient, power, outputs, refuse)
    const biot = body.solid && (filmCoefficient * body.length!) / body.solid.conductivity
    const film = input.correction === 'mean' ? filmCoefficient / (1 + biot! / (body.dimension! + 2)) : filmCoefficient
    const { capacity, area } = body
    const step = { initialTemperature, ambientTemperature, times, outputs }
    return {
      ...step,
      body,
      capacity,
      conductance: film * area,
      power,
      filmCoefficient,
      ...(biot === undefined ? {} : { biot }),
    }
  },
  solve,
  echo({ body, filmCoefficient, initialTemperature, ambientTemperature, times, outputs }) {
    return { ...body.echo, filmCoefficient, initialTemperature, ambientTemperature, times, outputs }
  },
  numbers: lumpedNumbers,
  checks: (input) => [...oneTemperatureWillDo(input.biot), ...balance(input)],
  errs: lumpedErrs,
  warnings: ({ filmCoefficient, biot }) => [...filmWarnings(filmCoefficient), ...biotWarnings(biot)],
  unitOf: (output, { body }) => (output === 'heatGained' ? body.heatUnit : undefined),
})

/** Without a film a source heats for ever: no end state, and no fraction of one. */
function refuseEndless(
  film: number,
  power: number,
  outputs: readonly OutputName[],
  refuse: (issue: Issue) => void,
): void {
  if (film !== 0) return
  const endless: readonly OutputName[] = ['remainingFraction', 'completedFraction', 'heatFraction', 'steadyTemperature']
  const absent: readonly OutputName[] = power === 0 ? ['timeConstant'] : [...endless, 'timeConstant']
  outputs.forEach((name, i) => {
    if (!absent.includes(name)) return
    const detail = `"${name}": with a film coefficient of 0 ${power === 0 ? 'the body never changes' : 'and a source the body never settles'}.`
    refuse({ pointer: `#/outputs/${i}`, code: 'output-not-defined', detail, accepted: 'temperature, heatGained' })
  })
}

/** What the film brings by the temperature of the body, and the source. */
function balance(input: LumpedResolved): Check[] {
  const { conductance, ambientTemperature, power } = input
  return lumpedBalance(solve, input, (_, T) => [conductance * (ambientTemperature - T), power])
}
