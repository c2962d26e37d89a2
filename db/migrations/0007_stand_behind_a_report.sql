CREATE TABLE "equipment" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"project_id" uuid NOT NULL,
	"name" text NOT NULL,
	"manufacturer" text DEFAULT '' NOT NULL,
	"model" text DEFAULT '' NOT NULL,
	"serial_number" text DEFAULT '' NOT NULL,
	"ratings" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"remark" text DEFAULT '' NOT NULL,
	"received_on" text,
	"retired_at" timestamp (3) with time zone,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "operating_modes" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"equipment_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"name" text NOT NULL,
	"description" text DEFAULT '' NOT NULL,
	CONSTRAINT "operating_modes_equipment_name_key" UNIQUE("equipment_id","name")
);
--> statement-breakpoint
CREATE TABLE "calibrations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"instrument_id" uuid NOT NULL,
	"calibrated_on" date NOT NULL,
	"due_on" date NOT NULL,
	"certificate_number" text DEFAULT '' NOT NULL,
	"calibrated_by" text DEFAULT '' NOT NULL,
	"uncertainty" text DEFAULT '' NOT NULL,
	"remark" text DEFAULT '' NOT NULL,
	"certificate_key" text,
	"certificate_name" text,
	"certificate_size" bigint,
	"certificate_sha256" text,
	"due_notice_sent_at" timestamp (3) with time zone,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "calibrations_due_after" CHECK ("calibrations"."due_on" > "calibrations"."calibrated_on"),
	CONSTRAINT "calibrations_certificate_complete" CHECK (num_nulls("calibrations"."certificate_key", "calibrations"."certificate_name", "calibrations"."certificate_size", "calibrations"."certificate_sha256") in (0, 4))
);
--> statement-breakpoint
CREATE TABLE "instruments" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"kind" text NOT NULL,
	"name" text NOT NULL,
	"manufacturer" text DEFAULT '' NOT NULL,
	"model" text DEFAULT '' NOT NULL,
	"serial_number" text NOT NULL,
	"remark" text DEFAULT '' NOT NULL,
	"responsible_id" uuid,
	"retired_at" timestamp (3) with time zone,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "instruments_model_serial_key" UNIQUE("manufacturer","model","serial_number")
);
--> statement-breakpoint
CREATE TABLE "laboratory" (
	"id" integer PRIMARY KEY DEFAULT 1 NOT NULL,
	"name" text DEFAULT '' NOT NULL,
	"address" text DEFAULT '' NOT NULL,
	"contact" text DEFAULT '' NOT NULL,
	"accreditation" text DEFAULT '' NOT NULL,
	"updated_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "laboratory_single_row" CHECK ("laboratory"."id" = 1)
);
--> statement-breakpoint
CREATE TABLE "measuring_chain_instruments" (
	"chain_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"instrument_id" uuid NOT NULL,
	CONSTRAINT "measuring_chain_instruments_chain_id_position_pk" PRIMARY KEY("chain_id","position")
);
--> statement-breakpoint
CREATE TABLE "measuring_chains" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"description" text DEFAULT '' NOT NULL,
	"retired_at" timestamp (3) with time zone,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "measuring_chains_name_key" UNIQUE("name")
);
--> statement-breakpoint
CREATE TABLE "verdict_repeats" (
	"verdict_id" uuid NOT NULL,
	"position" integer NOT NULL,
	"analysis_id" uuid NOT NULL,
	"channel_index" integer NOT NULL,
	"result" text NOT NULL,
	"reason" text NOT NULL,
	CONSTRAINT "verdict_repeats_verdict_id_position_pk" PRIMARY KEY("verdict_id","position")
);
--> statement-breakpoint
CREATE TABLE "invitations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"project_id" uuid NOT NULL,
	"email" text NOT NULL,
	"role" "project_role" NOT NULL,
	"token_sha256" text NOT NULL,
	"invited_by_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	"accepted_at" timestamp (3) with time zone,
	"accepted_by_id" uuid,
	"revoked_at" timestamp (3) with time zone
);
--> statement-breakpoint
CREATE TABLE "mails" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"kind" text NOT NULL,
	"project_id" uuid,
	"report_id" uuid,
	"to_address" text NOT NULL,
	"to_name" text DEFAULT '' NOT NULL,
	"subject" text NOT NULL,
	"text" text NOT NULL,
	"html" text NOT NULL,
	"attachments" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"invitation_id" uuid,
	"password_reset_id" uuid,
	"status" text DEFAULT 'queued' NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"last_error" text,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"last_attempt_at" timestamp (3) with time zone,
	"sent_at" timestamp (3) with time zone
);
--> statement-breakpoint
CREATE TABLE "password_resets" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"token_sha256" text NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp (3) with time zone NOT NULL,
	"used_at" timestamp (3) with time zone
);
--> statement-breakpoint
CREATE TABLE "report_references" (
	"report_id" uuid NOT NULL,
	"target_id" uuid NOT NULL,
	"kind" text NOT NULL,
	CONSTRAINT "report_references_report_id_target_id_pk" PRIMARY KEY("report_id","target_id")
);
--> statement-breakpoint
ALTER TABLE "limit_sets" ADD COLUMN "family_id" uuid;--> statement-breakpoint
UPDATE "limit_sets" SET "family_id" = "id";--> statement-breakpoint
ALTER TABLE "limit_sets" ALTER COLUMN "family_id" SET NOT NULL;--> statement-breakpoint
ALTER TABLE "limit_sets" ADD COLUMN "version" integer DEFAULT 1 NOT NULL;--> statement-breakpoint
ALTER TABLE "limit_sets" ADD COLUMN "cloned_from" text;--> statement-breakpoint
ALTER TABLE "limit_sets" ADD COLUMN "retired_at" timestamp (3) with time zone;--> statement-breakpoint
ALTER TABLE "verdicts" ADD COLUMN "supply" jsonb;--> statement-breakpoint
ALTER TABLE "verdicts" ADD COLUMN "repeatability" jsonb;--> statement-breakpoint
ALTER TABLE "projects" ADD COLUMN "customer_contact" text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE "projects" ADD COLUMN "preparer_may_issue" boolean DEFAULT false NOT NULL;--> statement-breakpoint
ALTER TABLE "channels" ADD COLUMN "measuring_chain_id" uuid;--> statement-breakpoint
ALTER TABLE "recordings" ADD COLUMN "equipment_id" uuid;--> statement-breakpoint
ALTER TABLE "recordings" ADD COLUMN "operating_mode_id" uuid;--> statement-breakpoint
ALTER TABLE "recordings" ADD COLUMN "measuring_chain_id" uuid;--> statement-breakpoint
ALTER TABLE "recordings" ADD COLUMN "conditions" jsonb DEFAULT '{}'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "reports" ADD COLUMN "deviations" text DEFAULT '' NOT NULL;--> statement-breakpoint
ALTER TABLE "reports" ADD COLUMN "recipients" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "reports" ADD COLUMN "replaces_id" uuid;--> statement-breakpoint
ALTER TABLE "reports" ADD COLUMN "overdue_reason" text;--> statement-breakpoint
ALTER TABLE "reports" ADD COLUMN "json_key" text;--> statement-breakpoint
ALTER TABLE "reports" ADD COLUMN "json_sha256" text;--> statement-breakpoint
ALTER TABLE "reports" ADD COLUMN "csv_key" text;--> statement-breakpoint
ALTER TABLE "reports" ADD COLUMN "csv_sha256" text;--> statement-breakpoint
ALTER TABLE "reports" ADD COLUMN "check_code" text;--> statement-breakpoint
ALTER TABLE "equipment" ADD CONSTRAINT "equipment_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "equipment" ADD CONSTRAINT "equipment_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "operating_modes" ADD CONSTRAINT "operating_modes_equipment_id_equipment_id_fk" FOREIGN KEY ("equipment_id") REFERENCES "public"."equipment"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "calibrations" ADD CONSTRAINT "calibrations_instrument_id_instruments_id_fk" FOREIGN KEY ("instrument_id") REFERENCES "public"."instruments"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "calibrations" ADD CONSTRAINT "calibrations_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "instruments" ADD CONSTRAINT "instruments_responsible_id_users_id_fk" FOREIGN KEY ("responsible_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "instruments" ADD CONSTRAINT "instruments_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "measuring_chain_instruments" ADD CONSTRAINT "measuring_chain_instruments_chain_id_measuring_chains_id_fk" FOREIGN KEY ("chain_id") REFERENCES "public"."measuring_chains"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "measuring_chain_instruments" ADD CONSTRAINT "measuring_chain_instruments_instrument_id_instruments_id_fk" FOREIGN KEY ("instrument_id") REFERENCES "public"."instruments"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "measuring_chains" ADD CONSTRAINT "measuring_chains_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "verdict_repeats" ADD CONSTRAINT "verdict_repeats_verdict_id_verdicts_id_fk" FOREIGN KEY ("verdict_id") REFERENCES "public"."verdicts"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "verdict_repeats" ADD CONSTRAINT "verdict_repeats_analysis_id_analyses_id_fk" FOREIGN KEY ("analysis_id") REFERENCES "public"."analyses"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_invited_by_id_users_id_fk" FOREIGN KEY ("invited_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_accepted_by_id_users_id_fk" FOREIGN KEY ("accepted_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "mails" ADD CONSTRAINT "mails_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "mails" ADD CONSTRAINT "mails_report_id_reports_id_fk" FOREIGN KEY ("report_id") REFERENCES "public"."reports"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "mails" ADD CONSTRAINT "mails_invitation_id_invitations_id_fk" FOREIGN KEY ("invitation_id") REFERENCES "public"."invitations"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "mails" ADD CONSTRAINT "mails_password_reset_id_password_resets_id_fk" FOREIGN KEY ("password_reset_id") REFERENCES "public"."password_resets"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "password_resets" ADD CONSTRAINT "password_resets_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_references" ADD CONSTRAINT "report_references_report_id_reports_id_fk" FOREIGN KEY ("report_id") REFERENCES "public"."reports"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "equipment_project_index" ON "equipment" USING btree ("project_id");--> statement-breakpoint
CREATE INDEX "calibrations_instrument_index" ON "calibrations" USING btree ("instrument_id","calibrated_on");--> statement-breakpoint
CREATE INDEX "measuring_chain_instruments_instrument_index" ON "measuring_chain_instruments" USING btree ("instrument_id");--> statement-breakpoint
CREATE INDEX "verdict_repeats_analysis_index" ON "verdict_repeats" USING btree ("analysis_id");--> statement-breakpoint
CREATE UNIQUE INDEX "invitations_token_key" ON "invitations" USING btree ("token_sha256");--> statement-breakpoint
CREATE INDEX "invitations_project_index" ON "invitations" USING btree ("project_id");--> statement-breakpoint
CREATE INDEX "mails_created_index" ON "mails" USING btree ("created_at");--> statement-breakpoint
CREATE INDEX "mails_report_index" ON "mails" USING btree ("report_id");--> statement-breakpoint
CREATE UNIQUE INDEX "password_resets_token_key" ON "password_resets" USING btree ("token_sha256");--> statement-breakpoint
CREATE INDEX "password_resets_user_index" ON "password_resets" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "report_references_target_index" ON "report_references" USING btree ("target_id");--> statement-breakpoint
ALTER TABLE "channels" ADD CONSTRAINT "channels_measuring_chain_id_measuring_chains_id_fk" FOREIGN KEY ("measuring_chain_id") REFERENCES "public"."measuring_chains"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recordings" ADD CONSTRAINT "recordings_equipment_id_equipment_id_fk" FOREIGN KEY ("equipment_id") REFERENCES "public"."equipment"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recordings" ADD CONSTRAINT "recordings_operating_mode_id_operating_modes_id_fk" FOREIGN KEY ("operating_mode_id") REFERENCES "public"."operating_modes"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recordings" ADD CONSTRAINT "recordings_measuring_chain_id_measuring_chains_id_fk" FOREIGN KEY ("measuring_chain_id") REFERENCES "public"."measuring_chains"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_replaces_id_reports_id_fk" FOREIGN KEY ("replaces_id") REFERENCES "public"."reports"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "recordings_equipment_index" ON "recordings" USING btree ("equipment_id");--> statement-breakpoint
CREATE UNIQUE INDEX "reports_check_code_key" ON "reports" USING btree ("check_code");--> statement-breakpoint
CREATE UNIQUE INDEX "reports_replaces_key" ON "reports" USING btree ("replaces_id");--> statement-breakpoint
ALTER TABLE "limit_sets" ADD CONSTRAINT "limit_sets_family_version_key" UNIQUE("family_id","version");