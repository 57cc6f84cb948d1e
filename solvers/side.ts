import { z } from 'zod'
import { film, imposedHeatFlux, surfaceTemperature } from './fields.ts'

/** What happens at one of two sides of a body. */
export type Side =
  | { kind: 'temperature'; surfaceTemperature: number }
  | { kind: 'convection'; ambientTemperature: number; filmCoefficient: number; imposedHeatFlux?: number | undefined }
  | { kind: 'flux'; imposedHeatFlux: number }
  | { kind: 'insulated' }

const kinds = [
  z.strictObject({ kind: z.literal('temperature'), surfaceTemperature }).meta({
    title: 'Held at a temperature',
    'x-hint': 'the face itself, measured on it',
  }),
  z.strictObject({ kind: z.literal('convection'), ...film, imposedHeatFlux: imposedHeatFlux.optional() }).meta({
    title: 'Convection',
    'x-hint': 'a fluid behind a film, and what the face absorbs beside it',
  }),
  z.strictObject({ kind: z.literal('flux'), imposedHeatFlux }).meta({
    title: 'Heat flux',
    'x-hint': 'all that enters there, whatever the temperature',
  }),
  z.strictObject({ kind: z.literal('insulated') }).meta({ title: 'Insulated', 'x-hint': 'no heat passes' }),
] as const

/** A side as a field, under its own name. */
export function sideField(label: string) {
  return z.discriminatedUnion('kind', kinds).meta({
    title: label,
    description: `${label}: a side of kind temperature, convection, flux or insulated, with the figures of its kind.`,
    'x-hint': 'held, in a fluid, heated by a flux, or insulated',
  })
}

/** Film coefficient of a side; infinite where the face is held, 0 where it passes no heat of itself. */
export function filmOf(side: Side): number {
  if (side.kind === 'temperature') return Infinity
  return side.kind === 'convection' ? side.filmCoefficient : 0
}

/** hL/k of a side. */
export function sideBiot(side: Side, length: number, conductivity: number): number {
  return (filmOf(side) * length) / conductivity
}

/** The temperature that a side drives the body to; undefined where it has none. */
export function temperatureOf(side: Side): number | undefined {
  if (side.kind === 'temperature') return side.surfaceTemperature
  return side.kind === 'convection' && side.filmCoefficient > 0 ? side.ambientTemperature : undefined
}

/** What a side absorbs whatever its temperature, W/m2. */
export function fluxOf(side: Side): number {
  return side.kind === 'flux' || side.kind === 'convection' ? (side.imposedHeatFlux ?? 0) : 0
}

/** Whether the flux at the side is known beforehand. */
export const passesNoHeat = (side: Side): boolean => filmOf(side) === 0
