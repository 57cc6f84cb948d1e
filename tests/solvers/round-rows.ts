import fc from 'fast-check'
import type { OutputName } from '../../solvers/outputs.ts'
import { exactDecades, exactTemperature, uniform } from './draw.ts'
import { exactAnnulus, type ExactFace, exactMedium } from './exact/annulus.ts'
import { D } from './exact/bessel.ts'

/* Random questions about a hollow cylinder and about the medium around one, with exact answers at the decimals that were drawn. */

export interface RoundRow {
  caseId: string
  body: Record<string, unknown>
  exact: Partial<Record<OutputName, D>>
  label: string
}

interface DrawnSide {
  body: Record<string, unknown>
  /** What the side is, in units of a length L and a conductivity k. */
  face(initial: D, length: D, k: D): ExactFace
}

const decimal = (x: number | string | { toString(): string }) => new D(x.toString())
const held = exactTemperature.map((T): DrawnSide => ({
  body: { kind: 'temperature', surfaceTemperature: T.toNumber() },
  face: (initial) => ({ slope: 0, level: new D(1), drive: decimal(T).minus(initial) }),
}))
const fluid = fc
  .tuple(exactTemperature, exactDecades(1e-2, 1e4), fc.constantFrom(0, 80.5))
  .map(([T, h, flux]): DrawnSide => ({
    body: {
      kind: 'convection',
      ambientTemperature: T.toNumber(),
      filmCoefficient: h.toNumber(),
      ...(flux ? { imposedHeatFlux: flux } : {}),
    },
    face: (initial, length, k) => ({
      slope: 1,
      level: decimal(h).mul(length).div(k),
      drive: decimal(T).minus(initial).mul(decimal(h)).plus(flux).mul(length).div(k),
    }),
  }))
const flux = exactDecades(1, 1e4).map((q): DrawnSide => ({
  body: { kind: 'flux', imposedHeatFlux: q.toNumber() },
  face: (_, length, k) => ({ slope: 1, level: new D(0), drive: decimal(q).mul(length).div(k) }),
}))
const insulated = fc.constant<DrawnSide>({
  body: { kind: 'insulated' },
  face: () => ({ slope: 1, level: new D(0), drive: new D(0) }),
})
const side = fc.oneof(held, fluid, flux, insulated)
const solid = { k: exactDecades(0.02, 50), capacity: exactDecades(1e4, 5e6), initial: exactTemperature }
const place = fc.oneof({ weight: 3, arbitrary: uniform }, { weight: 1, arbitrary: fc.constantFrom(0, 1) })
const bodyOf = (r: {
  k: { toNumber(): number }
  capacity: { toNumber(): number }
  initial: { toNumber(): number }
}) => ({
  conductivity: r.k.toNumber(),
  volumetricHeatCapacity: r.capacity.toNumber(),
  initialTemperature: r.initial.toNumber(),
})

const walls = (...wall: [number, number]) =>
  fc
    .record({
      ...solid,
      r1: exactDecades(1e-3, 1),
      wall: exactDecades(...wall),
      fo: exactDecades(1e-3, 10),
      share: place,
      inner: side,
      outer: side,
    })
    .map((r): RoundRow => {
      const [k, capacity, initial, r1] = [decimal(r.k), decimal(r.capacity), decimal(r.initial), decimal(r.r1)]
      const r2 = decimal(r1.mul(decimal(r.wall).plus(1)).toSignificantDigits(20))
      const L = r2.minus(r1)
      const radius = r.share === 1 ? r2 : decimal(r1.plus(L.mul(r.share)).toSignificantDigits(20))
      const time = decimal(decimal(r.fo).mul(L).mul(L).mul(capacity).div(k).toSignificantDigits(20))
      const fourier = time.mul(k).div(capacity).div(L).div(L)
      const faces = [r.inner.face(initial, L, k), r.outer.face(initial, L, k)] as const
      const at = exactAnnulus(r1.div(L), r2.div(L), radius.div(L), fourier, faces)
      const unit = k.div(L)
      const area = r1.plus(r2).div(L).div(2)
      return {
        caseId: 'hollow-cylinder-convection',
        body: {
          ...bodyOf(r),
          innerRadius: r1.toNumber(),
          outerRadius: r2.toNumber(),
          inner: r.inner.body,
          outer: r.outer.body,
          radii: [radius.toNumber()],
          times: [time.toNumber()],
        },
        exact: {
          temperature: initial.plus(at.temperature),
          heatFlux: unit.mul(at.flux),
          innerHeatFlux: unit.mul(at.inner),
          outerHeatFlux: unit.mul(at.outer),
          heatGained: D.acos(-1).mul(2).mul(capacity).mul(L).mul(L).mul(at.content),
          meanTemperature: initial.plus(at.content.div(area)),
        },
        label: `r2/r1 ${r2.div(r1).toPrecision(4)} Fo ${fourier.toPrecision(3)} share ${r.share.toFixed(3)} ${String(r.inner.body['kind'])} ${String(r.outer.body['kind'])}`,
      }
    })
export const hollow = walls(1e-3, 9e3)
/** So thin that the rounding of the radii is what an answer errs by most. */
export const thin = walls(1.01e-5, 1e-3)

export const medium = fc
  .record({
    ...solid,
    R: exactDecades(1e-3, 1),
    fo: exactDecades(1e-4, 1e6),
    share: place,
    side: fc.oneof(held, fluid, flux),
  })
  .map((r): RoundRow => {
    const [k, capacity, initial, R] = [decimal(r.k), decimal(r.capacity), decimal(r.initial), decimal(r.R)]
    const time = decimal(decimal(r.fo).mul(R).mul(R).mul(capacity).div(k).toSignificantDigits(20))
    const length = time.mul(k).div(capacity).sqrt()
    const radius = r.share === 0 ? R : decimal(R.plus(length.mul(8 * r.share)).toSignificantDigits(20))
    const face = r.side.face(initial, length, k)
    const at = exactMedium(R.div(length), radius.div(length), new D(1), face)
    const unit = k.div(length)
    const share = face.level.mul(at.temperature).div(face.drive)
    const ends = face.level.gt(0)
    return {
      caseId: 'cylinder-in-infinite-medium',
      body: {
        ...bodyOf(r),
        radius: R.toNumber(),
        boundary: r.side.body,
        radii: [radius.toNumber()],
        times: [time.toNumber()],
      },
      exact: {
        temperature: initial.plus(at.temperature),
        heatFlux: unit.mul(at.flux),
        surfaceHeatFlux: unit.mul(at.inner),
        heatGained: D.acos(-1).mul(2).mul(capacity).mul(length).mul(length).mul(at.content),
        ...(ends ? { completedFraction: share, remainingFraction: new D(1).minus(share) } : {}),
      },
      label: `Fo ${r.fo.toPrecision(3)} share ${r.share.toFixed(3)} ${String(r.side.body['kind'])}`,
    }
  })
