import { type Case, placeFields, type Resolved } from '../../case.ts'
import type { Bound } from '../../solution.ts'
import { figure } from '../../statement/validate.ts'
import { once } from '../once.ts'
import type { Drawing, Series } from './drawing.ts'

export type Kind = 'profiles' | 'histories' | 'dimensionless-centre' | 'position-correction' | 'heat-fraction'

/** The kinds of chart that a case has: classic ones of bodies with an end that one fluid drives. */
export function kindsOf(c: Case): Kind[] {
  const names = placeFields[c.places] as readonly string[]
  const along = names.includes('depths') || names.includes('radii')
  const classic =
    c.drive === 'ambientTemperature' && c.depthsEndAt && c.outputs.heatFraction && c.outputs.remainingFraction
  return [
    ...(along ? (['profiles'] as const) : []),
    'histories',
    ...(classic ? (['dimensionless-centre', 'position-correction', 'heat-fraction'] as const) : []),
  ]
}

/** Curves with how they are to be drawn, apart from the paper. */
export type Curves = Pick<Drawing, 'x' | 'y' | 'series'> & {
  units: { x: string; y: string }
  bound: Bound
  /** A sentence on what is drawn and how far it is off. */
  error: string
}

export interface Span {
  from: number
  until: number
  points: number
  log: boolean
}

/** Evenly spaced numbers, or by one ratio. */
export function spaced({ from, until, points, log }: Span): number[] {
  const at = (share: number) => (log ? from * (until / from) ** share : from + (until - from) * share)
  return Array.from({ length: points }, (_, i) => (i === points - 1 ? until : at(i / (points - 1))))
}

const exact = (bound: number) => `Drawn from exact values; the numbers are off by at most ${bound.toPrecision(1)}.`

/** Temperature along the places, a curve for each time. */
export function profiles(c: Case, input: Resolved, axis: 'depths' | 'radii'): Curves {
  const { values, bound } = c.solve(input).outputs.temperature!
  const series = (values as number[][]).map((row, i) => ({
    label: `${figure(input.times[i]!)} s`,
    x: input[axis]!,
    y: row,
  }))
  return {
    x: { label: axis === 'radii' ? 'Radius, m' : 'Depth, m', log: false },
    y: { label: 'Temperature, °C', log: false },
    units: { x: 'm', y: 'Cel' },
    series,
    bound,
    error: exact(bound.absolute),
  }
}

/** Temperature over time, a curve for each place. */
export function histories(c: Case, input: Resolved, log: boolean): Curves {
  const { values, bound } = c.solve(input).outputs.temperature!
  const rows = values as number[] | number[][]
  const labels = labelsOf(input)
  const series = labels.map((label, j) => ({
    label,
    x: input.times,
    y: rows.map((row) => (typeof row === 'number' ? row : row[j]!)),
  }))
  return {
    x: { label: 'Time, s', log },
    y: { label: 'Temperature, °C', log: false },
    units: { x: 's', y: 'Cel' },
    series,
    bound,
    error: exact(bound.absolute),
  }
}

function labelsOf({ depths, radii, points }: Resolved): string[] {
  const places = depths ?? radii
  if (places?.length) return places.map((place) => `${figure(place)} m`)
  if (points?.length)
    return points.map((point) =>
      Object.entries(point)
        .map(([axis, v]) => `${axis} ${figure(v)}`)
        .join(', '),
    )
  return ['Body']
}

/** A body of length, conductivity and heat capacity 1 that starts at 1 in a fluid at 0: times are Fourier numbers. */
function unitBody(c: Case, biot: number, asked: { times: number[]; depths: number[]; outputs: string[] }) {
  const faces = 'exposedFaces' in c.fields ? { exposedFaces: 1 } : {}
  const body = { conductivity: 1, volumetricHeatCapacity: 1, [c.depthsEndAt!]: 1, ...faces }
  const input = { ...body, filmCoefficient: biot, initialTemperature: 1, ambientTemperature: 0, ...asked }
  return c.solve(c.resolve(input)).outputs
}

