import { z } from 'zod'
import { quantities, quantity } from './quantity.ts'

/* The fields that cases share, each described once. Ranges are the contract's; typical values are those of practice. */

export const MAX_POSITIONS = 2000
export const MAX_TIMES = 100_000

const temperature = { unit: 'Cel', min: -273.15, max: 1e4, typical: [-40, 100] } as const

/** A solid: by a material, or by its properties, a conductivity and exactly one statement of its heat capacity. */
export const solid = {
  material: z.string().min(1).max(60).optional().meta({
    title: 'Material',
    description:
      'Material: the id of one of the catalogue, or of one of the account, in place of all properties. The answer says what was used.',
    'x-accepted': 'the id of a material',
    'x-hint': 'an id such as concrete-dense-2400, in place of the properties',
    'x-material': true,
  }),
  conductivity: quantity({
    symbol: 'k',
    unit: 'W/(m.K)',
    label: 'Conductivity',
    min: 1e-4,
    max: 1e4,
    typical: [0.02, 400],
    hint: 'insulation 0.035, brick 0.8, concrete 2, steel 50',
  }).optional(),
  density: quantity({
    symbol: 'ρ',
    unit: 'kg/m3',
    label: 'Density',
    min: 1e-2,
    max: 3e4,
    typical: [10, 9000],
    hint: 'with specificHeat',
  }).optional(),
  specificHeat: quantity({
    symbol: 'c',
    unit: 'J/(kg.K)',
    label: 'Specific heat',
    min: 0.1,
    max: 1e5,
    typical: [380, 4200],
    hint: 'with density',
  }).optional(),
  volumetricHeatCapacity: quantity({
    symbol: 'C',
    unit: 'J/(m3.K)',
    label: 'Volumetric heat capacity',
    min: 0.1,
    max: 1e9,
    typical: [1e4, 4.2e6],
    hint: 'in place of density and specificHeat, or of diffusivity',
  }).optional(),
  diffusivity: quantity({
    symbol: 'a',
    unit: 'm2/s',
    label: 'Diffusivity',
    min: 1e-12,
    max: 1e2,
    typical: [1e-7, 2e-4],
    hint: 'in place of a heat capacity',
  }).optional(),
}

export const initialTemperature = quantity({
  ...temperature,
  symbol: 'Tᵢ',
  label: 'Initial temperature',
  hint: 'the same everywhere at time 0',
})

export const surfaceTemperature = quantity({
  ...temperature,
  symbol: 'Tₛ',
  label: 'Surface temperature',
  hint: 'of the face itself, from time 0 on',
})

export const film = {
  ambientTemperature: quantity({
    ...temperature,
    symbol: 'Tₐ',
    label: 'Ambient temperature',
    hint: 'of the fluid, not of the face',
  }),
  filmCoefficient: quantity({
    symbol: 'h',
    unit: 'W/(m2.K)',
    label: 'Film coefficient',
    min: 1e-9,
    max: 1e9,
    zero: true,
    typical: [4, 3000],
    hint: 'total, radiation included; room 7.7, outside 25, water 100 to 3000',
  }),
}

const length = { unit: 'm', min: 1e-9, max: 1e5, typical: [0.005, 1] } as const
export const thickness = quantity({ ...length, symbol: 'd', label: 'Thickness', hint: 'whole, never half' })
/** Of a body that is taken to have no end. */
export const checkedThickness = quantity({
  ...length,
  typical: [0.001, 10],
  symbol: 'd',
  label: 'Thickness',
  hint: 'of the body, to check how long the answer holds; changes no number',
  changesNoNumber: true,
}).optional()
export const radius = quantity({ ...length, symbol: 'R', label: 'Radius' })

export const exposedFaces = z.union([z.literal(1), z.literal(2)]).meta({
  title: 'Exposed faces',
  description:
    'Exposed faces: 1 (the far face is insulated) or 2 (both alike). No default: the wrong one changes every time by a factor of four.',
  'x-symbol': 'n',
  'x-accepted': '1 or 2',
  'x-hint': '1: the other face is insulated',
})

