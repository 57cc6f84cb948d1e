import { sphere } from '../../bodies/radial-step.ts'
import { allRoundOutputs, roundHeld } from '../../bodies/round-case.ts'
import { defineCase } from '../../case.ts'
import { solve } from './solve.ts'

export default defineCase({
  id: 'sphere-surface-temperature',
  title: 'Sphere, fixed surface temperature',
  summary: 'A sphere at one temperature is held at another at its surface.',
  notes:
    'For compact pieces whose surface temperature is known: measured, or held by steam, ice water or a strong film. Places are depths from the surface or radii from the centre, one of the two. Taking a fixed surface in place of a film shortens times by about 2/(Bi + 2).',
  formula: [
    '\\theta = \\frac{T - T_s}{T_i - T_s} = 2 \\sum_n (-1)^{n+1} \\frac{\\sin(n \\pi r/R)}{n \\pi r/R} e^{-n^2 \\pi^2 \\mathrm{Fo}}',
    '\\mathrm{Fo} = at/R^2',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 9.3'],
  sketch: { body: 'sphere', boundary: 'temperature' },
  ...roundHeld(sphere, solve),
  cautions: ['food', 'general'],
  example: {
    conductivity: 0.55,
    density: 1050,
    specificHeat: 3700,
    radius: 0.025,
    initialTemperature: 8,
    surfaceTemperature: 98,
    radii: [0, 0.0125],
    times: [300, 1200],
  },
  variants: [
    {
      title: 'By depths, all outputs',
      input: {
        conductivity: 0.2,
        diffusivity: 1.1e-7,
        radius: 0.03,
        initialTemperature: 20,
        surfaceTemperature: -18,
        depths: [0, 0.01, 0.03],
        times: [600, 7200],
        outputs: allRoundOutputs,
      },
    },
  ],
})
