import { z } from 'zod'
import { resolveCycle } from './cycle.ts'
import type { Issue } from '../errors.ts'
import { cycle } from './fields.ts'
import type { Ambient } from '../math/lumped-response.ts'
import { quantity } from './quantity.ts'
import { rampRate } from './ramp.ts'

const start = quantity({
  symbol: 'Tₐ₀',
  unit: 'Cel',
  label: 'Start',
  min: -273.15,
  max: 1e4,
  typical: [-40, 100],
  hint: 'ambient temperature at time 0',
})

const kinds = [
  z.strictObject({ kind: z.literal('ramp'), start, rampRate }).meta({
    title: 'Rises evenly',
    'x-hint': 'from start on, at rampRate',
  }),
  z.strictObject({ kind: z.literal('cycle'), ...cycle }).meta({
    title: 'In a cycle',
    'x-hint': 'a cosine on the clock of times',
  }),
] as const

/** What a fluid does from time 0 on, as a field. */
export const ambientField = z.discriminatedUnion('kind', kinds).meta({
  title: 'Ambient temperature',
  description: 'Ambient temperature: of kind ramp (start, rampRate) or cycle, from time 0 on.',
  'x-hint': 'of the fluid: rising evenly, or in a cycle',
})

export type AmbientInput = z.infer<typeof ambientField>

export function resolveAmbient(input: AmbientInput, refuse: (issue: Issue) => void): Ambient | undefined {
  if (input.kind === 'ramp') return input
  const found = resolveCycle(input, refuse, '#/ambient')
  return found && { kind: 'cycle', cycle: found }
}
