import type { Check, Resolved } from '../case.ts'
import { initialTemperature, radius, solid } from '../statement/fields.ts'
import type { RadialStepInput } from './radial-step.ts'

/* What the descriptions of cylinders and spheres share. */

export const roundFields = { ...solid, radius, initialTemperature }

/** All of the outputs, with the unit of the heat: J/m of a cylinder, J of a sphere. */
export function roundOutputs(heat: string) {
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

export function roundAbsentOutputs(drive: string) {
  return {
    steadyTemperature: `The body ends at the ${drive} temperature, so there is nothing to compute.`,
    timeConstant:
      'The body has many time constants; only a body with one temperature has one. numbers holds the slowest.',
  }
}

export const allRoundOutputs = Object.keys(roundOutputs('J'))

export type RadialResolved = RadialStepInput & Resolved

export function fourierOf({ radius: R, diffusivity, times }: RadialStepInput): number[] {
  return times.map((time) => (diffusivity / (R * R)) * time)
}

export function insideCheck({ radius: R, depths, radii }: RadialStepInput): Check {
  return {
    id: 'place-inside-body',
    holds: true,
    value: (depths ?? radii ?? []).reduce((most, place) => Math.max(most, place), 0),
    limit: R,
    text: 'Every place lies inside the body.',
  }
}

export function lumpedCheck(biot: number): Check {
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
