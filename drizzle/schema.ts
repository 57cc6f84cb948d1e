import { sql } from 'drizzle-orm'
import {
  type AnyPgColumn,
  bigint,
  check,
  customType,
  date,
  doublePrecision,
  index,
  integer,
  json,
  pgTable,
  primaryKey,
  real,
  smallint,
  text,
  timestamp,
  uniqueIndex,
} from 'drizzle-orm/pg-core'

const bytes = customType<{ data: Buffer }>({ dataType: () => 'bytea' })
const instant = () => timestamp({ withTimezone: true, mode: 'date' })
const points = () => bigint({ mode: 'number' })
const createdAt = () => instant().notNull().defaultNow()
const oneOf = (name: string, column: AnyPgColumn, values: readonly string[]) =>
  check(name, sql`${column} in (${sql.raw(values.map((v) => `'${v}'`).join(', '))})`)

/** A trial is counted by the day and never invoiced; what is metered is counted by the month. */
export const environments = ['trial', 'metered'] as const
const environment = () => text({ enum: environments }).notNull()

export const accounts = pgTable('accounts', {
  id: text().primaryKey(),
  name: text().notNull(),
  /** Points of a new trial period; a period that has begun keeps the limit in its own row. */
  trialLimit: points().notNull().default(100_000),
  /** The same of a metered one; 0 without a plan. */
  meteredLimit: points().notNull().default(0),
  /** Calls a minute, of all keys together. */
  rate: integer().notNull().default(6000),
  createdAt: createdAt(),
})

export const people = pgTable(
  'people',
  {
    id: text().primaryKey(),
    mail: text().notNull(),
    name: text().notNull(),
    passwordHash: text().notNull(),
    createdAt: createdAt(),
  },
  (t) => [uniqueIndex('people_mail').on(t.mail)],
)

export const memberships = pgTable(
  'memberships',
  {
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    personId: text()
      .notNull()
      .references(() => people.id),
    role: text({ enum: ['owner', 'integrator', 'reader'] }).notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.accountId, t.personId] }),
    index('memberships_person').on(t.personId),
    oneOf('memberships_role', t.role, ['owner', 'integrator', 'reader']),
  ],
)

export const staff = pgTable(
  'staff',
  {
    id: text().primaryKey(),
    mail: text().notNull(),
    name: text().notNull(),
    passwordHash: text().notNull(),
    role: text({ enum: ['support', 'supervisor'] }).notNull(),
    createdAt: createdAt(),
  },
  (t) => [uniqueIndex('staff_mail').on(t.mail), oneOf('staff_role', t.role, ['support', 'supervisor'])],
)

/* Members and staff never share a session, so they do not share a table. */
const sessionColumns = () => ({ sid: text().primaryKey(), sess: json().notNull(), expire: instant().notNull() })
export const sessions = pgTable('sessions', sessionColumns(), (t) => [index('sessions_expire').on(t.expire)])
export const staffSessions = pgTable('staff_sessions', sessionColumns(), (t) => [
  index('staff_sessions_expire').on(t.expire),
])

export const keys = pgTable(
  'keys',
  {
    id: text().primaryKey(),
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    environment: environment(),
    name: text().notNull(),
    /** Of its newest secret. */
    prefix: text().notNull(),
    quota: points(),
    /** Calls a minute of this key alone. */
    rate: integer(),
    scopes: text().array().notNull(),
    /** Networks from which it may be used; from anywhere where there is none. */
    addresses: text().array().notNull().default([]),
    /** Origins of pages that may use it; no page may where there is none. */
    origins: text().array().notNull().default([]),
    createdBy: text()
      .notNull()
      .references(() => people.id),
    createdAt: createdAt(),
    lastUsedAt: instant(),
    expiresAt: instant(),
    revokedAt: instant(),
    revokedFor: text({ enum: ['asked', 'leaked'] }),
  },
  (t) => [
    index('keys_account').on(t.accountId, t.id),
    oneOf('keys_environment', t.environment, environments),
    oneOf('keys_revoked_for', t.revokedFor, ['asked', 'leaked']),
    check('keys_quota', sql`${t.quota} >= 0`),
    check('keys_rate', sql`${t.rate} > 0`),
  ],
)

/** What is sent as a key: one at a time, and the one before it while a rotation overlaps. */
export const secrets = pgTable(
  'secrets',
  {
    id: text().primaryKey(),
    keyId: text()
      .notNull()
      .references(() => keys.id),
    /** SHA-256 of the secret; itself it is kept nowhere. */
    hash: bytes().notNull(),
    prefix: text().notNull(),
    createdAt: createdAt(),
    lastUsedAt: instant(),
    /** When it ends although its key goes on. */
    endsAt: instant(),
  },
  (t) => [
    uniqueIndex('secrets_hash').on(t.hash),
    index('secrets_key').on(t.keyId),
    index('secrets_prefix').on(t.prefix),
  ],
)

/** What an account may use and has used; the row is locked while points are spent. */
export const periods = pgTable(
  'periods',
  {
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    environment: environment(),
    /** Its first day. */
    period: date({ mode: 'string' }).notNull(),
    limit: points().notNull(),
    used: points().notNull().default(0),
  },
  (t) => [primaryKey({ columns: [t.accountId, t.environment, t.period] }), check('periods_used', sql`${t.used} >= 0`)],
)

