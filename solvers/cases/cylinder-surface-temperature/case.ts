import { cylinder } from '../../bodies/radial-step.ts'
import { allRoundOutputs, roundHeld } from '../../bodies/round-case.ts'
import { defineCase } from '../../case.ts'
import { solve } from './solve.ts'

export default defineCase({
  id: 'cylinder-surface-temperature',
  title: 'Cylinder, fixed surface temperature',
  summary: 'A long cylinder at one temperature is held at another at its surface.',
  notes:
    'For cylinders whose surface temperature is known: measured, or held by steam, ice water or a strong film; at least about four diameters long. Places are depths from the surface or radii from the axis, one of the two. Taking a fixed surface in place of a film shortens times by about 2/(Bi + 2).',
  formula: [
    '\\theta = \\frac{T - T_s}{T_i - T_s} = \\sum_n \\frac{2}{z_n J_1(z_n)} J_0\\left(z_n r/R\\right) e^{-z_n^2 \\mathrm{Fo}}, \\qquad J_0(z_n) = 0',
    '\\mathrm{Fo} = at/R^2',
  ],
  sources: ['H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959, section 7.6'],
  sketch: { body: 'cylinder', boundary: 'temperature' },
  ...roundHeld(cylinder, solve),
  cautions: ['concrete', 'food', 'general'],
  example: {
    conductivity: 0.6,
    density: 1000,
    specificHeat: 4180,
    radius: 0.03,
    initialTemperature: 4,
    surfaceTemperature: 98,
    radii: [0, 0.015],
    times: [300, 1800],
  },
  variants: [
    {
      title: 'By depths, all outputs',
      input: {
        conductivity: 50,
        diffusivity: 1.4e-5,
        radius: 0.05,
        initialTemperature: 850,
        surfaceTemperature: 60,
        depths: [0, 0.02, 0.05],
        times: [5, 60],
        outputs: allRoundOutputs,
      },
    },
  ],
})
