/** A complex number. Plain pairs: the solvers need five operations on them, in their innermost loops. */
export interface Complex {
  re: number
  im: number
}

export const complex = (re: number, im = 0): Complex => ({ re, im })
export const plus = (a: Complex, b: Complex): Complex => ({ re: a.re + b.re, im: a.im + b.im })
export const minus = (a: Complex, b: Complex): Complex => ({ re: a.re - b.re, im: a.im - b.im })
export const times = (a: Complex, b: Complex): Complex => ({
  re: a.re * b.re - a.im * b.im,
  im: a.re * b.im + a.im * b.re,
})
export const scale = (factor: number, a: Complex): Complex => ({ re: factor * a.re, im: factor * a.im })
export const modulus = (a: Complex): number => Math.hypot(a.re, a.im)

/** a/b; the larger part of b is divided by first, so that nothing overflows on the way. */
export function over(a: Complex, b: Complex): Complex {
  if (Math.abs(b.re) >= Math.abs(b.im)) {
    const ratio = b.im / b.re
    const size = b.re + b.im * ratio
    return { re: (a.re + a.im * ratio) / size, im: (a.im - a.re * ratio) / size }
  }
  const ratio = b.re / b.im
  const size = b.re * ratio + b.im
  return { re: (a.re * ratio + a.im) / size, im: (a.im * ratio - a.re) / size }
}

export function exponential(a: Complex): Complex {
  const size = Math.exp(a.re)
  return { re: size * Math.cos(a.im), im: size * Math.sin(a.im) }
}