export const keyPeriods = pgTable(
  'key_periods',
  {
    keyId: text()
      .notNull()
      .references(() => keys.id),
    period: date({ mode: 'string' }).notNull(),
    /** Null where the key has no quota of its own. */
    limit: points(),
    used: points().notNull().default(0),
  },
  (t) => [primaryKey({ columns: [t.keyId, t.period] }), check('key_periods_used', sql`${t.used} >= 0`)],
)

/** Calls in the minute that an account or a key is in; unlogged, for they may be lost with a crash. */
export const rates = pgTable('rates', {
  /** Id of the account or key. */
  subject: text().primaryKey(),
  minute: instant().notNull(),
  calls: integer().notNull().default(0),
})

/** Insert-only, partitioned by month; a refund is a negative entry on its charge's day. */
export const ledger = pgTable(
  'ledger',
  {
    /** The UTC day of the call, which its period holds. */
    day: date({ mode: 'string' }).notNull(),
    requestId: text().notNull(),
    kind: text({ enum: ['charge', 'refund'] }).notNull(),
    accountId: text().notNull(),
    keyId: text().notNull(),
    environment: environment(),
    caseId: text(),
    points: points().notNull(),
    /** The caller's own tag of the call. */
    reference: text(),
    at: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.day, t.requestId, t.kind] }),
    index('ledger_account').on(t.accountId, t.day),
    oneOf('ledger_kind', t.kind, ['charge', 'refund']),
  ],
)

/** Charges made before the work whose answer is not there yet; one that stays is refunded. */
export const openCharges = pgTable('open_charges', { requestId: text().primaryKey(), at: createdAt() }, (t) => [
  index('open_charges_at').on(t.at),
])

/** Calls that their clients may send again, for a day; the answer only of what cannot be computed again. */
export const idempotency = pgTable(
  'idempotency',
  {
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    key: text().notNull(),
    /** SHA-256 of method, address and body. */
    fingerprint: bytes().notNull(),
    /** Of the call that has the key, whose charge in the ledger says that it was answered. */
    requestId: text().notNull(),
    day: date({ mode: 'string' })
      .notNull()
      .default(sql`(now() AT TIME ZONE 'UTC')::date`),
    at: createdAt(),
    answer: json(),
  },
  (t) => [primaryKey({ columns: [t.accountId, t.key] }), index('idempotency_at').on(t.at)],
)

/** One row a call, partitioned by day; never a body, never a key. */
export const log = pgTable(
  'log',
  {
    at: instant().notNull(),
    id: text().notNull(),
    accountId: text(),
    keyId: text(),
    method: text().notNull(),
    path: text().notNull(),
    caseId: text(),
    operation: text(),
    status: smallint().notNull(),
    milliseconds: real().notNull(),
    bytesIn: integer().notNull(),
    bytesOut: integer().notNull(),
    points: points().notNull(),
    problem: json(),
    solver: text().notNull(),
    reference: text(),
    /** Of the trace that the call is a part of, as of W3C Trace Context. */
    traceId: text(),
  },
  (t) => [
    primaryKey({ columns: [t.at, t.id] }),
    index('log_account').on(t.accountId, t.at, t.id),
    index('log_key').on(t.keyId, t.at, t.id),
    index('log_unanswered')
      .on(t.at)
      .where(sql`${t.status} >= 499 AND ${t.points} = 0`),
  ],
)

/** Who did what; ids only, so that a person can be erased and the record stays. */
export const audit = pgTable(
  'audit',
  {
    id: text().primaryKey(),
    at: createdAt(),
    /** A call that needs no sign-in acts under its request id. */
    actorKind: text({ enum: ['person', 'staff', 'call'] }).notNull(),
    actorId: text().notNull(),
    accountId: text(),
    action: text().notNull(),
    subject: text(),
    reason: text(),
  },
  (t) => [index('audit_account').on(t.accountId, t.at), oneOf('audit_actor', t.actorKind, ['person', 'staff', 'call'])],
)

/** Materials that accounts keep for themselves; SI. */
export const materials = pgTable(
  'materials',
  {
    id: text().primaryKey(),
    accountId: text()
      .notNull()
      .references(() => accounts.id),
    name: text().notNull(),
    group: text().notNull(),
    conductivity: doublePrecision().notNull(),
    density: doublePrecision().notNull(),
    specificHeat: doublePrecision().notNull(),
    state: text().notNull(),
    source: text().notNull(),
    confidence: text({ enum: ['high', 'medium', 'low'] }).notNull(),
    /** The person who made it, or the key that did. */
    createdBy: text().notNull(),
    createdAt: createdAt(),
    updatedAt: instant().notNull().defaultNow(),
  },
  (t) => [
    index('materials_account').on(t.accountId, t.name, t.id),
    oneOf('materials_confidence', t.confidence, ['high', 'medium', 'low']),
    check('materials_positive', sql`${t.conductivity} > 0 AND ${t.density} > 0 AND ${t.specificHeat} > 0`),
  ],
)

/** Counters of calls by address; unlogged, for they may be lost with a crash. */
export const rateLimits = pgTable('rate_limits', {
  key: text().primaryKey(),
  hits: integer().notNull(),
  resetsAt: instant().notNull(),
})
