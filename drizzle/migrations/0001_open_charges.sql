CREATE TABLE "open_charges" (
	"request_id" text PRIMARY KEY NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
DROP INDEX "log_failed";--> statement-breakpoint
CREATE INDEX "open_charges_at" ON "open_charges" USING btree ("at");--> statement-breakpoint
CREATE INDEX "log_unanswered" ON "log" USING btree ("at") WHERE "log"."status" >= 499 AND "log"."points" = 0;--> statement-breakpoint
CREATE TRIGGER "keep_all" BEFORE TRUNCATE ON "audit" FOR EACH STATEMENT EXECUTE FUNCTION "refuse_change"();
--> statement-breakpoint
CREATE TRIGGER "keep_all" BEFORE TRUNCATE ON "ledger" FOR EACH STATEMENT EXECUTE FUNCTION "refuse_change"();
--> statement-breakpoint
-- Statement triggers of a table are not those of its partitions, which can be emptied by their own names.
DO $$
DECLARE
  part regclass;
BEGIN
  FOR part IN SELECT inhrelid FROM pg_inherits WHERE inhparent = 'ledger'::regclass LOOP
    EXECUTE format('CREATE TRIGGER "keep_all" BEFORE TRUNCATE ON %s FOR EACH STATEMENT EXECUTE FUNCTION "refuse_change"()', part);
  END LOOP;
END
$$;
--> statement-breakpoint
-- As before, and a new partition can be emptied no more than its parent.
CREATE OR REPLACE FUNCTION "create_partition"("parent" text, "part" text, "range_column" text, "low" text, "high" text)
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
  IF EXISTS (SELECT FROM pg_trigger WHERE tgrelid = format('%I', parent)::regclass AND tgname = 'keep_all') THEN
    EXECUTE format('CREATE TRIGGER "keep_all" BEFORE TRUNCATE ON %I FOR EACH STATEMENT EXECUTE FUNCTION "refuse_change"()', part);
  END IF;
  RETURN true;
END
$$;
