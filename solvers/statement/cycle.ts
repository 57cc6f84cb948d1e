import type { Issue } from '../errors.ts'
import type { Cycle } from '../math/cycle-phase.ts'

interface CycleInput {
  cycleMean: number
  amplitude: number
  period: number
  timeOfMaximum?: number | undefined
  timeOfMinimum?: number | undefined
}

/** A cycle from exactly one of its two instants; `within` says where its fields stand, `#` or `#/ambient`. */
export function resolveCycle(input: CycleInput, refuse: (issue: Issue) => void, within = '#'): Cycle | undefined {
  const { cycleMean, amplitude, period, timeOfMaximum, timeOfMinimum } = input
  const accepted = 'exactly one of timeOfMaximum and timeOfMinimum, in s on the clock of times'
  if (timeOfMaximum !== undefined && timeOfMinimum !== undefined) {
    const detail = 'The phase of the cycle is given twice: by timeOfMaximum and by timeOfMinimum.'
    refuse({ pointer: `${within}/timeOfMinimum`, code: 'conflicting-fields', detail, accepted })
    return undefined
  }
  const instant = timeOfMaximum ?? timeOfMinimum
  if (instant === undefined) {
    const detail = 'The phase of the cycle is missing.'
    refuse({ pointer: `${within}/timeOfMaximum`, code: 'missing-field', detail, accepted })
    return undefined
  }
  return { cycleMean, amplitude, period, instant, sign: timeOfMaximum === undefined ? -1 : 1 }
}

/** The fields of a cycle as they were given. */
export function cycleEcho({ cycleMean, amplitude, period, instant, sign }: Cycle): Record<string, number> {
  return { cycleMean, amplitude, period, [sign === 1 ? 'timeOfMaximum' : 'timeOfMinimum']: instant }
}
