CREATE TYPE "public"."run_verdict" AS ENUM('holds', 'broken', 'no data');--> statement-breakpoint
ALTER TABLE "run" ADD COLUMN "verdict" "run_verdict";--> statement-breakpoint
ALTER TABLE "run" ADD COLUMN "judgement" jsonb;--> statement-breakpoint
ALTER TABLE "run" ADD COLUMN "judged_at" timestamp with time zone;--> statement-breakpoint
CREATE INDEX "run_unjudged" ON "run" USING btree ("finished_at") WHERE status = 'done' AND judged_at IS NULL;