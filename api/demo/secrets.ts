import { randomBytes } from 'node:crypto'
import { mkdir, readFile, rename, writeFile } from 'node:fs/promises'
import path from 'node:path'
import bcrypt from 'bcryptjs'
import { z } from 'zod'
import { newKey } from '../keys/key.ts'
import { agents, members } from './firm.ts'

const COST = 12
const kept = z.object({
  signIns: z.record(z.string(), z.object({ password: z.string(), hash: z.string() })),
  key: z.string(),
})
export type DemoSecrets = z.infer<typeof kept>

const roles = [...members, ...agents].map(({ role }) => role)

/** Passwords and key of this installation's demo; made once, then read from its data folder. */
export async function demoSecrets(folder: string): Promise<DemoSecrets> {
  const text = await readFile(fileIn(folder), 'utf8').catch(() => undefined)
  const read = text === undefined ? undefined : kept.safeParse(asJson(text)).data
  if (read && roles.every((role) => role in read.signIns)) return read
  const made = await Promise.all(roles.map(async (role) => [role, await newPassword()] as const))
  const secrets = { signIns: Object.fromEntries(made), key: newKey('trial') }
  await keepSecrets(folder, secrets)
  return secrets
}

export async function keepSecrets(folder: string, secrets: DemoSecrets): Promise<void> {
  await mkdir(folder, { recursive: true })
  const fresh = `${fileIn(folder)}.${process.pid}`
  await writeFile(fresh, JSON.stringify(secrets, null, 1), { mode: 0o600 })
  await rename(fresh, fileIn(folder))
}

const fileIn = (folder: string) => path.join(folder, 'demo.json')

function asJson(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch {
    return undefined
  }
}

async function newPassword() {
  const password = randomBytes(12).toString('base64url')
  return { password, hash: await bcrypt.hash(password, COST) }
}
