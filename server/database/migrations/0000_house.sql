CREATE TYPE "public"."clouding" AS ENUM('on-heating', 'on-cooling');--> statement-breakpoint
CREATE TYPE "public"."concentration_scale" AS ENUM('mol/L', 'mol/kg');--> statement-breakpoint
CREATE TYPE "public"."criterion" AS ENUM('onset', 'fraction', 'steepest', 'departure', 'sigmoid');--> statement-breakpoint
CREATE TYPE "public"."enthalpy_basis" AS ENUM('per-repeat-unit', 'per-cooperative-unit');--> statement-breakpoint
CREATE TYPE "public"."fit_model" AS ENUM('linear', 'langmuir', 'linear-langmuir', 'linear-quadratic', 'linear-hill', 'expression');--> statement-breakpoint
CREATE TYPE "public"."fit_result_kind" AS ENUM('estimate', 'bootstrap');--> statement-breakpoint
CREATE TYPE "public"."instrument_kind" AS ENUM('transmittance', 'absorbance', 'scattering', 'by-eye');--> statement-breakpoint
CREATE TYPE "public"."job_kind" AS ENUM('refit');--> statement-breakpoint
CREATE TYPE "public"."job_state" AS ENUM('waiting', 'running', 'done', 'failed', 'cancelled');--> statement-breakpoint
CREATE TYPE "public"."lab_role" AS ENUM('lead', 'chemist');--> statement-breakpoint
CREATE TYPE "public"."project_role" AS ENUM('owner', 'editor', 'collaborator');--> statement-breakpoint
CREATE TYPE "public"."reading_limit" AS ENUM('exact', 'below', 'above', 'salt-precipitated');--> statement-breakpoint
CREATE TYPE "public"."sd_meaning" AS ENUM('sd-of-replicates', 'standard-uncertainty');--> statement-breakpoint
CREATE TYPE "public"."site_role" AS ENUM('curator', 'admin');--> statement-breakpoint
CREATE TYPE "public"."temperature_direction" AS ENUM('heating', 'cooling');--> statement-breakpoint
CREATE TABLE "audit_event" (
	"id" uuid PRIMARY KEY NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	"person_id" uuid,
	"project_id" uuid,
	"lab_id" uuid,
	"action" text NOT NULL,
	"subject" text NOT NULL,
	"subject_id" uuid,
	"details" jsonb NOT NULL
);
--> statement-breakpoint
ALTER TABLE "audit_event" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "batch" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"campaign_id" uuid NOT NULL,
	"label" text NOT NULL,
	"measured_on" date,
	"reference_check" double precision,
	"note" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "batch_in_project" UNIQUE("id","project_id"),
	CONSTRAINT "batch_label_unique" UNIQUE("campaign_id","label")
);
--> statement-breakpoint
ALTER TABLE "batch" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "campaign" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"lab_id" uuid NOT NULL,
	"sample_id" uuid,
	"instrument_id" uuid,
	"name" text NOT NULL,
	"clouds" "clouding" NOT NULL,
	"solvent" text DEFAULT 'water' NOT NULL,
	"buffer" text,
	"polymer_concentration" double precision,
	"criterion" "criterion",
	"criterion_fraction" double precision,
	"rate" double precision,
	"transition_enthalpy" double precision,
	"transition_enthalpy_basis" "enthalpy_basis",
	"started_on" date,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"deleted_at" timestamp with time zone,
	CONSTRAINT "campaign_in_project" UNIQUE("id","project_id"),
	CONSTRAINT "campaign_polymer_concentration" CHECK ("campaign"."polymer_concentration" > 0),
	CONSTRAINT "campaign_rate" CHECK ("campaign"."rate" > 0),
	CONSTRAINT "campaign_fraction" CHECK ("campaign"."criterion_fraction" > 0 and "campaign"."criterion_fraction" < 1),
	CONSTRAINT "campaign_enthalpy_has_basis" CHECK (("campaign"."transition_enthalpy" is null) = ("campaign"."transition_enthalpy_basis" is null))
);
--> statement-breakpoint
ALTER TABLE "campaign" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "credential" (
	"person_id" uuid PRIMARY KEY NOT NULL,
	"password_hash" text NOT NULL,
	"changed_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "credential" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "draft" (
	"id" uuid PRIMARY KEY NOT NULL,
	"person_id" uuid NOT NULL,
	"project_id" uuid,
	"kind" text NOT NULL,
	"subject_id" uuid,
	"content" jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "draft_one_a_subject" UNIQUE NULLS NOT DISTINCT("person_id","kind","subject_id")
);
--> statement-breakpoint
ALTER TABLE "draft" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "fit" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"model" "fit_model" NOT NULL,
	"options" jsonb NOT NULL,
	"engine_version" text NOT NULL,
	"fingerprint" text NOT NULL,
	"made_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "fit_in_project" UNIQUE("id","project_id"),
	CONSTRAINT "fit_fingerprint" UNIQUE("fingerprint")
);
--> statement-breakpoint
ALTER TABLE "fit" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "fit_blank" (
	"project_id" uuid NOT NULL,
	"fit_id" uuid NOT NULL,
	"reading_id" uuid NOT NULL,
	CONSTRAINT "fit_blank_fit_id_reading_id_pk" PRIMARY KEY("fit_id","reading_id")
);
--> statement-breakpoint
ALTER TABLE "fit_blank" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "fit_result" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"fit_id" uuid NOT NULL,
	"kind" "fit_result_kind" NOT NULL,
	"result" jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "fit_result" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "fit_revision" (
	"project_id" uuid NOT NULL,
	"fit_id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	CONSTRAINT "fit_revision_fit_id_revision_id_pk" PRIMARY KEY("fit_id","revision_id")
);
--> statement-breakpoint
ALTER TABLE "fit_revision" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "instrument" (
	"id" uuid PRIMARY KEY NOT NULL,
	"lab_id" uuid NOT NULL,
	"name" text NOT NULL,
	"kind" "instrument_kind" NOT NULL,
	"path_length" double precision,
	"wavelength" double precision,
	"probe_place" text,
	"calibrated_on" date,
	"offset_value" double precision,
	"offset_uncertainty" double precision,
	"offset_stated_on" date,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "instrument_geometry" CHECK ("instrument"."path_length" > 0 and "instrument"."wavelength" > 0 and "instrument"."offset_uncertainty" >= 0)
);
--> statement-breakpoint
ALTER TABLE "instrument" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "job" (
	"id" uuid PRIMARY KEY NOT NULL,
	"kind" "job_kind" NOT NULL,
	"project_id" uuid,
	"person_id" uuid NOT NULL,
	"input" jsonb NOT NULL,
	"state" "job_state" DEFAULT 'waiting' NOT NULL,
	"done" integer DEFAULT 0 NOT NULL,
	"total" integer,
	"cancel_requested" boolean DEFAULT false NOT NULL,
	"problem" text,
	"version" integer DEFAULT 1 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"started_at" timestamp with time zone,
	"finished_at" timestamp with time zone,
	CONSTRAINT "job_progress" CHECK ("job"."done" >= 0 and ("job"."total" is null or "job"."done" <= "job"."total"))
);
--> statement-breakpoint
ALTER TABLE "job" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "lab" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "lab" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "membership" (
	"lab_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"role" "lab_role" NOT NULL,
	"since" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "membership_lab_id_person_id_role_pk" PRIMARY KEY("lab_id","person_id","role")
);
--> statement-breakpoint
ALTER TABLE "membership" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "person" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"email" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"deactivated_at" timestamp with time zone
);
--> statement-breakpoint
ALTER TABLE "person" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "person_site_role" (
	"person_id" uuid NOT NULL,
	"role" "site_role" NOT NULL,
	CONSTRAINT "person_site_role_person_id_role_pk" PRIMARY KEY("person_id","role")
);
--> statement-breakpoint
ALTER TABLE "person_site_role" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "project" (
	"id" uuid PRIMARY KEY NOT NULL,
	"name" text NOT NULL,
	"question" text,
	"invented" boolean DEFAULT false NOT NULL,
	"created_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"deleted_at" timestamp with time zone
);
--> statement-breakpoint
ALTER TABLE "project" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "project_lab" (
	"project_id" uuid NOT NULL,
	"lab_id" uuid NOT NULL,
	CONSTRAINT "project_lab_project_id_lab_id_pk" PRIMARY KEY("project_id","lab_id")
);
--> statement-breakpoint
ALTER TABLE "project_lab" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "project_member" (
	"project_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"role" "project_role" NOT NULL,
	"since" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "project_member_project_id_person_id_pk" PRIMARY KEY("project_id","person_id")
);
--> statement-breakpoint
ALTER TABLE "project_member" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "rate_limit" (
	"key" text NOT NULL,
	"minute" timestamp with time zone NOT NULL,
	"count" integer NOT NULL,
	CONSTRAINT "rate_limit_key_minute_pk" PRIMARY KEY("key","minute")
);
--> statement-breakpoint
ALTER TABLE "rate_limit" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "reading" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"series_id" uuid,
	"batch_id" uuid,
	"concentration" double precision NOT NULL,
	"composition" jsonb NOT NULL,
	"value" double precision NOT NULL,
	"sd" double precision,
	"sd_given" double precision,
	"sd_given_meaning" "sd_meaning",
	"n" integer,
	"direction" "temperature_direction" NOT NULL,
	"rate" double precision,
	"ph" double precision,
	"polymer_concentration" double precision,
	"limit" "reading_limit" DEFAULT 'exact' NOT NULL,
	"note" text,
	"origin" jsonb NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "reading_in_project" UNIQUE("id","project_id"),
	CONSTRAINT "reading_has_place" CHECK ("reading"."series_id" is not null or "reading"."batch_id" is not null),
	CONSTRAINT "reading_blank_is_zero" CHECK ("reading"."series_id" is not null or "reading"."concentration" = 0),
	CONSTRAINT "reading_concentration" CHECK ("reading"."concentration" >= 0 and "reading"."concentration" < 'Infinity'),
	CONSTRAINT "reading_value" CHECK ("reading"."value" > -273.15 and "reading"."value" < 1000),
	CONSTRAINT "reading_sd" CHECK ("reading"."sd" >= 0 and "reading"."sd" < 'Infinity'),
	CONSTRAINT "reading_n" CHECK ("reading"."n" >= 1)
);
--> statement-breakpoint
ALTER TABLE "reading" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "revision_reading" (
	"project_id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"reading_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"set_aside_reason" text,
	"set_aside_by" uuid,
	"set_aside_at" timestamp with time zone,
	CONSTRAINT "revision_reading_revision_id_reading_id_pk" PRIMARY KEY("revision_id","reading_id"),
	CONSTRAINT "revision_reading_number" UNIQUE("revision_id","number"),
	CONSTRAINT "revision_reading_set_aside" CHECK (num_nulls("revision_reading"."set_aside_reason", "revision_reading"."set_aside_by", "revision_reading"."set_aside_at") in (0, 3)),
	CONSTRAINT "revision_reading_reason" CHECK (length(trim("revision_reading"."set_aside_reason")) > 0)
);
--> statement-breakpoint
ALTER TABLE "revision_reading" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "sample" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"name" text NOT NULL,
	"number_mean_mass" double precision,
	"weight_mean_mass" double precision,
	"dispersity" double precision,
	"mass_method" text,
	"end_groups" text,
	"tacticity" text,
	"lot" text,
	"opened_on" date,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "sample_in_project" UNIQUE("id","project_id"),
	CONSTRAINT "sample_masses" CHECK ("sample"."number_mean_mass" > 0 and "sample"."weight_mean_mass" > 0 and "sample"."dispersity" >= 1)
);
--> statement-breakpoint
ALTER TABLE "sample" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "seed" (
	"name" text PRIMARY KEY NOT NULL,
	"planted_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "seed" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "series" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"campaign_id" uuid NOT NULL,
	"stock_id" uuid,
	"salt_formula" text NOT NULL,
	"salt_name" text NOT NULL,
	"anion" text NOT NULL,
	"cation" text NOT NULL,
	"scale" "concentration_scale" DEFAULT 'mol/L' NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"deleted_at" timestamp with time zone,
	CONSTRAINT "series_in_project" UNIQUE("id","project_id")
);
--> statement-breakpoint
ALTER TABLE "series" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "series_revision" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"series_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"summary" text NOT NULL,
	"made_by" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "series_revision_in_project" UNIQUE("id","project_id"),
	CONSTRAINT "series_revision_number" UNIQUE("series_id","number"),
	CONSTRAINT "series_revision_from_one" CHECK ("series_revision"."number" >= 1)
);
--> statement-breakpoint
ALTER TABLE "series_revision" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "session" (
	"id" uuid PRIMARY KEY NOT NULL,
	"person_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"revoked_at" timestamp with time zone
);
--> statement-breakpoint
ALTER TABLE "session" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "sign_in_attempt" (
	"key" text PRIMARY KEY NOT NULL,
	"misses" integer NOT NULL,
	"last_at" timestamp with time zone NOT NULL,
	"blocked_until" timestamp with time zone,
	CONSTRAINT "sign_in_attempt_misses" CHECK ("sign_in_attempt"."misses" >= 0)
);
--> statement-breakpoint
ALTER TABLE "sign_in_attempt" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "stock" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"lab_id" uuid NOT NULL,
	"salt_formula" text NOT NULL,
	"salt_name" text NOT NULL,
	"anion" text NOT NULL,
	"cation" text NOT NULL,
	"hydrate" double precision DEFAULT 0 NOT NULL,
	"lot" text,
	"purity" double precision,
	"made_on" date,
	"assay" double precision,
	"relative_uncertainty" double precision,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "stock_in_project" UNIQUE("id","project_id"),
	CONSTRAINT "stock_fractions" CHECK ("stock"."purity" > 0 and "stock"."purity" <= 1 and "stock"."assay" > 0 and "stock"."relative_uncertainty" >= 0 and "stock"."hydrate" >= 0)
);
--> statement-breakpoint
ALTER TABLE "stock" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
CREATE TABLE "upload" (
	"id" uuid PRIMARY KEY NOT NULL,
	"project_id" uuid NOT NULL,
	"person_id" uuid NOT NULL,
	"name" text NOT NULL,
	"media_type" text NOT NULL,
	"size" bigint NOT NULL,
	"sha256" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "upload_hash" CHECK ("upload"."sha256" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
ALTER TABLE "upload" ENABLE ROW LEVEL SECURITY;--> statement-breakpoint
ALTER TABLE "audit_event" ADD CONSTRAINT "audit_event_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit_event" ADD CONSTRAINT "audit_event_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "audit_event" ADD CONSTRAINT "audit_event_lab_id_lab_id_fk" FOREIGN KEY ("lab_id") REFERENCES "public"."lab"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "batch" ADD CONSTRAINT "batch_campaign" FOREIGN KEY ("campaign_id","project_id") REFERENCES "public"."campaign"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "campaign" ADD CONSTRAINT "campaign_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "campaign" ADD CONSTRAINT "campaign_lab_id_lab_id_fk" FOREIGN KEY ("lab_id") REFERENCES "public"."lab"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "campaign" ADD CONSTRAINT "campaign_instrument_id_instrument_id_fk" FOREIGN KEY ("instrument_id") REFERENCES "public"."instrument"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "campaign" ADD CONSTRAINT "campaign_sample" FOREIGN KEY ("sample_id","project_id") REFERENCES "public"."sample"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "credential" ADD CONSTRAINT "credential_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "draft" ADD CONSTRAINT "draft_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "draft" ADD CONSTRAINT "draft_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fit" ADD CONSTRAINT "fit_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fit" ADD CONSTRAINT "fit_made_by_person_id_fk" FOREIGN KEY ("made_by") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fit_blank" ADD CONSTRAINT "fit_blank_fit" FOREIGN KEY ("fit_id","project_id") REFERENCES "public"."fit"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fit_blank" ADD CONSTRAINT "fit_blank_reading" FOREIGN KEY ("reading_id","project_id") REFERENCES "public"."reading"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fit_result" ADD CONSTRAINT "fit_result_fit" FOREIGN KEY ("fit_id","project_id") REFERENCES "public"."fit"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fit_revision" ADD CONSTRAINT "fit_revision_fit" FOREIGN KEY ("fit_id","project_id") REFERENCES "public"."fit"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "fit_revision" ADD CONSTRAINT "fit_revision_revision" FOREIGN KEY ("revision_id","project_id") REFERENCES "public"."series_revision"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "instrument" ADD CONSTRAINT "instrument_lab_id_lab_id_fk" FOREIGN KEY ("lab_id") REFERENCES "public"."lab"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job" ADD CONSTRAINT "job_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "job" ADD CONSTRAINT "job_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_lab_id_lab_id_fk" FOREIGN KEY ("lab_id") REFERENCES "public"."lab"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "person_site_role" ADD CONSTRAINT "person_site_role_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project" ADD CONSTRAINT "project_created_by_person_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project_lab" ADD CONSTRAINT "project_lab_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project_lab" ADD CONSTRAINT "project_lab_lab_id_lab_id_fk" FOREIGN KEY ("lab_id") REFERENCES "public"."lab"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project_member" ADD CONSTRAINT "project_member_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "project_member" ADD CONSTRAINT "project_member_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reading" ADD CONSTRAINT "reading_series" FOREIGN KEY ("series_id","project_id") REFERENCES "public"."series"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reading" ADD CONSTRAINT "reading_batch" FOREIGN KEY ("batch_id","project_id") REFERENCES "public"."batch"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision_reading" ADD CONSTRAINT "revision_reading_set_aside_by_person_id_fk" FOREIGN KEY ("set_aside_by") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision_reading" ADD CONSTRAINT "revision_reading_revision" FOREIGN KEY ("revision_id","project_id") REFERENCES "public"."series_revision"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision_reading" ADD CONSTRAINT "revision_reading_reading" FOREIGN KEY ("reading_id","project_id") REFERENCES "public"."reading"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "sample" ADD CONSTRAINT "sample_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "series" ADD CONSTRAINT "series_campaign" FOREIGN KEY ("campaign_id","project_id") REFERENCES "public"."campaign"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "series" ADD CONSTRAINT "series_stock" FOREIGN KEY ("stock_id","project_id") REFERENCES "public"."stock"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "series_revision" ADD CONSTRAINT "series_revision_made_by_person_id_fk" FOREIGN KEY ("made_by") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "series_revision" ADD CONSTRAINT "series_revision_series" FOREIGN KEY ("series_id","project_id") REFERENCES "public"."series"("id","project_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "stock" ADD CONSTRAINT "stock_project_lab" FOREIGN KEY ("project_id","lab_id") REFERENCES "public"."project_lab"("project_id","lab_id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "upload" ADD CONSTRAINT "upload_project_id_project_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."project"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "upload" ADD CONSTRAINT "upload_person_id_person_id_fk" FOREIGN KEY ("person_id") REFERENCES "public"."person"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "audit_event_project" ON "audit_event" USING btree ("project_id","at");--> statement-breakpoint
CREATE INDEX "audit_event_person" ON "audit_event" USING btree ("person_id","at");--> statement-breakpoint
CREATE INDEX "batch_project" ON "batch" USING btree ("project_id");--> statement-breakpoint
CREATE UNIQUE INDEX "campaign_name_unique" ON "campaign" USING btree ("project_id","lab_id","name") WHERE "campaign"."deleted_at" is null;--> statement-breakpoint
CREATE INDEX "fit_project" ON "fit" USING btree ("project_id");--> statement-breakpoint
CREATE INDEX "fit_blank_reading" ON "fit_blank" USING btree ("reading_id");--> statement-breakpoint
CREATE INDEX "fit_result_fit" ON "fit_result" USING btree ("fit_id","kind");--> statement-breakpoint
CREATE INDEX "fit_revision_revision" ON "fit_revision" USING btree ("revision_id");--> statement-breakpoint
CREATE INDEX "instrument_lab" ON "instrument" USING btree ("lab_id");--> statement-breakpoint
CREATE INDEX "job_person" ON "job" USING btree ("person_id","created_at");--> statement-breakpoint
CREATE INDEX "job_project" ON "job" USING btree ("project_id","created_at");--> statement-breakpoint
CREATE UNIQUE INDEX "lab_name_unique" ON "lab" USING btree (lower("name"));--> statement-breakpoint
CREATE INDEX "membership_person" ON "membership" USING btree ("person_id");--> statement-breakpoint
CREATE UNIQUE INDEX "person_email_unique" ON "person" USING btree (lower("email"));--> statement-breakpoint
CREATE INDEX "project_created_by" ON "project" USING btree ("created_by");--> statement-breakpoint
CREATE INDEX "project_lab_lab" ON "project_lab" USING btree ("lab_id");--> statement-breakpoint
CREATE INDEX "project_member_person" ON "project_member" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "rate_limit_minute" ON "rate_limit" USING btree ("minute");--> statement-breakpoint
CREATE INDEX "reading_series" ON "reading" USING btree ("series_id");--> statement-breakpoint
CREATE INDEX "reading_batch" ON "reading" USING btree ("batch_id");--> statement-breakpoint
CREATE INDEX "revision_reading_reading" ON "revision_reading" USING btree ("reading_id");--> statement-breakpoint
CREATE INDEX "sample_project" ON "sample" USING btree ("project_id");--> statement-breakpoint
CREATE INDEX "series_project" ON "series" USING btree ("project_id","id");--> statement-breakpoint
CREATE INDEX "series_campaign" ON "series" USING btree ("campaign_id");--> statement-breakpoint
CREATE INDEX "session_person" ON "session" USING btree ("person_id");--> statement-breakpoint
CREATE INDEX "sign_in_attempt_last" ON "sign_in_attempt" USING btree ("last_at");--> statement-breakpoint
CREATE INDEX "stock_project" ON "stock" USING btree ("project_id");--> statement-breakpoint
CREATE INDEX "upload_project" ON "upload" USING btree ("project_id","created_at");