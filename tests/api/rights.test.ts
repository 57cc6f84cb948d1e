import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import type { Operation } from '../../api/operation.ts'
import { operations } from '../../api/operations.ts'
import { type Permission, type StaffPermission, roles, staffRoles } from '../../api/permissions.ts'
import { Client } from './harness/client.ts'
import { makeKey, query } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'
import { type World, createWorld, exampleBody, exampleHeaders, pathIn } from './harness/world.ts'

/* What the roles promise, stated apart from the table that the service reads. */
const promised: Record<Permission | StaffPermission, string> = {
  'session:read': 'owner integrator reader',
  'keys:read': 'owner integrator',
  'keys:create': 'owner integrator',
  'keys:change': 'owner integrator',
  'keys:revoke': 'owner integrator',
  'materials:read': 'owner integrator reader',
  'materials:write': 'owner integrator',
  'usage:read': 'owner integrator reader',
  'requests:read': 'owner integrator reader',
  'staff-session:read': 'support supervisor',
  'any-request:find': 'support supervisor',
  'any-request:read': 'support supervisor',
}

let service: TestService
let world: World
beforeAll(async () => {
  service = await startTestService()
  world = await createWorld(service)
})
afterAll(() => service.close())

const clients = () => ({ ...world.members, ...world.staff, nobody: world.nobody })
const everyone = [...roles, ...staffRoles, 'nobody'] as const
const guarded = operations.filter((o) => o.access === 'session' || o.access === 'staff')

const ask = (client: Client, o: Operation, ids: Record<string, string> = {}) =>
  client.call(pathIn(world, o, ids), {
    method: o.method.toUpperCase(),
    body: exampleBody(o),
    headers: exampleHeaders(o),
  })

function expected(o: Operation, who: (typeof everyone)[number]): number {
  const signedIn = o.access === 'session' ? roles : staffRoles
  if (!(signedIn as readonly string[]).includes(who)) return 401
  return promised[o.permission as Permission].split(' ').includes(who) ? o.status : 403
}

describe.each(guarded.map((o) => [o.id, o] as const))('%s', (_, o) => {
  test.each(everyone)('as %s', async (who) => {
    /* A key of the caller's own, so that only the role decides. */
    const maker = who === 'integrator' ? world.members.integrator : world.members.owner
    const ids: Record<string, string> = {
      ...(o.path.includes('{keyId}') ? { keyId: (await makeKey(maker)).id } : {}),
      ...(o.path.includes('{materialId}') ? { materialId: await world.keepMaterial(maker) } : {}),
    }
    const answer = await ask(clients()[who], o, ids)
    expect(answer.status, answer.text).toBe(expected(o, who))
  })

  test('a key is no session, and the session of one side is none of the other', async () => {
    const headers = { authorization: `Bearer ${world.key.secret}` }
    const method = o.method.toUpperCase()
    const answer = await world.nobody.call(pathIn(world, o), {
      method,
      headers: { ...exampleHeaders(o), ...headers },
      body: exampleBody(o),
    })
    expect(answer.status).toBe(401)
    const other = new Client(service.url)
    for (const [name, value] of (o.access === 'session' ? world.staff.support : world.members.owner).cookies)
      other.cookies.set(name.includes('staff') ? name.replace('-staff', '') : `${name}-staff`, value)
    expect((await ask(other, o)).status).toBe(401)
  })
})

describe.each(operations.filter((o) => o.access === 'session').map((o) => [o.id, o] as const))('%s', (_, o) => {
  test('shows and changes nothing of another account', async () => {
    const before = await query(
      service.databaseUrl,
      'SELECT id, revoked_at FROM keys WHERE account_id = $1 ORDER BY id',
      [world.accountId],
    )
    const answer = await ask(world.stranger, o, { keyId: world.key.id })
    expect(answer.status).toBe(o.params ? 404 : o.status)
    for (const word of [world.accountId, world.key.id, world.requestId].filter(
      (id) => !answer.json.detail?.includes(id),
    ))
      expect(answer.text.replaceAll(answer.json.requestId ?? ' ', '')).not.toContain(word)
    expect(
      await query(service.databaseUrl, 'SELECT id, revoked_at FROM keys WHERE account_id = $1 ORDER BY id', [
        world.accountId,
      ]),
    ).toEqual(before)
  })
})

test('the key of one account reads no request of another', async () => {
  const headers = { authorization: `Bearer ${world.strangersKey.secret}` }
  const answer = await world.nobody.call(`/v1/requests/${world.requestId}`, { headers })
  expect(answer.status).toBe(404)
})

