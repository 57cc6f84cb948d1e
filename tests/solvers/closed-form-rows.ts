import fc from 'fast-check'
import type { OutputName } from '../../solvers/outputs.ts'
import { exactEnergy, exactHalfSpace } from './exact/film.ts'
import { D, erf, PI } from './exact/functions.ts'
import { decay, type Drive, ended, erfcOf, underFlux, underRamp } from './exact/half-space.ts'
import { exactCosine } from './exact/lumped.ts'
import { exactDose, exactLine, exactPoint } from './exact/sources.ts'
import { exactDecades as decades, exactTemperature as temperature } from './draw.ts'

/*
 * Random questions to the closed forms with their exact answers. Inputs are decimals of 20 digits, so that rounding them
 * to doubles is part of the error, as it is for a caller.
 */

export interface ClosedFormRow {
  caseId: string
  body: Record<string, unknown>
  exact: Partial<Record<OutputName, D>>
  label: string
}

const number = (d: D) => d.toNumber()
const digits = (d: D) => d.toSignificantDigits(20)
const solidArbitrary = fc.record({ k: decades(0.01, 100), density: decades(10, 5e3), specificHeat: decades(100, 5e3) })
type Drawn = { k: D; density: D; specificHeat: D }
const solidOf = ({ k, density, specificHeat }: Drawn) => ({
  conductivity: number(k),
  density: number(density),
  specificHeat: number(specificHeat),
})
const capacityOf = ({ density, specificHeat }: Drawn) => density.mul(specificHeat)
const diffusivityOf = (solid: Drawn) => solid.k.div(capacityOf(solid))
/** η = x/(2√(at)), the face now and then. */
const eta = fc.oneof({ weight: 5, arbitrary: decades(1e-6, 20) }, { weight: 1, arbitrary: fc.constant(new D(0)) })
const signed = (size: fc.Arbitrary<D>) => fc.tuple(size, fc.boolean()).map(([d, up]) => (up ? d : d.neg()))
const depthAt = (n: D, t: D, a: D) => digits(n.mul(2).mul(a.mul(t).sqrt()))

/** A drive that lasts for a share of the time: all of it, nearly all, or next to nothing. */
const lasting = fc.oneof(
  fc.constant(undefined),
  decades(1e-9, 0.9),
  decades(1e-9, 0.1).map((d) => new D(1).minus(d)),
)

function driven(
  caseId: string,
  names: { drive: string; duration: string },
  exactly: typeof underFlux,
): fc.Arbitrary<ClosedFormRow> {
  return fc
    .record({
      solid: solidArbitrary,
      Ti: temperature,
      t: decades(1e-3, 1e10),
      eta,
      size: signed(decades(1e-6, 1e6)),
      lasting,
    })
    .map(({ solid, Ti, t, eta, size, lasting }) => {
      const a = diffusivityOf(solid)
      const x = depthAt(eta, t, a)
      const d = lasting && digits(lasting.mul(t))
      const unit: Drive = d ? ended(exactly, x, t, d, solid.k, a) : exactly(x, t, solid.k, a)
      return {
        caseId,
        body: {
          ...solidOf(solid),
          initialTemperature: number(Ti),
          [names.drive]: number(size),
          ...(d ? { [names.duration]: Math.max(1e-9, number(d)) } : {}),
          depths: [number(x)],
          times: [number(t)],
        },
        exact: {
          temperature: Ti.plus(size.mul(unit.temperature)),
          heatFlux: size.mul(unit.flux),
          surfaceHeatFlux: size.mul(unit.surfaceFlux),
          heatGained: size.mul(unit.heat),
        },
        label: `η ${eta.toPrecision(3)} d/t ${lasting?.toPrecision(3)}`,
      }
    })
    .filter(({ body }) => !(names.duration in body) || (body as Record<string, unknown>)[names.duration] !== 1e-9)
}

