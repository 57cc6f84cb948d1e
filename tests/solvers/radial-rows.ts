import fc from 'fast-check'
import type { OutputName } from '../../solvers/outputs.ts'
import { exactDecades as decades, exactTemperature as temperature, uniform } from './draw.ts'
import { exactCylinder, type ExactRound, exactSphere } from './exact/round.ts'
import { D, PI } from './exact/functions.ts'

/*
 * Random questions about cylinders and spheres with their exact answers. Inputs are decimals of 20 digits, so that rounding
 * them to doubles is part of the error, as it is for a caller.
 */

export interface RadialRow {
  caseId: string
  body: Record<string, unknown>
  exact: Partial<Record<OutputName, D>>
  scale: number
  temperatures: number[]
  surface: number
  label: string
}

const number = (d: D) => d.toNumber()

interface Form {
  exact(biot: D | null, fourier: D, delta: D): ExactRound
  volume(radius: D): D
}
const cylinder: Form = { exact: exactCylinder, volume: (R) => PI.mul(R).mul(R) }
const sphere: Form = { exact: exactSphere, volume: (R) => PI.mul(4).div(3).mul(R.pow(3)) }

function rows(form: 'cylinder' | 'sphere', held: boolean, fourier: fc.Arbitrary<D>): fc.Arbitrary<RadialRow> {
  const { exact, volume } = form === 'cylinder' ? cylinder : sphere
  return fc
    .record({
      k: decades(0.01, 100),
      density: decades(10, 5e3),
      specificHeat: decades(100, 5e3),
      radius: decades(1e-3, 10),
      biot: decades(1e-9, 1e15),
      fourier,
      initial: temperature,
      drive: temperature,
      share: fc.oneof(
        { weight: 4, arbitrary: uniform.map((u) => Math.min(1, Math.max(0, 1.3 * u - 0.15))) },
        { weight: 1, arbitrary: decades(1e-15, 1).map(number) },
      ),
      byRadius: fc.boolean(),
    })
    .map((r): RadialRow => {
      const { k, density, specificHeat, radius, share } = r
      const capacity = density.mul(specificHeat)
      const film = r.biot.mul(k).div(radius).toSignificantDigits(20)
      const time = r.fourier.mul(radius).mul(radius).mul(capacity).div(k).toSignificantDigits(20)
      const place = D.min(radius, radius.mul(share).toSignificantDigits(20))
      const delta = r.byRadius ? new D(1).minus(place.div(radius)) : place.div(radius)
      const biot = held ? null : film.mul(radius).div(k)
      const fo = k.mul(time).div(capacity).div(radius).div(radius)
      const at = exact(biot, fo, delta)
      const face = exact(biot, fo, new D(0))
      const step = r.drive.minus(r.initial)
      const unit = held ? k.mul(step).div(radius) : film.mul(step)
      return {
        caseId: `${form}-${held ? 'surface-temperature' : 'convection'}`,
        body: {
          conductivity: number(k),
          density: number(density),
          specificHeat: number(specificHeat),
          radius: number(radius),
          initialTemperature: number(r.initial),
          ...(held
            ? { surfaceTemperature: number(r.drive) }
            : { filmCoefficient: number(film), ambientTemperature: number(r.drive) }),
          [r.byRadius ? 'radii' : 'depths']: [number(place)],
          times: [number(time)],
        },
        exact: {
          temperature: r.drive.minus(step.mul(at.remaining)),
          meanTemperature: r.drive.minus(step.mul(at.mean)),
          remainingFraction: at.remaining,
          completedFraction: at.completed,
          heatFraction: at.heat,
          heatFlux: unit.mul(at.flux),
          surfaceHeatFlux: unit.mul(face.flux),
          heatGained: capacity.mul(volume(radius)).mul(step).mul(at.heat),
        },
        scale: number(step.abs()),
        temperatures: [number(r.initial), number(r.drive)],
        surface: number(unit.mul(face.flux)),
        label: `Bi ${biot?.toPrecision(3) ?? 'held'} Fo ${fo.toPrecision(3)} ${r.byRadius ? 'radius' : 'depth'} ${share.toFixed(3)} of R`,
      }
    })
}

/** The Bessel functions of exact cylinders take long, so there are fewer of them. */
export const radialRows = {
  'cylinder-convection': { arbitrary: rows('cylinder', false, decades(0.01, 100)), count: 12 },
  'cylinder-surface-temperature': { arbitrary: rows('cylinder', true, decades(0.01, 100)), count: 10 },
  'sphere-convection': {
    arbitrary: rows('sphere', false, fc.oneof(decades(1e-3, 1), decades(1e-9, 1e3))),
    count: 60,
  },
  'sphere-surface-temperature': {
    arbitrary: rows('sphere', true, fc.oneof(decades(1e-3, 1), decades(1e-9, 1e3))),
    count: 50,
  },
}
