import fc from 'fast-check'
import type { OutputName } from '../../solvers/outputs.ts'
import { uniform } from './draw.ts'
import { D, erf, erfc, PI } from './exact/functions.ts'
import { exactEnergy, exactHalfSpace, exactSlab } from './exact/film.ts'
import { exactFixedSlab } from './exact/fixed.ts'

/*
 * Random questions with their exact answers. Inputs are decimals of 20 digits, so that rounding them to doubles is
 * part of the error, as it is for a caller.
 */

export interface RandomRow {
  caseId: string
  body: Record<string, unknown>
  exact: Partial<Record<OutputName, D>>
  scale: number
  temperatures: number[]
  surface: number
  label: string
}

const decades = (from: number, to: number) =>
  fc.tuple(uniform, uniform).map(([u, v]) =>
    new D(from)
      .mul(new D(10).pow(Math.log10(to / from) * u))
      .mul(new D(1).plus(new D(v).mul('1e-9')))
      .toSignificantDigits(20),
  )
const temperature = fc
  .tuple(uniform, uniform)
  .map(([u, v]) => new D(u).mul(100).minus(50).plus(new D(v).mul('1e-16')).toSignificantDigits(20))
/** A share of a length, its ends included. */
const share = fc.oneof(
  { weight: 4, arbitrary: uniform.map((u) => Math.min(1, Math.max(0, 1.3 * u - 0.15))) },
  { weight: 1, arbitrary: decades(1e-17, 1).map((d) => d.toNumber()) },
)

const solidArbitrary = fc.record({ k: decades(0.01, 100), density: decades(10, 5e3), specificHeat: decades(100, 5e3) })
const common = { solid: solidArbitrary, initial: temperature, ambient: temperature, share }
const number = (d: D) => d.toNumber()

const slab = fc
  .record({
    ...common,
    d: decades(1e-3, 10),
    faces: fc.constantFrom(1, 2),
    behind: fc.boolean(),
    biot: decades(1e-14, 1e15),
    fourier: fc.oneof(decades(1e-3, 1), decades(1e-9, 1e3)),
  })
  .map((r): RandomRow => {
    const { k, density, specificHeat } = r.solid
    const length = r.d.div(r.faces)
    const capacity = density.mul(specificHeat)
    const film = r.biot.mul(k).div(length).toSignificantDigits(20)
    const time = r.fourier.mul(length).mul(length).mul(capacity).div(k).toSignificantDigits(20)
    const near = D.min(length, length.mul(r.share).toSignificantDigits(20))
    // Behind the mid-plane of a body with two exposed faces, now and then very close to its far face.
    const mirrored = r.faces === 2 && r.behind
    const depth = mirrored ? r.d.minus(near) : near
    const biot = film.mul(length).div(k)
    const fourier = k.mul(time).div(capacity).div(length).div(length)
    const at = exactSlab(biot, fourier, near.div(length))
    const face = exactSlab(biot, fourier, new D(0))
    const step = r.ambient.minus(r.initial)
    return {
      caseId: 'slab-convection',
      body: { ...bodyOf(r, film, time), thickness: number(r.d), exposedFaces: r.faces, depths: [number(depth)] },
      exact: {
        temperature: r.ambient.minus(step.mul(at.remaining)),
        meanTemperature: r.ambient.minus(step.mul(at.mean)),
        remainingFraction: at.remaining,
        completedFraction: at.completed,
        heatFraction: at.heat,
        heatFlux: film
          .mul(step)
          .mul(at.flux)
          .mul(mirrored ? -1 : 1),
        surfaceHeatFlux: film.mul(step).mul(face.remaining),
        heatGained: capacity.mul(length).mul(step).mul(at.heat),
      },
      ...contractOf(r, film.mul(step).mul(face.remaining)),
      label: `Bi ${biot.toPrecision(3)} Fo ${fourier.toPrecision(3)} depth ${r.share.toFixed(3)} of L`,
    }
  })

