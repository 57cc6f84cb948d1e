import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { outputNamesOf, placeFields, shapeOf } from '../../solvers/case.ts'
import { cases } from '../../solvers/cases/index.ts'
import { domainCodes, DomainError } from '../../solvers/errors.ts'
import { solve } from '../../solvers/operations/solve.ts'
import type { OutputName } from '../../solvers/outputs.ts'
import { admissible } from './admissible.ts'
import { temperaturesOf } from './ask.ts'
import { brief, proof, seed } from './counts.ts'

const count = Math.ceil((proof ? 1_000_000 : brief ? 10_000 : 100_000) / cases.length)

interface Answer {
  result: Partial<Record<OutputName, number | number[] | number[][]>>
  accuracy: { bound: Partial<Record<OutputName, { absolute: number; relative: number }>>; scale: number }
}

const misfits = ['depth-outside-body', 'sizes-do-not-fit']

const numbers = (values: number | number[] | number[][]): number[] => [values].flat(2)

/** Whether the body is heated by more than the temperatures that it is given; then it may leave them. */
const heats = (body: Record<string, unknown>): boolean =>
  /"(power|linePower|energy|imposedHeatFlux|rampRate|powerDensity|adiabaticRise|amplitude)"/.test(JSON.stringify(body))

/** Says what is wrong with an answer, or nothing. */
function wrongWith(body: Record<string, unknown>, { result, accuracy }: Answer): string | undefined {
  for (const [name, values] of Object.entries(result))
    if (!numbers(values).every(Number.isFinite)) return `${name} is not finite`
  for (const [name, b] of Object.entries(accuracy.bound))
    if (!(b.absolute >= 0 && b.relative >= 0 && Number.isFinite(b.absolute + b.relative))) return `bound of ${name}`
  if (!Number.isFinite(accuracy.scale)) return 'scale'
  for (const name of ['remainingFraction', 'completedFraction', 'heatFraction'] as const)
    if (!numbers(result[name] ?? []).every((v) => v >= 0 && v <= 1)) return `${name} outside 0..1`
  if (heats(body)) return undefined
  const ends = temperaturesOf(body)
  for (const name of ['temperature', 'meanTemperature'] as const) {
    const slack = accuracy.bound[name]?.absolute ?? 0
    if (!numbers(result[name] ?? []).every((v) => v >= Math.min(...ends) - slack && v <= Math.max(...ends) + slack))
      return `${name} breaks the maximum principle`
  }
  return undefined
}

describe.each(cases.map((c) => [c.id, c] as const))('%s over all admissible inputs', (_id, c) => {
  it(
    `answers ${count} random ones with finite numbers inside the limits, or refuses by a listed code`,
    { timeout: 3_600_000 },
    () => {
      // Sensitivities take hundreds of solves each; they are asked on their own.
      const names = outputNamesOf(c).filter((name) => name !== 'sensitivities')
      const placeless = names.filter((name) => ['times', 'single'].includes(shapeOf(c, name)))
      let [asked, answered] = [0, 0]
      const ask = (body: Record<string, unknown>, outputs: OutputName[]): string | undefined => {
        try {
          const answer = solve.prepare(c, { ...body, outputs }, 'full').run() as Answer
          answered++
          return wrongWith(body, answer)
        } catch (error) {
          if (!(error instanceof DomainError)) throw error
          const unknown = error.issues.find((issue) => !(issue.code in domainCodes))
          if (unknown) return `unknown code ${unknown.code}`
          const absent = error.issues.every((issue) => issue.code === 'output-not-defined')
          // A place or two sizes that do not fit each other, drawn by chance.
          if (error.issues.every((issue) => misfits.includes(issue.code))) return undefined
          const singular = error.issues.every((issue) => issue.code === 'singular-at-time-zero')
          if (singular)
            return ask(
              body,
              outputs.filter((name) => !name.endsWith('eatFlux')),
            )
          if (error.issues.every((issue) => issue.code === 'no-rate-at-change'))
            return ask(
              body,
              outputs.filter((name) => name !== 'rate'),
            )
          if (!absent) return `refused: ${JSON.stringify(error.issues[0])}`
          const left = outputs.filter((_, i) => !error.issues.some((issue) => issue.pointer === `#/outputs/${i}`))
          return left.length ? ask(body, left) : undefined
        }
      }
      // A rate takes twelve solves: one input in five asks for it.
      const wanted = (list: readonly OutputName[]) => list.filter((name) => name !== 'rate' || asked % 5 === 0)
      fc.assert(
        fc.property(admissible(c), (body) => {
          asked++
          const nowhere = c.places !== 'none' && placeFields[c.places].every((name) => !body[name])
          expect(ask(body, wanted(nowhere ? placeless : names))).toBeUndefined()
        }),
        { numRuns: count, seed },
      )
      expect(answered).toBeGreaterThanOrEqual(count / 4)
    },
  )
})
