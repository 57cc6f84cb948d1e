import { EPS } from './rounding.ts'

/**
 * 1 − C₁ cos(z(1 − δ)), from its power series in z where the difference would cancel; X = 1 − δ:
 * (z + sin z cos z)·(1 − A₁) = −Σ (−1)^m z^(2m+1)/(2m+1)!·[(1+X)^(2m+1) + (1−X)^(2m+1) − 4^m],  m ≥ 1
 */
export function oneMinusFirst(z: number, X: number, first: number): { value: number; error: number } {
  if (z > 0.9) return { value: 1 - first, error: EPS * (24 + 12 * z) * first }
  let power = z
  let up = 1 + X
  let down = 1 - X
  let four = 1
  let sum = 0
  let size = 0
  for (let m = 1; m <= 14; m++) {
    power *= -(z * z) / (2 * m * (2 * m + 1))
    up *= (1 + X) * (1 + X)
    down *= (1 - X) * (1 - X)
    four *= 4
    const term = power * (up + down - four)
    sum -= term
    size += Math.abs(power) * (up + down + four)
  }
  const scale = z + Math.sin(z) * Math.cos(z)
  return { value: sum / scale, error: (24 * EPS * size) / scale }
}

/**
 * 1 − D₁ of the mean, D₁ = 2 sin²z/(z(z + sin z cos z)); with w = 2z:
 * z(z + sin z cos z)·(1 − D₁) = Σ_{k≥2} (−1)^k w^(2k+2)·[1/(4(2k+1)!) − 1/(2k+2)!]
 */
export function oneMinusFirstMean(z: number, first: number): { value: number; error: number } {
  if (z > 0.9) return { value: 1 - first, error: 40 * EPS * first }
  const square = 4 * z * z
  let power = (square * square) / 24 // w^(2k+2)/(2k+1)! is this times w²/(2k+1) for k = 2
  let sum = 0
  let size = 0
  for (let k = 2; k <= 16; k++) {
    power *= k === 2 ? square / 5 : -square / (2 * k * (2 * k + 1))
    const term = power * (0.25 - 1 / (2 * k + 2))
    sum += term
    size += Math.abs(term)
  }
  const scale = z * (z + Math.sin(z) * Math.cos(z))
  return { value: sum / scale, error: (30 * EPS * size) / scale }
}
