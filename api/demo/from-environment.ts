import type pg from 'pg'
import { createPool } from '../database.ts'
import { createLog } from '../log.ts'
import { type Demo, seedDemo } from './seed-demo.ts'

/** Runs an errand on the demo of the database that the environment names, and ends its connections. */
export async function withDemo<R>(errand: (demo: Demo, pool: pg.Pool) => Promise<R>): Promise<R> {
  const url = process.env['DATABASE_URL']
  const folder = process.env['SOAKSTONE_DATA']
  if (!url || !folder) throw new Error(`${url ? 'SOAKSTONE_DATA' : 'DATABASE_URL'} is missing.`)
  const publicUrl = (process.env['PUBLIC_URL'] || 'http://127.0.0.1:4600').replace(/\/+$/, '')
  const pool = createPool(url, 2, createLog('silent'))
  try {
    return await errand(await seedDemo({ pool, folder, publicUrl }), pool)
  } finally {
    await pool.end()
  }
}
