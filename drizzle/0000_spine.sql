CREATE TYPE "public"."event_kind" AS ENUM('progress', 'status');--> statement-breakpoint
CREATE TYPE "public"."role" AS ENUM('viewer', 'engineer', 'reviewer', 'admin');--> statement-breakpoint
CREATE TYPE "public"."run_status" AS ENUM('queued', 'running', 'done', 'failed', 'cancelled');--> statement-breakpoint
CREATE TYPE "public"."shard_status" AS ENUM('queued', 'running', 'done');--> statement-breakpoint
CREATE TABLE "chunk" (
	"run_id" uuid NOT NULL,
	"shard_index" integer NOT NULL,
	"column_name" text NOT NULL,
	"index" integer NOT NULL,
	"count" integer NOT NULL,
	"minimum" double precision,
	"maximum" double precision,
	"data" "bytea" NOT NULL,
	CONSTRAINT "chunk_run_id_column_name_shard_index_index_pk" PRIMARY KEY("run_id","column_name","shard_index","index")
);
--> statement-breakpoint
CREATE TABLE "event" (
	"run_id" uuid NOT NULL,
	"sequence" integer NOT NULL,
	"kind" "event_kind" NOT NULL,
	"data" jsonb NOT NULL,
	"at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "event_run_id_sequence_pk" PRIMARY KEY("run_id","sequence")
);
--> statement-breakpoint
CREATE TABLE "membership" (
	"workspace_id" uuid NOT NULL,
	"user_id" uuid NOT NULL,
	"role" "role" NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "membership_workspace_id_user_id_pk" PRIMARY KEY("workspace_id","user_id")
);
--> statement-breakpoint
CREATE TABLE "netlist" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"workspace_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"title" text NOT NULL,
	"created_by" uuid NOT NULL,
	"latest_revision" integer NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"updated_at" timestamp with time zone DEFAULT now() NOT NULL,
	"archived_at" timestamp with time zone,
	CONSTRAINT "netlist_number" UNIQUE("workspace_id","number")
);
--> statement-breakpoint
CREATE TABLE "revision" (
	"netlist_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"hash" text NOT NULL,
	"text" text NOT NULL,
	"message" text,
	"author_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "revision_netlist_id_number_pk" PRIMARY KEY("netlist_id","number")
);
--> statement-breakpoint
CREATE TABLE "run" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"workspace_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"netlist_id" uuid NOT NULL,
	"revision_number" integer NOT NULL,
	"status" "run_status" DEFAULT 'queued' NOT NULL,
	"plan" jsonb NOT NULL,
	"points" integer NOT NULL,
	"points_done" integer DEFAULT 0 NOT NULL,
	"points_failed" integer DEFAULT 0 NOT NULL,
	"shards_left" integer NOT NULL,
	"last_event" integer DEFAULT 0 NOT NULL,
	"queued_at" timestamp with time zone DEFAULT now() NOT NULL,
	"started_at" timestamp with time zone,
	"finished_at" timestamp with time zone,
	"error" text,
	"requested_by" uuid NOT NULL,
	"engine_version" text NOT NULL,
	CONSTRAINT "run_number" UNIQUE("workspace_id","number")
);
--> statement-breakpoint
CREATE TABLE "session" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"last_seen_at" timestamp with time zone DEFAULT now() NOT NULL,
	"ended_at" timestamp with time zone,
	"user_agent" text,
	"address" text
);
--> statement-breakpoint
CREATE TABLE "shard" (
	"run_id" uuid NOT NULL,
	"index" integer NOT NULL,
	"from_point" integer NOT NULL,
	"to_point" integer NOT NULL,
	"status" "shard_status" DEFAULT 'queued' NOT NULL,
	"attempt" integer DEFAULT 0 NOT NULL,
	"queued_at" timestamp with time zone DEFAULT now() NOT NULL,
	"claimed_at" timestamp with time zone,
	"claimed_by" text,
	"lease_until" timestamp with time zone,
	"points_under_way" integer DEFAULT 0 NOT NULL,
	"failures" jsonb DEFAULT '[]'::jsonb NOT NULL,
	CONSTRAINT "shard_run_id_index_pk" PRIMARY KEY("run_id","index")
);
--> statement-breakpoint
CREATE TABLE "user" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"email" text NOT NULL,
	"name" text NOT NULL,
	"password_hash" text NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "workspace" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"slug" text NOT NULL,
	"name" text NOT NULL,
	"last_netlist_number" integer DEFAULT 0 NOT NULL,
	"last_run_number" integer DEFAULT 0 NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "workspace_slug_unique" UNIQUE("slug"),
	CONSTRAINT "workspace_slug_form" CHECK ("workspace"."slug" ~ '^[a-z0-9]+(-[a-z0-9]+)*$')
);
--> statement-breakpoint
ALTER TABLE "chunk" ADD CONSTRAINT "chunk_shard" FOREIGN KEY ("run_id","shard_index") REFERENCES "public"."shard"("run_id","index") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "event" ADD CONSTRAINT "event_run_id_run_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."run"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_workspace_id_workspace_id_fk" FOREIGN KEY ("workspace_id") REFERENCES "public"."workspace"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "membership" ADD CONSTRAINT "membership_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "netlist" ADD CONSTRAINT "netlist_workspace_id_workspace_id_fk" FOREIGN KEY ("workspace_id") REFERENCES "public"."workspace"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "netlist" ADD CONSTRAINT "netlist_created_by_user_id_fk" FOREIGN KEY ("created_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_netlist_id_netlist_id_fk" FOREIGN KEY ("netlist_id") REFERENCES "public"."netlist"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "revision" ADD CONSTRAINT "revision_author_id_user_id_fk" FOREIGN KEY ("author_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_workspace_id_workspace_id_fk" FOREIGN KEY ("workspace_id") REFERENCES "public"."workspace"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_netlist_id_netlist_id_fk" FOREIGN KEY ("netlist_id") REFERENCES "public"."netlist"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_requested_by_user_id_fk" FOREIGN KEY ("requested_by") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "run" ADD CONSTRAINT "run_revision" FOREIGN KEY ("netlist_id","revision_number") REFERENCES "public"."revision"("netlist_id","number") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "session" ADD CONSTRAINT "session_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "shard" ADD CONSTRAINT "shard_run_id_run_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."run"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "membership_user" ON "membership" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "netlist_updated" ON "netlist" USING btree ("workspace_id","updated_at");--> statement-breakpoint
CREATE INDEX "revision_hash" ON "revision" USING btree ("netlist_id","hash");--> statement-breakpoint
CREATE INDEX "run_netlist" ON "run" USING btree ("netlist_id","number");--> statement-breakpoint
CREATE INDEX "run_status" ON "run" USING btree ("status");--> statement-breakpoint
CREATE INDEX "session_user" ON "session" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "shard_status" ON "shard" USING btree ("status","queued_at");--> statement-breakpoint
CREATE UNIQUE INDEX "user_email_lower" ON "user" USING btree (lower("email"));