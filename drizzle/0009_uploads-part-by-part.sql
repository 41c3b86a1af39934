CREATE TABLE "upload_parts" (
	"upload_id" uuid NOT NULL,
	"number" integer NOT NULL,
	"storage_key" text NOT NULL,
	CONSTRAINT "upload_parts_upload_id_number_pk" PRIMARY KEY("upload_id","number"),
	CONSTRAINT "upload_parts_number_not_negative" CHECK ("upload_parts"."number" >= 0)
);
--> statement-breakpoint
CREATE TABLE "uploads" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"submission_id" uuid NOT NULL,
	"user_id" uuid NOT NULL,
	"name" text NOT NULL,
	"bytes" bigint NOT NULL,
	"sha256" text NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	CONSTRAINT "uploads_one_per_name" UNIQUE("submission_id","user_id","name"),
	CONSTRAINT "uploads_sha256_form" CHECK ("uploads"."sha256" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "uploads_bytes_positive" CHECK ("uploads"."bytes" > 0)
);
--> statement-breakpoint
ALTER TABLE "upload_parts" ADD CONSTRAINT "upload_parts_upload_id_uploads_id_fk" FOREIGN KEY ("upload_id") REFERENCES "public"."uploads"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "uploads" ADD CONSTRAINT "uploads_submission_id_submissions_id_fk" FOREIGN KEY ("submission_id") REFERENCES "public"."submissions"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "uploads" ADD CONSTRAINT "uploads_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "uploads_expiry_idx" ON "uploads" USING btree ("expires_at");--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON uploads, upload_parts TO counterfoil_web;
--> statement-breakpoint
-- To go on with an upload is to keep it longer.
GRANT UPDATE (expires_at) ON uploads TO counterfoil_web;
--> statement-breakpoint
-- The worker clears away what nobody came back for; whose it was is not its concern.
GRANT SELECT (id, expires_at), DELETE ON uploads TO counterfoil_worker;
--> statement-breakpoint
GRANT SELECT ON upload_parts TO counterfoil_worker;
