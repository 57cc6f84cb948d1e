import { depthOf, filmOf, heldOf, type Kinds, type Names, solidOf, unitSolid } from './ask.ts'

const names = (energy: string): Names => ({
  temperature_C: 'temperature',
  theta: 'remainingFraction',
  average_C: 'meanTemperature',
  heat_fraction: 'heatFraction',
  surface_heat_flux_W_m2: 'surfaceHeatFlux',
  [energy]: 'heatGained',
})

const placed = (i: Record<string, number>) => ({
  radius: i['radius_m'],
  radii: [i['position_m']],
  times: [i['time_s']],
})

const held = (caseId: string, energy: string): Kinds[string] => ({
  file: 'C_cylinder_sphere',
  ask: (i) => ({ caseId, body: { ...solidOf(i), ...heldOf(i), ...placed(i) } }),
  names: names(energy),
})

const film = (caseId: string, energy: string): Kinds[string] => ({
  file: 'C_cylinder_sphere',
  ask: (i) => ({ caseId, body: { ...solidOf(i), ...filmOf(i), ...placed(i) } }),
  names: names(energy),
})

const extreme = (caseId: string): Kinds[string] => ({
  file: 'I_extremes',
  ask: (i) => ({
    caseId,
    body: {
      ...unitSolid,
      radius: 1,
      filmCoefficient: i['biot'],
      initialTemperature: 1,
      ambientTemperature: 0,
      times: [i['fourier']],
      depths: [depthOf(1, i['position_ratio']!)],
    },
  }),
  names: {
    theta: 'remainingFraction',
    one_minus_theta: 'completedFraction',
    heat_fraction: 'heatFraction',
    average_theta: 'meanTemperature',
  },
})

export const radial: Kinds = {
  C1: held('cylinder-surface-temperature', 'energy_J_m'),
  C2: film('cylinder-convection', 'energy_J_m'),
  C3: held('sphere-surface-temperature', 'energy_J'),
  C4: film('sphere-convection', 'energy_J'),
  'I-cylinder': extreme('cylinder-convection'),
  'I-sphere': extreme('sphere-convection'),
}
