import { D, erf, erfc, PI } from './functions.ts'

/* Exact responses of a half space at 0 to drives that act on its face, in decimal arithmetic. */

const rootPi = PI.sqrt()
/** Beyond, every term is below 1e-17000 and only lengthens the sums. */
const FAR = 200

export const decay = (x: D): D => (x.gt(FAR) ? new D(0) : x.mul(x).neg().exp())
export const erfcOf = (x: D): D => (x.gt(FAR) ? new D(0) : erfc(x))
export const ierfc = (x: D): D =>
  x.gt(FAR)
    ? new D(0)
    : decay(x)
        .div(rootPi)
        .minus(x.mul(erfc(x)))
export const i2erfc = (x: D): D =>
  x.gt(FAR)
    ? new D(0)
    : erfc(x)
        .minus(x.mul(2).mul(ierfc(x)))
        .div(4)

export interface Drive {
  /** Of the temperature, per unit of the drive. */
  temperature: D
  flux: D
  surfaceFlux: D
  heat: D
}

const zero: Drive = { temperature: new D(0), flux: new D(0), surfaceFlux: new D(0), heat: new D(0) }

/** Since the start of a flux of 1; k, a and e = k/√a. */
export function underFlux(x: D, t: D, k: D, a: D): Drive {
  if (t.lte(0)) return zero
  const root = a.mul(t).sqrt()
  const eta = x.div(root.mul(2))
  return {
    temperature: root.mul(2).div(k).mul(ierfc(eta)),
    flux: erfcOf(eta),
    surfaceFlux: new D(1),
    heat: t,
  }
}

/** Since the start of a surface temperature that rises by 1 a second. */
export function underRamp(x: D, t: D, k: D, a: D): Drive {
  if (t.lte(0)) return zero
  const eta = x.div(a.mul(t).sqrt().mul(2))
  const e = k.div(a.sqrt())
  const root = t.sqrt()
  return {
    temperature: t.mul(4).mul(i2erfc(eta)),
    flux: e.mul(root).mul(2).mul(ierfc(eta)),
    surfaceFlux: e.mul(root).mul(2).div(rootPi),
    heat: e.mul(t).mul(root).mul(4).div(3).div(rootPi),
  }
}

/** A drive that ends after a while. */
export function ended(drive: typeof underFlux, x: D, t: D, duration: D, k: D, a: D): Drive {
  const all = drive(x, t, k, a)
  const undone = drive(x, t.minus(duration), k, a)
  return {
    temperature: all.temperature.minus(undone.temperature),
    flux: all.flux.minus(undone.flux),
    surfaceFlux: all.surfaceFlux.minus(undone.surfaceFlux),
    heat: all.heat.minus(undone.heat),
  }
}

export { erf }