const absorbing = fc
  .record({
    solid: solidArbitrary,
    Ti: temperature,
    Ta: temperature,
    t: decades(1e-3, 1e10),
    eta,
    beta: decades(1e-10, 1e8),
    flux: signed(decades(1e-3, 1e6)),
  })
  .map(({ solid, Ti, Ta, t, eta, beta, flux }): ClosedFormRow => {
    const a = diffusivityOf(solid)
    const x = depthAt(eta, t, a)
    const root = a.mul(t).sqrt()
    const film = digits(beta.mul(solid.k).div(root))
    const b = film.mul(root).div(solid.k)
    const at = exactHalfSpace(x.div(root.mul(2)), b)
    const drive = film.mul(Ta.minus(Ti)).plus(flux)
    return {
      caseId: 'semi-infinite-convection',
      body: {
        ...solidOf(solid),
        filmCoefficient: number(film),
        imposedHeatFlux: number(flux),
        initialTemperature: number(Ti),
        ambientTemperature: number(Ta),
        depths: [number(x)],
        times: [number(t)],
      },
      exact: {
        temperature: Ti.plus(drive.div(film).mul(at.completed)),
        heatFlux: drive.mul(at.flux),
        surfaceHeatFlux: drive.mul(exactHalfSpace(new D(0), b).flux),
        heatGained: drive.mul(t).mul(exactEnergy(b)),
        completedFraction: at.completed,
        remainingFraction: at.remaining,
      },
      label: `η ${eta.toPrecision(3)} β ${beta.toPrecision(3)}`,
    }
  })
  .filter(({ body }) => (body['filmCoefficient'] as number) >= 1e-9 && (body['filmCoefficient'] as number) <= 1e9)

const effusivityOf = (solid: Drawn) => solid.k.mul(capacityOf(solid)).sqrt()

/** γ undefined: perfect contact. */
function touching(gammas: fc.Arbitrary<D | undefined>): fc.Arbitrary<ClosedFormRow> {
  return fc
    .record({
      own: solidArbitrary,
      other: solidArbitrary,
      T1: temperature,
      T2: temperature,
      t: decades(1e-3, 1e10),
      eta,
      gamma: gammas,
      inOther: fc.boolean(),
    })
    .map(({ own, other, T1, T2, t, eta, gamma, inOther }): ClosedFormRow => {
      const [e1, e2] = [effusivityOf(own), effusivityOf(other)]
      const [there, share, start] = inOther ? [other, e1, T2] : [own, e2, T1]
      const a = diffusivityOf(there)
      const x = depthAt(eta, t, a)
      const n = x.div(a.mul(t).sqrt().mul(2))
      const way = (inOther ? T1.minus(T2) : T2.minus(T1)).mul(share).div(e1.plus(e2))
      const h = gamma && digits(gamma.div(t.sqrt()).div(new D(1).div(e1).plus(new D(1).div(e2))))
      const g = h?.mul(t.sqrt()).mul(new D(1).div(e1).plus(new D(1).div(e2)))
      const joint = e1.mul(e2).div(e1.plus(e2))
      const contact = e1.mul(T1).plus(e2.mul(T2)).div(e1.plus(e2))
      const at = g && exactHalfSpace(n, g)
      const face = g && exactHalfSpace(new D(0), g)
      const surface = T2.minus(T1).mul(h && face ? h.mul(face.flux) : joint.div(PI.mul(t).sqrt()))
      const completed = at ? at.completed : erfcOf(n)
      const done = face ? face.completed : new D(1)
      return {
        caseId: 'semi-infinite-contact',
        body: {
          ...solidOf(own),
          initialTemperature: number(T1),
          other: { ...solidOf(other), initialTemperature: number(T2) },
          ...(h ? { contactConductance: number(h) } : {}),
          depths: [number(inOther ? x.neg() : x)],
          times: [number(t)],
        },
        exact: {
          temperature: start.plus(way.mul(completed)),
          // At the faces themselves a depth of −0 is the own body's.
          idealTemperature: start.plus(way.mul(erfcOf(n))),
          heatFlux: h && at ? T2.minus(T1).mul(h).mul(at.flux) : surface.mul(decay(n)),
          surfaceHeatFlux: surface,
          heatGained: T2.minus(T1).mul(h && g ? h.mul(t).mul(exactEnergy(g)) : joint.mul(t.div(PI).sqrt()).mul(2)),
          completedFraction: completed,
          remainingFraction: at ? at.remaining : erf(n),
          contactTemperature: contact,
          surfaceTemperature: T1.plus(contact.minus(T1).mul(done)),
          otherSurfaceTemperature: T2.plus(contact.minus(T2).mul(done)),
        },
        label: `η ${eta.toPrecision(3)} γ ${gamma?.toPrecision(3)} ${inOther ? 'other' : 'own'}`,
      }
    })
    .filter(({ body }) => {
      const h = body['contactConductance'] as number | undefined
      return (body['depths'] as number[])[0] !== 0 && (h === undefined || (h >= 1e-9 && h <= 1e12))
    })
}

