CREATE TYPE "public"."shard_kind" AS ENUM('points', 'branches');--> statement-breakpoint
ALTER TABLE "run" ADD COLUMN "rows_sought" integer DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE "run" ADD COLUMN "rows_done" integer DEFAULT 0 NOT NULL;--> statement-breakpoint
ALTER TABLE "shard" ADD COLUMN "kind" "shard_kind" DEFAULT 'points' NOT NULL;--> statement-breakpoint
ALTER TABLE "shard" ADD COLUMN "unstable" jsonb DEFAULT '[]'::jsonb NOT NULL;--> statement-breakpoint
ALTER TABLE "shard" ADD COLUMN "found" jsonb;