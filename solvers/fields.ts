import { z } from 'zod'
import { quantities, quantity } from './quantity.ts'

/* The fields that cases share, each described once. Ranges are the contract's; typical values are those of practice. */

export const MAX_POSITIONS = 2000
export const MAX_TIMES = 100_000

const temperature = { unit: 'Cel', min: -273.15, max: 1e4, typical: [-40, 100] } as const

/** A solid by its properties: a conductivity and exactly one statement of its heat capacity. */
export const solid = {
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

export const times = quantities(
  { symbol: 't', unit: 's', label: 'Times', min: 0, max: 1e17, typical: [60, 1e8], hint: 'after the change' },
  MAX_TIMES,
)