test("what is missing and what is another account's look the same", async () => {
  const [others, missing] = await Promise.all(
    [world.requestId, 'req_019283746570700080000123456789ab'].map((id) =>
      world.stranger.call(`/portal/v1/requests/${id}`),
    ),
  )
  expect({ ...others?.json, requestId: '' }).toEqual({ ...missing?.json, requestId: '' })
})

test('an integrator lists and revokes own keys only, the owner all', async () => {
  const own = await makeKey(world.members.integrator, { name: 'Own' })
  const owners = await makeKey(world.members.owner, { name: 'Owners' })
  const listed = (await world.members.integrator.call('/portal/v1/keys')).json.keys.map((k: { id: string }) => k.id)
  expect(listed).toContain(own.id)
  expect(listed).not.toContain(owners.id)
  expect((await world.members.integrator.post(`/portal/v1/keys/${owners.id}/revoke`)).status).toBe(404)
  expect((await world.members.owner.post(`/portal/v1/keys/${own.id}/revoke`)).json.key.revokedAt).not.toBeNull()
})

test('an integrator reads all materials and changes own ones only, the owner all', async () => {
  const { owner, integrator } = world.members
  const [owners, own] = [await world.keepMaterial(owner), await world.keepMaterial(integrator)]
  const body = exampleBody(operations.find(({ id }) => id === 'replaceAccountMaterial') as Operation)
  const change = (client: Client, id: string, method: string) =>
    client.call(`/portal/v1/materials/${id}`, {
      method,
      headers: { 'if-match': '*' },
      body: method === 'PUT' ? body : undefined,
    })
  expect((await change(integrator, owners, 'GET')).status).toBe(200)
  for (const method of ['PUT', 'DELETE']) expect((await change(integrator, owners, method)).status).toBe(404)
  expect((await change(integrator, own, 'PUT')).status).toBe(200)
  expect((await change(owner, own, 'DELETE')).status).toBe(204)
  const done = await query(service.databaseUrl, 'SELECT action FROM audit WHERE subject = $1 ORDER BY at, id', [own])
  expect(done).toEqual(['kept', 'replaced', 'deleted'].map((action) => ({ action: `material ${action}` })))
})

test('a role that changes counts at the next call', async () => {
  const set = (role: string) =>
    query(service.databaseUrl, 'UPDATE memberships SET role = $1 WHERE person_id = $2', [role, 'prsn_reader'])
  await set('integrator')
  expect((await world.members.reader.call('/portal/v1/keys')).status).toBe(200)
  await set('reader')
  expect((await world.members.reader.call('/portal/v1/keys')).status).toBe(403)
})

test('a revoked key ends with its next call', async () => {
  const key = await makeKey(world.members.owner)
  const headers = { authorization: `Bearer ${key.secret}` }
  expect((await world.nobody.call('/v1/usage', { headers })).status).toBe(200)
  expect((await world.members.owner.post(`/portal/v1/keys/${key.id}/revoke`)).status).toBe(200)
  expect((await world.nobody.call('/v1/usage', { headers })).json).toMatchObject({ status: 401, code: 'key-unknown' })
})

test('every look of staff is on record with its reason, and shows no secret and no mail', async () => {
  const reason = 'The customer asked on the telephone.'
  const found = await world.staff.support.post('/support/v1/find', { query: world.key.secret.slice(0, 17), reason })
  expect(found.json.requests[0]).toMatchObject({ id: world.requestId, account: { id: world.accountId } })
  const pasted = await world.staff.support.post('/support/v1/find', { query: world.key.secret, reason })
  expect(pasted.json.requests).toEqual(found.json.requests)
  const byId = await world.staff.support.post('/support/v1/find', { query: world.requestId, reason })
  expect(byId.json.requests).toHaveLength(1)
  const read = await world.staff.support.post(`/support/v1/requests/${world.requestId}/read`, { reason })
  expect(read.json).toMatchObject({
    id: world.requestId,
    account: { id: world.accountId },
    ledger: [{ kind: 'charge' }],
  })
  for (const answer of [found, pasted, byId, read]) {
    expect(answer.text).not.toContain(world.key.secret)
    expect(answer.text).not.toContain('@')
  }
  const looks = await query<{ action: string; subject: string; account_id: string }>(
    service.databaseUrl,
    'SELECT action, subject, account_id FROM audit WHERE actor_id = $1 AND reason = $2 ORDER BY at',
    ['stff_support', reason],
  )
  expect(looks.map((l) => l.action)).toEqual(['requests found', 'requests found', 'requests found', 'request read'])
  expect(looks[3]).toMatchObject({ account_id: world.accountId, subject: world.requestId })
  expect(JSON.stringify(looks)).not.toContain(world.key.secret)
})
