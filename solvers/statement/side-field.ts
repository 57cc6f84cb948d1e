import { z } from 'zod'
import { film, imposedHeatFlux, surfaceTemperature } from './fields.ts'

/* A side (side.ts) as it is stated. */

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
