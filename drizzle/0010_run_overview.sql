CREATE TABLE "overview" (
	"run_id" uuid PRIMARY KEY NOT NULL,
	"data" "bytea" NOT NULL
);
--> statement-breakpoint
ALTER TABLE "overview" ADD CONSTRAINT "overview_run_id_run_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."run"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "overview" ALTER COLUMN "data" SET COMPRESSION lz4;
