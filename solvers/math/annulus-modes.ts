import { EPS } from './rounding.ts'

/** A face that is held at its temperature, or that gives heat away by a film of this Biot number (0: insulated). */
export type Face = { held: true } | { held: false; film: number }

/** A hollow cylinder, in units of the thickness of its wall: ρ₂ = ρ₁ + 1. */
export interface Annulus {
  innerRadius: number
  inner: Face
  outer: Face
}

/** One eigenfunction φ of the annulus, φ″ + φ′/ρ + w·φ = 0. */
export interface Mode {
  /** The eigenvalue w = z². */
  w: number
  /** ∫φ²ρ dρ. */
  norm: number
  /** ∫φρ dρ. */
  content: number
  /** What a unit drive at either face puts into the mode: a flux of one kelvin a thickness, or a temperature of one kelvin. */
  gains: readonly [number, number]
  /** φ and −φ′ at the places asked for, the two faces last. */
  values: Float64Array
  slopes: Float64Array
}

/** No step of the power series is longer than this share of its radius, nor than this share of the wavelength over 2π. */
const STEP = 0.3
const MOST_TERMS = 60
/** φ, ρφ′, and their derivatives by w, at a distance from the inner face. */
interface State {
  at: number
  u: number
  v: number
  uw: number
  vw: number
}

/** From one radius to the next by the power series of the equation about the first: (ρu′)′ = −wρu. */
function advance({ innerRadius }: Annulus, w: number, from: State, to: number): State {
  const radius = innerRadius + from.at
  const x = to - from.at
  const share = x / radius
  let { u, v, uw, vw } = from
  let before = 0
  let beforeW = 0
  const sum = { at: to, u, v, uw, vw }
  for (let n = 0; n < MOST_TERMS; n++) {
    const lever = x * (radius * u + x * before)
    const leverW = x * (radius * uw + x * beforeW)
    before = u
    beforeW = uw
    u = (share * (v - n * u)) / (n + 1)
    uw = (share * (vw - n * uw)) / (n + 1)
    v = (-w * lever) / (n + 1)
    vw = (-w * leverW - lever) / (n + 1)
    sum.u += u
    sum.v += v
    sum.uw += uw
    sum.vw += vw
    const small = 1e-18
    if (
      Math.abs(u) <= small * Math.abs(sum.u) &&
      Math.abs(v) <= small * Math.abs(sum.v) &&
      Math.abs(uw) <= small * Math.abs(sum.uw) &&
      Math.abs(vw) <= small * Math.abs(sum.vw) &&
      n > 1
    )
      break
  }
  return sum
}

/** The solution that fits the inner face, at the distances given, in rising order; and how often it changes its sign up to the last. */
function solution(annulus: Annulus, w: number, distances: readonly number[]): { states: State[]; changes: number } {
  const { inner, innerRadius } = annulus
  const start = inner.held ? { u: 0, v: innerRadius } : { u: 1, v: innerRadius * inner.film }
  let state: State = { at: 0, ...start, uw: 0, vw: 0 }
  let changes = 0
  const longest = STEP / Math.sqrt(w)
  const states = distances.map((distance) => {
    while (state.at < distance) {
      const step = Math.min(STEP * (innerRadius + state.at), 3 * longest)
      // A last step of nearly nothing is taken together with the one before it.
      const next = advance(annulus, w, state, state.at + 1.01 * step >= distance ? distance : state.at + step)
      if (next.u * state.u < 0 || (next.u === 0 && next.at < 1)) changes++
      state = next
    }
    return state
  })
  return { states, changes }
}

/** What is left over at the outer face, zero at an eigenvalue, with its derivative, and how many eigenvalues lie below. */
function remainder(annulus: Annulus, w: number) {
  const { states, changes } = solution(annulus, w, [1])
  const { u, v, uw, vw } = states[0]!
  const { outer } = annulus
  const outerRadius = annulus.innerRadius + 1
  if (outer.held) return { value: u, slope: uw, below: changes }
  const value = v / outerRadius + outer.film * u
  return { value, slope: vw / outerRadius + outer.film * uw, below: changes + (value * u < 0 ? 1 : 0) }
}

/** The eigenvalue number i, counted from 0. */
function eigenvalue(annulus: Annulus, i: number, previous: number): number {
  if (i === 0) return smallest(annulus)
  const near = nearby(annulus, (Math.sqrt(previous) + Math.PI) ** 2, i)
  if (near !== undefined) return near
  let low = previous
  // Both faces held have the largest eigenvalues, and those of an annulus are below those of a slab.
  let high = ((i + 1) * Math.PI) ** 2 * (1 + 1e-9)
  let belowHigh = remainder(annulus, high).below
  let belowLow = 0
  // Halved until one eigenvalue is left between the two.
  for (let step = 0; step < 60 && (belowLow !== i || belowHigh !== i + 1); step++) {
    const middle = (low + high) / 2
    const { below } = remainder(annulus, middle)
    if (below > i) [high, belowHigh] = [middle, below]
    else [low, belowLow] = [middle, below]
  }
  return polished(annulus, low, high, i)
}

