import type pg from 'pg'

const query = {
  name: 'account-status',
  text: `
    SELECT coalesce(p."limit", a.trial_limit) AS "limit", coalesce(p.used, 0) AS used,
      ((d.day + 1)::timestamp AT TIME ZONE 'UTC') AS resets_at
    FROM accounts a CROSS JOIN (SELECT (now() AT TIME ZONE 'UTC')::date AS day) d
    LEFT JOIN periods p ON p.account_id = a.id AND p.environment = 'trial' AND p.period = d.day
    WHERE a.id = $1`,
}

/** Where the account stands in this period. */
export async function accountStatus(pool: pg.Pool, accountId: string) {
  const { rows } = await pool.query({ ...query, values: [accountId] })
  return {
    limit: Number(rows[0].limit),
    used: Number(rows[0].used),
    resetsAt: (rows[0].resets_at as Date).toISOString(),
  }
}
