import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { ask, askSingle, single } from './ask.ts'
import { proof, seed } from './counts.ts'
import { decades, uniform } from './draw.ts'

/* Relations between the closed forms of half spaces, and their limits. */

const runs = { numRuns: proof ? 1000 : 60, seed }
const ground = { conductivity: 1.3, density: 2000, specificHeat: 950, initialTemperature: 15 }
const a = 1.3 / (2000 * 950)
const asked = (id: string, body: object, output = 'temperature') =>
  askSingle(id, body as Record<string, unknown>, output)
const value = (id: string, body: object, output = 'temperature') => asked(id, body, output).value
const outputs = ['temperature', 'heatFlux', 'surfaceHeatFlux', 'heatGained']

/** Two ways to one number agree within the sum of their bounds and what the second is known to leave out. */
function alike(one: { value: number; bound: number }, two: { value: number; bound: number }, left = 0): void {
  expect(Math.abs(one.value - two.value)).toBeLessThanOrEqual(one.bound + two.bound + left)
}
const place = fc.tuple(decades(10, 1e7), decades(1e-3, 10)).map(([t, n]) => ({ t, x: n * 2 * Math.sqrt(a * t) }))

describe('a film and an absorbed flux', () => {
  it('are the film alone towards the ambient temperature raised by q/h', () => {
    fc.assert(
      fc.property(place, decades(0.1, 1e5), decades(0.01, 5000), ({ t, x }, h, raised) => {
        const q = h * raised
        const body = { ...ground, filmCoefficient: h, depths: [x], times: [t] }
        for (const output of outputs)
          alike(
            asked('semi-infinite-convection', { ...body, ambientTemperature: 5, imposedHeatFlux: q }, output),
            asked('semi-infinite-convection', { ...body, ambientTemperature: 5 + q / h }, output),
            // The raised temperature was rounded once, and its whole difference counts.
            4e-15 * (h * (20 + q / h) * (output === 'heatGained' ? t : 1)),
          )
      }),
      runs,
    )
  })
  it('without a film are the flux alone, and without a flux the film alone', () => {
    fc.assert(
      fc.property(place, decades(1, 1e4), ({ t, x }, q) => {
        const body = { ...ground, depths: [x], times: [t] }
        const still = { ...body, filmCoefficient: 0, ambientTemperature: -40, imposedHeatFlux: q }
        for (const output of outputs)
          alike(
            asked('semi-infinite-convection', still, output),
            asked('semi-infinite-surface-flux', { ...body, imposedHeatFlux: q }, output),
          )
        const film = { ...body, filmCoefficient: 12, ambientTemperature: -4 }
        for (const output of outputs)
          expect(value('semi-infinite-convection', { ...film, imposedHeatFlux: 0 }, output)).toBe(
            value('semi-infinite-convection', film, output),
          )
      }),
      runs,
    )
  })
})

describe('drives that end', () => {
  it('two pulses in a row are one of twice the duration', () => {
    fc.assert(
      fc.property(place, decades(1e-6, 0.49), ({ t, x }, share) => {
        const pulse = (pulseDuration: number, time: number) =>
          asked('semi-infinite-surface-flux', {
            ...ground,
            initialTemperature: 0,
            imposedHeatFlux: 300,
            pulseDuration,
            depths: [x],
            times: [time],
          })
        const d = Math.max(1e-9, t * share)
        const [whole, first, second] = [pulse(2 * d, t), pulse(d, t), pulse(d, t - d)]
        alike(whole, { value: first.value + second.value, bound: first.bound + second.bound }, 4e-16 * first.value)
      }),
      runs,
    )
  })
  it('a pulse long past is a dose: q·d/(C√(πat))·e^(−η²), and leaves all its heat', () => {
    const body = {
      ...ground,
      initialTemperature: 0,
      imposedHeatFlux: 1e6,
      pulseDuration: 1e-3,
      depths: [0.02],
      times: [3600],
    }
    const dose = (1e6 * 1e-3) / (2000 * 950) / Math.sqrt(Math.PI * a * 3600)
    expect(value('semi-infinite-surface-flux', body) / (dose * Math.exp(-(0.02 ** 2) / (4 * a * 3600)))).toBeCloseTo(
      1,
      6,
    )
    expect(value('semi-infinite-surface-flux', body, 'heatGained')).toBe(1000)
    expect(value('semi-infinite-surface-flux', body, 'surfaceHeatFlux')).toBe(0)
  })
  it('a short ramp that is held is a step of the surface half its duration later', () => {
    const d = 1e-3
    const body = { ...ground, depths: [0.05], times: [20000] }
    const ramp = { ...body, rampRate: 30 / d, rampDuration: d }
    const step = { ...body, surfaceTemperature: 45, times: [20000 - d / 2] }
    for (const output of outputs)
      expect(
        value('semi-infinite-surface-ramp', ramp, output) / value('semi-infinite-surface-temperature', step, output),
      ).toBeCloseTo(1, 11)
  })
  it('at its end a drive is still as it was, and its answers pass over without a step', () => {
    for (const [id, drive] of [
      ['semi-infinite-surface-flux', { imposedHeatFlux: 500, pulseDuration: 600 }],
      ['semi-infinite-surface-ramp', { rampRate: 0.02, rampDuration: 600 }],
    ] as const) {
      const at = (t: number, output: string) => value(id, { ...ground, ...drive, depths: [0.01], times: [t] }, output)
      for (const output of ['temperature', 'heatFlux', 'heatGained'])
        expect(at(600 + 1e-9, output) / at(600, output)).toBeCloseTo(1, 11)
    }
  })
  it('the heat of a held ramp is the integral of its surface flux', () => {
    const body = { ...ground, rampRate: 0.01, rampDuration: 1000, depths: [0] }
    const times = Array.from({ length: 4000 }, (_, i) => 1000 + (i + 0.5) * 2)
    const flux = ask('semi-infinite-surface-ramp', { ...body, times, outputs: ['surfaceHeatFlux'] }).result[
      'surfaceHeatFlux'
    ] as number[]
    const later = flux.reduce((sum, q) => sum + 2 * q, 0)
    const [from, to] = [1000, 9000].map((t) =>
      value('semi-infinite-surface-ramp', { ...body, times: [t] }, 'heatGained'),
    )
    expect(later / (to! - from!)).toBeCloseTo(1, 5)
  })
})

