import { z } from 'zod'
import { exposedFaces, radius, solid, thickness } from './fields.ts'
import { quantity } from './quantity.ts'

/** A body with one temperature: by its heat capacity and area, by its volume and area, or by its shape and solid. */
export const lumpedBody = {
  heatCapacity: quantity({
    symbol: 'C',
    unit: 'J/K',
    label: 'Heat capacity of the body',
    min: 1e-12,
    max: 1e15,
    hint: 'with area',
  }).optional(),
  volume: quantity({
    symbol: 'V',
    unit: 'm3',
    label: 'Volume',
    min: 1e-27,
    max: 1e15,
    hint: 'with area and the heat capacity of the solid',
  }).optional(),
  area: quantity({ symbol: 'A', unit: 'm2', label: 'Exchanging area', min: 1e-18, max: 1e10 }).optional(),
  body: z.enum(['slab', 'cylinder', 'sphere']).optional().meta({
    title: 'Body',
    description:
      'Body: slab (with thickness and exposedFaces), cylinder or sphere (with radius), in place of heatCapacity or volume with area.',
    'x-accepted': 'slab, cylinder or sphere',
    'x-hint': 'in place of heat capacity and area',
  }),
  thickness: thickness.optional(),
  exposedFaces: exposedFaces.optional(),
  radius: radius.optional(),
  ...solid,
  correction: z.enum(['none', 'mean']).optional().meta({
    title: 'Correction',
    description: 'Correction: none (default) or mean, with body only.',
    'x-accepted': 'none or mean',
    'x-hint': 'with body only',
  }),
}
