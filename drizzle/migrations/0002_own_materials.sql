CREATE TABLE "materials" (
	"id" text PRIMARY KEY NOT NULL,
	"account_id" text NOT NULL,
	"name" text NOT NULL,
	"group" text NOT NULL,
	"conductivity" double precision NOT NULL,
	"density" double precision NOT NULL,
	"specific_heat" double precision NOT NULL,
	"state" text NOT NULL,
	"source" text NOT NULL,
	"confidence" text NOT NULL,
	"created_by" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "materials_confidence" CHECK ("materials"."confidence" in ('high', 'medium', 'low')),
	CONSTRAINT "materials_positive" CHECK ("materials"."conductivity" > 0 AND "materials"."density" > 0 AND "materials"."specific_heat" > 0)
);
--> statement-breakpoint
ALTER TABLE "materials" ADD CONSTRAINT "materials_account_id_accounts_id_fk" FOREIGN KEY ("account_id") REFERENCES "public"."accounts"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "materials_account" ON "materials" USING btree ("account_id","name","id");