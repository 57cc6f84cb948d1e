import type pg from 'pg'
import { errorCode } from '../database.ts'

/** The connection broke while a COMMIT was under way, so nobody knows whether it holds. */
export class UnknownOutcome extends Error {
  constructor(cause: unknown) {
    super('The outcome of a COMMIT is unknown.', { cause })
    this.name = 'UnknownOutcome'
  }
}

const DEADLOCK = '40P01'
const SERIALIZATION = '40001'
const TRIES = 5

export const isDeadlock = (error: unknown) => [DEADLOCK, SERIALIZATION].includes(errorCode(error) ?? '')

/** Runs work in one durable transaction, again where it met a deadlock. */
export async function durably<R>(pool: pg.Pool, work: (client: pg.PoolClient) => Promise<R>): Promise<R> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await once(pool, work)
    } catch (error) {
      if (!isDeadlock(error) || attempt === TRIES) throw error
    }
  }
}

async function once<R>(pool: pg.Pool, work: (client: pg.PoolClient) => Promise<R>): Promise<R> {
  const client = await pool.connect()
  let broken: Error | undefined
  try {
    await client.query('BEGIN; SET LOCAL synchronous_commit = on')
    const result = await work(client)
    await commit(client)
    return result
  } catch (error) {
    if (error instanceof UnknownOutcome) broken = error
    else await client.query('ROLLBACK').catch((lost: Error) => (broken = lost))
    throw error
  } finally {
    client.release(broken)
  }
}

/* An error with a code from inside the transaction says that it was rolled back; all else says nothing. */
async function commit(client: pg.PoolClient): Promise<void> {
  try {
    const { command } = await client.query('COMMIT')
    if (command !== 'COMMIT') throw Object.assign(new Error('the transaction had failed'), { code: '25P02' })
  } catch (error) {
    if (/^(23|25|40)/.test(errorCode(error) ?? '')) throw error
    throw new UnknownOutcome(error)
  }
}
