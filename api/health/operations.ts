import { z } from 'zod'
import { operation } from '../operation.ts'

const state = (word: string) => z.strictObject({ status: z.literal(word) })

const healthz = operation({
  id: 'isAlive',
  document: 'openapi',
  method: 'get',
  path: '/healthz',
  tag: 'Health',
  summary: 'Is the process alive?',
  description: 'Asks nothing of any other part.',
  access: 'public',
  status: 200,
  answer: state('alive').meta({ id: 'Alive' }),
  handle: () => ({ body: { status: 'alive' }, headers: { 'Cache-Control': 'no-store' } }),
})

const readyz = operation({
  id: 'isReady',
  document: 'openapi',
  method: 'get',
  path: '/readyz',
  tag: 'Health',
  summary: 'Can the service answer calls?',
  description: 'Asks the database.',
  access: 'public',
  status: 200,
  answer: state('ready').meta({ id: 'Ready' }),
  async handle({ deps }) {
    await deps.pool.query('SELECT 1 FROM keys LIMIT 0')
    return { body: { status: 'ready' }, headers: { 'Cache-Control': 'no-store' } }
  },
})

export const healthOperations = [healthz, readyz]
