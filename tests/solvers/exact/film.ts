import { D, erf, erfcx, energyFunction } from './functions.ts'

/* Exact responses to a unit step of the fluid, in decimal arithmetic: the values that answers and bounds are held to. */

const decimal = (value: number | string | D) => new D(value)

export interface ExactResponse {
  remaining: D
  completed: D
  /** q/(h·ΔT). */
  flux: D
}

/** Half space: η = x/(2√(at)), β = h√(at)/k. */
export function exactHalfSpace(eta: D, beta: D): ExactResponse {
  const decay = eta.mul(eta).neg().exp()
  const flux = decay.mul(erfcx(eta.plus(beta)))
  const completed = decay.mul(erfcx(eta)).minus(flux)
  return { completed, remaining: erf(eta).plus(flux), flux }
}

/** Q/(h·ΔT·t) of a half space. */
export function exactEnergy(beta: D): D {
  return energyFunction(beta).div(beta).div(beta)
}

/** Slab of length 1 at depth δ. Below Fo 0.006 two images (the third is e^(−160) of them), above it the eigenfunctions. */
export function exactSlab(biot: D, fourier: D, delta: D): ExactResponse & { heat: D; mean: D } {
  return fourier.lt('0.006') ? byImages(biot, fourier, delta) : bySeries(biot, fourier, delta)
}

function byImages(biot: D, fourier: D, delta: D) {
  const root = fourier.sqrt()
  const beta = biot.mul(root)
  const near = exactHalfSpace(delta.div(root.mul(2)), beta)
  const far = exactHalfSpace(new D(2).minus(delta).div(root.mul(2)), beta)
  const heat = biot.mul(fourier).mul(exactEnergy(beta))
  return {
    completed: near.completed.plus(far.completed),
    remaining: near.remaining.minus(far.completed),
    flux: near.flux.minus(far.flux),
    heat,
    mean: new D(1).minus(heat),
  }
}

function bySeries(biot: D, fourier: D, delta: D) {
  let remaining = decimal(0)
  let flux = decimal(0)
  let mean = decimal(0)
  for (let m = 0; m < 200; m++) {
    const z = exactRoot(biot, m)
    const decay = z.mul(z).mul(fourier).neg().exp()
    const weight = biot
      .mul(2)
      .div(z.mul(z.mul(z).plus(biot.mul(biot)).plus(biot)))
      .mul(decay)
    const cos = z.mul(delta).cos()
    const sin = z.mul(delta).sin()
    remaining = remaining.plus(weight.mul(z.mul(cos).plus(biot.mul(sin))))
    flux = flux.plus(weight.mul(z).mul(cos.minus(z.div(biot).mul(sin))))
    mean = mean.plus(weight.mul(biot).div(z))
    if (decay.lt('1e-58')) break
  }
  return { remaining, completed: decimal(1).minus(remaining), flux, heat: decimal(1).minus(mean), mean }
}

/** Newton on z sin z − Bi cos z, from the root in double precision. */
function exactRoot(biot: D, m: number): D {
  const B = biot.toNumber()
  let start = m === 0 ? Math.sqrt(B / (1 + B / 2.4674)) : m * Math.PI + Math.atan2(B, m * Math.PI + 0.5)
  for (let i = 0; i < 40; i++) start -= (start - m * Math.PI - Math.atan2(B, start)) / (1 + B / (B * B + start * start))
  let z = decimal(start)
  for (let i = 0; i < 3; i++) {
    const sin = z.sin()
    const cos = z.cos()
    const value = z.mul(sin).minus(biot.mul(cos))
    const slope = sin.plus(z.mul(cos)).plus(biot.mul(sin))
    z = z.minus(value.div(slope))
  }
  return z
}
