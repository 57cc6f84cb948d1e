import { readFileSync } from 'node:fs'
import type { OutputName } from '../../solvers/outputs.ts'

interface Row {
  id: string
  case: string
  inputs: Record<string, number>
  expected: Record<string, string>
  absolute_only?: string[]
}

/** One reference value as a question to the product. */
export interface Question {
  row: string
  caseId: string
  body: Record<string, unknown>
  output: OutputName
  /** 20 digits. */
  expected: string
  absoluteOnly: boolean
}

function read(name: string): Row[] {
  return JSON.parse(readFileSync(new URL(`../reference/values/${name}.json`, import.meta.url), 'utf8')) as Row[]
}

type Ask = (i: Record<string, number>) => { caseId: string; body: Record<string, unknown> }
type Names = Record<string, OutputName>

const solidOf = (i: Record<string, number>) => ({
  conductivity: i['conductivity_W_mK'],
  density: i['density_kg_m3'],
  specificHeat: i['specific_heat_J_kgK'],
})
const filmOf = (i: Record<string, number>) => ({
  filmCoefficient: i['film_W_m2K'],
  initialTemperature: i['initial_C'],
  ambientTemperature: i['ambient_C'],
})
const heldOf = (i: Record<string, number>) => ({
  initialTemperature: i['initial_C'],
  surfaceTemperature: i['surface_C'],
})
const unitSolid = { conductivity: 1, diffusivity: 1 }

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

const kinds: Record<string, { file: string; ask: Ask; names: Names }> = {
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

/** Half thickness less position in decimals, as the row states it: a difference in doubles would be another depth. */
function depthOf(half: number, position: number): number {
  return Number((half - position).toPrecision(12))
}

export const questions: Question[] = Object.entries(kinds).flatMap(([kind, { file, ask, names }]) =>
  read(file)
    .filter((row) => row.case === kind)
    .flatMap((row) =>
      Object.entries(names).flatMap(([key, output]) => {
        const expected = row.expected[key]
        if (expected === undefined) return []
        return [
          {
            row: row.id,
            ...ask(row.inputs),
            output,
            expected,
            absoluteOnly: row.absolute_only?.includes(key) ?? false,
          },
        ]
      }),
    ),
)

/** The flux ratio of I-semi is q/(h·ΔT), asked as a flux. */
export const fluxRatios = read('I_extremes')
  .filter((row) => row.case === 'I-semi')
  .map((row) => ({
    row: row.id,
    ...kinds['I-semi']!.ask(row.inputs),
    film: row.inputs['film_number']!,
    expected: row.expected['flux_ratio']!,
  }))