describe('two bodies in contact', () => {
  const other = { conductivity: 40, volumetricHeatCapacity: 3.5e6, initialTemperature: 80 }
  const pair = fc.tuple(place, fc.oneof(fc.constant(undefined), decades(1, 1e6)), uniform)
  it('seen from the other side are the same bodies with fluxes turned', () => {
    fc.assert(
      fc.property(pair, ([{ t, x }, h]) => {
        const film = h === undefined ? {} : { contactConductance: h }
        const near = { ...ground, other, ...film, depths: [x], times: [t] }
        const { initialTemperature, ...solid } = ground
        const far = { ...other, other: { ...solid, initialTemperature }, ...film, depths: [-x], times: [t] }
        const at = (body: object, output: string) => {
          const { result, accuracy } = ask('semi-infinite-contact', { ...body, outputs: [output] })
          const { absolute, relative } = accuracy.bound[output]!
          const found = single(result[output]!)
          return { value: found, bound: absolute + relative * Math.abs(found) }
        }
        const turned = (body: object, output: string) => ({ ...at(body, output), value: -at(body, output).value })
        alike(at(near, 'temperature'), at(far, 'temperature'))
        alike(at(near, 'heatFlux'), turned(far, 'heatFlux'))
        alike(at(near, 'heatGained'), turned(far, 'heatGained'))
        alike(at(near, 'surfaceTemperature'), at(far, 'otherSurfaceTemperature'))
        alike(at(near, 'completedFraction'), at(far, 'completedFraction'))
      }),
      runs,
    )
  })
  it('of one effusivity meet at the mean; a far stronger one holds the surface, or is the fluid behind a film', () => {
    const twin = { ...ground, other: { ...ground, initialTemperature: 40 }, depths: [0.03], times: [7200] }
    expect(value('semi-infinite-contact', twin, 'contactTemperature')).toBeCloseTo(27.5, 13)
    const strong = { conductivity: 1e4, volumetricHeatCapacity: 1e9, initialTemperature: 40 }
    const body = { ...ground, depths: [0.03], times: [7200] }
    // What the strong body gives way is the ratio of the effusivities, 5e-4, of the difference.
    const held = value('semi-infinite-surface-temperature', { ...body, surfaceTemperature: 40 })
    expect(Math.abs(value('semi-infinite-contact', { ...body, other: strong }) - held)).toBeLessThan(25 * 5.1e-4)
    const film = value('semi-infinite-convection', { ...body, ambientTemperature: 40, filmCoefficient: 30 })
    const touched = ask('semi-infinite-contact', { ...body, other: strong, contactConductance: 30 }).result
    expect(Math.abs(single(touched['temperature']!) - film)).toBeLessThan(25 * 5.1e-4)
  })
  it('with an ever better conductance come to perfect contact, and the ideal values always come along', () => {
    const body = { ...ground, other, depths: [-0.01, 0.01], times: [600], contactConductance: 1e12 }
    const { result } = ask('semi-infinite-contact', body)
    expect(Object.keys(result)).toEqual(['contactTemperature', 'idealTemperature', 'temperature'])
    const [ideal, real] = [result['idealTemperature'], result['temperature']] as number[][][]
    ideal![0]!.forEach((T, j) => expect(real![0]![j]! / T).toBeCloseTo(1, 8))
    const perfect = { ...body, contactConductance: undefined }
    expect(
      ask('semi-infinite-contact', JSON.parse(JSON.stringify(perfect)) as typeof body).result['temperature'],
    ).toEqual(ideal)
    expect(Object.keys(ask('semi-infinite-contact', { ...body, outputs: ['surfaceHeatFlux'] }).result)).toEqual([
      'contactTemperature',
      'surfaceHeatFlux',
    ])
  })
  it('begin as they were', () => {
    const body = { ...ground, other, contactConductance: 500, depths: [-1, 0, 1], times: [0] }
    const { result } = ask('semi-infinite-contact', {
      ...body,
      outputs: ['temperature', 'heatFlux', 'surfaceTemperature', 'otherSurfaceTemperature', 'heatGained'],
    })
    expect(result['temperature']).toEqual([[80, 15, 15]])
    expect(result['heatFlux']).toEqual([[0, 500 * 65, 0]])
    expect([result['surfaceTemperature'], result['otherSurfaceTemperature'], result['heatGained']]).toEqual([
      [15],
      [80],
      [0],
    ])
  })
})
