CREATE TABLE "reading_rules" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"project_id" uuid NOT NULL,
	"name" text NOT NULL,
	"file_name_pattern" text NOT NULL,
	"column_names" jsonb,
	"options" jsonb NOT NULL,
	"created_by_id" uuid NOT NULL,
	"created_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp (3) with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "reading_rules_project_name_key" UNIQUE("project_id","name")
);
--> statement-breakpoint
ALTER TABLE "recordings" ADD COLUMN "reading_rule_id" uuid;--> statement-breakpoint
ALTER TABLE "recordings" ADD COLUMN "reading_rule_name" text;--> statement-breakpoint
ALTER TABLE "reading_rules" ADD CONSTRAINT "reading_rules_project_id_projects_id_fk" FOREIGN KEY ("project_id") REFERENCES "public"."projects"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reading_rules" ADD CONSTRAINT "reading_rules_created_by_id_users_id_fk" FOREIGN KEY ("created_by_id") REFERENCES "public"."users"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "recordings" ADD CONSTRAINT "recordings_reading_rule_id_reading_rules_id_fk" FOREIGN KEY ("reading_rule_id") REFERENCES "public"."reading_rules"("id") ON DELETE set null ON UPDATE no action;