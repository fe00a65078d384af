ALTER TABLE "people" ADD COLUMN "calendar_secret_hash" text;--> statement-breakpoint
CREATE UNIQUE INDEX "people_calendar_secret_key" ON "people" USING btree ("calendar_secret_hash");