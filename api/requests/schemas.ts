import { z } from 'zod'
import { idField } from '../ids.ts'
import { problemCodes } from '../problems.ts'
import { instantSchema } from '../texts.ts'

const text = z.string()
const count = z.number().int()

const keyReference = z.strictObject({ id: text, name: text, prefix: text })
const shape = {
  id: text,
  at: instantSchema,
  key: keyReference.nullable(),
  method: text,
  path: text,
  case: text.nullable(),
  operation: text.nullable(),
  status: count.meta({ description: 'Status answered; 499 where the client hung up first.' }),
  milliseconds: z.number(),
  points: count,
  problem: z.enum(problemCodes).nullable().meta({ description: 'Code of the problem answered.' }),
  reference: text.nullable().meta({ description: 'As in the Client-Reference header of the call.' }),
  traceId: text.nullable().meta({ description: 'As in the traceparent header of the call.' }),
}
const detail = {
  ...shape,
  bytesIn: count,
  bytesOut: count,
  problem: z.record(text, z.unknown()).nullable().meta({ description: 'The whole problem as answered.' }),
  ledger: z.array(z.strictObject({ kind: z.enum(['charge', 'refund']), points: count, at: instantSchema })),
  solver: text,
}
const account = z.strictObject({ id: text, name: text }).nullable()

export const requestParams = z.strictObject({
  requestId: idField('req').meta({ description: 'As in the Request-Id header.' }),
})

export const requestListQuery = z.strictObject({
  cursor: text.max(200).optional().meta({ description: 'From `next` of the page before.' }),
  keyId: idField('key').optional().meta({ description: 'Only calls of this key.', 'x-accepted': 'the id of a key' }),
  reference: text.max(64).optional().meta({ description: 'Only calls with this Client-Reference.' }),
  status: z
    .enum(['ok', 'refused', 'failed'])
    .optional()
    .meta({ description: 'ok: 2xx and 3xx; refused: 4xx; failed: 5xx.', 'x-accepted': 'ok, refused or failed' }),
})

export const requestListSchema = z
  .strictObject({
    requests: z.array(z.strictObject(shape).meta({ id: 'RequestEntry' })),
    next: text.nullable().meta({ description: 'Cursor of the next page, or null on the last.' }),
  })
  .meta({ id: 'RequestList' })

export const requestSchema = z.strictObject(detail).meta({ id: 'Request' })

export const foundSchema = z
  .strictObject({ requests: z.array(z.strictObject({ ...shape, account }).meta({ id: 'FoundRequest' })) })
  .meta({ id: 'FoundRequests' })

export const staffRequestSchema = z.strictObject({ ...detail, account }).meta({ id: 'StaffRequest' })