/**
 * Newton's steps from where the next eigenvalue is expected: they lie about π apart in z. Undefined where they do not come to rest at it: the
 * count at the last of them, next to the root on either side, says which root it is.
 */
function nearby(annulus: Annulus, start: number, i: number): number | undefined {
  let w = start
  for (let step = 0; step < 12; step++) {
    const { value, slope, below } = remainder(annulus, w)
    const change = value / slope
    const next = w - change
    if (!(next > 0)) return undefined
    if (Math.abs(change) <= 4 * EPS * w) return below === i || below === i + 1 ? next : undefined
    w = next
  }
  return undefined
}

/** From 0 upward Newton's steps rise to the smallest root and never beyond: all roots are real and positive. */
function smallest(annulus: Annulus): number {
  let w = 0
  for (let step = 0; step < 200; step++) {
    const { value, slope } = remainder(annulus, w)
    const next = w - value / slope
    if (!(next > w * (1 + 2 * EPS))) break
    w = next
  }
  return w
}

function polished(annulus: Annulus, from: number, to: number, i: number): number {
  let low = from
  let high = to
  let w = (low + high) / 2
  for (let step = 0; step < 100; step++) {
    const { value, slope, below } = remainder(annulus, w)
    if (below > i) high = w
    else low = w
    const newton = w - value / slope
    const next = newton > low && newton < high ? newton : (low + high) / 2
    if (Math.abs(next - w) <= 4 * EPS * w) return next
    w = next
  }
  return w
}

/** φ = 1 where both faces are insulated: the mean, which no drive but a flux moves. */
function meanMode(annulus: Annulus, count: number): Mode {
  const area = annulus.innerRadius + 0.5
  const gains = [annulus.innerRadius, annulus.innerRadius + 1] as const
  return {
    w: 0,
    norm: area,
    content: area,
    gains,
    values: new Float64Array(count).fill(1),
    slopes: new Float64Array(count),
  }
}

function modeOf(annulus: Annulus, w: number, distances: readonly number[]): Mode {
  const { inner, outer, innerRadius } = annulus
  const outerRadius = innerRadius + 1
  const order = distances.map((_, j) => j).sort((a, b) => distances[a]! - distances[b]!)
  /** At the outer face the film ties φ and its slope: the one that has its digits gives the other. */
  const fitted = (state: State) => {
    if (outer.held || state.at !== 1) return state
    if (outer.film > 1) return { ...state, u: -state.v / (outerRadius * outer.film) }
    return { ...state, v: -outerRadius * outer.film * state.u }
  }
  const { states } = solution(annulus, w, [...order.map((j) => distances[j]!), 1])
  const values = new Float64Array(distances.length)
  const slopes = new Float64Array(distances.length)
  order.forEach((j, k) => {
    const { at, u, v } = fitted(states[k]!)
    values[j] = u
    slopes[j] = -v / (innerRadius + at)
  })
  const { uw, vw } = states.at(-1)!
  const { u, v } = fitted(states.at(-1)!)
  const first = inner.held ? 1 : inner.film
  const gains = [innerRadius, outer.held ? -v : outerRadius * u] as const
  return { w, norm: uw * v - u * vw, content: (innerRadius * first - v) / w, gains, values, slopes }
}

/**
 * Eigenfunctions of a hollow cylinder whose faces are held or give heat away by films, for times from a shortest one on.
 *
 *   φ = power series of φ″ + φ′/ρ + w·φ = 0 from the inner face outward in short steps; ∫φ²ρ dρ = ρ(φ′·∂φ/∂w − φ·∂φ′/∂w)
 *
 * Shapes    n distances from the inner face; modes each with n values.
 * Units     lengths in units of the wall's thickness, times in its square over the diffusivity.
 * Domain    inner radius 1e-4..1e5; Biot numbers 0..1e18; shortest time from about 0.1 on.
 * Accuracy  eigenvalues and values relative 1e-13, however thin the wall and small the films: nothing cancels, since
 *           neither Bessel functions of nearly the same argument nor differences of squares of radii are taken.
 * Errors    none.
 * Source    C. Sturm's count of the zeros (from memory); H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids, 2nd ed. 1959,
 *           §7.10, writes the same functions by J and Y.
 */
export function annulusModes(annulus: Annulus, distances: readonly number[], shortest: number): Mode[] {
  const { inner, outer } = annulus
  const modes: Mode[] = []
  if (!inner.held && !outer.held && inner.film === 0 && outer.film === 0)
    modes.push(meanMode(annulus, distances.length))
  let w = 0
  for (let i = modes.length; i < 40; i++) {
    w = eigenvalue(annulus, i, w)
    modes.push(modeOf(annulus, w, distances))
    if (w * shortest > 42) break
  }
  return modes
}
