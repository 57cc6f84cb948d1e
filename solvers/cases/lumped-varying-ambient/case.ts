import { lumpedBalance } from '../../bodies/lumped-balance.ts'
import { phaseAt, waveAt } from '../../math/cycle-phase.ts'
import { ambientField, resolveAmbient } from '../../statement/ambient.ts'
import { type Check, defineCase, type Numbers, type Resolved } from '../../case.ts'
import { cycleEcho } from '../../statement/cycle.ts'
import { film, initialTemperature } from '../../statement/fields.ts'
import { filmWarnings } from '../../statement/film.ts'
import { biotWarnings, lumpedErrs, lumpedNumbers, oneTemperatureWillDo } from '../../bodies/lumped-biot.ts'
import { type LumpedBody, noBody, resolveBody } from '../../bodies/lumped-body.ts'
import { lumpedBody } from '../../statement/lumped-fields.ts'
import type { Ambient } from '../../math/lumped-response.ts'
import type { OutputName } from '../../outputs.ts'
import { solve, type VaryingInput } from './solve.ts'

interface VaryingResolved extends VaryingInput, Resolved {
  times: number[]
  outputs: OutputName[]
  filmCoefficient: number
  /** Absent where the body was not stated by shape and solid. */
  biot?: number
  body: LumpedBody
}

const fields = { ...lumpedBody, initialTemperature, filmCoefficient: film.filmCoefficient, ambient: ambientField }

const endless = 'The fluid does not come to rest, so the body has no end state.'

