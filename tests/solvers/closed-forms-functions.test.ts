import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { phaseAt, waveAt } from '../../solvers/math/cycle-phase.ts'
import { exponentialIntegral } from '../../solvers/math/exponential-integral.ts'
import { rampAfter, rootAfter, rootAfterAtFace, stepAfter } from '../../solvers/math/half-space-drives.ts'
import { afterPulse } from '../../solvers/math/half-space-pulse.ts'
import { i2erfcx } from '../../solvers/math/i2erfcx.ts'
import { cosineShare, rampShare, rangeSoFar } from '../../solvers/math/lumped-response.ts'
import { type Estimate, EPS } from '../../solvers/math/rounding.ts'
import { proof, seed } from './counts.ts'
import { decades, uniform } from './draw.ts'
import { D, erfcx, PI } from './exact/functions.ts'
import { ended, underFlux, underRamp } from './exact/half-space.ts'
import { exactCosine } from './exact/lumped.ts'
import { exactE1 } from './exact/sources.ts'

/* The functions behind the closed forms, against decimal arithmetic at 60 digits. */

const count = proof ? 4000 : 300
const sampled = <T>(arbitrary: fc.Arbitrary<T>) => fc.sample(arbitrary, { numRuns: count, seed })
/** A double digit for digit: its shortest decimal would be another number. */
const same = (x: number) => new D(`0x${Math.abs(x).toString(16)}`).mul(x < 0 ? -1 : 1)
const errorIn = (value: number, exact: D) => Number(new D(value).minus(exact).div(exact).abs().div(EPS))
const excess = ({ value, error }: Estimate, exact: D) => Number(same(value).minus(exact).abs()) / error

describe('the second integral of erfc', () => {
  const exact = (x: D) => x.mul(x).mul(2).plus(1).mul(erfcx(x)).minus(x.mul(2).div(PI.sqrt())).div(4)
  it('keeps its stated errors from 1e-9 to 1e6', () => {
    for (const x of [...sampled(decades(1e-9, 1e6)), 1 - 1e-15, 1])
      expect(errorIn(i2erfcx(x), exact(same(x))), `${x}`).toBeLessThan(x < 1 ? 100 : 8)
  })
  it('vanishes far out, and the plain difference has lost all digits by then', () => {
    expect(i2erfcx(1e200)).toBe(0)
    const x = 3e4
    const plain = ((1 + 2 * x * x) * erfcx(new D(x)).toNumber() - (2 * x) / Math.sqrt(Math.PI)) / 4
    expect(errorIn(plain, exact(same(x)))).toBeGreaterThan(1e10)
  })
})

describe('the exponential integral', () => {
  it('keeps its stated errors from 1e-40 to 700, on both sides of 1', () => {
    const arguments_ = [...sampled(decades(1e-40, 700)), ...sampled(decades(0.2, 5)), 1 - 2e-16, 1]
    for (const u of arguments_)
      expect(errorIn(exponentialIntegral(u), exactE1(same(u))), `${u}`).toBeLessThan(u < 1 ? 20 : 8)
  })
  it('stays finite at both ends', () => {
    expect(exponentialIntegral(1e-300)).toBeCloseTo(690.1983122333121, 10)
    expect(exponentialIntegral(800)).toBe(0)
    expect(exponentialIntegral(Infinity)).toBe(0)
  })
})

