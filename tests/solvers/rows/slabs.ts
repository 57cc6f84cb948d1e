import { depthOf, type Kinds, solidOf } from './ask.ts'

/* Slabs between two sides, under a flux, and with heat released inside. */

type Inputs = Record<string, number>

const wallOf = (i: Inputs) => ({
  ...solidOf(i),
  thickness: i['thickness_m'],
  initialTemperature: i['initial_C'],
  depths: [i['position_m']],
  times: [i['time_s']],
})
const filmAt = (i: Inputs, side: 'left' | 'right') => ({
  kind: 'convection',
  ambientTemperature: i[`${side}_ambient_C`],
  filmCoefficient: i[`${side}_film_W_m2K`],
})

const wallNames = {
  temperature_C: 'temperature',
  average_C: 'meanTemperature',
  left_heat_flux_W_m2: 'leftHeatFlux',
  right_heat_flux_W_m2: 'rightHeatFlux',
  energy_J_m2: 'heatGained',
} as const

export const slabs: Kinds = {
  B3: {
    file: 'B_slab',
    ask: (i) => ({
      caseId: 'slab-two-sides',
      body: {
        ...wallOf(i),
        left: { kind: 'temperature', surfaceTemperature: i['left_surface_C'] },
        right: { kind: 'temperature', surfaceTemperature: i['right_surface_C'] },
      },
    }),
    names: wallNames,
  },
  B4: {
    file: 'B_slab',
    ask: (i) => ({
      caseId: 'slab-two-sides',
      body: { ...wallOf(i), left: filmAt(i, 'left'), right: filmAt(i, 'right') },
    }),
    names: wallNames,
  },
  B5: {
    file: 'B_slab',
    ask: (i) => ({
      caseId: 'slab-surface-flux',
      body: { ...wallOf(i), imposedHeatFlux: i['flux_W_m2'], back: { kind: 'insulated' } },
    }),
    names: { temperature_C: 'temperature', average_C: 'meanTemperature', energy_J_m2: 'heatGained' },
  },
  B6: {
    file: 'B_slab',
    ask: (i) => ({
      caseId: 'slab-surface-flux',
      body: { ...wallOf(i), imposedHeatFlux: i['flux_W_m2'], back: filmAt(i, 'right') },
    }),
    names: {
      temperature_C: 'temperature',
      average_C: 'meanTemperature',
      right_heat_flux_W_m2: 'backHeatFlux',
      energy_J_m2: 'heatGained',
    },
  },
  B7: {
    file: 'B_slab',
    ask: (i) => ({
      caseId: 'slab-internal-heat',
      body: {
        ...solidOf(i),
        thickness: 2 * i['half_thickness_m']!,
        exposedFaces: 2,
        initialTemperature: i['initial_C'],
        ambientTemperature: i['ambient_C'],
        filmCoefficient: i['film_W_m2K'],
        source: { kind: 'constant', powerDensity: i['generation_W_m3'] },
        depths: [depthOf(i['half_thickness_m']!, i['position_m']!)],
        times: [i['time_s']],
      },
    }),
    names: {
      temperature_C: 'temperature',
      average_C: 'meanTemperature',
      surface_heat_flux_W_m2: 'surfaceHeatFlux',
      stored_energy_J_m2: 'heatGained',
      steady_temperature_C: 'steadyTemperature',
    },
  },
}
