-- Not worth a write to the journal of the database for each call: after a crash a minute begins anew.
CREATE UNLOGGED TABLE "rates" (
	"subject" text PRIMARY KEY NOT NULL,
	"minute" timestamp with time zone NOT NULL,
	"calls" integer DEFAULT 0 NOT NULL
);
--> statement-breakpoint
ALTER TABLE "rates" SET (fillfactor = 50);
--> statement-breakpoint
CREATE TABLE "secrets" (
	"id" text PRIMARY KEY NOT NULL,
	"key_id" text NOT NULL,
	"hash" "bytea" NOT NULL,
	"prefix" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_used_at" timestamp with time zone,
	"ends_at" timestamp with time zone
);
--> statement-breakpoint
ALTER TABLE "audit" DROP CONSTRAINT "audit_actor";--> statement-breakpoint
ALTER TABLE "keys" DROP CONSTRAINT "keys_environment";--> statement-breakpoint
DROP INDEX "keys_hash";--> statement-breakpoint
DROP INDEX "keys_prefix";--> statement-breakpoint
ALTER TABLE "accounts" ADD COLUMN "metered_limit" bigint DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE "accounts" ADD COLUMN "rate" integer DEFAULT 6000 NOT NULL;--> statement-breakpoint
ALTER TABLE "keys" ADD COLUMN "rate" integer;--> statement-breakpoint
-- Keys that were made before there were scopes could do all of it.
ALTER TABLE "keys" ADD COLUMN "scopes" text[] NOT NULL
  DEFAULT '{solve,jobs,files,materials:read,materials:write,usage:read,requests:read,webhooks}';--> statement-breakpoint
ALTER TABLE "keys" ALTER COLUMN "scopes" DROP DEFAULT;--> statement-breakpoint
ALTER TABLE "keys" ADD COLUMN "addresses" text[] DEFAULT '{}' NOT NULL;--> statement-breakpoint
ALTER TABLE "keys" ADD COLUMN "origins" text[] DEFAULT '{}' NOT NULL;--> statement-breakpoint
ALTER TABLE "keys" ADD COLUMN "expires_at" timestamp with time zone;--> statement-breakpoint
ALTER TABLE "keys" ADD COLUMN "revoked_for" text;--> statement-breakpoint
INSERT INTO "secrets" ("id", "key_id", "hash", "prefix", "created_at", "last_used_at")
SELECT 'sec_' || substr("id", 5), "id", "hash", "prefix", "created_at", "last_used_at" FROM "keys";--> statement-breakpoint
UPDATE "keys" SET "revoked_for" = 'asked' WHERE "revoked_at" IS NOT NULL;--> statement-breakpoint
ALTER TABLE "secrets" ADD CONSTRAINT "secrets_key_id_keys_id_fk" FOREIGN KEY ("key_id") REFERENCES "public"."keys"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "secrets_hash" ON "secrets" USING btree ("hash");--> statement-breakpoint
CREATE INDEX "secrets_key" ON "secrets" USING btree ("key_id");--> statement-breakpoint
CREATE INDEX "secrets_prefix" ON "secrets" USING btree ("prefix");--> statement-breakpoint
ALTER TABLE "keys" DROP COLUMN "hash";--> statement-breakpoint
ALTER TABLE "audit" ADD CONSTRAINT "audit_actor" CHECK ("audit"."actor_kind" in ('person', 'staff', 'call'));--> statement-breakpoint
ALTER TABLE "keys" ADD CONSTRAINT "keys_revoked_for" CHECK ("keys"."revoked_for" in ('asked', 'leaked'));--> statement-breakpoint
ALTER TABLE "keys" ADD CONSTRAINT "keys_rate" CHECK ("keys"."rate" > 0);--> statement-breakpoint
ALTER TABLE "keys" ADD CONSTRAINT "keys_environment" CHECK ("keys"."environment" in ('trial', 'metered'));
--> statement-breakpoint
-- A metered period is a month, so the entries say their day, and the day says the period.
ALTER TABLE "ledger" RENAME COLUMN "period" TO "day";
--> statement-breakpoint
ALTER TABLE "ledger" RENAME CONSTRAINT "ledger_period_request_id_kind_pk" TO "ledger_day_request_id_kind_pk";
--> statement-breakpoint
-- As before, by the ledger's day.
CREATE OR REPLACE FUNCTION "create_partitions"("first_day" date, "last_day" date) RETURNS integer LANGUAGE plpgsql AS $$
DECLARE
  made integer := 0;
  d date;
BEGIN
  PERFORM pg_advisory_xact_lock(hashtext('soakstone partitions'));
  FOR d IN SELECT generate_series(first_day, last_day, interval '1 day')::date LOOP
    IF create_partition('log', 'log_' || to_char(d, 'YYYYMMDD'), 'at', d::text || ' 00:00:00+00', (d + 1)::text || ' 00:00:00+00')
    THEN made := made + 1; END IF;
  END LOOP;
  FOR d IN SELECT generate_series(date_trunc('month', first_day), last_day, interval '1 month')::date LOOP
    IF create_partition('ledger', 'ledger_' || to_char(d, 'YYYYMM'), 'day', d::text, (d + interval '1 month')::date::text)
    THEN made := made + 1; END IF;
  END LOOP;
  RETURN made;
END
$$;
--> statement-breakpoint
-- The first day of the period that holds a day.
CREATE FUNCTION "period_of"("environment" text, "day" date) RETURNS date LANGUAGE sql IMMUTABLE AS $$
  SELECT CASE environment WHEN 'trial' THEN day ELSE date_trunc('month', day::timestamp)::date END
$$;
--> statement-breakpoint
-- The instant at which the next period begins.
CREATE FUNCTION "period_end"("environment" text, "day" date) RETURNS timestamptz LANGUAGE sql IMMUTABLE AS $$
  SELECT CASE environment WHEN 'trial' THEN (day + 1)::timestamp ELSE date_trunc('month', day::timestamp) + interval '1 month' END
    AT TIME ZONE 'UTC'
$$;
