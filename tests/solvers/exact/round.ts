import { D, erfc, erfcx, energyFunction, PI } from './functions.ts'

/*
 * Exact responses of spheres and cylinders of radius 1 to a unit step, at radius ρ: `flux` in units of h·ΔT behind a film, of
 * k·ΔT/R where the face is held (Bi null).
 */

export interface ExactRound {
  remaining: D
  completed: D
  flux: D
  heat: D
  mean: D
}

const one = new D(1)

/** Below Fo 0.006 images (the next is e^(−160) of them), above it the eigenfunctions. */
export function exactSphere(biot: D | null, fourier: D, delta: D): ExactRound {
  const found = fourier.lt('0.006') ? sphereImages(biot, fourier, delta) : sphereSeries(biot, fourier, one.minus(delta))
  return atHeldFace(biot, delta, found)
}

/** Of a face that is held nothing remains, where the sums leave 1e-60. */
function atHeldFace(biot: D | null, delta: D, found: ExactRound): ExactRound {
  return biot || !delta.isZero() ? found : { ...found, remaining: new D(0), completed: one }
}

function sphereImages(biot: D | null, fourier: D, delta: D): ExactRound {
  const root = fourier.sqrt()
  const rho = one.minus(delta)
  const near = delta.div(root.mul(2))
  const far = one.plus(rho).div(root.mul(2))
  const step = biot ? filmStep(biot, root) : heldStep(root)
  if (rho.isZero()) {
    const completed = step.slope(near).mul(2)
    return { completed, remaining: one.minus(completed), flux: rho, heat: step.heat, mean: one.minus(step.heat) }
  }
  const w = step.image(near).minus(step.image(far))
  const completed = w.div(rho)
  const flux = rho
    .mul(step.slope(near).plus(step.slope(far)))
    .minus(w)
    .div(rho.mul(rho))
  return {
    completed,
    remaining: one.minus(completed),
    flux: flux.div(biot ?? 1),
    heat: step.heat,
    mean: one.minus(step.heat),
  }
}

/** Beyond, every term is below 1e-17000 and only lengthens the sums. */
const FAR = 200
const decay = (eta: D) => (eta.gt(FAR) ? new D(0) : eta.mul(eta).neg().exp())

function filmStep(biot: D, root: D) {
  const H = biot.minus(1)
  const beta = H.mul(root)
  const ratio = biot.div(H)
  const energy = energyFunction(beta).div(beta).div(beta)
  return {
    image: (eta: D) =>
      eta.gt(FAR) ? new D(0) : ratio.mul(decay(eta)).mul(erfcx(eta).minus(signedErfcx(eta.plus(beta)))),
    slope: (eta: D) => (eta.gt(FAR) ? new D(0) : biot.mul(decay(eta)).mul(signedErfcx(eta.plus(beta)))),
    heat: biot
      .mul(3)
      .mul(root)
      .mul(root)
      .mul(one.minus(ratio.mul(one.minus(energy)))),
  }
}

const signedErfcx = (x: D) => (x.isNegative() ? x.mul(x).exp().mul(2).minus(erfcx(x.neg())) : erfcx(x))

function heldStep(root: D) {
  return {
    image: (eta: D) => (eta.gt(FAR) ? new D(0) : erfc(eta)),
    slope: (eta: D) => decay(eta).div(PI.sqrt().mul(root)),
    heat: root.mul(6).div(PI.sqrt()).minus(root.mul(root).mul(3)),
  }
}

function sphereSeries(biot: D | null, fourier: D, rho: D): ExactRound {
  let remaining = new D(0)
  let flux = new D(0)
  let mean = new D(0)
  for (let n = 0; n < 200; n++) {
    const z = biot ? sphereRoot(biot, n) : PI.mul(n + 1)
    const decay = z.mul(z).mul(fourier).neg().exp()
    const lag = z.sin().minus(z.mul(z.cos()))
    const C = biot ? lag.mul(4).div(z.mul(2).minus(z.mul(2).sin())) : new D(n % 2 === 0 ? 2 : -2)
    const weight = C.mul(decay)
    const x = z.mul(rho)
    remaining = remaining.plus(x.isZero() ? weight : weight.mul(x.sin()).div(x))
    if (!x.isZero())
      flux = flux.plus(
        weight
          .mul(z)
          .mul(x.sin().minus(x.mul(x.cos())))
          .div(x.mul(x)),
      )
    mean = mean.plus(biot ? weight.mul(3).mul(lag).div(z.pow(3)) : decay.mul(6).div(z.mul(z)))
    if (decay.lt('1e-58')) break
  }
  return { remaining, completed: one.minus(remaining), flux: flux.div(biot ?? 1), heat: one.minus(mean), mean }
}

