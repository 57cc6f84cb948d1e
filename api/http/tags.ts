import type { Request } from 'express'
import { withoutKeys } from '../keys/key.ts'
import { invalidHeader } from '../problems.ts'

const referenceForm = /^[\x21-\x7e]([\x20-\x7e]{0,62}[\x21-\x7e])?$/
const traceForm = /^(?!ff)[0-9a-f]{2}-(?!0{32})([0-9a-f]{32})-(?!0{16})[0-9a-f]{16}-[0-9a-f]{2}(-.*)?$/

/**
 * What a caller calls its call: a tag of its own, and the trace that the call is a part of. A wrong tag is refused,
 * for it would be missed later; a wrong trace begins anew, as W3C Trace Context says.
 */
export function tagsOf({ headers }: Request): { reference?: string; traceId?: string } {
  const [reference, trace] = [headers['client-reference'], headers['traceparent']]
  if (reference !== undefined && (typeof reference !== 'string' || !referenceForm.test(reference)))
    throw invalidHeader('Client-Reference', 'The header is no tag.', '1 to 64 visible characters of ASCII')
  const traceId = typeof trace === 'string' ? traceForm.exec(trace)?.[1] : undefined
  return { ...(reference ? { reference: withoutKeys(reference) } : {}), ...(traceId ? { traceId } : {}) }
}
