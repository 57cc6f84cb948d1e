import type { Check } from '../case.ts'
import { balanceOf, heatsOf } from './heat-balance.ts'
import type { OutputName } from '../outputs.ts'
import type { Solution } from '../solution.ts'

/** The balance of a body with one temperature: `flows` is all that enters at a time, by the temperature that is answered there. */
export function lumpedBalance<
  I extends { times: readonly number[]; outputs: readonly OutputName[]; conductance: number },
>(solve: (input: I) => Solution, input: I, flows: (time: number, T: number) => number[], longest?: number): Check[] {
  return balanceOf(
    input.times,
    (times) => {
      const { temperature, heatGained } = solve({ ...input, times, outputs: ['temperature', 'heatGained'] }).outputs
      return {
        heats: heatsOf(heatGained!),
        flows: (temperature!.values as number[]).map((T, i) => flows(times[i]!, T)),
        flowError: input.conductance * temperature!.bound.absolute,
      }
    },
    longest === undefined ? {} : { longest },
  )
}
