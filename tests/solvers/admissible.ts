import fc from 'fast-check'

/* Inputs over the whole admissible ranges, their ends and zeros included: where accuracy is not compared, only sanity. */

const range = (from: number, to: number) => {
  const low = Math.log(from)
  const span = Math.log(to / from)
  const inside = fc
    .double({ min: 0, max: 1, noNaN: true })
    .map((u) => Math.min(to, Math.max(from, Math.exp(low + span * u))))
  return fc.oneof({ weight: 20, arbitrary: inside }, { weight: 1, arbitrary: fc.constantFrom(from, to) })
}
const zeroOr = (from: number, to: number) =>
  fc.oneof({ weight: 12, arbitrary: range(from, to) }, { weight: 1, arbitrary: fc.constant(0) })
const temperature = fc.oneof(fc.double({ min: -273.15, max: 1e4, noNaN: true }), fc.constantFrom(-273.15, 0, 20, 1e4))

const capacity = fc.oneof(
  fc.record({ density: range(1e-2, 3e4), specificHeat: range(0.1, 1e5) }),
  fc.record({ volumetricHeatCapacity: range(0.1, 1e9) }),
)
const solid = fc
  .tuple(range(1e-4, 1e4), fc.oneof(capacity, fc.record({ diffusivity: range(1e-12, 1e2) })))
  .map(([conductivity, heat]) => ({ conductivity, ...heat }))
const film = fc.record({
  filmCoefficient: zeroOr(1e-9, 1e9),
  initialTemperature: temperature,
  ambientTemperature: temperature,
})
const time = fc.oneof(
  { weight: 10, arbitrary: zeroOr(1e-12, 1e17) },
  { weight: 1, arbitrary: fc.constantFrom(5e-324, 1e-300, 1e-200) },
)
const times = fc.array(time, { minLength: 1, maxLength: 3 })
const shares = fc.array(fc.oneof(fc.double({ min: 0, max: 1, noNaN: true }), fc.constantFrom(0, 0.5, 1)), {
  minLength: 1,
  maxLength: 3,
})
const faces = fc.constantFrom(1, 2)

const slab = fc
  .tuple(solid, film, range(1e-9, 1e5), faces, shares, times)
  .map(([s, f, thickness, exposedFaces, at, t]) => ({
    ...s,
    ...f,
    thickness,
    exposedFaces,
    depths: at.map((share) => Math.min(thickness, share * thickness)),
    times: t,
  }))
const halfSpace = fc
  .tuple(solid, film, fc.array(zeroOr(1e-9, 1e5), { minLength: 1, maxLength: 3 }), times)
  .map(([s, f, depths, t]) => ({ ...s, ...f, depths, times: t }))
const power = fc.oneof(
  fc.constant({}),
  zeroOr(1e-15, 1e15).map((size) => ({ power: size })),
  range(1e-15, 1e15).map((size) => ({ power: -size })),
)
const byCapacity = fc
  .tuple(
    fc.oneof(
      fc.record({ heatCapacity: range(1e-12, 1e15) }),
      fc.tuple(range(1e-27, 1e15), capacity).map(([volume, heat]) => ({ volume, ...heat })),
    ),
    range(1e-18, 1e10),
    power,
  )
  .map(([c, area, p]) => ({ ...c, area, ...p }))
const shape = fc.oneof(
  fc.record({ body: fc.constant('slab'), thickness: range(1e-9, 1e5), exposedFaces: faces }),
  fc.record({ body: fc.constantFrom('cylinder', 'sphere'), radius: range(1e-9, 1e5) }),
)
const byShape = fc
  .tuple(shape, solid, fc.constantFrom({}, { correction: 'none' }, { correction: 'mean' }))
  .map(([b, s, c]) => ({ ...b, ...s, ...c }))
const lumped = fc.tuple(fc.oneof(byCapacity, byShape), film, times).map(([b, f, t]) => ({ ...b, ...f, times: t }))

/** By case: a body of every admissible kind, without outputs. */
export const admissible: Record<string, fc.Arbitrary<Record<string, unknown> & { times: number[] }>> = {
  'slab-convection': slab,
  'semi-infinite-convection': halfSpace,
  'lumped-convection': lumped,
}
