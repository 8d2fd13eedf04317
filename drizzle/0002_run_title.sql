ALTER TABLE "run" ADD COLUMN "title" text;
--> statement-breakpoint
UPDATE "run" SET "title" = coalesce(nullif("plan" ->> 'title', ''), "netlist"."title")
  FROM "netlist" WHERE "netlist"."id" = "run"."netlist_id";
--> statement-breakpoint
ALTER TABLE "run" ALTER COLUMN "title" SET NOT NULL;