const cycleArbitrary = fc.record({
  mean: temperature,
  amplitude: decades(1e-3, 100),
  period: decades(1e-3, 1e8),
  turns: signed(decades(1e-3, 1e3)),
  instant: signed(decades(1e-3, 10)),
  lowest: fc.boolean(),
})
const cycleOf = (c: { mean: D; amplitude: D; period: D }, instant: D, lowest: boolean) => ({
  cycleMean: number(c.mean),
  amplitude: number(c.amplitude),
  period: number(c.period),
  [lowest ? 'timeOfMinimum' : 'timeOfMaximum']: number(instant),
})

function swinging(caseId: string, films: fc.Arbitrary<D | undefined>): fc.Arbitrary<ClosedFormRow> {
  return fc
    .record({
      solid: solidArbitrary,
      cycle: cycleArbitrary,
      deep: fc.oneof(decades(1e-6, 30), fc.constant(new D(0))),
      ratio: films,
    })
    .map(({ solid, cycle, deep, ratio }): ClosedFormRow => {
      const { amplitude, mean, period } = cycle
      const t = digits(cycle.turns.mul(period))
      const instant = digits(cycle.instant.mul(period))
      const damping = diffusivityOf(solid).mul(period).div(PI).sqrt()
      const x = digits(deep.mul(damping))
      const X = x.div(damping)
      const film = ratio && digits(ratio.mul(solid.k).div(damping))
      const r = film?.mul(damping).div(solid.k)
      const size = r && r.plus(1).pow(2).plus(1).sqrt()
      const gain = r && size ? r.div(size) : new D(1)
      const lag = r ? D.atan(new D(1).div(r.plus(1))) : new D(0)
      const turned = t.minus(instant).div(period)
      const angle = turned.minus(turned.floor()).mul(PI).mul(2).minus(lag)
      const sign = cycle.lowest ? -1 : 1
      const local = amplitude.mul(gain).mul(X.neg().exp())
      const fluxSize = amplitude.mul(gain).mul(solid.k).mul(new D(2).sqrt()).div(damping)
      const eighth = PI.div(4)
      return {
        caseId,
        body: {
          ...solidOf(solid),
          ...cycleOf(cycle, instant, cycle.lowest),
          ...(film ? { filmCoefficient: number(film) } : {}),
          depths: [number(x)],
          times: [number(t)],
        },
        exact: {
          temperature: mean.plus(local.mul(angle.minus(X).cos()).mul(sign)),
          heatFlux: fluxSize.mul(X.neg().exp()).mul(angle.minus(X).plus(eighth).cos()).mul(sign),
          surfaceHeatFlux: fluxSize.mul(angle.plus(eighth).cos()).mul(sign),
          amplitude: local,
          timeLag: lag.plus(X).div(PI).div(2).mul(period),
          dampingDepth: damping,
          heatPerHalfCycle: fluxSize.mul(period).div(PI),
        },
        label: `X ${deep.toPrecision(3)} r ${ratio?.toPrecision(3)} turns ${cycle.turns.toPrecision(3)}`,
      }
    })
    .filter(({ body }) => {
      const h = body['filmCoefficient'] as number | undefined
      return h === undefined || (h >= 1e-9 && h <= 1e9)
    })
}

function around(caseId: string, field: string, exactly: typeof exactLine): fc.Arbitrary<ClosedFormRow> {
  return fc
    .record({
      solid: solidArbitrary,
      Ti: temperature,
      t: decades(1e-3, 1e10),
      eta: decades(1e-6, 20),
      size: signed(decades(1e-3, 1e6)),
    })
    .map(({ solid, Ti, t, eta, size }): ClosedFormRow => {
      const a = diffusivityOf(solid)
      const r = depthAt(eta, t, a)
      const { rise, flux } = exactly(r, t, solid.k, a)
      return {
        caseId,
        body: {
          ...solidOf(solid),
          initialTemperature: number(Ti),
          [field]: number(size),
          radii: [number(r)],
          times: [number(t)],
        },
        exact: { temperature: Ti.plus(size.mul(rise)), heatFlux: size.mul(flux) },
        label: `η ${eta.toPrecision(3)}`,
      }
    })
    .filter(({ body }) => (body['radii'] as number[])[0]! <= 1e5 && (body['radii'] as number[])[0]! >= 1e-12)
}

