import { cylinder } from '../../bodies/radial-step.ts'
import { allRoundOutputs, roundInFluid } from '../../bodies/round-case.ts'
import { defineCase } from '../../case.ts'
import { solve } from './solve.ts'

export default defineCase({
  id: 'cylinder-convection',
  title: 'Cylinder, convection at its surface',
  summary: 'A long cylinder at one temperature meets a fluid at another.',
  notes:
    'For columns, logs, cables, bars, cans and pipes full of what they hold, at least about four diameters long; short ones are short-cylinder-convection. Places are depths from the surface or radii from the axis, one of the two; a depth keeps its digits near the surface. A film coefficient of 0 leaves the body as it is. Properties and film are constant; a change of film in mid-history is not in this case.',
  formula: [
    '\\theta = \\frac{T - T_a}{T_i - T_a} = \\sum_n C_n\\, J_0\\left(z_n r/R\\right) e^{-z_n^2 \\mathrm{Fo}}',
    'z_n J_1(z_n) = \\mathrm{Bi}\\, J_0(z_n), \\qquad C_n = \\frac{2}{z_n} \\frac{J_1(z_n)}{J_0^2(z_n) + J_1^2(z_n)}',
    '\\mathrm{Bi} = hR/k, \\qquad \\mathrm{Fo} = at/R^2',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 7.7'],
  sketch: { body: 'cylinder', boundary: 'convection' },
  ...roundInFluid(cylinder, solve),
  cautions: ['concrete', 'food', 'general'],
  example: {
    conductivity: 1.7,
    density: 2300,
    specificHeat: 900,
    radius: 0.15,
    filmCoefficient: 20,
    initialTemperature: 20,
    ambientTemperature: -5,
    radii: [0, 0.15],
    times: [3600, 36000],
  },
  variants: [
    {
      title: 'By depths, all outputs',
      input: {
        conductivity: 0.21,
        volumetricHeatCapacity: 1.5e6,
        radius: 0.12,
        filmCoefficient: 12,
        initialTemperature: 15,
        ambientTemperature: 80,
        depths: [0, 0.03, 0.12],
        times: [600, 86400],
        outputs: allRoundOutputs,
      },
    },
    {
      title: 'Heat and mean only: no places',
      input: {
        conductivity: 0.6,
        diffusivity: 1.45e-7,
        radius: 0.04,
        filmCoefficient: 600,
        initialTemperature: 60,
        ambientTemperature: 4,
        times: [1800, 7200],
        outputs: ['heatGained', 'meanTemperature', 'heatFraction'],
      },
    },
  ],
})
