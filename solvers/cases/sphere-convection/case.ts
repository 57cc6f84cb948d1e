import { sphere } from '../../bodies/radial-step.ts'
import { allRoundOutputs, roundInFluid } from '../../bodies/round-case.ts'
import { defineCase } from '../../case.ts'
import { solve } from './solve.ts'

export default defineCase({
  id: 'sphere-convection',
  title: 'Sphere, convection at its surface',
  summary: 'A sphere at one temperature meets a fluid at another.',
  notes:
    'For fruit, balls, pellets, grains and compact pieces with about one length in all directions. Places are depths from the surface or radii from the centre, one of the two; a depth keeps its digits near the surface. A film coefficient of 0 leaves the body as it is. Properties and film are constant; a change of film in mid-history is not in this case.',
  formula: [
    '\\theta = \\frac{T - T_a}{T_i - T_a} = \\sum_n C_n \\frac{\\sin(z_n r/R)}{z_n r/R} e^{-z_n^2 \\mathrm{Fo}}',
    '1 - z_n \\cot z_n = \\mathrm{Bi}, \\qquad C_n = \\frac{4 (\\sin z_n - z_n \\cos z_n)}{2 z_n - \\sin 2 z_n}',
    '\\mathrm{Bi} = hR/k, \\qquad \\mathrm{Fo} = at/R^2',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 9.4'],
  sketch: { body: 'sphere', boundary: 'convection' },
  ...roundInFluid(sphere, solve),
  cautions: ['food', 'general'],
  example: {
    conductivity: 0.5,
    density: 1000,
    specificHeat: 3800,
    radius: 0.04,
    filmCoefficient: 25,
    initialTemperature: 25,
    ambientTemperature: 2,
    radii: [0, 0.04],
    times: [1800, 7200],
  },
  variants: [
    {
      title: 'By depths, all outputs',
      input: {
        conductivity: 45,
        volumetricHeatCapacity: 3.6e6,
        radius: 0.01,
        filmCoefficient: 800,
        initialTemperature: 850,
        ambientTemperature: 60,
        depths: [0, 0.004, 0.01],
        times: [1, 30],
        outputs: allRoundOutputs,
      },
    },
    {
      title: 'Heat and mean only: no places',
      input: {
        conductivity: 1.1,
        diffusivity: 5e-7,
        radius: 0.02,
        filmCoefficient: 90,
        initialTemperature: 20,
        ambientTemperature: 300,
        times: [60, 900],
        outputs: ['heatGained', 'meanTemperature', 'heatFraction'],
      },
    },
  ],
})
