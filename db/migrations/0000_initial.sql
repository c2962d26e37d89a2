CREATE TYPE "public"."analysis_status" AS ENUM('queued', 'running', 'done', 'failed');--> statement-breakpoint
CREATE TYPE "public"."note_kind" AS ENUM('order', 'line', 'span');--> statement-breakpoint
CREATE TYPE "public"."project_role" AS ENUM('technician', 'analyst', 'manager', 'guest');--> statement-breakpoint
CREATE TYPE "public"."recording_status" AS ENUM('received', 'reading', 'analysing', 'ready', 'failed');--> statement-breakpoint
CREATE TYPE "public"."report_status" AS ENUM('draft', 'in-review', 'issued', 'superseded');--> statement-breakpoint
CREATE TABLE "analyses" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"recording_id" uuid NOT NULL,
	"status" "analysis_status" DEFAULT 'queued' NOT NULL,
	"progress" double precision DEFAULT 0 NOT NULL,
	"problem" jsonb,
	"engine_version" text,
	"settings" jsonb NOT NULL,
	"superseded_by_id" uuid,
	"cancel_requested_at" timestamp (3) with time zone,
	"started_by_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"finished_at" timestamp (3) with time zone
);
--> statement-breakpoint
CREATE TABLE "analysis_channels" (
	"analysis_id" uuid NOT NULL,
	"index" integer NOT NULL,
	"name" text NOT NULL,
	"quantity" text NOT NULL,
	"unit" text NOT NULL,
	"mean" double precision,
	"rms" double precision,
	"peak" double precision,
	"crest_factor" double precision,
	"form_factor" double precision,
	"fundamental" jsonb,
	"thd_f_percent" double precision,
	"thd_r_percent" double precision,
	"thd_max_order" integer NOT NULL,
	"thd_plus_n_percent" double precision,
	"sinad_db" double precision,
	"snr_db" double precision,
	"sfdr_db" double precision,
	"enob_bits" double precision,
	"interharmonics" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"windows" jsonb,
	"flags" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"spectrum_key" text NOT NULL,
	"spectrum_window" text NOT NULL,
	"spectrum_start_hz" double precision NOT NULL,
	"spectrum_step_hz" double precision NOT NULL,
	CONSTRAINT "analysis_channels_analysis_id_index_pk" PRIMARY KEY("analysis_id","index")
);
--> statement-breakpoint
CREATE TABLE "harmonics" (
	"analysis_id" uuid NOT NULL,
	"channel_index" integer NOT NULL,
	"order" integer NOT NULL,
	"frequency_hz" double precision NOT NULL,
	"rms" double precision NOT NULL,
	"percent_of_fundamental" double precision,
	"phase_deg" double precision,
	"phase_zero_crossing_deg" double precision,
	"group_rms" double precision,
	"subgroup_rms" double precision,
	"smoothed_mean_rms" double precision,
	"smoothed_max_rms" double precision,
	CONSTRAINT "harmonics_analysis_id_channel_index_order_pk" PRIMARY KEY("analysis_id","channel_index","order")
);
--> statement-breakpoint
CREATE TABLE "notes" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"analysis_id" uuid NOT NULL,
	"channel_index" integer NOT NULL,
	"kind" "note_kind" NOT NULL,
	"order" integer,
	"frequency_hz" double precision,
	"from_s" double precision,
	"to_s" double precision,
	"text" text NOT NULL,
	"cause" text DEFAULT '' NOT NULL,
	"author_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "sessions" (
	"sid" varchar PRIMARY KEY NOT NULL,
	"sess" json NOT NULL,
	"expire" timestamp (6) NOT NULL
);
--> statement-breakpoint
CREATE TABLE "users" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"password_hash" text NOT NULL,
	"is_administrator" boolean DEFAULT false NOT NULL,
	"disabled_at" timestamp (3) with time zone,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "users_email_lower_case" CHECK ("users"."email" = lower("users"."email"))
);
--> statement-breakpoint
CREATE TABLE "limit_sets" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"project_id" uuid NOT NULL,
	"definition" jsonb NOT NULL,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "verdicts" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"analysis_id" uuid NOT NULL,
	"channel_index" integer NOT NULL,
	"limit_set_id" text NOT NULL,
	"limit_set" jsonb NOT NULL,
	"parameters" jsonb NOT NULL,
	"decision_rule" text NOT NULL,
	"decision_rule_text" text NOT NULL,
	"result" text NOT NULL,
	"reason" text NOT NULL,
	"orders" jsonb NOT NULL,
	"totals" jsonb NOT NULL,
	"author_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "members" (
	"project_id" uuid NOT NULL,
	"user_id" uuid NOT NULL,
	"role" "project_role" NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "members_project_id_user_id_pk" PRIMARY KEY("project_id","user_id")
);
--> statement-breakpoint
CREATE TABLE "projects" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"name" text NOT NULL,
	"customer" text DEFAULT '' NOT NULL,
	"description" text DEFAULT '' NOT NULL,
	"default_settings" jsonb NOT NULL,
	"comparison_limit_set_id" text,
	"last_recording_number" integer DEFAULT 0 NOT NULL,
	"last_report_number" integer DEFAULT 0 NOT NULL,
	"archived_at" timestamp (3) with time zone,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "channels" (
	"recording_id" uuid NOT NULL,
	"index" integer NOT NULL,
	"name" text NOT NULL,
	"quantity" text NOT NULL,
	"unit" text NOT NULL,
	"gain" double precision DEFAULT 1 NOT NULL,
	"offset" double precision DEFAULT 0 NOT NULL,
	"lowest_code" double precision,
	"highest_code" double precision,
	"missing_values" integer DEFAULT 0 NOT NULL,
	"samples_key" text NOT NULL,
	"pyramid_key" text NOT NULL,
	CONSTRAINT "channels_recording_id_index_pk" PRIMARY KEY("recording_id","index")
);
--> statement-breakpoint
CREATE TABLE "recordings" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"project_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"name" text NOT NULL,
	"eut" text DEFAULT '' NOT NULL,
	"measuring_chain" text DEFAULT '' NOT NULL,
	"instrument" text DEFAULT '' NOT NULL,
	"remark" text DEFAULT '' NOT NULL,
	"captured_at" timestamp (3) with time zone,
	"status" "recording_status" DEFAULT 'received' NOT NULL,
	"progress" double precision DEFAULT 0 NOT NULL,
	"problem" jsonb,
	"warnings" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"file_name" text NOT NULL,
	"file_size" bigint NOT NULL,
	"file_sha256" text NOT NULL,
	"source_key" text NOT NULL,
	"import_options" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"format" text,
	"metadata" jsonb DEFAULT '{}'::jsonb NOT NULL,
	"sample_rate_hz" double precision,
	"sample_count" bigint,
	"uploaded_by_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "recordings_project_number_key" UNIQUE("project_id","number"),
	CONSTRAINT "recordings_sha256_form" CHECK ("recordings"."file_sha256" ~ '^[0-9a-f]{64}$')
);
--> statement-breakpoint
CREATE TABLE "report_events" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"report_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"by_id" uuid NOT NULL,
	"comment" text DEFAULT '' NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "report_verdicts" (
	"report_id" uuid NOT NULL,
	"verdict_id" uuid NOT NULL,
	"position" integer NOT NULL,
	CONSTRAINT "report_verdicts_report_id_verdict_id_pk" PRIMARY KEY("report_id","verdict_id")
);
--> statement-breakpoint
CREATE TABLE "reports" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"project_id" uuid NOT NULL,
	"number" integer,
	"revision" integer DEFAULT 0 NOT NULL,
	"title" text NOT NULL,
	"summary" text DEFAULT '' NOT NULL,
	"status" "report_status" DEFAULT 'draft' NOT NULL,
	"content" jsonb,
	"pdf_key" text,
	"pdf_sha256" text,
	"prepared_by_id" uuid NOT NULL,
	"issued_by_id" uuid,
	"issued_at" timestamp (3) with time zone,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "reports_project_number_key" UNIQUE("project_id","number","revision"),
	CONSTRAINT "reports_issued_complete" CHECK ("reports"."status" not in ('issued', 'superseded') or ("reports"."number" is not null and "reports"."content" is not null and "reports"."pdf_key" is not null and "reports"."pdf_sha256" is not null and "reports"."issued_by_id" is not null and "reports"."issued_at" is not null))
);
--> statement-breakpoint
ALTER TABLE "analyses" ADD CONSTRAINT "analyses_recording_id_recordings_id_fk" FOREIGN KEY ("recording_id") REFERENCES "public"."recordings"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "analyses" ADD CONSTRAINT "analyses_superseded_by_id_analyses_id_fk" FOREIGN KEY ("superseded_by_id") REFERENCES "public"."analyses"("id") ON DELETE set null ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "analyses" ADD CONSTRAINT "analyses_started_by_id_users_id_fk" FOREIGN KEY ("started_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD CONSTRAINT "analysis_channels_analysis_id_analyses_id_fk" FOREIGN KEY ("analysis_id") REFERENCES "public"."analyses"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "harmonics" ADD CONSTRAINT "harmonics_channel_fkey" FOREIGN KEY ("analysis_id","channel_index") REFERENCES "public"."analysis_channels"("analysis_id","index") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "notes" ADD CONSTRAINT "notes_analysis_id_analyses_id_fk" FOREIGN KEY ("analysis_id") REFERENCES "public"."analyses"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "notes" ADD CONSTRAINT "notes_author_id_users_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "limit_sets" ADD CONSTRAINT "limit_sets_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "limit_sets" ADD CONSTRAINT "limit_sets_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "verdicts" ADD CONSTRAINT "verdicts_analysis_id_analyses_id_fk" FOREIGN KEY ("analysis_id") REFERENCES "public"."analyses"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "verdicts" ADD CONSTRAINT "verdicts_author_id_users_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "members" ADD CONSTRAINT "members_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "members" ADD CONSTRAINT "members_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "projects" ADD CONSTRAINT "projects_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "channels" ADD CONSTRAINT "channels_recording_id_recordings_id_fk" FOREIGN KEY ("recording_id") REFERENCES "public"."recordings"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recordings" ADD CONSTRAINT "recordings_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recordings" ADD CONSTRAINT "recordings_uploaded_by_id_users_id_fk" FOREIGN KEY ("uploaded_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_events" ADD CONSTRAINT "report_events_report_id_reports_id_fk" FOREIGN KEY ("report_id") REFERENCES "public"."reports"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_events" ADD CONSTRAINT "report_events_by_id_users_id_fk" FOREIGN KEY ("by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_verdicts" ADD CONSTRAINT "report_verdicts_report_id_reports_id_fk" FOREIGN KEY ("report_id") REFERENCES "public"."reports"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "report_verdicts" ADD CONSTRAINT "report_verdicts_verdict_id_verdicts_id_fk" FOREIGN KEY ("verdict_id") REFERENCES "public"."verdicts"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_prepared_by_id_users_id_fk" FOREIGN KEY ("prepared_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_issued_by_id_users_id_fk" FOREIGN KEY ("issued_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "analyses_recording_index" ON "analyses" USING btree ("recording_id","created_at");--> statement-breakpoint
CREATE INDEX "notes_analysis_index" ON "notes" USING btree ("analysis_id");--> statement-breakpoint
CREATE INDEX "sessions_expire_index" ON "sessions" USING btree ("expire");--> statement-breakpoint
CREATE UNIQUE INDEX "users_email_key" ON "users" USING btree ("email");--> statement-breakpoint
CREATE INDEX "limit_sets_project_index" ON "limit_sets" USING btree ("project_id");--> statement-breakpoint
CREATE INDEX "verdicts_analysis_index" ON "verdicts" USING btree ("analysis_id");--> statement-breakpoint
CREATE INDEX "members_user_index" ON "members" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "recordings_project_sha256_index" ON "recordings" USING btree ("project_id","file_sha256");--> statement-breakpoint
CREATE INDEX "report_events_report_index" ON "report_events" USING btree ("report_id");--> statement-breakpoint
CREATE INDEX "report_verdicts_verdict_index" ON "report_verdicts" USING btree ("verdict_id");