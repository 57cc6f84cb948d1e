import { depthOf, filmOf, heldOf, type Kinds, type Names, solidOf, unitSolid } from './ask.ts'

const halfSpaceNames: Names = {
  temperature_C: 'temperature',
  change_ratio: 'completedFraction',
  heat_flux_W_m2: 'heatFlux',
  surface_heat_flux_W_m2: 'surfaceHeatFlux',
  energy_J_m2: 'heatGained',
}
const slabNames: Names = {
  temperature_C: 'temperature',
  theta: 'remainingFraction',
  average_C: 'meanTemperature',
  heat_fraction: 'heatFraction',
  surface_heat_flux_W_m2: 'surfaceHeatFlux',
  energy_J_m2: 'heatGained',
}

export const steps: Kinds = {
  A2: {
    file: 'A_semi_infinite',
    ask: (i) => ({
      caseId: 'semi-infinite-convection',
      body: { ...solidOf(i), ...filmOf(i), depths: [i['position_m']], times: [i['time_s']] },
    }),
    names: halfSpaceNames,
  },
  B2: {
    file: 'B_slab',
    ask: (i) => ({
      caseId: 'slab-convection',
      body: {
        ...solidOf(i),
        ...filmOf(i),
        thickness: 2 * i['half_thickness_m']!,
        exposedFaces: 2,
        depths: [depthOf(i['half_thickness_m']!, i['position_m']!)],
        times: [i['time_s']],
      },
    }),
    names: slabNames,
  },
  A1: {
    file: 'A_semi_infinite',
    ask: (i) => ({
      caseId: 'semi-infinite-surface-temperature',
      body: { ...solidOf(i), ...heldOf(i), depths: [i['position_m']], times: [i['time_s']] },
    }),
    names: halfSpaceNames,
  },
  B1: {
    file: 'B_slab',
    ask: (i) => ({
      caseId: 'slab-surface-temperature',
      body: {
        ...solidOf(i),
        ...heldOf(i),
        thickness: 2 * i['half_thickness_m']!,
        exposedFaces: 2,
        depths: [depthOf(i['half_thickness_m']!, i['position_m']!)],
        times: [i['time_s']],
      },
    }),
    names: slabNames,
  },
  'I-slabstep': {
    file: 'I_extremes',
    ask: (i) => ({
      caseId: 'slab-surface-temperature',
      body: {
        ...unitSolid,
        thickness: 2,
        exposedFaces: 2,
        initialTemperature: 1,
        surfaceTemperature: 0,
        times: [i['fourier']],
        depths: [depthOf(1, i['position_ratio']!)],
      },
    }),
    names: { theta: 'remainingFraction', one_minus_theta: 'completedFraction' },
  },
  D1: {
    file: 'D_lumped',
    ask: (i) => ({
      caseId: 'lumped-convection',
      body: {
        heatCapacity: i['mass_kg']! * i['specific_heat_J_kgK']!,
        area: i['area_m2'],
        ...filmOf(i),
        times: [i['time_s']],
      },
    }),
    names: {
      temperature_C: 'temperature',
      theta: 'remainingFraction',
      time_constant_s: 'timeConstant',
      energy_J: 'heatGained',
    },
  },
  'I-slab': {
    file: 'I_extremes',
    ask: (i) => ({
      caseId: 'slab-convection',
      body: {
        ...unitSolid,
        thickness: 2,
        exposedFaces: 2,
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
  },
  'I-semi': {
    file: 'I_extremes',
    ask: (i) => ({
      caseId: 'semi-infinite-convection',
      body: {
        ...unitSolid,
        filmCoefficient: i['film_number'],
        initialTemperature: 0,
        ambientTemperature: 1,
        times: [1],
        depths: [2 * i['similarity']!],
      },
    }),
    names: { change_ratio: 'completedFraction', one_minus_change_ratio: 'remainingFraction' },
  },
}