describe('what a drive leaves behind after it has ended', () => {
  /** t/d from just above 1 to 1e12, and both sides of what decides the form: d = t/2, and η²d/(t − d) = 1. */
  const cases = fc.tuple(
    fc.oneof(decades(1e-12, 0.999999), fc.constantFrom(0.5 - 1e-12, 0.5, 0.5 + 1e-12)),
    fc.oneof(decades(1e-5, 20), fc.constant(0), fc.constantFrom(1 - 1e-12, 1, 1 + 1e-12)),
    fc.boolean(),
  )
  it('is within its error of the exact difference, in relative digits too', () => {
    for (const [share, size, atEdge] of sampled(cases)) {
      const duration = share
      const eta = atEdge ? size * Math.sqrt((1 - share) / share) : size
      if (eta > 20) continue
      const depth = 2 * eta
      const at = afterPulse(1, duration, depth, 1)
      const under = (drive: typeof underFlux) => ended(drive, same(depth), new D(1), same(duration), new D(1), new D(1))
      const [flux, ramp] = [under(underFlux), under(underRamp)]
      const label = `d/t ${share} η ${eta}`
      expect(excess(rampAfter(at, 1), ramp.temperature), label).toBeLessThan(1)
      expect(excess(rootAfter(at, 1), flux.temperature), label).toBeLessThan(1)
      expect(
        excess(rootAfterAtFace(afterPulse(1, duration, 0, 1), duration, 1), ramp.surfaceFlux.div(1)),
        label,
      ).toBeLessThan(1)
      if (eta > 0) expect(excess(stepAfter(at), flux.flux), label).toBeLessThan(1)
      const planted = rampAfter(at, 1)
      expect(excess({ ...planted, value: planted.value * (1 + 1e-10) }, ramp.temperature), label).toBeGreaterThan(1)
      for (const found of [rampAfter(at, 1), rootAfter(at, 1)]) expect(found.error / found.value).toBeLessThan(1e-11)
    }
  })
  it('has lost its digits in the plain difference', () => {
    const plain = Math.sqrt(1) - Math.sqrt(1 - 1e-12)
    const exact = new D(1).minus(new D(1).minus(same(1e-12)).sqrt())
    expect(errorIn(plain, exact)).toBeGreaterThan(1e10)
  })
})

describe('the phase of a cycle', () => {
  it('is reduced exactly, whatever the number of turns', () => {
    for (const [turns, from] of sampled(fc.tuple(decades(1, 1e15), uniform))) {
      const period = 86400
      const time = period * turns
      const instant = period * from
      const exact = same(time).minus(same(instant)).div(period)
      const angle = exact.minus(exact.floor()).mul(PI).mul(2)
      const { angle: found } = phaseAt(time, { period, instant })
      expect(Math.abs(Math.cos(found) - angle.cos().toNumber())).toBeLessThan(2e-15)
    }
  })
  it('counts the rounding of far times as an error, and no more than both ends of a cosine', () => {
    const near = waveAt(phaseAt(1000, { period: 86400, instant: 0 }))
    const far = waveAt(phaseAt(86400e6 + 1000, { period: 86400, instant: 0 }))
    expect(near.error).toBeLessThan(1e-15)
    expect(far.error).toBeGreaterThan(1e-11)
    expect(waveAt(phaseAt(1e17, { period: 1e-6, instant: 0 })).error).toBeLessThanOrEqual(2)
  })
})

describe('a body with one temperature', () => {
  it('follows a ramp by its power series below t = τ and by expm1 above, within the error', () => {
    for (const s of [...sampled(decades(1e-12, 1e6)), 1 - 1e-15, 1]) {
      const exact = new D(1).minus(new D(1).minus(same(s).neg().exp()).div(same(s)))
      expect(errorIn(rampShare(s).value, exact), `${s}`).toBeLessThan(12)
    }
  })
  it('follows a cosine within the error on both sides of t = τ and t = P/2π', () => {
    const drawn = fc.tuple(decades(1e-10, 50), decades(1e-10, 1e4), uniform)
    const edges = [1 - 1e-12, 1, 1 + 1e-12].flatMap((s) =>
      [1 - 1e-12, 1, 1 + 1e-12].map((turned): [number, number, number] => [s, turned / (2 * Math.PI), 0.3]),
    )
    for (const [s, turns, from] of [...sampled(drawn), ...edges]) {
      const period = 1000
      const time = turns * period
      const instant = from * period
      const cycle = { cycleMean: 0, amplitude: 1, period, instant, sign: 1 as const }
      const exact = exactCosine(same(time), same(s), same(period), same(instant))
      expect(excess(cosineShare(time, s, cycle, time / s), exact), `t/τ ${s} t/P ${turns}`).toBeLessThan(1)
    }
  })
  it('knows what a cycle has reached so far', () => {
    for (const [turns, from] of sampled(fc.tuple(decades(1e-4, 2), uniform))) {
      const cycle = { cycleMean: 0, amplitude: 1, period: 1, instant: from, sign: 1 as const }
      const seen = Array.from({ length: 2001 }, (_, i) => Math.cos(2 * Math.PI * ((turns * i) / 2000 - from)))
      const { lowest, highest } = rangeSoFar(turns, cycle)
      expect(Math.abs(lowest - Math.min(...seen))).toBeLessThan(2e-5)
      expect(Math.abs(highest - Math.max(...seen))).toBeLessThan(2e-5)
      const turned = rangeSoFar(turns, { ...cycle, sign: -1 })
      expect([-turned.highest, -turned.lowest]).toEqual([lowest, highest])
    }
  })
})
