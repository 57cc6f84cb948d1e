import type { Body } from './body.ts'
import type { Answer } from './solve.ts'

/** What a drawing reads from the description of a case. */
export interface Described {
  id: string
  places: 'depths' | 'radii' | 'depths-or-radii' | 'points' | 'none'
  pointAxes: readonly string[]
  sketch: { body: string; boundary: string }
  depthsEndAt: string | null
  drive: string | null
  weight: number
  outputs: readonly { name: string }[]
  fields: readonly {
    name: string
    schema: Readonly<Record<string, unknown>>
    kinds?: readonly { kind: string }[] | undefined
  }[]
}

interface Items {
  minimum?: number
  maximum?: number
}

const itemsOf = ({ fields }: Described, name: string): Items =>
  (fields.find((field) => field.name === name)?.schema['items'] as Items | undefined) ?? {}

/** The least and the largest value that the contract accepts in a list. */
export const leastOf = (c: Described, name: string): number => itemsOf(c, name).minimum ?? -Infinity
export const largestOf = (c: Described, name: string): number => itemsOf(c, name).maximum ?? Infinity

/** Times of a clock, which may be negative. */
export const hasClock = (c: Described): boolean => leastOf(c, 'times') < 0

/** Whether its temperatures can be drawn over time. */
export const isDrawn = (c: Described): boolean =>
  c.outputs.some(({ name }) => name === 'temperature') && c.fields.some(({ name }) => name === 'times')

/** A quantity of the input as it was used. */
export function numberIn({ input }: Answer, name: string | null): number | undefined {
  const value = name === null ? undefined : input[name]
  return typeof value === 'number' ? value : undefined
}

export const numbersOf = (value: unknown): number[] =>
  Array.isArray(value) ? value.filter((v) => typeof v === 'number') : []

/** What the reader asked for, as it stands in the grid of a drawing. */
export interface Asked {
  places: readonly number[]
  times: readonly number[]
}

export const twelve = (value: number): number => Number(value.toPrecision(12))

export const askedIn = (body: Body): Asked => ({
  places: numbersOf(body['depths'] ?? body['radii']),
  times: numbersOf(body['times']),
})
