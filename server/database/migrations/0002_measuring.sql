CREATE TYPE "public"."change_reason" AS ENUM('typing-error', 're-measured', 'other');--> statement-breakpoint
CREATE TYPE "public"."import_state" AS ENUM('open', 'committed', 'discarded');--> statement-breakpoint
CREATE TYPE "public"."replicate_kind" AS ENUM('independent-samples', 'repeat-scans');--> statement-breakpoint
CREATE TABLE "batch_revision" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"batch_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"summary" text NOT NULL,
	"made_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "batch_revision_in_project" UNIQUE("id","project_id"),
	CONSTRAINT "batch_revision_number" UNIQUE("batch_id","number"),
	CONSTRAINT "batch_revision_from_one" CHECK ("batch_revision"."number" >= 1)
);
--> statement-breakpoint
ALTER TABLE "batch_revision" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "batch_revision_reading" (
	"project_id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"reading_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"set_aside_reason" text,
	"set_aside_by" uuid,
	"set_aside_at" timestamp with time zone,
	CONSTRAINT "batch_revision_reading_revision_id_reading_id_pk" PRIMARY KEY("revision_id","reading_id"),
	CONSTRAINT "batch_revision_reading_number" UNIQUE("revision_id","number"),
	CONSTRAINT "batch_revision_reading_set_aside" CHECK (num_nulls("batch_revision_reading"."set_aside_reason", "batch_revision_reading"."set_aside_by", "batch_revision_reading"."set_aside_at") in (0, 3)),
	CONSTRAINT "batch_revision_reading_reason" CHECK (length(trim("batch_revision_reading"."set_aside_reason")) > 0)
);
--> statement-breakpoint
ALTER TABLE "batch_revision_reading" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "project_visit" (
	"project_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"before" timestamp with time zone,
	CONSTRAINT "project_visit_project_id_person_id_pk" PRIMARY KEY("project_id","person_id")
);
--> statement-breakpoint
ALTER TABLE "project_visit" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "recipe" (
	"id" uuid PRIMARY KEY NOT NULL,
	"lab_id" uuid NOT NULL,
	"name" text NOT NULL,
	"signature" text NOT NULL,
	"choices" jsonb NOT NULL,
	"made_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"used_at" timestamp with time zone,
	CONSTRAINT "recipe_name_unique" UNIQUE("lab_id","name")
);
--> statement-breakpoint
ALTER TABLE "recipe" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "table_import" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"campaign_id" uuid NOT NULL,
	"upload_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"state" "import_state" DEFAULT 'open' NOT NULL,
	"choices" jsonb NOT NULL,
	"counts" jsonb NOT NULL,
	"recipe_id" uuid,
	"made" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL,
	"committed_at" timestamp with time zone,
	CONSTRAINT "table_import_committed" CHECK (("table_import"."state" = 'committed') = ("table_import"."committed_at" is not null))
);
--> statement-breakpoint
ALTER TABLE "table_import" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "campaign" DROP CONSTRAINT "campaign_rate";--> statement-breakpoint
ALTER TABLE "campaign" ADD COLUMN "ph" double precision;--> statement-breakpoint
ALTER TABLE "campaign" ADD COLUMN "hold" double precision;--> statement-breakpoint
ALTER TABLE "campaign" ADD COLUMN "replicate_kind" "replicate_kind";--> statement-breakpoint
ALTER TABLE "reading" ADD COLUMN "replaces" uuid;--> statement-breakpoint
ALTER TABLE "reading" ADD COLUMN "change_reason" "change_reason";--> statement-breakpoint
ALTER TABLE "reading" ADD COLUMN "change_words" text;--> statement-breakpoint
ALTER TABLE "series_revision" ADD COLUMN "choice" jsonb;--> statement-breakpoint
ALTER TABLE "stock" ADD COLUMN "make_up" text;--> statement-breakpoint
ALTER TABLE "batch_revision" ADD CONSTRAINT "batch_revision_made_by_person_id_fk" FOREIGN KEY ("made_by") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch_revision" ADD CONSTRAINT "batch_revision_batch" FOREIGN KEY ("batch_id","project_id") REFERENCES "public"."batch"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch_revision_reading" ADD CONSTRAINT "batch_revision_reading_set_aside_by_person_id_fk" FOREIGN KEY ("set_aside_by") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch_revision_reading" ADD CONSTRAINT "batch_revision_reading_revision" FOREIGN KEY ("revision_id","project_id") REFERENCES "public"."batch_revision"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch_revision_reading" ADD CONSTRAINT "batch_revision_reading_reading" FOREIGN KEY ("reading_id","project_id") REFERENCES "public"."reading"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project_visit" ADD CONSTRAINT "project_visit_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project_visit" ADD CONSTRAINT "project_visit_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recipe" ADD CONSTRAINT "recipe_lab_id_lab_id_fk" FOREIGN KEY ("lab_id") REFERENCES "public"."lab"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recipe" ADD CONSTRAINT "recipe_made_by_person_id_fk" FOREIGN KEY ("made_by") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "table_import" ADD CONSTRAINT "table_import_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "table_import" ADD CONSTRAINT "table_import_upload_id_upload_id_fk" FOREIGN KEY ("upload_id") REFERENCES "public"."upload"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "table_import" ADD CONSTRAINT "table_import_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "table_import" ADD CONSTRAINT "table_import_recipe_id_recipe_id_fk" FOREIGN KEY ("recipe_id") REFERENCES "public"."recipe"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "table_import" ADD CONSTRAINT "table_import_campaign" FOREIGN KEY ("campaign_id","project_id") REFERENCES "public"."campaign"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "batch_revision_reading_reading" ON "batch_revision_reading" USING btree ("reading_id");--> statement-breakpoint
CREATE INDEX "recipe_signature" ON "recipe" USING btree ("lab_id","signature");--> statement-breakpoint
CREATE INDEX "table_import_project" ON "table_import" USING btree ("project_id","state");--> statement-breakpoint
CREATE INDEX "table_import_upload" ON "table_import" USING btree ("upload_id");--> statement-breakpoint
ALTER TABLE "reading" ADD CONSTRAINT "reading_replaces" FOREIGN KEY ("replaces","project_id") REFERENCES "public"."reading"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE UNIQUE INDEX "series_salt_unique" ON "series" USING btree ("campaign_id","salt_formula","scale") WHERE "series"."deleted_at" is null;--> statement-breakpoint
ALTER TABLE "campaign" ADD CONSTRAINT "campaign_rate" CHECK ("campaign"."rate" > 0 and "campaign"."hold" >= 0);--> statement-breakpoint
ALTER TABLE "reading" ADD CONSTRAINT "reading_change_has_reason" CHECK (("reading"."replaces" is null) = ("reading"."change_reason" is null));