CREATE TABLE "idempotency" (
	"account_id" text NOT NULL,
	"key" text NOT NULL,
	"fingerprint" "bytea" NOT NULL,
	"request_id" text NOT NULL,
	"day" date DEFAULT (now() AT TIME ZONE 'UTC')::date NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"answer" json,
	CONSTRAINT "idempotency_account_id_key_pk" PRIMARY KEY("account_id","key")
);
--> statement-breakpoint
ALTER TABLE "ledger" ADD COLUMN "reference" text;--> statement-breakpoint
ALTER TABLE "log" ADD COLUMN "reference" text;--> statement-breakpoint
ALTER TABLE "log" ADD COLUMN "trace_id" text;--> statement-breakpoint
ALTER TABLE "idempotency" ADD CONSTRAINT "idempotency_account_id_accounts_id_fk" FOREIGN KEY ("account_id") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "idempotency_at" ON "idempotency" USING btree ("at");