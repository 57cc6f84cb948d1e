import erf from '@stdlib/math-base-special-erf'
import erfcx from '@stdlib/math-base-special-erfcx'
import { energyFraction } from './convective-half-space.ts'
import { gauss } from './gauss.ts'
import { ierfcx } from './ierfcx.ts'
import type { Moment } from './unit-body.ts'

/*
 * What drives the face of a sphere, as a plane body sees it: w = ρ(1 − θ) obeys the plane equation, and is made of images
 * P(η) of a half space with η = distance/(2√Fo).
 */
export interface SphereFace {
  /** Images kept: δ and 2 − δ, and as many again at 2 + δ and 4 − δ. */
  pairs: 1 | 2
  /** Biot number that fluxes are told in units of; 1 where the face is held. */
  unit: number
  /** P. */
  image(eta: number, m: Moment): number
  /** −P′/(2√Fo): what the image adds to ∂w/∂ρ. */
  slope(eta: number, m: Moment): number
  /** P″/(4Fo): what it adds to ∂²w/∂ρ². */
  bend(eta: number, m: Moment): number
  /** 1 − P without cancellation, and the size of what it is made of; undefined where P stays below 1/2. */
  left(eta: number, m: Moment): { value: number; size: number } | undefined
  /** P(far) less the image of the second pair that nearly cancels it, 2·near farther away. */
  mirrored(far: number, near: number, m: Moment): number
  /** Heat fraction without the reflections. */
  heat(m: Moment): { value: number; size: number }
}

const SQRT_PI = 1.772453850905516
const FAR = 27.5
const decayOf = (eta: number) => (eta > FAR ? 0 : Math.exp(-eta * eta))
const erfcOf = (eta: number) => decayOf(eta) * erfcx(eta)

/** The face itself is stepped: P = erfc. */
export const heldFace: SphereFace = {
  pairs: 2,
  unit: 1,
  image: erfcOf,
  slope: (eta, m) => decayOf(eta) / (SQRT_PI * m.root),
  bend: (eta, m) => (eta * decayOf(eta)) / m.root / (SQRT_PI * m.root),
  left: (eta) => ({ value: erf(eta), size: erf(eta) }),
  mirrored: (far, near) =>
    near * far > 0.5 ? erfcOf(far) - erfcOf(far + 2 * near) : (2 / SQRT_PI) * gauss(decayOf, far, 2 * near),
  heat(m) {
    const far = 1 / m.root
    const images = 1 / SQRT_PI + (far > FAR ? 0 : 2 * decayOf(far) * ierfcx(far))
    return { value: 3 * m.root * (2 * images - m.root), size: 9 * m.root }
  },
}

/**
 * A film: w′ + Hw = Bi at the face, with H = Bi − 1 of any sign and β = H√Fo.
 *
 *   P = Bi·√Fo·e^(−η²)·[erfcx(η) − erfcx(η + β)]/β
 *   −P′/(2√Fo) = Bi·e^(−η²)·erfcx(η + β),   P″/(4Fo) = Bi·e^(−η²)·[η·erfcx(η + β) + ierfcx(η + β)]/√Fo
 *   Q/Q₀ = 3BiFo·[1 − Bi√Fo·(1 − E(β))/β],   E = [erfcx(β) − 1 + 2β/√π]/β²
 */
export function filmFace(biot: number): SphereFace {
  const H = biot - 1
  return {
    pairs: 1,
    unit: biot,
    image(eta, m) {
      if (eta > FAR) return 0
      const beta = H * m.root
      return biot * m.root * decayOf(eta) * scaledDifference(eta, beta)
    },
    slope: (eta, m) => biot * decayOf(eta) * erfcx(eta + H * m.root),
    bend(eta, m) {
      const shifted = eta + H * m.root
      return (biot * decayOf(eta) * (eta * erfcx(shifted) + ierfcx(shifted))) / m.root
    },
    left(eta, m) {
      if (biot < 2) return undefined
      const whole = biot * (erf(eta) + decayOf(eta) * erfcx(eta + H * m.root))
      return { value: (whole - 1) / H, size: (whole + 1) / H }
    },
    mirrored(far, _near, m) {
      return this.image(far, m)
    },
    heat(m) {
      const beta = H * m.root
      const share = biot < 2 ? 1 - biot * m.root * energyDeficit(beta) : (biot * energyFraction(beta) - 1) / H
      const value = 3 * biot * m.fourier * share
      return { value, size: 2 * value }
    },
  }
}

/** [erfcx(η) − erfcx(η + β)]/β, by quadrature of −erfcx′ = 2·ierfcx where the difference would cancel. */
function scaledDifference(eta: number, beta: number): number {
  if (beta >= Math.max(0.7, eta)) return (erfcx(eta) - erfcx(eta + beta)) / beta
  return beta === 0 ? 2 * ierfcx(eta) : (2 * gauss(ierfcx, eta, beta)) / beta
}

/** (1 − E(β))/β = Σ (−β)ⁿ/Γ(n/2 + 5/2), for |β| < 1. */
function energyDeficit(beta: number): number {
  let even = 0.7522527780636751
  let odd = -beta / 2
  let sum = even + odd
  for (let n = 2; n < 60; n += 2) {
    even *= (beta * beta) / (n / 2 + 1.5)
    odd *= (beta * beta) / (n / 2 + 2)
    sum += even + odd
  }
  return sum
}
