import type { Check } from '../case.ts'
import { gaussOver } from '../math/gauss-panels.ts'
import type { OutputName } from '../outputs.ts'
import { errorOf, type Output, type Solution } from '../solution.ts'
import { latestOf } from '../math/latest.ts'

/* Whether the heat that an answer says was gained is what its own fluxes brought in: two ways to one number. */

/** Gauss-Legendre rule of 5 points on [0, 1] (Abramowitz & Stegun, table 25.4). */
const NODES = [0.04691007703066802, 0.23076534494715845, 0.5, 0.7692346550528415, 0.953089922969332]
const WEIGHTS = [
  0.11846344252809454, 0.23931433524968324, 0.28444444444444444, 0.23931433524968324, 0.11846344252809454,
]
/** What the rule may leave of all that passes. */
const RULE = 1e-5

/** Heats and flows at the times asked for, on one basis. */
export interface HeatSample {
  heats: { value: number; error: number }[]
  /** Of each time, all that enters and is released, W. */
  flows: number[][]
  /** What a flow may be off. */
  flowError: number
}

export interface BalanceOptions {
  /** Times at which what drives the case changes its law. */
  instants?: readonly number[]
  /** No stretch longer than this, where flows go up and down. */
  longest?: number
  /** Heat released in the body since time 0. */
  released?: (time: number) => number
}

const TEXT =
  'The heat gained over the last stretch of time is what entered at the faces and was released over it, as a share of all that passed.'

/**
 * The heat gained from the middle between the last change and the last time to that time, less the integral of the flows over it.
 *
 * Source   Gauss-Legendre quadrature, M. Abramowitz, I. A. Stegun, Handbook of Mathematical Functions, 1964, table 25.4.
 */
export function balanceOf(
  times: readonly number[],
  sample: (times: number[]) => HeatSample,
  { instants = [], longest = Infinity, released = () => 0 }: BalanceOptions = {},
): Check[] {
  const last = latestOf(times)
  const change = instants.reduce((most, t) => (t < last ? Math.max(most, t) : most), 0)
  const width = Math.min((last - change) / 2, longest)
  if (!(width > 1e-290)) return []
  const from = last - width
  const { heats, flows, flowError } = sample([from, last, ...NODES.map((node) => from + node * width)])
  const [before, after] = [heats[0]!, heats[1]!]
  const inside = flows.slice(2)
  const over = (of: (row: number[]) => number) => width * inside.reduce((sum, row, i) => sum + WEIGHTS[i]! * of(row), 0)
  const source = released(last) - released(from)
  const entered = over((row) => row.reduce((sum, flow) => sum + flow, 0)) + source
  const passed = over((row) => row.reduce((sum, flow) => sum + Math.abs(flow), 0)) + Math.abs(released(last))
  const size = Math.max(Math.abs(before.value), Math.abs(after.value), passed)
  if (!(size > 1e-280) || !Number.isFinite(size)) return []
  const value = Math.abs(after.value - before.value - entered) / size
  const limit = RULE + (before.error + after.error + flowError * width) / size
  return [{ id: 'heat-balance', holds: value <= limit, value, limit, text: TEXT }]
}

/** Heats as they were answered, each with what it may be off. */
export const heatsOf = ({ values, bound }: Output): HeatSample['heats'] =>
  (values as number[]).map((value) => ({ value, error: errorOf(bound, value) }))

interface Places {
  times: readonly number[]
  depths?: readonly number[] | undefined
  radii?: readonly number[] | undefined
  points?: readonly unknown[] | undefined
}

/** The balance of a case by its own outputs: `faces` are the fluxes into the body, each with its area on the basis of the heat. */
export function heatBalance<I extends Places>(
  solve: (input: I) => Solution,
  input: I,
  faces: Partial<Record<OutputName, number>>,
  more: BalanceOptions = {},
): Check[] {
  const names = Object.keys(faces) as OutputName[]
  return balanceOf(
    input.times,
    (times) => {
      const { outputs } = solve({ ...withoutPlaces(input), times, outputs: ['heatGained', ...names] })
      const of = (name: OutputName) => outputs[name]!.values as number[]
      const flowError = names.reduce((sum, name) => {
        return sum + faces[name]! * errorOf(outputs[name]!.bound, Math.max(...of(name).map(Math.abs)))
      }, 0)
      return {
        heats: heatsOf(outputs.heatGained!),
        flows: times.map((_, i) => names.map((name) => faces[name]! * of(name)[i]!)),
        flowError,
      }
    },
    more,
  )
}

function withoutPlaces<I extends Places>(input: I): I {
  const none = (name: 'depths' | 'radii' | 'points') => (input[name] === undefined ? {} : { [name]: [] })
  return { ...input, ...none('depths'), ...none('radii'), ...none('points') }
}

/**
 * Where the flux is given, heat that it brings in says nothing of the temperatures: there what they hold is summed over the depth.
 *
 *   Q = ∫ C·(T − Tᵢ)·A dx over 12 lengths √(at) from the face inward, by panels of 12 points in √x
 */
export function contentBalance<I extends Places & { initialTemperature: number }>(
  solve: (input: I) => Solution,
  input: I,
  body: { diffusivity: number; capacityAt: (depth: number) => number; places: (depths: number[]) => Partial<I> },
): Check[] {
  const last = latestOf(input.times)
  const reach = 12 * Math.sqrt(body.diffusivity) * Math.sqrt(last)
  if (!(reach > 1e-290)) return []
  const depths: number[] = []
  const collect = (s: number) => depths.push(s * s * reach)
  gaussOver(collect, 2)
  const { temperature, heatGained } = solve({
    ...input,
    ...body.places(depths),
    times: [last],
    outputs: ['temperature', 'heatGained'],
  }).outputs
  const row = (temperature!.values as number[][])[0]!
  let next = 0
  let size = 0
  const held = gaussOver((s) => {
    const depth = depths[next]!
    const weight = 2 * s * reach * body.capacityAt(depth)
    size += weight * (temperature!.bound.absolute / 24)
    return weight * (row[next++]! - input.initialTemperature)
  }, 2)
  const gained = (heatGained!.values as number[])[0]!
  if (!(Math.abs(gained) > 1e-280)) return []
  const value = Math.abs(gained - held) / Math.abs(gained)
  const limit = RULE + heatGained!.bound.relative + (heatGained!.bound.absolute + 4 * size) / Math.abs(gained)
  const text = 'The heat gained is what the temperatures along the depth hold, at the last time, as a share of it.'
  return [{ id: 'heat-balance', holds: value <= limit, value, limit, text }]
}
