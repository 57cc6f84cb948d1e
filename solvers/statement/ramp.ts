import { quantity } from './quantity.ts'

/** How fast a temperature is led along a straight line. */
export const rampRate = quantity({
  symbol: 'r',
  unit: 'K/s',
  label: 'Ramp rate',
  min: -1e6,
  max: 1e6,
  typical: [-1, 1],
  hint: '1 K/h is 2.78e-4; negative where it cools',
})