const lumped = fc.record({
  capacity: decades(1e-3, 1e9),
  area: decades(1e-6, 1e3),
  film: decades(1e-3, 1e4),
  s: fc.oneof(decades(1e-10, 100), decades(0.1, 3)),
  Ti: temperature,
})

const warming = fc
  .record({ body: lumped, start: temperature, rate: signed(decades(1e-6, 10)) })
  .map(({ body, start, rate }): ClosedFormRow => {
    const { capacity, area, film, Ti } = body
    const t = digits(body.s.mul(capacity).div(film).div(area))
    const s = t.mul(film).mul(area).div(capacity)
    const done = new D(1).minus(s.neg().exp())
    const rise = start
      .minus(Ti)
      .mul(done)
      .plus(rate.mul(t).mul(new D(1).minus(done.div(s))))
    return {
      caseId: 'lumped-varying-ambient',
      body: {
        heatCapacity: number(capacity),
        area: number(area),
        filmCoefficient: number(film),
        initialTemperature: number(Ti),
        ambient: { kind: 'ramp', start: number(start), rampRate: number(rate) },
        times: [number(t)],
      },
      exact: { temperature: Ti.plus(rise), heatGained: capacity.mul(rise) },
      label: `t/τ ${s.toPrecision(3)}`,
    }
  })

const cycling = fc
  .record({ body: lumped, cycle: cycleArbitrary, turned: fc.oneof(decades(1e-8, 1e4), decades(0.05, 1)) })
  .map(({ body, cycle, turned }): ClosedFormRow => {
    const { capacity, area, film, Ti } = body
    const t = digits(body.s.mul(capacity).div(film).div(area))
    const period = digits(t.div(turned))
    const instant = digits(cycle.instant.mul(period))
    const s = t.mul(film).mul(area).div(capacity)
    const done = new D(1).minus(s.neg().exp())
    const y = exactCosine(t, s, period, instant).mul(cycle.lowest ? -1 : 1)
    const rise = cycle.mean.minus(Ti).mul(done).plus(cycle.amplitude.mul(y))
    return {
      caseId: 'lumped-varying-ambient',
      body: {
        heatCapacity: number(capacity),
        area: number(area),
        filmCoefficient: number(film),
        initialTemperature: number(Ti),
        ambient: { kind: 'cycle', ...cycleOf({ ...cycle, period }, instant, cycle.lowest) },
        times: [number(t)],
      },
      exact: { temperature: Ti.plus(rise), heatGained: capacity.mul(rise) },
      label: `t/τ ${s.toPrecision(3)} t/P ${turned.toPrecision(3)}`,
    }
  })
  .filter(({ body, exact }) => {
    const { period } = body['ambient'] as { period: number }
    return period >= 1e-6 && period <= 1e12 && exact.temperature !== undefined
  })

export const closedFormRows = {
  'a flux, and a pulse': driven(
    'semi-infinite-surface-flux',
    { drive: 'imposedHeatFlux', duration: 'pulseDuration' },
    underFlux,
  ),
  'a ramp, held or not': driven(
    'semi-infinite-surface-ramp',
    { drive: 'rampRate', duration: 'rampDuration' },
    underRamp,
  ),
  'a film and an absorbed flux': absorbing,
  'perfect contact': touching(fc.constant(undefined)),
  'contact with a conductance': touching(decades(1e-8, 1e8)),
  'a surface in a cycle': swinging('semi-infinite-periodic-surface', fc.constant(undefined)),
  'a fluid in a cycle': swinging('semi-infinite-periodic-ambient', decades(1e-6, 1e6)),
  'a line source': around('line-source', 'linePower', exactLine),
  'a point source': around('point-source', 'power', exactPoint),
  'a dose at a point': around('point-source', 'energy', exactDose),
  'one temperature in a ramp': warming,
  'one temperature in a cycle': cycling,
}
