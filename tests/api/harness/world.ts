import { operations } from '../../../api/operations.ts'
import type { Operation } from '../../../api/operation.ts'
import { type Role, type StaffRole, roles, staffRoles } from '../../../api/permissions.ts'
import { Client } from './client.ts'
import { makeKey, query, signUp } from './people.ts'
import type { TestService } from './service.ts'

/** An account with a person of each role, another account, staff, a key, and one call of it. */
export interface World {
  members: Record<Role, Client>
  staff: Record<StaffRole, Client>
  stranger: Client
  nobody: Client
  accountId: string
  key: { id: string; secret: string }
  requestId: string
  /** A key that may be revoked. */
  spareKey: { id: string; secret: string }
  strangersKey: { id: string; secret: string }
  /** Keeps a material of the account, made by a member, and gives its id. */
  keepMaterial(maker: Client): Promise<string>
  /** Materials of the account, by the operation that reads, changes or deletes each. */
  materials: Record<string, string>
}

const exampleOf = (id: string) =>
  operations.find((o) => o.id === id)?.example?.body as { mail: string; password: string }

export async function createWorld({ url, databaseUrl, service }: TestService): Promise<World> {
  const sql = (text: string, values: unknown[]) => query(databaseUrl, text, values)
  const { accountId, client: owner, mail } = await signUp(url)
  const key = await makeKey(owner, { name: 'World' })
  const member = exampleOf('signIn')
  const hash = await service.deps.compute.hashPassword(member.password)
  const members = { owner } as Record<Role, Client>
  for (const role of roles.filter((r) => r !== 'owner')) {
    const [id, address] = [`prsn_${role}`, role === 'integrator' ? member.mail : `${role}@example.org`]
    await sql('INSERT INTO people (id, mail, name, password_hash) VALUES ($1, $2, $3, $4)', [id, address, role, hash])
    await sql('INSERT INTO memberships (account_id, person_id, role) VALUES ($1, $2, $3)', [accountId, id, role])
    members[role] = await signIn(url, '/portal/v1/sign-in', { mail: address, password: member.password })
  }
  const staff = {} as Record<StaffRole, Client>
  const agent = exampleOf('staffSignIn')
  for (const role of staffRoles) {
    const address = role === 'support' ? agent.mail : `${role}@example.org`
    await sql('INSERT INTO staff (id, mail, name, password_hash, role) VALUES ($1, $2, $3, $4, $5)', [
      `stff_${role}`,
      address,
      role,
      hash,
      role,
    ])
    staff[role] = await signIn(url, '/support/v1/sign-in', { mail: address, password: member.password })
  }
  const { client: stranger } = await signUp(url)
  const keepMaterial = async (maker: Client) => {
    const { path, example } = operations.find((o) => o.id === 'createAccountMaterial') as Operation
    const made = await maker.post(path, example?.body)
    if (made.status !== 201) throw new Error(`keeping a material answered ${made.status}: ${made.text}`)
    return made.json.id as string
  }
  const materials: Record<string, string> = {}
  for (const o of operations.filter(({ path }) => path.endsWith('/{materialId}')))
    materials[o.id] = await keepMaterial(owner)
  const solve = operations.find((o) => o.metered) as Operation
  const answer = await new Client(url).post(solve.path, solve.example?.body, { authorization: `Bearer ${key.secret}` })
  if (answer.status !== 200) throw new Error(`the first call answered ${answer.status}: ${answer.text}; ${mail}`)
  await service.deps.requestLog.flush()
  const requestId = answer.headers.get('request-id') as string
  return {
    members,
    staff,
    stranger,
    nobody: new Client(url),
    accountId,
    key,
    requestId,
    spareKey: await makeKey(owner),
    strangersKey: await makeKey(stranger),
    keepMaterial,
    materials,
  }
}

async function signIn(url: string, path: string, body: object): Promise<Client> {
  const client = new Client(url)
  const answer = await client.post(path, body)
  if (answer.status !== 200) throw new Error(`sign-in answered ${answer.status}: ${answer.text}`)
  return client
}

/** The path of an operation with the ids of what the world holds. */
export function pathIn(world: World, o: Operation, ids: Record<string, string> = {}): string {
  const known: Record<string, string> = {
    ...o.example?.params,
    requestId: world.requestId,
    keyId: world.spareKey.id,
    ...(world.materials[o.id] ? { materialId: world.materials[o.id] } : {}),
    ...ids,
  }
  return o.path.replace(/\{(\w+)\}/g, (_, name: string) => known[name] ?? `no-${name}`)
}

/** Who may call an operation, as the client and headers with which it is called. */
export function callerOf(world: World, o: Operation): { client: Client; headers: Record<string, string> } {
  const key = o.access === 'key' ? { authorization: `Bearer ${world.key.secret}` } : {}
  const headers = { ...key, ...exampleHeaders(o) }
  if (o.access === 'key') return { client: world.nobody, headers }
  if (o.access === 'session') return { client: world.members.owner, headers }
  if (o.access === 'staff') return { client: world.staff.support, headers }
  return { client: new Client(world.nobody.url), headers }
}

/** The body of an operation's example. */
export function exampleBody(o: Operation): unknown {
  return o.body ? o.example?.body : o.upload?.example
}

/** What goes with it: the version of what is changed, and the kind of a body that is no JSON. */
export function exampleHeaders(o: Operation): Record<string, string> {
  return { ...(o.conditional ? { 'if-match': '*' } : {}), ...(o.upload ? { 'content-type': o.upload.kind } : {}) }
}
