import { SLOPE_COST } from './rate.ts'

/** Where an output has numbers: at each time and place, the same for each parameter, at each time, at each place, or once. */
export type Shape = 'grid' | 'grids' | 'times' | 'places' | 'single'

export interface OutputDescription {
  label: string
  symbol: string
  unit: string
  shape: Shape
  text: string
  /** How many values of others one of these takes; it is priced so. */
  cost?: number
}

/* The outputs that cases share. A case names those it has; where its unit or shape differs, it says so. */
export const outputCatalogue = {
  temperature: {
    label: 'Temperature',
    symbol: 'T',
    unit: 'Cel',
    shape: 'grid',
    text: 'Temperature at each time and place.',
  },
  rate: {
    label: 'Rate',
    symbol: '∂T/∂t',
    unit: 'K/s',
    shape: 'grid',
    text: 'How fast the temperature rises at each time and place.',
    cost: SLOPE_COST,
  },
  sensitivities: {
    label: 'Sensitivities',
    symbol: '∂T/∂ln p',
    unit: 'K',
    shape: 'grids',
    text: 'By how much the temperature at each time and place changes with the logarithm of each parameter that the input states, all others kept: a hundredth of it for 1 %. An object with the parameters as names, such as conductivity or left.filmCoefficient.',
    cost: SLOPE_COST,
  },
  heatFlux: {
    label: 'Heat flux',
    symbol: 'q',
    unit: 'W/m2',
    shape: 'grid',
    text: 'Local heat flux, positive inward from the exposed face.',
  },
  surfaceHeatFlux: {
    label: 'Surface heat flux',
    symbol: 'qₛ',
    unit: 'W/m2',
    shape: 'times',
    text: 'Heat flux conducted into the body at the exposed face.',
  },
  heatGained: {
    label: 'Heat gained',
    symbol: 'Q',
    unit: 'J/m2',
    shape: 'times',
    text: 'Energy stored since time 0; negative where the body cools.',
  },
  meanTemperature: {
    label: 'Mean temperature',
    symbol: 'T̄',
    unit: 'Cel',
    shape: 'times',
    text: 'Mean over the volume.',
  },
  remainingFraction: {
    label: 'Remaining fraction',
    symbol: 'θ',
    unit: '1',
    shape: 'grid',
    text: 'Share of the initial difference to the end state that is left: 1 at the start.',
  },
  completedFraction: {
    label: 'Completed fraction',
    symbol: '1 − θ',
    unit: '1',
    shape: 'grid',
    text: 'Share of the change that is done, computed without cancellation.',
  },
  heatFraction: {
    label: 'Heat fraction',
    symbol: 'Q/Q₀',
    unit: '1',
    shape: 'times',
    text: 'Heat gained as a share of what the body gains in all.',
  },
  steadyTemperature: {
    label: 'Steady temperature',
    symbol: 'T∞',
    unit: 'Cel',
    shape: 'single',
    text: 'The end state.',
  },
  timeConstant: {
    label: 'Time constant',
    symbol: 'τ',
    unit: 's',
    shape: 'single',
    text: 'Time in which the difference to the end state falls to 1/e.',
  },
  amplitude: {
    label: 'Amplitude',
    symbol: 'A(x)',
    unit: 'K',
    shape: 'places',
    text: 'Amplitude of the temperature at each place.',
  },
  timeLag: {
    label: 'Time lag',
    symbol: 'Δt',
    unit: 's',
    shape: 'places',
    text: 'Time by which each place follows the driving cycle, whole periods included.',
  },
  dampingDepth: {
    label: 'Damping depth',
    symbol: 'δ',
    unit: 'm',
    shape: 'single',
    text: 'Depth over which the amplitude falls to 1/e.',
  },
  heatPerHalfCycle: {
    label: 'Heat per half cycle',
    symbol: 'Q½',
    unit: 'J/m2',
    shape: 'single',
    text: 'Heat that enters the surface in one half of the cycle and leaves in the other.',
  },
  contactTemperature: {
    label: 'Contact temperature',
    symbol: 'Tₖ',
    unit: 'Cel',
    shape: 'single',
    text: 'Temperature that both faces have at once, and keep, in perfect contact.',
  },
  idealTemperature: {
    label: 'Temperature in perfect contact',
    symbol: 'T*',
    unit: 'Cel',
    shape: 'grid',
    text: 'Temperature at each time and place if nothing resisted between the faces.',
  },
  surfaceTemperature: {
    label: 'Surface temperature',
    symbol: 'Tₛ',
    unit: 'Cel',
    shape: 'times',
    text: 'Temperature of the own face.',
  },
  otherSurfaceTemperature: {
    label: 'Surface temperature of the other body',
    symbol: 'Tₛ₂',
    unit: 'Cel',
    shape: 'times',
    text: 'Temperature of the face of the other body.',
  },
  leftHeatFlux: {
    label: 'Heat flux at the left',
    symbol: 'qₗ',
    unit: 'W/m2',
    shape: 'times',
    text: 'Heat flux conducted into the body at its left face.',
  },
  rightHeatFlux: {
    label: 'Heat flux at the right',
    symbol: 'qᵣ',
    unit: 'W/m2',
    shape: 'times',
    text: 'Heat flux conducted into the body at its right face.',
  },
  backHeatFlux: {
    label: 'Heat flux at the back',
    symbol: 'q₂',
    unit: 'W/m2',
    shape: 'times',
    text: 'Heat flux conducted into the body at its back face.',
  },
  heatReleased: {
    label: 'Heat released',
    symbol: 'Qᵥ',
    unit: 'J/m2',
    shape: 'times',
    text: 'Heat that the source in the body has given off since time 0.',
  },
  innerHeatFlux: {
    label: 'Heat flux at the inside',
    symbol: 'q₁',
    unit: 'W/m2',
    shape: 'times',
    text: 'Heat flux conducted into the body at its inner face, per m2 of that face.',
  },
  outerHeatFlux: {
    label: 'Heat flux at the outside',
    symbol: 'q₂',
    unit: 'W/m2',
    shape: 'times',
    text: 'Heat flux conducted into the body at its outer face, per m2 of that face.',
  },
  admittance: {
    label: 'Admittance',
    symbol: 'Y',
    unit: 'W/(m2.K)',
    shape: 'single',
    text: 'Amplitude of the heat flux into one exposed face per kelvin of the driving cycle.',
  },
  admittanceTimeLead: {
    label: 'Time lead of the admittance',
    symbol: 'ΔtY',
    unit: 's',
    shape: 'single',
    text: 'Time by which the heat flux is ahead of the driving cycle.',
  },
  arealHeatCapacity: {
    label: 'Areal heat capacity',
    symbol: 'κ',
    unit: 'J/(m2.K)',
    shape: 'single',
    text: 'Period over 2π times the admittance.',
  },
  bathTemperature: {
    label: 'Bath temperature',
    symbol: 'Tᵦ',
    unit: 'Cel',
    shape: 'times',
    text: 'Temperature of the bath at each time.',
  },
  equilibriumTemperature: {
    label: 'Equilibrium temperature',
    symbol: 'T∞',
    unit: 'Cel',
    shape: 'single',
    text: 'Temperature that body and bath come to.',
  },
} as const satisfies Record<string, OutputDescription>

export type OutputName = keyof typeof outputCatalogue
export const outputNames = Object.keys(outputCatalogue) as OutputName[]