export default defineCase<typeof fields, VaryingResolved>({
  id: 'lumped-varying-ambient',
  title: 'One temperature, fluid that warms or cycles',
  summary: 'A body small or well mixed enough to have one temperature meets a fluid whose temperature changes.',
  notes:
    'For sensors that follow a changing fluid, tanks through a day and parts in a programmed oven. The ambient temperature rises evenly from start on (kind ramp), or follows a cycle (kind cycle). The body begins at its own initial temperature: the answer holds the way from there, not the settled cycle alone. State the body by heatCapacity and area; or by volume, the heat capacity of its solid, and area; or as a slab, cylinder or sphere with a full solid. Heat is for the body; with a shape per m2 of one exposed face (slab), per m (cylinder), or whole (sphere). In a ramp the body comes to lag the fluid by its time constant.',
  formula: [
    '\\tau\\,\\frac{dT}{dt} = T_a(t) - T, \\qquad T(0) = T_i, \\qquad \\tau = \\frac{C}{hA}',
    '\\text{ramp:}\\quad T = T_i + (T_a(0) - T_i)\\left(1 - e^{-t/\\tau}\\right) + r\\left[t - \\tau\\left(1 - e^{-t/\\tau}\\right)\\right]',
    '\\text{cycle:}\\quad T = T_i + (T_m - T_i)\\left(1 - e^{-t/\\tau}\\right) + \\frac{A}{(1 + \\omega^2\\tau^2)^{1/2}} \\left[\\cos(\\omega(t - t_+) - \\psi) - e^{-t/\\tau} \\cos(\\omega t_+ + \\psi)\\right], \\quad \\tan\\psi = \\omega\\tau',
  ],
  sources: [
    'F. P. Incropera, D. P. DeWitt, Fundamentals of Heat and Mass Transfer, chapter 5: the lumped capacitance method',
  ],
  family: 'lumped',
  sketch: { body: 'lumped', boundary: 'ramp' },
  fields,
  places: 'none',
  outputs: { temperature: {}, heatGained: { unit: 'J' } },
  absentOutputs: {
    heatFlux: 'A body with one temperature has no heat flux inside.',
    surfaceHeatFlux: 'Ask heatGained; the film carries h(Tₐ − T).',
    meanTemperature: 'The one temperature is the mean.',
    remainingFraction: endless,
    completedFraction: endless,
    heatFraction: endless,
    steadyTemperature: endless,
    timeConstant: 'Ask the case with a constant fluid; it is C/(hA).',
  },
  weight: 1,
  setUp: 0,
  cautions: ['food', 'control', 'general'],
  example: {
    heatCapacity: 420000,
    area: 1.5,
    filmCoefficient: 9,
    initialTemperature: 12,
    ambient: { kind: 'ramp', start: 15, rampRate: 0.0005 },
    times: [3600, 36000],
  },
  variants: [
    {
      title: 'A tank outdoors through the days',
      input: {
        volume: 0.4,
        volumetricHeatCapacity: 4.18e6,
        area: 3.2,
        filmCoefficient: 14,
        initialTemperature: 25,
        ambient: { kind: 'cycle', cycleMean: 16, amplitude: 8, period: 86400, timeOfMaximum: 54000 },
        times: [3600, 86400, 604800],
        outputs: ['temperature', 'heatGained'],
      },
    },
    {
      title: 'A steel ball in an oven that cools, with the mean correction',
      input: {
        body: 'sphere',
        radius: 0.03,
        conductivity: 16,
        density: 7900,
        specificHeat: 500,
        correction: 'mean',
        filmCoefficient: 30,
        initialTemperature: 20,
        ambient: { kind: 'ramp', start: 400, rampRate: -0.02 },
        times: [60, 3600],
        outputs: ['temperature', 'heatGained'],
      },
    },
    {
      title: 'A sheet in air that cycles, by the coldest instant',
      input: {
        body: 'slab',
        thickness: 0.003,
        exposedFaces: 2,
        conductivity: 150,
        diffusivity: 6e-5,
        filmCoefficient: 20,
        initialTemperature: 5,
        ambient: { kind: 'cycle', cycleMean: 20, amplitude: 4, period: 600, timeOfMinimum: 100 },
        times: [30, 6000],
      },
    },
  ],
  resolve(input, refuse): VaryingResolved {
    const { filmCoefficient, initialTemperature, times, outputs } = input
    const body = resolveBody(input, refuse) ?? noBody
    const ambient = resolveAmbient(input.ambient, refuse)
    const biot = body.solid && (filmCoefficient * body.length!) / body.solid.conductivity
    const film = input.correction === 'mean' ? filmCoefficient / (1 + biot! / (body.dimension! + 2)) : filmCoefficient
    const { capacity, area } = body
    return {
      body,
      capacity,
      conductance: film * area,
      filmCoefficient,
      ...(biot === undefined ? {} : { biot }),
      initialTemperature,
      ambient: ambient!,
      times,
      outputs,
    }
  },
  solve,
  echo({ body, filmCoefficient, initialTemperature, ambient, times, outputs }) {
    return { ...body.echo, filmCoefficient, initialTemperature, ambient: ambientEcho(ambient), times, outputs }
  },
  end: ({ conductance, initialTemperature }) => (conductance === 0 ? initialTemperature : null),
  numbers: (input) => ({ ...lumpedNumbers(input), ...settling(input) }),
  checks: (input) => [...oneTemperatureWillDo(input.biot), ...balance(input)],
  errs: lumpedErrs,
  warnings: ({ filmCoefficient, biot }) => [...filmWarnings(filmCoefficient), ...biotWarnings(biot)],
  unitOf: (output, { body }) => (output === 'heatGained' ? body.heatUnit : undefined),
})

function ambientEcho(ambient: Ambient): Record<string, unknown> {
  return ambient.kind === 'ramp' ? { ...ambient } : { kind: 'cycle', ...cycleEcho(ambient.cycle) }
}

/** What the film brings by the temperatures of fluid and body, over no more than a part of a cycle. */
function balance(input: VaryingResolved): Check[] {
  const { conductance, ambient } = input
  const flows = (time: number, T: number) => [conductance * (ambientAt(ambient, time) - T)]
  return lumpedBalance(solve, input, flows, ambient.kind === 'cycle' ? ambient.cycle.period / 4 : Infinity)
}

function ambientAt(ambient: Ambient, time: number): number {
  if (ambient.kind === 'ramp') return ambient.start + ambient.rampRate * time
  const { cycle } = ambient
  return cycle.cycleMean + cycle.sign * cycle.amplitude * waveAt(phaseAt(time, cycle), 0, 0).value
}

/** Cycles after which the start is forgotten to 1 % of the amplitude: it fades as one exponential. */
function settling({ capacity, conductance, ambient }: VaryingResolved): Numbers {
  if (ambient.kind !== 'cycle' || conductance === 0) return {}
  const cyclesToSettle = Math.ceil((Math.log(100) * (capacity / conductance)) / ambient.cycle.period)
  return Number.isFinite(cyclesToSettle) ? { cyclesToSettle } : {}
}
