import { EPS } from './rounding.ts'
import type { FirstDeficit, Mode } from './round-series.ts'
import type { UnitPlaces } from './unit-body.ts'

/* How far the first mode alone is from 1: 1 − C₁φ₁(ρ) = (1 − C₁) + C₁(1 − φ₁(ρ)), and 1 − its mean. */

/** Up to this root by power series in z; above, nothing cancels. */
const SMALL = 0.9

interface Powers {
  /** 1 − C₁. */
  coefficient: number
  /** 1 − the mean. */
  mean: number
  /** 1 − φ₁ at x = zρ. */
  bend(x: number): number
}

export function sphereDeficit(places: UnitPlaces, first: Mode): FirstDeficit {
  return deficit(places, first, spherePowers)
}

export function cylinderDeficit(places: UnitPlaces, first: Mode): FirstDeficit {
  return deficit(places, first, cylinderPowers)
}

function deficit(places: UnitPlaces, first: Mode, powersOf: (z: number) => Powers): FirstDeficit {
  const { root: z, parts, mean } = first
  if (z > SMALL)
    return {
      at: (j) => ({ value: 1 - parts[j]!.value, error: EPS * (1 + parts[j]!.slack) }),
      mean: { value: 1 - mean, error: 40 * EPS * mean },
    }
  const powers = powersOf(z)
  return {
    at(j) {
      const x = z * places.inner[j]!
      const bend = powers.bend(x)
      const moved = z * (4 + places.shifts[j]!) * x
      const error = EPS * (40 * (Math.abs(powers.coefficient) + bend) + moved)
      return { value: powers.coefficient + (1 - powers.coefficient) * bend, error }
    },
    mean: { value: powers.mean, error: 60 * EPS * powers.mean },
  }
}

/**
 * (2z − sin 2z)·(1 − C₁) = −Σ (−1)^k z^(2k+1)/(2k+1)!·(2^(2k+1) − 8k),  k ≥ 2
 * z³(2z − sin 2z)·(1 − mean) = −Σ (−1)^k (k − 3)(k − 4)(k − ½)·(2z)^(2k)/(2k)!,  k ≥ 5
 */
function spherePowers(z: number): Powers {
  const y = z * z
  let power = z // z^(2k+1)/(2k+1)!
  let four = 1
  let whole = 0
  let coefficient = 0
  let mean = 0
  for (let k = 1; k <= 16; k++) {
    power *= -y / (2 * k * (2 * k + 1))
    four *= 4
    whole -= 2 * four * power
    coefficient -= power * (2 * four - 8 * k)
    if (k >= 5) mean -= (k - 3) * (k - 4) * (k - 0.5) * four * power * ((2 * k + 1) / z)
  }
  return { coefficient: coefficient / whole, mean: mean / (z * y * whole), bend: sincDeficit }
}

/** 1 − sin(x)/x. */
function sincDeficit(x: number): number {
  const y = x * x
  let sum = 0
  for (let k = 10; k >= 1; k--) sum = (1 - sum) * (y / (2 * k * (2 * k + 1)))
  return sum
}

/**
 * With q = (z/2)², and c_k the binomial coefficient (2k over k):
 * J₀² + J₁² = Σ (−q)^k/(k!(k+1)!)·c_k
 * (J₀² + J₁²)·(1 − C₁) = Σ (−q)^k/(k!(k+1)!)·(c_k − 1),  k ≥ 1
 * (J₀² + J₁²)·(1 − mean) = Σ (−q)^k/(k!(k+1)!)·(c_k − c_(k+1)/(k + 2)),  k ≥ 2
 */
function cylinderPowers(z: number): Powers {
  const q = (z / 2) * (z / 2)
  let power = 1
  let binomial = 1
  let whole = 1
  let coefficient = 0
  let mean = 0
  for (let k = 1; k <= 16; k++) {
    power *= -q / (k * (k + 1))
    binomial *= (2 * (2 * k - 1)) / k
    whole += power * binomial
    coefficient += power * (binomial - 1)
    mean += power * (binomial - (binomial * 2 * (2 * k + 1)) / (k + 1) / (k + 2))
  }
  return { coefficient: coefficient / whole, mean: mean / whole, bend: besselDeficit }
}

/** 1 − J₀(x). */
function besselDeficit(x: number): number {
  const q = (x / 2) * (x / 2)
  let sum = 0
  for (let k = 10; k >= 1; k--) sum = (1 - sum) * (q / (k * k))
  return sum
}
