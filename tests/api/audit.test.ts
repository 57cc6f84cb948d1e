import { afterAll, beforeAll, expect, test } from 'vitest'
import { newId } from '../../api/ids.ts'
import { query } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'
import { type World, createWorld } from './harness/world.ts'

let service: TestService
let world: World
beforeAll(async () => {
  service = await startTestService()
  world = await createWorld(service)
})
afterAll(() => service.close())

test('a look of staff for a request that does not exist is on record too', async () => {
  const [asked, reason] = [newId('req'), 'The customer read it out on the telephone.']
  const answer = await world.staff.support.post(`/support/v1/requests/${asked}/read`, { reason })
  expect(answer.status).toBe(404)
  expect(
    await query(service.databaseUrl, 'SELECT action, subject, account_id FROM audit WHERE reason = $1', [reason]),
  ).toEqual([{ action: 'request read', subject: asked, account_id: null }])
})
