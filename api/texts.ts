import { z } from 'zod'

const stored = /^[^\p{Cc}\p{Cs}]*$/u

/** A text that is kept: no control characters, no half of a surrogate pair, no blank ends. */
export function storedText(label: string, max: number, min = 1) {
  return z
    .string()
    .min(min)
    .max(max)
    .refine((text) => stored.test(text) && text === text.trim(), {
      error: `${label} has control characters, or blanks at its ends.`,
    })
    .meta({
      title: label,
      description: `${label}: ${min} to ${max} characters.`,
      'x-accepted': `${min} to ${max} characters`,
    })
}

/** A mail address, kept in lower case. */
export const mailField = z
  .email()
  .max(254)
  .transform((mail) => mail.toLowerCase())
  .meta({ title: 'Mail address', description: 'Mail address, 254 characters at most.', 'x-accepted': 'a mail address' })

export const instantSchema = z.iso.datetime().meta({ description: 'An instant in UTC, RFC 3339.' })

/** The service knows no earlier days; the last is that of four digits. */
export const FIRST_DAY = '2000-01-01'
export const dayField = z.iso
  .date({ abort: true })
  .refine((day) => day >= FIRST_DAY, { error: `The first day is ${FIRST_DAY}.` })
  .meta({ description: 'A UTC day, such as 2026-03-31.', 'x-accepted': 'a day such as 2026-03-31' })