const halfSpace = fc
  .record({ ...common, d: decades(1e-3, 10), biot: decades(1e-8, 1e8), fourier: decades(1e-3, 1e4) })
  .map((r): RandomRow => {
    const { k, density, specificHeat } = r.solid
    const capacity = density.mul(specificHeat)
    const film = r.biot.mul(k).div(r.d).toSignificantDigits(20)
    const time = r.fourier.mul(r.d).mul(r.d).mul(capacity).div(k).toSignificantDigits(20)
    const depth = r.d.mul(r.share).toSignificantDigits(20)
    const root = k.mul(time).div(capacity).sqrt()
    const beta = film.mul(root).div(k)
    const at = exactHalfSpace(depth.div(root.mul(2)), beta)
    const face = exactHalfSpace(new D(0), beta)
    const step = r.ambient.minus(r.initial)
    return {
      caseId: 'semi-infinite-convection',
      body: { ...bodyOf(r, film, time), depths: [number(depth)] },
      exact: {
        temperature: r.initial.plus(step.mul(at.completed)),
        remainingFraction: at.remaining,
        completedFraction: at.completed,
        heatFlux: film.mul(step).mul(at.flux),
        surfaceHeatFlux: film.mul(step).mul(face.flux),
        heatGained: film.mul(step).mul(time).mul(exactEnergy(beta)),
      },
      ...contractOf(r, film.mul(step).mul(face.flux)),
      label: `β ${beta.toPrecision(3)} η ${depth.div(root.mul(2)).toPrecision(3)}`,
    }
  })

const lumped = fc
  .record({
    ...common,
    capacity: decades(1e-3, 1e9),
    area: decades(1e-6, 1e3),
    film: decades(1e-3, 1e4),
    ratio: decades(1e-8, 100),
    power: temperature,
  })
  .map((r): RandomRow => {
    const { capacity, area, film, power } = r
    const time = r.ratio.mul(capacity).div(film).div(area).toSignificantDigits(20)
    const ratio = time.mul(film).mul(area).div(capacity)
    const left = ratio.neg().exp()
    const done = new D(1).minus(left)
    const rise = power.div(film).div(area)
    const step = r.ambient.minus(r.initial)
    const temperatureNow = r.initial.plus(step.plus(rise).mul(done))
    const sourceScale = D.min(power.abs().mul(time).div(capacity), rise.abs())
    return {
      caseId: 'lumped-convection',
      body: {
        heatCapacity: number(capacity),
        area: number(area),
        filmCoefficient: number(film),
        power: number(power),
        initialTemperature: number(r.initial),
        ambientTemperature: number(r.ambient),
        times: [number(time)],
      },
      exact: {
        temperature: temperatureNow,
        heatGained: temperatureNow.minus(r.initial).mul(capacity),
        remainingFraction: left,
        completedFraction: done,
        heatFraction: done,
        steadyTemperature: r.ambient.plus(rise),
        timeConstant: capacity.div(film).div(area),
      },
      scale: number(step.abs().plus(sourceScale)),
      temperatures: [number(r.initial), number(r.ambient)],
      surface: 0,
      label: `t/τ ${ratio.toPrecision(3)} P/(hA) ${rise.toPrecision(3)}`,
    }
  })

