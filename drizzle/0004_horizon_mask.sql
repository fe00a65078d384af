ALTER TABLE "stations" ADD COLUMN "horizon_mask" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "stations" ADD COLUMN "max_azimuth_rate_deg_per_s" double precision;