/** Newton on (1 − Bi)·sin z − z cos z, from a start in double precision. */
function sphereRoot(biot: D, n: number): D {
  const B = biot.toNumber()
  let start = n * Math.PI + Math.atan2(n * Math.PI + 2, 1 - B)
  for (let i = 0; i < 60; i++) start = n * Math.PI + Math.atan2(start, 1 - B)
  let z = new D(n === 0 && B < 1 ? Math.sqrt((3 * B) / (1 + B / 5)) : start)
  for (let i = 0; i < 9; i++) {
    const value = one.minus(biot).mul(z.sin()).minus(z.mul(z.cos()))
    const slope = z.mul(z.sin()).minus(biot.mul(z.cos()))
    const change = value.div(slope)
    z = z.minus(change)
    if (change.abs().lt(z.mul('1e-50'))) break
  }
  return z
}

/** By eigenfunctions, for Fo from 0.01 on: below, their Bessel functions would need more digits than these have. */
export function exactCylinder(biot: D | null, fourier: D, delta: D): ExactRound {
  let remaining = new D(0)
  let flux = new D(0)
  let mean = new D(0)
  const rho = one.minus(delta)
  for (let n = 0; n < 60; n++) {
    const z = cylinderRoot(biot, n)
    const decay = z.mul(z).mul(fourier).neg().exp()
    const { j0, j1 } = exactJ(z)
    const C = j1
      .mul(2)
      .div(z)
      .div(j0.mul(j0).plus(j1.mul(j1)))
    const at = exactJ(z.mul(rho))
    const weight = C.mul(decay)
    remaining = remaining.plus(weight.mul(at.j0))
    flux = flux.plus(weight.mul(z).mul(at.j1))
    mean = mean.plus(weight.mul(2).mul(j1).div(z))
    if (decay.lt('1e-50')) break
  }
  const completed = one.minus(remaining)
  return atHeldFace(biot, delta, {
    remaining,
    completed,
    flux: flux.div(biot ?? 1),
    heat: one.minus(mean),
    mean,
  })
}

/* The terms of the power series grow to e^x, so 60 digits beyond that of x = 130. */
const Wide = D.clone({ precision: 120 })

/** J₀ and J₁ by power series. */
export function exactJ(x: D): { j0: D; j1: D } {
  const half = new Wide(x).div(2)
  const q = half.mul(half).neg()
  let term = new Wide(1)
  let j0 = new Wide(0)
  let j1 = new Wide(0)
  for (let k = 0; k < 900; k++) {
    j0 = j0.plus(term)
    j1 = j1.plus(term.div(k + 1))
    term = term.mul(q).div((k + 1) * (k + 1))
    if (term.abs().lt('1e-75') && k * 2 > x.toNumber()) break
  }
  return { j0: new D(j0), j1: new D(half.mul(j1)) }
}

/** Newton on zJ₁ − Bi·J₀ (J₀ where the face is held), from the m-th sign change in double precision. */
function cylinderRoot(biot: D | null, m: number): D {
  const B = biot ? biot.toNumber() : Infinity
  let z = new D(cylinderStart(B, m))
  for (let i = 0; i < 9; i++) {
    const { j0, j1 } = exactJ(z)
    const value = biot ? z.mul(j1).minus(biot.mul(j0)) : j0
    const slope = biot ? z.mul(j0).plus(biot.mul(j1)) : j1.neg()
    const change = value.div(slope)
    z = z.minus(change)
    if (change.abs().lt(z.mul('1e-45'))) break
  }
  return z
}

/** z ≈ φ + π/4 − 1/(8z)·… of the phase φ of J, with φ = mπ + atan(Bi/z): good to a percent. */
function cylinderStart(B: number, m: number): number {
  if (m === 0) return Math.sqrt(2 / (1 / B + 2 / 5.783185962946785))
  let z = m * Math.PI + 1
  for (let i = 0; i < 60; i++) {
    const bend = 3 / (8 * z)
    z =
      m * Math.PI +
      Math.PI / 4 +
      Math.atan2(B, z) -
      bend * (1 - (B === Infinity ? 1 : (B * B) / (B * B + z * z))) +
      (B === Infinity ? 1 : (B * B) / (B * B + z * z)) / (8 * z)
  }
  return z
}
