import { D, erf, erfc, PI } from './functions.ts'

/* Exact responses to a unit step of the face itself. Fluxes are per k·ΔT/L, the slab's length L being 1. */

export function exactFixedSlab(fourier: D, delta: D): { remaining: D; completed: D; flux: D; heat: D; mean: D } {
  return fourier.lt('0.006') ? byImages(fourier, delta) : bySeries(fourier, delta)
}

/** Beyond, every term is below 1e-17000 and only lengthens the sums. */
const FAR = 200
const erfcOf = (x: D) => (x.gt(FAR) ? new D(0) : erfc(x))
const decayOf = (x: D) => (x.gt(FAR) ? new D(0) : x.mul(x).neg().exp())
const ierfc = (x: D) =>
  x.gt(FAR)
    ? new D(0)
    : decayOf(x)
        .div(PI.sqrt())
        .minus(x.mul(erfc(x)))

/** Six images: the next are e^(−9/Fo) of the first. */
function byImages(fourier: D, delta: D) {
  const two = fourier.sqrt().mul(2)
  const signs = [1, 1, -1, -1, 1, 1]
  const places = [delta, D.sub(2, delta), D.add(2, delta), D.sub(4, delta), D.add(4, delta), D.sub(6, delta)]
  const completed = places.reduce((sum, x, i) => sum.plus(erfcOf(x.div(two)).mul(signs[i]!)), new D(0))
  const outward = [1, -1, -1, 1, 1, -1]
  const flux = places
    .reduce((sum, x, i) => sum.plus(decayOf(x.div(two)).mul(outward[i]!)), new D(0))
    .div(PI.mul(fourier).sqrt())
  const series = [1, 2].reduce((sum, n) => sum.plus(ierfc(new D(n).div(fourier.sqrt())).mul(n % 2 ? -2 : 2)), new D(0))
  const heat = two.mul(new D(1).div(PI.sqrt()).plus(series))
  const rest = places.slice(1).reduce((sum, x, i) => sum.plus(erfcOf(x.div(two)).mul(signs[i + 1]!)), new D(0))
  return { completed, remaining: erf(delta.div(two)).minus(rest), flux, heat, mean: new D(1).minus(heat) }
}

function bySeries(fourier: D, delta: D) {
  let remaining = new D(0)
  let flux = new D(0)
  let mean = new D(0)
  for (let n = 0; n < 200; n++) {
    const z = PI.mul(n + 0.5)
    const decay = z.mul(z).mul(fourier).neg().exp()
    remaining = remaining.plus(z.mul(delta).sin().mul(2).div(z).mul(decay))
    flux = flux.plus(z.mul(delta).cos().mul(2).mul(decay))
    mean = mean.plus(new D(2).div(z.mul(z)).mul(decay))
    if (decay.lt('1e-58')) break
  }
  return { remaining, completed: new D(1).minus(remaining), flux, heat: new D(1).minus(mean), mean }
}
