import type pg from 'pg'

const query = {
  name: 'account-status',
  text: `
    SELECT e.environment, coalesce(p."limit", e."limit") AS "limit", coalesce(p.used, 0) AS used,
      period_end(e.environment, d.day) AS resets_at
    FROM accounts a CROSS JOIN (SELECT (now() AT TIME ZONE 'UTC')::date AS day) d
    CROSS JOIN LATERAL (VALUES ('trial', a.trial_limit), ('metered', a.metered_limit)) AS e(environment, "limit")
    LEFT JOIN periods p ON p.account_id = a.id AND p.environment = e.environment
      AND p.period = period_of(e.environment, d.day)
    WHERE a.id = $1`,
}

/** Where the account stands in this period of its trial, and in that of its plan where it has one. */
export async function accountStatus(pool: pg.Pool, accountId: string) {
  const { rows } = await pool.query({ ...query, values: [accountId] })
  const of = (environment: string) => {
    const row = rows.find((one) => one.environment === environment)
    return {
      limit: Number(row.limit),
      used: Number(row.used),
      resetsAt: (row.resets_at as Date).toISOString(),
    }
  }
  const metered = of('metered')
  return { ...of('trial'), metered: metered.limit > 0 || metered.used > 0 ? metered : null }
}
