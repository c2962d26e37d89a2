ALTER TABLE "analyses" ADD COLUMN "power" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "analyses" ADD COLUMN "three_phase" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD COLUMN "tone" jsonb;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD COLUMN "distortion" jsonb;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD COLUMN "bands" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD COLUMN "counted_frequency" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD COLUMN "lines" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD COLUMN "families" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD COLUMN "uncertainty" jsonb DEFAULT '{}'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD COLUMN "spectrum_noise_bandwidth_hz" double precision;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD COLUMN "spectrum_segments" integer;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD COLUMN "series_key" text;--> statement-breakpoint
ALTER TABLE "analysis_channels" ADD COLUMN "series" jsonb;--> statement-breakpoint
ALTER TABLE "harmonics" ADD COLUMN "uncertainty" double precision;--> statement-breakpoint
ALTER TABLE "harmonics" ADD COLUMN "group_statistics" jsonb;--> statement-breakpoint
ALTER TABLE "harmonics" ADD COLUMN "subgroup_statistics" jsonb;