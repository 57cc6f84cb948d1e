import type pg from 'pg'

/** Days for which calls stay in the log. */
export const KEPT_DAYS = 30

/* A day still in use is waited for briefly only: calls queue behind whoever waits for the whole log. */
const patience = "SET LOCAL lock_timeout = '2s'"
const alone = "SELECT pg_advisory_xact_lock(hashtext('soakstone partitions'))"
const ended = `
  SELECT c.relname AS name FROM pg_inherits i JOIN pg_class c ON c.oid = i.inhrelid
  WHERE i.inhparent = 'log'::regclass AND c.relname ~ '^log_[0-9]{8}$'
    AND c.relname < 'log_' || to_char((now() AT TIME ZONE 'UTC')::date - ${KEPT_DAYS}, 'YYYYMMDD')
  ORDER BY 1`
const strays = `
  DELETE FROM log_default WHERE at < ((now() AT TIME ZONE 'UTC')::date - ${KEPT_DAYS})::timestamp AT TIME ZONE 'UTC'`

/** Drops the days of the log that are no longer kept, and gives their number. Any process may do it at any time. */
export async function dropOldLog(pool: pg.Pool): Promise<number> {
  const client = await pool.connect()
  let dropped = 0
  try {
    for (;;) {
      await client.query('BEGIN')
      await client.query(patience)
      await client.query(alone)
      const { rows } = await client.query<{ name: string }>(ended)
      if (rows[0]) await client.query(`DROP TABLE "${rows[0].name}"`)
      else await client.query(strays)
      await client.query('COMMIT')
      if (!rows[0]) return dropped
      dropped++
    }
  } catch (error) {
    await client.query('ROLLBACK')
    throw error
  } finally {
    client.release()
  }
}