const fixedSlab = fc
  .record({
    ...common,
    d: decades(1e-3, 10),
    faces: fc.constantFrom(1, 2),
    behind: fc.boolean(),
    fourier: fc.oneof(decades(1e-3, 1), decades(1e-9, 1e3)),
  })
  .map((r): RandomRow => {
    const { k, density, specificHeat } = r.solid
    const length = r.d.div(r.faces)
    const capacity = density.mul(specificHeat)
    const time = r.fourier.mul(length).mul(length).mul(capacity).div(k).toSignificantDigits(20)
    const near = D.min(length, length.mul(r.share).toSignificantDigits(20))
    const mirrored = r.faces === 2 && r.behind
    const depth = mirrored ? r.d.minus(near) : near
    const fourier = k.mul(time).div(capacity).div(length).div(length)
    const at = exactFixedSlab(fourier, near.div(length))
    const face = exactFixedSlab(fourier, new D(0))
    const step = r.ambient.minus(r.initial)
    const unit = k.mul(step).div(length)
    return {
      caseId: 'slab-surface-temperature',
      body: { ...heldBodyOf(r, time), thickness: number(r.d), exposedFaces: r.faces, depths: [number(depth)] },
      exact: {
        temperature: r.ambient.minus(step.mul(at.remaining)),
        meanTemperature: r.ambient.minus(step.mul(at.mean)),
        remainingFraction: at.remaining,
        completedFraction: at.completed,
        heatFraction: at.heat,
        heatFlux: unit.mul(at.flux).mul(mirrored ? -1 : 1),
        surfaceHeatFlux: unit.mul(face.flux),
        heatGained: capacity.mul(length).mul(step).mul(at.heat),
      },
      ...contractOf(r, unit.mul(face.flux)),
      label: `Fo ${fourier.toPrecision(3)} depth ${near.div(length).toPrecision(3)} of L`,
    }
  })

const fixedHalfSpace = fc
  .record({ ...common, d: decades(1e-3, 10), fourier: decades(1e-3, 1e4) })
  .map((r): RandomRow => {
    const { k, density, specificHeat } = r.solid
    const capacity = density.mul(specificHeat)
    const time = r.fourier.mul(r.d).mul(r.d).mul(capacity).div(k).toSignificantDigits(20)
    const depth = r.d.mul(r.share).toSignificantDigits(20)
    const eta = depth.div(k.mul(time).div(capacity).sqrt().mul(2))
    const step = r.ambient.minus(r.initial)
    const surface = k.mul(capacity).div(PI.mul(time)).sqrt().mul(step)
    return {
      caseId: 'semi-infinite-surface-temperature',
      body: { ...heldBodyOf(r, time), depths: [number(depth)] },
      exact: {
        temperature: r.initial.plus(step.mul(erfc(eta))),
        remainingFraction: erf(eta),
        completedFraction: erfc(eta),
        heatFlux: surface.mul(eta.mul(eta).neg().exp()),
        surfaceHeatFlux: surface,
        heatGained: k.mul(capacity).mul(time).div(PI).sqrt().mul(2).mul(step),
      },
      ...contractOf(r, surface),
      label: `η ${eta.toPrecision(3)}`,
    }
  })

function heldBodyOf(r: Drawn, time: D): Record<string, unknown> {
  const { conductivity, density, specificHeat, initialTemperature, ambientTemperature, times } = bodyOf(
    r,
    new D(0),
    time,
  )
  return { conductivity, density, specificHeat, initialTemperature, surfaceTemperature: ambientTemperature, times }
}

type Drawn = { solid: { k: D; density: D; specificHeat: D }; initial: D; ambient: D }

function bodyOf(r: Drawn, film: D, time: D): Record<string, unknown> {
  return {
    conductivity: number(r.solid.k),
    density: number(r.solid.density),
    specificHeat: number(r.solid.specificHeat),
    filmCoefficient: number(film),
    initialTemperature: number(r.initial),
    ambientTemperature: number(r.ambient),
    times: [number(time)],
  }
}

function contractOf(r: Drawn, surface: D) {
  return {
    scale: number(r.ambient.minus(r.initial).abs()),
    temperatures: [number(r.initial), number(r.ambient)],
    surface: number(surface),
  }
}

export const randomRows = {
  'slab-convection': slab,
  'semi-infinite-convection': halfSpace,
  'lumped-convection': lumped,
  'slab-surface-temperature': fixedSlab,
  'semi-infinite-surface-temperature': fixedHalfSpace,
}