const biotLabel = (biot: number) => `Bi ${figure(biot)}`
const worst = (a: Bound, b: Bound): Bound => ({
  absolute: Math.max(a.absolute, b.absolute),
  relative: Math.max(a.relative, b.relative),
})

/** One number over the Fourier number, a curve for each Biot number. */
function overFourier(c: Case, biots: readonly number[], span: Span, output: 'remainingFraction' | 'heatFraction') {
  const times = spaced(span)
  let bound: Bound = { absolute: 0, relative: 0 }
  const series = biots.map((biot): Series => {
    const found = unitBody(c, biot, { times, depths: [1], outputs: [output] })[output]!
    bound = worst(bound, found.bound)
    return { label: biotLabel(biot), x: times, y: (found.values as (number | number[])[]).flat() }
  })
  return { series, bound, x: { label: 'Fourier number', log: span.log }, units: { x: '1', y: '1' } }
}

/** Remaining fraction at the centre, on a logarithmic axis: straight once one term is left. */
export function dimensionlessCentre(c: Case, biots: readonly number[], span: Span): Curves {
  const found = overFourier(c, biots, span, 'remainingFraction')
  return {
    ...found,
    y: { label: 'Remaining fraction at the centre', log: true },
    error: exact(found.bound.absolute + found.bound.relative),
  }
}

export function heatFraction(c: Case, biots: readonly number[], span: Span): Curves {
  const found = overFourier(c, biots, span, 'heatFraction')
  return {
    ...found,
    y: { label: 'Heat fraction', log: false },
    error: exact(found.bound.absolute + found.bound.relative),
  }
}

/** From here on the correction may be used. */
const FROM_FOURIER = 0.2
/** Here only the first term is left of any body, to the last digit. */
const LATE_FOURIER = 5

/** Remaining fractions at some places as shares of the one at the centre. */
function shapeAt(c: Case, biot: number, fourier: number, ratios: readonly number[]): number[] {
  const depths = [...ratios.map((ratio) => 1 - ratio), 1]
  const { values } = unitBody(c, biot, { times: [fourier], depths, outputs: ['remainingFraction'] }).remainingFraction!
  const row = (values as number[][])[0]!
  return row.slice(0, -1).map((value) => value / row.at(-1)!)
}

/** Largest share by which the face differs from its correction at the earliest time it may be used at, and where. */
export const correctionError = once((c: Case): { error: number; biot: number } => {
  const biots = Array.from({ length: 41 }, (_, k) => 10 ** (k / 10 - 2))
  return biots.reduce(
    (most, biot) => {
      const [late] = shapeAt(c, biot, LATE_FOURIER, [1])
      const [early] = shapeAt(c, biot, FROM_FOURIER, [1])
      const error = Math.abs(early! / late! - 1)
      return error > most.error ? { error, biot } : most
    },
    { error: 0, biot: 0 },
  )
})

/** The temperature of a place over that of the centre, once one term is left; a curve for each Biot number. */
export function positionCorrection(c: Case, biots: readonly number[], span: Span): Curves {
  const x = spaced({ ...span, log: false })
  const series = biots.map((biot) => ({ label: biotLabel(biot), x, y: shapeAt(c, biot, LATE_FOURIER, x) }))
  const { error, biot } = correctionError(c)
  return {
    x: { label: 'Place: 0 the centre, 1 the exposed face', log: false },
    y: { label: 'Remaining fraction over that of the centre', log: false },
    units: { x: '1', y: '1' },
    series,
    // Between the Biot numbers that were tried it may be larger by less than a hundredth of itself.
    bound: { absolute: 0, relative: 1.01 * error },
    error: `For Fourier numbers of ${FROM_FOURIER} and more only; there the correction errs by at most ${(100 * error).toPrecision(2)} % (Bi ${biot.toPrecision(2)}), later by less.`,
  }
}