export const depths = quantities(
  { symbol: 'x', unit: 'm', label: 'Depths', min: 0, max: 1e5, hint: 'inward from the exposed face' },
  MAX_POSITIONS,
)

/** Of a case with two bodies in contact: the other one lies at negative depths. */
export const signedDepths = quantities(
  { symbol: 'x', unit: 'm', label: 'Depths', min: -1e5, max: 1e5, hint: 'below 0 in the other body' },
  MAX_POSITIONS,
)

export const radii = quantities(
  { symbol: 'r', unit: 'm', label: 'Radii', min: 0, max: 1e5, hint: 'from the axis or centre' },
  MAX_POSITIONS,
)

const coordinates = {
  x: quantity({ symbol: 'x', unit: 'm', label: 'x', min: -1e5, max: 1e5 }),
  y: quantity({ symbol: 'y', unit: 'm', label: 'y', min: -1e5, max: 1e5 }),
  z: quantity({ symbol: 'z', unit: 'm', label: 'z', min: -1e5, max: 1e5 }),
  r: quantity({ symbol: 'r', unit: 'm', label: 'r', min: 0, max: 1e5 }),
}

/** Points of a body of two or three dimensions. */
export function pointsOf(
  axes: readonly (keyof typeof coordinates)[],
  optional: readonly (keyof typeof coordinates)[] = [],
) {
  const shape = axes.map((axis) => [axis, optional.includes(axis) ? coordinates[axis].optional() : coordinates[axis]])
  const point = z.strictObject(Object.fromEntries(shape) as Record<string, z.ZodType<number | undefined>>)
  const named = axes.map((axis) => (optional.includes(axis) ? `${axis}?` : axis)).join(', ')
  const accepted = `1 to ${MAX_POSITIONS} points {${named}}, in m`
  return z
    .array(point)
    .min(1)
    .max(MAX_POSITIONS)
    .meta({
      title: 'Points',
      description: `Points: ${accepted}.`,
      'x-symbol': axes.join(', '),
      'x-ucum': 'm',
      'x-accepted': accepted,
      'x-point': [...axes],
    })
}

/** Times of a clock that a settled cycle is reckoned on. */
export const clockTimes = quantities(
  { symbol: 't', unit: 's', label: 'Times', min: -1e17, max: 1e17, hint: 'of the clock of the cycle, any sign' },
  MAX_TIMES,
)

/** A settled cycle on the clock of `times`; exactly one of the two instants. */
export const cycle = {
  cycleMean: quantity({ ...temperature, symbol: 'Tₘ', label: 'Cycle mean', hint: 'mean of the driving temperature' }),
  amplitude: quantity({
    symbol: 'A',
    unit: 'K',
    label: 'Amplitude',
    min: 0,
    max: 1e4,
    typical: [1, 40],
    hint: 'half of highest less lowest',
  }),
  period: quantity({
    symbol: 'P',
    unit: 's',
    label: 'Period',
    min: 1e-6,
    max: 1e12,
    typical: [60, 4e7],
    hint: 'a day 86400, a year 31557600',
  }),
  timeOfMaximum: quantity({
    symbol: 't₊',
    unit: 's',
    label: 'Time of maximum',
    min: -1e17,
    max: 1e17,
    hint: 'or timeOfMinimum',
  }).optional(),
  timeOfMinimum: quantity({
    symbol: 't₋',
    unit: 's',
    label: 'Time of minimum',
    min: -1e17,
    max: 1e17,
    hint: 'or timeOfMaximum',
  }).optional(),
}

export const imposedHeatFlux = quantity({
  symbol: 'q₀',
  unit: 'W/m2',
  label: 'Imposed heat flux',
  min: -1e12,
  max: 1e12,
  typical: [-1000, 150_000],
  hint: 'absorbed at the face, positive into the body',
})

export const times = quantities(
  { symbol: 't', unit: 's', label: 'Times', min: 0, max: 1e17, typical: [60, 1e8], hint: 'after the change' },
  MAX_TIMES,
)
