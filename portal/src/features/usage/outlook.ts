import { instantText, whole } from '../../components/formats.ts'
import type { Usage } from './queries.ts'

const DAY = 86_400_000
/** Before this a rate says little. */
const SOON = DAY / 24

/** What the rate since midnight leads to by the time the quota resets. */
export function outlookOf(
  { limit, used, resetsAt }: Usage['account'],
  asOf: string,
): { expected: number; sentence: string } {
  const now = Date.parse(asOf)
  const reset = Date.parse(resetsAt)
  const gone = DAY - (reset - now)
  const until = `until ${instantText(resetsAt).slice(0, -3)} UTC`
  if (used >= limit) return { expected: used, sentence: `The quota is spent. Calls answer 429 ${until}.` }
  if (gone < SOON || used === 0) return { expected: used, sentence: `${whole(limit - used)} points are left ${until}.` }
  const rate = used / gone
  const spentAt = now + (limit - used) / rate
  const expected = Math.round(used + rate * (reset - now))
  if (spentAt >= reset)
    return {
      expected,
      sentence: `${whole(limit - used)} points are left ${until}. At the rate since midnight that is enough.`,
    }
  const at = instantText(new Date(spentAt).toISOString()).slice(0, -3)
  return {
    expected,
    sentence: `At the rate since midnight the quota is spent on ${at} UTC. From then on calls answer 429 ${until}.`,
  }
}
