CREATE TABLE "kept_answer" (
	"user_id" uuid NOT NULL,
	"key" text NOT NULL,
	"request" text NOT NULL,
	"status" integer,
	"body" jsonb,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "kept_answer_user_id_key_pk" PRIMARY KEY("user_id","key")
);
--> statement-breakpoint
ALTER TABLE "kept_answer" ADD CONSTRAINT "kept_answer_user_id_user_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."user"("id") ON DELETE no action ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "kept_answer_age" ON "kept_answer" USING btree ("created_at");