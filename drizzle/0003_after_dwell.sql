CREATE TABLE "after_dwell_approaches" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"screening_id" uuid NOT NULL,
	"protected_object_id" uuid NOT NULL,
	"path" text NOT NULL,
	"at" timestamp (3) with time zone NOT NULL,
	"miss_km" double precision NOT NULL,
	"relative_speed_km_per_s" double precision NOT NULL,
	"probability" double precision,
	"at_edge" boolean NOT NULL
);
--> statement-breakpoint
CREATE TABLE "after_dwell_screenings" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"engagement_id" uuid NOT NULL,
	"run" uuid NOT NULL,
	"state" text NOT NULL,
	"reason" text,
	"from_at" timestamp (3) with time zone NOT NULL,
	"to_at" timestamp (3) with time zone NOT NULL,
	"threshold_km" double precision NOT NULL,
	"element_set_id" uuid NOT NULL,
	"checked" integer DEFAULT 0 NOT NULL,
	"total" integer NOT NULL,
	"unseen" jsonb DEFAULT '[]'::jsonb NOT NULL,
	"updated_at" timestamp (3) with time zone NOT NULL,
	CONSTRAINT "after_dwell_screenings_engagement_id_unique" UNIQUE("engagement_id")
);
--> statement-breakpoint
ALTER TABLE "after_dwell_approaches" ADD CONSTRAINT "after_dwell_approaches_screening_id_after_dwell_screenings_id_fk" FOREIGN KEY ("screening_id") REFERENCES "public"."after_dwell_screenings"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "after_dwell_approaches" ADD CONSTRAINT "after_dwell_approaches_protected_object_id_protected_objects_id_fk" FOREIGN KEY ("protected_object_id") REFERENCES "public"."protected_objects"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "after_dwell_screenings" ADD CONSTRAINT "after_dwell_screenings_engagement_id_engagements_id_fk" FOREIGN KEY ("engagement_id") REFERENCES "public"."engagements"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "after_dwell_screenings" ADD CONSTRAINT "after_dwell_screenings_element_set_id_element_sets_id_fk" FOREIGN KEY ("element_set_id") REFERENCES "public"."element_sets"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "after_dwell_approaches_screening" ON "after_dwell_approaches" USING btree ("screening_id");