import type { CaseDescription, Check, Resolved } from '../case.ts'
import type { Solution } from '../solution.ts'
import { film, initialTemperature, radius, solid, surfaceTemperature } from '../statement/fields.ts'
import { filmWarnings } from '../statement/film.ts'
import { resolveSolid } from '../statement/solid.ts'
import { heatBalance } from './heat-balance.ts'
import { heldNumbers } from './held-face.ts'
import { type FilmDrive, type Form, type HeldDrive, radialLateNumbers, type RadialStepInput } from './radial-step.ts'
import { refuseFluxAtStep } from './singular.ts'

/* What the descriptions of cylinders and spheres share. */

const roundFields = { ...solid, radius, initialTemperature }
const filmFields = { ...roundFields, ...film }
const heldFields = { ...roundFields, surfaceTemperature }

export type FilmRound = RadialStepInput & FilmDrive
export type HeldRound = RadialStepInput & HeldDrive

/** All of the outputs, with the unit of the heat: J/m of a cylinder, J of a sphere. */
function roundOutputs(heat: string) {
  return {
    temperature: {},
    heatFlux: {},
    surfaceHeatFlux: {},
    heatGained: { unit: heat },
    meanTemperature: {},
    remainingFraction: {},
    completedFraction: {},
    heatFraction: {},
  }
}

function absentOutputs(drive: string) {
  return {
    steadyTemperature: `The body ends at the ${drive} temperature, so there is nothing to compute.`,
    timeConstant:
      'The body has many time constants; only a body with one temperature has one. numbers holds the slowest.',
  }
}

export const allRoundOutputs = Object.keys(roundOutputs('J'))

const common = {
  family: 'round',
  places: 'depths-or-radii',
  depthsEndAt: 'radius',
  dimensionless: { radius: 1 },
  weight: 1,
  setUp: 3,
} as const

type Told = 'id' | 'title' | 'summary' | 'notes' | 'formula' | 'sources' | 'sketch' | 'cautions' | 'example'
type Shared<F extends typeof filmFields | typeof heldFields, R extends Resolved> = Omit<CaseDescription<F, R>, Told>

/** Of a body in a fluid from time 0 on. */
export function roundInFluid(
  form: Form,
  solve: (input: FilmRound) => Solution,
): Shared<typeof filmFields, FilmRound & Resolved> {
  return {
    ...common,
    fields: filmFields,
    drive: 'ambientTemperature',
    outputs: roundOutputs(form.heat),
    absentOutputs: absentOutputs('ambient'),
    resolve(input, refuse) {
      const body = resolveSolid(input, refuse)
      const { radius, filmCoefficient, initialTemperature, ambientTemperature, depths, radii, times, outputs } = input
      const own = { radius, filmCoefficient, initialTemperature, ambientTemperature }
      return { ...body!, ...own, ...(radii ? { radii } : { depths: depths ?? [] }), times, outputs }
    },
    solve,
    numbers(input) {
      const late = radialLateNumbers(form, input, biotOf(input))
      return { biot: biotOf(input), fourier: fourierOf(input), length: input.radius, ...late }
    },
    checks: (input) => [
      insideCheck(input),
      lumpedCheck(biotOf(input)),
      ...heatBalance(solve, input, { surfaceHeatFlux: form.surface(input.radius) }),
    ],
    warnings: (input) => filmWarnings(input.filmCoefficient),
  }
}

/** Of a body whose surface is held at a temperature from time 0 on. */
export function roundHeld(
  form: Form,
  solve: (input: HeldRound) => Solution,
): Shared<typeof heldFields, HeldRound & Resolved> {
  return {
    ...common,
    fields: heldFields,
    drive: 'surfaceTemperature',
    outputs: roundOutputs(form.heat),
    absentOutputs: absentOutputs('surface'),
    resolve(input, refuse) {
      const body = resolveSolid(input, refuse)
      const { radius, initialTemperature, surfaceTemperature, depths, radii, times, outputs } = input
      const places = radii ? radii.map((r) => radius - r) : depths
      refuseFluxAtStep({ times, depths: places, outputs }, (depth) => depth === 0, refuse)
      const own = { radius, initialTemperature, surfaceTemperature }
      return { ...body!, ...own, ...(radii ? { radii } : { depths: depths ?? [] }), times, outputs }
    },
    solve,
    numbers(input) {
      const late = radialLateNumbers(form, input, Infinity)
      return { fourier: fourierOf(input), length: input.radius, ...late, ...heldNumbers(input, input.radius) }
    },
    checks: (input) => [
      insideCheck(input),
      ...heatBalance(solve, input, { surfaceHeatFlux: form.surface(input.radius) }),
    ],
    warnings: () => [],
  }
}

const biotOf = (input: FilmRound) => (input.filmCoefficient * input.radius) / input.conductivity

function fourierOf({ radius: R, diffusivity, times }: RadialStepInput): number[] {
  return times.map((time) => (diffusivity / (R * R)) * time)
}

function insideCheck({ radius: R, depths, radii }: RadialStepInput): Check {
  return {
    id: 'place-inside-body',
    holds: true,
    value: (depths ?? radii ?? []).reduce((most, place) => Math.max(most, place), 0),
    limit: R,
    text: 'Every place lies inside the body.',
  }
}

function lumpedCheck(biot: number): Check {
  return {
    id: 'one-temperature-would-not-do',
    holds: biot > 0.1,
    value: biot,
    limit: 0.1,
    text:
      biot > 0.1
        ? 'The temperature differs across the body (Biot number above 0.1), so this case is needed.'
        : 'The Biot number is at most 0.1: one temperature would do here, and lumped-convection gives it.',
  }
}
