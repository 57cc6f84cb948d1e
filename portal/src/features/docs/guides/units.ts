import type { Guide } from '../guide.ts'
import { pathOf, wall } from './wall.ts'

const { conductivity: _, density: __, specificHeat: ___, ...rest } = wall

export const units: Guide = {
  slug: 'units-and-materials',
  title: 'Units and materials',
  summary: 'How numbers are stated, and how a material stands in for its properties.',
  parts: [
    {
      heading: 'Plain numbers are in SI',
      text: [
        'A plain number is in SI, a temperature in degrees Celsius, a difference of temperatures in kelvin. Seconds, metres, watts.',
      ],
    },
    {
      heading: 'A number with a unit',
      text: [
        'In place of any number of a quantity stands `{"value": 12, "unit": "cm"}` with a UCUM code; in a list each element may have its own. Converted values are exact: the decimal that was sent is multiplied as a fraction and rounded once.',
        'Degrees Celsius and Fahrenheit have a zero of their own, so they never stand in a product: write `W/(m.K)`, and `[degR]` in imperial products. What is not accepted is refused with `unit-not-accepted`, never guessed.',
      ],
      call: {
        path: pathOf('solve'),
        body: {
          ...wall,
          thickness: { value: 20, unit: 'cm' },
          ambientTemperature: { value: 23, unit: '[degF]' },
          depths: [{ value: 10, unit: 'cm' }],
          times: [{ value: 1, unit: 'h' }],
        },
      },
    },
    {
      heading: 'A material in place of its properties',
      text: [
        '`material` takes the id of one of the catalogue, or of one that your account keeps under Materials. It stands in place of all properties: give one or the other, never both.',
        'The answer says what was used, with its source, state and confidence, and warns where these are weak (`material-confidence-low`, `moisture-state-unspecified`).',
      ],
      call: {
        path: pathOf('solve'),
        body: { material: 'concrete-dense-2400', ...rest, depths: [0.1], times: [3600] },
      },
    },
  ],
  links: [
    { to: '/problems/unit-not-accepted', text: 'unit-not-accepted' },
    { to: '/materials', text: 'Materials' },
  ],
}
