import { z } from 'zod'
import { environments } from '../../drizzle/schema.ts'
import { type Scope, allScopes, scopes } from '../permissions.ts'
import { instantSchema, storedText } from '../texts.ts'
import { networkOf } from './networks.ts'

const count = z.number().int()
const whole = (min: number, max: number) => count.min(min).max(max)
const from = (min: number, max: number) => ({ 'x-accepted': `a whole number from ${min} to ${max}` })

const scope = z.enum(allScopes as [Scope, ...Scope[]]).meta({ 'x-accepted': `one of ${allScopes.join(', ')}` })
const scopeList = z.array(scope).min(1).max(allScopes.length)
const scopeTexts = Object.entries(scopes).map(([scope, text]) => `${scope}: ${text}`)

const network = z
  .string()
  .max(50)
  .refine((text) => networkOf(text) !== undefined, { error: 'This is no address and no network.' })
  .meta({ 'x-accepted': 'an address or a network such as 203.0.113.0/24 or 2001:db8::/32' })

const originForm = /^(https:\/\/[^/]+|http:\/\/(localhost|127\.0\.0\.1)(:\d+)?)$/
const origin = z
  .string()
  .max(300)
  .refine((text) => originForm.test(text) && URL.canParse(text) && new URL(text).origin === text, {
    error: 'This is no origin of a page.',
  })
  .meta({ 'x-accepted': 'an origin such as https://app.example.org, in lower case and without a path' })

const MOST_POINTS = 1_000_000_000
const MOST_CALLS = 6000

/** What may be set of a key, when it is made and later. */
const settings = {
  name: storedText('Name', 80),
  quota: whole(0, MOST_POINTS)
    .nullable()
    .optional()
    .meta({
      ...from(0, MOST_POINTS),
      title: 'Own quota',
      description: 'Points a period for this key alone, within those of the account.',
    }),
  rate: whole(1, MOST_CALLS)
    .nullable()
    .optional()
    .meta({
      ...from(1, MOST_CALLS),
      title: 'Own rate',
      description: 'Calls a minute for this key alone, within those of the account.',
    }),
  scopes: scopeList.optional().meta({
    'x-accepted': `one or more of ${allScopes.join(', ')}`,
    title: 'Scopes',
    description: `What the key may do; all unless given. ${scopeTexts.join(' ')}`,
  }),
  expiresAt: z.iso.datetime({ offset: true }).nullable().optional().meta({
    title: 'Expires',
    description: 'From when the key is refused; never unless given.',
    'x-accepted': 'an instant to come, such as 2099-12-31T23:00:00Z',
  }),
  addresses: z.array(network).max(50).optional().meta({
    title: 'Allowed networks',
    description:
      'Addresses and networks (IPv4, IPv6) from which the key may be used; from anywhere where there is none.',
  }),
  origins: z.array(origin).max(20).optional().meta({
    title: 'Allowed origins',
    description:
      'Origins of pages whose browsers may send the key; no page where there is none. Whoever opens such a page can read the key.',
  }),
}

export const keySettingsSchema = z.strictObject(settings).meta({ id: 'KeySettings' })
export const newKeySchema = z
  .strictObject({
    ...settings,
    environment: z
      .enum(environments)
      .optional()
      .meta({
        'x-accepted': environments.join(' or '),
        title: 'Environment',
        description:
          'trial (unless given): points of the day, never invoiced. metered: points of the month, of the plan.',
      }),
  })
  .meta({ id: 'NewKey' })
export type KeySettings = z.output<typeof keySettingsSchema>

const MOST_OVERLAP = 30 * 24
export const rotationSchema = z
  .strictObject({
    overlapHours: whole(0, MOST_OVERLAP).meta({
      ...from(0, MOST_OVERLAP),
      title: 'Overlap',
      description: 'Hours for which the old secret goes on beside the new one; 0 ends it at once.',
    }),
  })
  .meta({ id: 'KeyRotation' })

export const keySchema = z
  .strictObject({
    id: z.string(),
    name: z.string(),
    prefix: z
      .string()
      .meta({ description: 'Environment and the first six characters; more of a key is never shown again.' }),
    environment: z.enum(environments),
    quota: count.nullable().meta({ description: 'Points a period of this key alone, or null.' }),
    rate: count.nullable().meta({ description: 'Calls a minute of this key alone, or null.' }),
    used: count.meta({ description: 'Points used in this period.' }),
    scopes: scopeList,
    addresses: z.array(z.string()),
    origins: z.array(z.string()),
    createdAt: instantSchema,
    createdBy: z.string(),
    lastUsedAt: instantSchema.nullable(),
    expiresAt: instantSchema.nullable(),
    revokedAt: instantSchema.nullable(),
    revokedFor: z
      .enum(['asked', 'leaked'])
      .nullable()
      .meta({ description: 'asked: by a member; leaked: it was reported as found in public.' }),
    oldSecret: z
      .strictObject({ prefix: z.string(), endsAt: instantSchema, lastUsedAt: instantSchema.nullable() })
      .nullable()
      .meta({ description: 'The secret before the last rotation, while it still works.' }),
  })
  .meta({ id: 'Key' })

export const shownSecretSchema = z.strictObject({ key: keySchema, secret: z.string() }).meta({ id: 'CreatedKey' })
