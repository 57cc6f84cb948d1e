import type { Body } from './body.ts'
import { type Answer, type CompactAnswer, isFull } from './solve.ts'

/** What was asked, with numbers that were given in other units as they were used: in those of the contract. */
export function asUsed({ body, answer }: { body: Body; answer: Answer | CompactAnswer }): Body {
  if (!isFull(answer)) return body
  const used: Body = { ...answer.input, ...answer.axes }
  return Object.fromEntries(Object.entries(body).map(([name, given]) => [name, used[name] ?? given]))
}
