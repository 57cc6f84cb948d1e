import { z } from 'zod'
import { roles, staffRoles } from '../permissions.ts'
import { mailField, storedText } from '../texts.ts'
import { MAX_PASSWORD_BYTES, MIN_PASSWORD } from './password-rules.ts'

const newPassword = z
  .string()
  .min(MIN_PASSWORD)
  .max(MAX_PASSWORD_BYTES)
  .refine((text) => Buffer.byteLength(text) <= MAX_PASSWORD_BYTES, {
    error: `password has more than ${MAX_PASSWORD_BYTES} bytes.`,
  })
  .meta({
    title: 'Password',
    description: `Password: ${MIN_PASSWORD} characters at least, ${MAX_PASSWORD_BYTES} bytes at most; any characters.`,
    'x-accepted': `at least ${MIN_PASSWORD} characters that are not easily guessed`,
  })

export const signUpSchema = z
  .strictObject({
    mail: mailField,
    password: newPassword,
    name: storedText('Name', 100),
    accountName: storedText('Account name', 100),
  })
  .meta({ id: 'SignUp' })

export const signInSchema = z
  .strictObject({
    mail: mailField,
    password: z.string().min(1).max(1024).meta({ title: 'Password', 'x-accepted': '1 to 1024 characters' }),
  })
  .meta({ id: 'SignIn' })

export const sessionSchema = z
  .strictObject({
    person: z.strictObject({ name: z.string(), mail: z.string() }),
    account: z.strictObject({ id: z.string(), name: z.string() }),
    role: z.enum(roles),
    permissions: z.array(z.string()).meta({ description: 'What the role may do.' }),
  })
  .meta({ id: 'Session' })

export const staffSessionSchema = z
  .strictObject({ person: z.strictObject({ name: z.string(), mail: z.string() }), role: z.enum(staffRoles) })
  .meta({ id: 'StaffSession' })
