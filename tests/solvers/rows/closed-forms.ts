import { filmOf, type Kinds, solidOf } from './ask.ts'

const drivenNames = {
  temperature_C: 'temperature',
  heat_flux_W_m2: 'heatFlux',
  surface_heat_flux_W_m2: 'surfaceHeatFlux',
  energy_J_m2: 'heatGained',
} as const

const cycleNames = {
  temperature_C: 'temperature',
  amplitude_K: 'amplitude',
  time_lag_s: 'timeLag',
  heat_flux_W_m2: 'heatFlux',
  damping_depth_m: 'dampingDepth',
} as const

const cycleOf = (i: Record<string, number>, of: 'surface' | 'ambient') => ({
  cycleMean: i[`${of}_mean_C`],
  amplitude: i[`${of}_amplitude_K`],
  period: i['period_s'],
  timeOfMaximum: i['time_of_maximum_s'],
  depths: [i['position_m']],
  times: [i['time_s']],
})

const contactBody = (i: Record<string, number>, n: 1 | 2) => ({
  conductivity: i[`conductivity_${n}_W_mK`],
  density: i[`density_${n}_kg_m3`],
  specificHeat: i[`specific_heat_${n}_J_kgK`],
  initialTemperature: i[`initial_${n}_C`],
})

const lumpedOf = (i: Record<string, number>) => ({
  heatCapacity: i['mass_kg']! * i['specific_heat_J_kgK']!,
  area: i['area_m2'],
  filmCoefficient: i['film_W_m2K'],
  initialTemperature: i['initial_C'],
  times: [i['time_s']],
})

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
  A4: {
    file: 'A_semi_infinite',
    ask: (i) => ({ caseId: 'semi-infinite-periodic-surface', body: { ...solidOf(i), ...cycleOf(i, 'surface') } }),
    names: cycleNames,
  },
  A5: {
    file: 'A_semi_infinite',
    ask: (i) => ({
      caseId: 'semi-infinite-periodic-ambient',
      body: { ...solidOf(i), filmCoefficient: i['film_W_m2K'], ...cycleOf(i, 'ambient') },
    }),
    names: cycleNames,
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
  A7: {
    file: 'A_semi_infinite',
    ask: (i) => ({
      caseId: 'semi-infinite-contact',
      // The row counts from the other body, at x below 0, to the own.
      body: {
        ...contactBody(i, 2),
        other: contactBody(i, 1),
        depths: [i['position_m']],
        times: [i['time_s']],
      },
    }),
    names: {
      contact_temperature_C: 'contactTemperature',
      temperature_C: 'temperature',
      interface_heat_flux_W_m2: 'surfaceHeatFlux',
      energy_J_m2: 'heatGained',
    },
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
  G1: {
    file: 'G_line_source',
    ask: (i) => ({
      caseId: 'line-source',
      body: {
        ...solidOf(i),
        initialTemperature: i['initial_C'],
        linePower: i['line_power_W_m'],
        radii: [i['position_m']],
        times: [i['time_s']],
      },
    }),
    names: { temperature_C: 'temperature', radial_heat_flux_W_m2: 'heatFlux' },
  },
  D2: {
    file: 'D_lumped',
    ask: (i) => ({
      caseId: 'lumped-convection',
      body: { ...lumpedOf(i), ambientTemperature: i['ambient_C'], power: i['gain_W'] },
    }),
    names: { temperature_C: 'temperature', steady_temperature_C: 'steadyTemperature' },
  },
  D3: {
    file: 'D_lumped',
    ask: (i) => ({
      caseId: 'lumped-varying-ambient',
      body: {
        ...lumpedOf(i),
        ambient: { kind: 'ramp', start: i['ambient_start_C'], rampRate: i['ambient_ramp_K_s'] },
      },
    }),
    names: { temperature_C: 'temperature' },
  },
}
