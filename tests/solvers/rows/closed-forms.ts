import { filmOf, type Kinds, solidOf } from './ask.ts'

const drivenNames = {
  temperature_C: 'temperature',
  heat_flux_W_m2: 'heatFlux',
  surface_heat_flux_W_m2: 'surfaceHeatFlux',
  energy_J_m2: 'heatGained',
} as const

export const closedForms: Kinds = {
  A3: {
    file: 'A_semi_infinite',
    ask: (i) => ({
      caseId: 'semi-infinite-surface-flux',
      body: {
        ...solidOf(i),
        initialTemperature: i['initial_C'],
        imposedHeatFlux: i['flux_W_m2'],
        depths: [i['position_m']],
        times: [i['time_s']],
      },
    }),
    names: drivenNames,
  },
  A6: {
    file: 'A_semi_infinite',
    ask: (i) => ({
      caseId: 'semi-infinite-surface-ramp',
      body: {
        ...solidOf(i),
        initialTemperature: i['initial_C'],
        rampRate: i['surface_ramp_K_s'],
        depths: [i['position_m']],
        times: [i['time_s']],
      },
    }),
    names: drivenNames,
  },
  A8: {
    file: 'A_semi_infinite',
    ask: (i) => ({
      caseId: 'semi-infinite-surface-flux',
      body: {
        ...solidOf(i),
        initialTemperature: i['initial_C'],
        imposedHeatFlux: i['flux_W_m2'],
        pulseDuration: i['pulse_duration_s'],
        depths: [i['position_m']],
        times: [i['time_s']],
      },
    }),
    names: drivenNames,
  },
  A9: {
    file: 'A_semi_infinite',
    ask: (i) => ({
      caseId: 'semi-infinite-convection',
      body: {
        ...solidOf(i),
        ...filmOf(i),
        imposedHeatFlux: i['flux_W_m2'],
        depths: [i['position_m']],
        times: [i['time_s']],
      },
    }),
    names: drivenNames,
  },
}
