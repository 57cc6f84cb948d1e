CREATE TABLE "accounts" (
	"id" text PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"trial_limit" bigint DEFAULT 100000 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "audit" (
	"id" text PRIMARY KEY NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"actor_kind" text NOT NULL,
	"actor_id" text NOT NULL,
	"account_id" text,
	"action" text NOT NULL,
	"subject" text,
	"reason" text,
	CONSTRAINT "audit_actor" CHECK ("audit"."actor_kind" in ('person', 'staff'))
);
--> statement-breakpoint
CREATE TABLE "key_periods" (
	"key_id" text NOT NULL,
	"period" date NOT NULL,
	"limit" bigint,
	"used" bigint DEFAULT 0 NOT NULL,
	CONSTRAINT "key_periods_key_id_period_pk" PRIMARY KEY("key_id","period"),
	CONSTRAINT "key_periods_used" CHECK ("key_periods"."used" >= 0)
);
--> statement-breakpoint
CREATE TABLE "keys" (
	"id" text PRIMARY KEY NOT NULL,
	"account_id" text NOT NULL,
	"environment" text NOT NULL,
	"name" text NOT NULL,
	"hash" "bytea" NOT NULL,
	"prefix" text NOT NULL,
	"quota" bigint,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_used_at" timestamp with time zone,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "keys_environment" CHECK ("keys"."environment" in ('trial')),
	CONSTRAINT "keys_quota" CHECK ("keys"."quota" >= 0)
);
--> statement-breakpoint
CREATE TABLE "ledger" (
	"period" date NOT NULL,
	"request_id" text NOT NULL,
	"kind" text NOT NULL,
	"account_id" text NOT NULL,
	"key_id" text NOT NULL,
	"environment" text NOT NULL,
	"case_id" text,
	"points" bigint NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "ledger_period_request_id_kind_pk" PRIMARY KEY("period","request_id","kind"),
	CONSTRAINT "ledger_kind" CHECK ("ledger"."kind" in ('charge', 'refund'))
) PARTITION BY RANGE ("period");
--> statement-breakpoint
CREATE TABLE "log" (
	"at" timestamp with time zone NOT NULL,
	"id" text NOT NULL,
	"account_id" text,
	"key_id" text,
	"method" text NOT NULL,
	"path" text NOT NULL,
	"case_id" text,
	"operation" text,
	"status" smallint NOT NULL,
	"milliseconds" real NOT NULL,
	"bytes_in" integer NOT NULL,
	"bytes_out" integer NOT NULL,
	"points" bigint NOT NULL,
	"problem" json,
	"solver" text NOT NULL,
	CONSTRAINT "log_at_id_pk" PRIMARY KEY("at","id")
) PARTITION BY RANGE ("at");
--> statement-breakpoint
CREATE TABLE "memberships" (
	"account_id" text NOT NULL,
	"person_id" text NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "memberships_account_id_person_id_pk" PRIMARY KEY("account_id","person_id"),
	CONSTRAINT "memberships_role" CHECK ("memberships"."role" in ('owner', 'integrator', 'reader'))
);
--> statement-breakpoint
CREATE TABLE "people" (
	"id" text PRIMARY KEY NOT NULL,
	"mail" text NOT NULL,
	"name" text NOT NULL,
	"password_hash" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "periods" (
	"account_id" text NOT NULL,
	"environment" text NOT NULL,
	"period" date NOT NULL,
	"limit" bigint NOT NULL,
	"used" bigint DEFAULT 0 NOT NULL,
	CONSTRAINT "periods_account_id_environment_period_pk" PRIMARY KEY("account_id","environment","period"),
	CONSTRAINT "periods_used" CHECK ("periods"."used" >= 0)
);
--> statement-breakpoint
CREATE UNLOGGED TABLE "rate_limits" (
	"key" text PRIMARY KEY NOT NULL,
	"hits" integer NOT NULL,
	"resets_at" timestamp with time zone NOT NULL
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"sid" text PRIMARY KEY NOT NULL,
	"sess" json NOT NULL,
	"expire" timestamp with time zone NOT NULL
);
--> statement-breakpoint
CREATE TABLE "staff" (
	"id" text PRIMARY KEY NOT NULL,
	"mail" text NOT NULL,
	"name" text NOT NULL,
	"password_hash" text NOT NULL,
	"role" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "staff_role" CHECK ("staff"."role" in ('support', 'supervisor'))
);
--> statement-breakpoint
CREATE TABLE "staff_sessions" (
	"sid" text PRIMARY KEY NOT NULL,
	"sess" json NOT NULL,
	"expire" timestamp with time zone NOT NULL
);
--> statement-breakpoint
ALTER TABLE "key_periods" ADD CONSTRAINT "key_periods_key_id_keys_id_fk" FOREIGN KEY ("key_id") REFERENCES "public"."keys"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "keys" ADD CONSTRAINT "keys_account_id_accounts_id_fk" FOREIGN KEY ("account_id") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "keys" ADD CONSTRAINT "keys_created_by_people_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_account_id_accounts_id_fk" FOREIGN KEY ("account_id") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "memberships" ADD CONSTRAINT "memberships_person_id_people_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."people"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "periods" ADD CONSTRAINT "periods_account_id_accounts_id_fk" FOREIGN KEY ("account_id") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "audit_account" ON "audit" USING btree ("account_id","at");--> statement-breakpoint
CREATE UNIQUE INDEX "keys_hash" ON "keys" USING btree ("hash");--> statement-breakpoint
CREATE INDEX "keys_account" ON "keys" USING btree ("account_id","id");--> statement-breakpoint
CREATE INDEX "keys_prefix" ON "keys" USING btree ("prefix");--> statement-breakpoint
CREATE INDEX "ledger_account" ON "ledger" USING btree ("account_id","period");--> statement-breakpoint
CREATE INDEX "log_account" ON "log" USING btree ("account_id","at","id");--> statement-breakpoint
CREATE INDEX "log_key" ON "log" USING btree ("key_id","at","id");--> statement-breakpoint
CREATE INDEX "log_failed" ON "log" USING btree ("at") WHERE "log"."status" >= 500;--> statement-breakpoint
CREATE INDEX "memberships_person" ON "memberships" USING btree ("person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "people_mail" ON "people" USING btree ("mail");--> statement-breakpoint
CREATE INDEX "sessions_expire" ON "sessions" USING btree ("expire");--> statement-breakpoint
CREATE UNIQUE INDEX "staff_mail" ON "staff" USING btree ("mail");--> statement-breakpoint
CREATE INDEX "staff_sessions_expire" ON "staff_sessions" USING btree ("expire");
--> statement-breakpoint
-- One row of each of these is updated by every metered call: room on the page keeps the updates off the indexes.
ALTER TABLE "periods" SET (fillfactor = 50);
--> statement-breakpoint
ALTER TABLE "key_periods" SET (fillfactor = 50);
--> statement-breakpoint
ALTER TABLE "rate_limits" SET (fillfactor = 50);
--> statement-breakpoint
-- Catches what comes before its partition exists; rows move on when it does.
CREATE TABLE "ledger_default" PARTITION OF "ledger" DEFAULT;
--> statement-breakpoint
CREATE TABLE "log_default" PARTITION OF "log" DEFAULT;
--> statement-breakpoint
CREATE FUNCTION "refuse_change"() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  RAISE EXCEPTION '% is insert-only', TG_TABLE_NAME USING ERRCODE = 'restrict_violation';
END
$$;
--> statement-breakpoint
CREATE TRIGGER "insert_only" BEFORE UPDATE OR DELETE ON "ledger" FOR EACH ROW EXECUTE FUNCTION "refuse_change"();
--> statement-breakpoint
CREATE TRIGGER "insert_only" BEFORE UPDATE OR DELETE ON "audit" FOR EACH ROW EXECUTE FUNCTION "refuse_change"();
--> statement-breakpoint
-- Makes one partition for [low, high) and moves rows of the default partition into it. True where it was missing.
CREATE FUNCTION "create_partition"("parent" text, "part" text, "range_column" text, "low" text, "high" text)
RETURNS boolean LANGUAGE plpgsql AS $$
DECLARE
  rest text := parent || '_default';
BEGIN
  IF to_regclass(format('%I', part)) IS NOT NULL THEN RETURN false; END IF;
  EXECUTE format('LOCK TABLE %I IN ACCESS EXCLUSIVE MODE', rest);
  EXECUTE format('CREATE TABLE %I (LIKE %I INCLUDING DEFAULTS INCLUDING CONSTRAINTS)', part, parent);
  EXECUTE format('INSERT INTO %I SELECT * FROM %I WHERE %I >= %L AND %I < %L', part, rest, range_column, low, range_column, high);
  EXECUTE format('ALTER TABLE %I DISABLE TRIGGER USER', rest);
  EXECUTE format('DELETE FROM %I WHERE %I >= %L AND %I < %L', rest, range_column, low, range_column, high);
  EXECUTE format('ALTER TABLE %I ENABLE TRIGGER USER', rest);
  EXECUTE format('ALTER TABLE %I ATTACH PARTITION %I FOR VALUES FROM (%L) TO (%L)', parent, part, low, high);
  RETURN true;
END
$$;
--> statement-breakpoint
-- The log of each day and the ledger of each month from one day to another. Any process may call it at any time.
CREATE FUNCTION "create_partitions"("first_day" date, "last_day" date) RETURNS integer LANGUAGE plpgsql AS $$
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
    IF create_partition('ledger', 'ledger_' || to_char(d, 'YYYYMM'), 'period', d::text, (d + interval '1 month')::date::text)
    THEN made := made + 1; END IF;
  END LOOP;
  RETURN made;
END
$$;
