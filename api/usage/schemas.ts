import { z } from 'zod'
import { environments } from '../../drizzle/schema.ts'
import { dayField, instantSchema } from '../texts.ts'

const count = z.number().int()

const standing = {
  limit: count.meta({ description: 'Points of the period.' }),
  used: count.meta({ description: 'Points used in the period.' }),
  resetsAt: instantSchema,
}

export const statusSchema = z
  .strictObject({
    ...standing,
    metered: z
      .strictObject(standing)
      .nullable()
      .meta({ description: 'The same of metered keys, where there is a plan.' }),
  })
  .meta({ id: 'AccountStatus' })

const groups = ['day', 'key', 'case', 'environment', 'reference'] as const
export type Group = (typeof groups)[number]

export const usageQuery = z.strictObject({
  from: dayField.optional().meta({
    description: 'First UTC day; 29 days before `to` unless given.',
    'x-accepted': 'a day such as 2026-03-31',
  }),
  to: dayField
    .optional()
    .meta({ description: 'Last UTC day, included; today unless given.', 'x-accepted': 'a day such as 2026-03-31' }),
  groupBy: z
    .string()
    .regex(/^(day|key|case|environment|reference)(,(day|key|case|environment|reference)){0,4}$/)
    .default('day')
    .meta({
      description: 'One or more of day, key, case, environment and reference, with commas between.',
      'x-accepted': 'day, key, case, environment, reference, or several with commas between',
    }),
})

const figures = {
  calls: count,
  points: count,
  refused: count.meta({ description: 'Calls that were refused or failed; they cost nothing.' }),
}

export const usageSchema = z
  .strictObject({
    from: dayField,
    to: dayField,
    asOf: instantSchema,
    groupBy: z.array(z.enum(groups)),
    account: statusSchema,
    rows: z.array(
      z.strictObject({
        day: dayField.optional(),
        keyId: z.string().nullable().optional(),
        keyName: z.string().nullable().optional(),
        case: z.string().nullable().optional(),
        environment: z.enum(environments).nullable().optional(),
        reference: z.string().nullable().optional(),
        ...figures,
      }),
    ),
    total: z.strictObject(figures),
  })
  .meta({ id: 'Usage' })
