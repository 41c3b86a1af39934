CREATE TABLE "comments" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"thread_id" uuid NOT NULL,
	"writer_id" uuid NOT NULL,
	"side" text NOT NULL,
	"body" text NOT NULL,
	"variation_id" uuid,
	"written_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "comments_variation_attached_once" UNIQUE("variation_id"),
	CONSTRAINT "comments_side_known" CHECK ("side" in ('authors', 'referee', 'editor'))
);
--> statement-breakpoint
CREATE TABLE "decisions" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"submission_id" uuid NOT NULL,
	"round" integer NOT NULL,
	"revision" integer NOT NULL,
	"attempt" integer DEFAULT 1 NOT NULL,
	"kind" text NOT NULL,
	"level" integer,
	"remarks" json DEFAULT '[]'::json NOT NULL,
	"covers" json DEFAULT '[]'::json NOT NULL,
	"run_id" uuid,
	"letter" json NOT NULL,
	"public_sentence" text DEFAULT '' NOT NULL,
	"decided_by" uuid NOT NULL,
	"decided_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "decisions_one_live" UNIQUE("submission_id","revision","attempt"),
	CONSTRAINT "decisions_kind_known" CHECK ("kind" in ('back-with-author', 'set-aside', 'enter')),
	CONSTRAINT "decisions_level" CHECK (("decisions"."kind" = 'enter') = ("decisions"."level" is not null) and ("decisions"."level" is null or "decisions"."level" between 1 and 3)),
	CONSTRAINT "decisions_entered_run" CHECK ("decisions"."kind" <> 'enter' or "decisions"."run_id" is not null)
);
--> statement-breakpoint
CREATE TABLE "assignments" (
	"submission_id" uuid PRIMARY KEY NOT NULL,
	"editor_id" uuid NOT NULL,
	"taken_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "invitations" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"submission_id" uuid NOT NULL,
	"referee_id" uuid NOT NULL,
	"invited_by" uuid NOT NULL,
	"slot" text NOT NULL,
	"state" text DEFAULT 'asked' NOT NULL,
	"flags" json DEFAULT '[]'::json NOT NULL,
	"reason" text,
	"stated_no_conflict" text,
	"invited_at" timestamp with time zone DEFAULT now() NOT NULL,
	"answered_at" timestamp with time zone,
	CONSTRAINT "invitations_slot" UNIQUE("submission_id","slot"),
	CONSTRAINT "invitations_state_known" CHECK ("state" in ('asked', 'accepted', 'declined', 'lapsed', 'relieved')),
	CONSTRAINT "invitations_answered" CHECK (("invitations"."state" = 'asked') = ("invitations"."answered_at" is null))
);
--> statement-breakpoint
CREATE TABLE "outbox" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"message_id" text NOT NULL,
	"dedupe_key" text NOT NULL,
	"recipient" text NOT NULL,
	"subject" text NOT NULL,
	"body" text NOT NULL,
	"headers" json DEFAULT '{}'::json NOT NULL,
	"state" text DEFAULT 'waiting' NOT NULL,
	"attempts" integer DEFAULT 0 NOT NULL,
	"last_error" text,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"due_at" timestamp with time zone DEFAULT now() NOT NULL,
	"sent_at" timestamp with time zone,
	CONSTRAINT "outbox_message_id_unique" UNIQUE("message_id"),
	CONSTRAINT "outbox_once" UNIQUE("dedupe_key"),
	CONSTRAINT "outbox_state_known" CHECK ("state" in ('waiting', 'sent', 'given-up'))
);
--> statement-breakpoint
CREATE TABLE "record_standings" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"record_id" text NOT NULL,
	"standing" text NOT NULL,
	"reason" text DEFAULT '' NOT NULL,
	"set_by" uuid,
	"since" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "record_standings_known" CHECK ("standing" in ('entered', 'under-recheck', 'superseded', 'lapsed', 'struck'))
);
--> statement-breakpoint
CREATE TABLE "records" (
	"id" text PRIMARY KEY NOT NULL,
	"submission_id" uuid NOT NULL,
	"decision_id" uuid NOT NULL,
	"revision" integer NOT NULL,
	"level" integer NOT NULL,
	"document" "bytea" NOT NULL,
	"signature" "bytea" NOT NULL,
	"document_digest" text NOT NULL,
	"key_id" text NOT NULL,
	"entered_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "records_decision_id_unique" UNIQUE("decision_id"),
	CONSTRAINT "records_one_per_revision" UNIQUE("submission_id","revision")
);
--> statement-breakpoint
CREATE TABLE "signing_keys" (
	"id" text PRIMARY KEY NOT NULL,
	"public_key" text NOT NULL,
	"first_used_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "signing_refusals" (
	"decision_id" uuid PRIMARY KEY NOT NULL,
	"code" text NOT NULL,
	"reason" text NOT NULL,
	"refused_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "editor_notes" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"submission_id" uuid NOT NULL,
	"writer_id" uuid NOT NULL,
	"body" text NOT NULL,
	"written_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
CREATE TABLE "reports" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"submission_id" uuid NOT NULL,
	"referee_id" uuid NOT NULL,
	"slot" text NOT NULL,
	"round" integer NOT NULL,
	"revision" integer NOT NULL,
	"answers" json NOT NULL,
	"recommendation" text NOT NULL,
	"confidence" integer NOT NULL,
	"handed_in_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "reports_once_per_round" UNIQUE("submission_id","referee_id","round"),
	CONSTRAINT "reports_recommendation_known" CHECK ("recommendation" in ('enter-1', 'enter-2', 'enter-3', 'minor', 'major', 'set-aside', 'outside')),
	CONSTRAINT "reports_confidence_in_range" CHECK ("reports"."confidence" between 1 and 5)
);
--> statement-breakpoint
CREATE TABLE "threads" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"submission_id" uuid NOT NULL,
	"kind" text NOT NULL,
	"state" text DEFAULT 'open' NOT NULL,
	"visibility" text NOT NULL,
	"anchor" json NOT NULL,
	"anchored" json NOT NULL,
	"opened_on_revision" integer NOT NULL,
	"opened_by" uuid NOT NULL,
	"opened_at" timestamp with time zone DEFAULT now() NOT NULL,
	"closed_by" uuid,
	"closed_at" timestamp with time zone,
	CONSTRAINT "threads_kind_known" CHECK ("kind" in ('question', 'must-change', 'should-change', 'note')),
	CONSTRAINT "threads_state_known" CHECK ("state" in ('open', 'answered', 'resolved', 'overruled', 'moot')),
	CONSTRAINT "threads_visibility_known" CHECK ("visibility" in ('editor-only', 'referees', 'authors'))
);
--> statement-breakpoint
ALTER TABLE "comments" ADD CONSTRAINT "comments_thread_id_threads_id_fk" FOREIGN KEY ("thread_id") REFERENCES "public"."threads"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "comments" ADD CONSTRAINT "comments_writer_id_users_id_fk" FOREIGN KEY ("writer_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "comments" ADD CONSTRAINT "comments_variation_id_variations_id_fk" FOREIGN KEY ("variation_id") REFERENCES "public"."variations"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decisions" ADD CONSTRAINT "decisions_submission_id_submissions_id_fk" FOREIGN KEY ("submission_id") REFERENCES "public"."submissions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decisions" ADD CONSTRAINT "decisions_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "decisions" ADD CONSTRAINT "decisions_decided_by_users_id_fk" FOREIGN KEY ("decided_by") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "assignments" ADD CONSTRAINT "assignments_submission_id_submissions_id_fk" FOREIGN KEY ("submission_id") REFERENCES "public"."submissions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "assignments" ADD CONSTRAINT "assignments_editor_id_users_id_fk" FOREIGN KEY ("editor_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_submission_id_submissions_id_fk" FOREIGN KEY ("submission_id") REFERENCES "public"."submissions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_referee_id_users_id_fk" FOREIGN KEY ("referee_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "invitations" ADD CONSTRAINT "invitations_invited_by_users_id_fk" FOREIGN KEY ("invited_by") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "record_standings" ADD CONSTRAINT "record_standings_record_id_records_id_fk" FOREIGN KEY ("record_id") REFERENCES "public"."records"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "record_standings" ADD CONSTRAINT "record_standings_set_by_users_id_fk" FOREIGN KEY ("set_by") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "records" ADD CONSTRAINT "records_submission_id_submissions_id_fk" FOREIGN KEY ("submission_id") REFERENCES "public"."submissions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "records" ADD CONSTRAINT "records_decision_id_decisions_id_fk" FOREIGN KEY ("decision_id") REFERENCES "public"."decisions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "records" ADD CONSTRAINT "records_key_id_signing_keys_id_fk" FOREIGN KEY ("key_id") REFERENCES "public"."signing_keys"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "signing_refusals" ADD CONSTRAINT "signing_refusals_decision_id_decisions_id_fk" FOREIGN KEY ("decision_id") REFERENCES "public"."decisions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "editor_notes" ADD CONSTRAINT "editor_notes_submission_id_submissions_id_fk" FOREIGN KEY ("submission_id") REFERENCES "public"."submissions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "editor_notes" ADD CONSTRAINT "editor_notes_writer_id_users_id_fk" FOREIGN KEY ("writer_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_submission_id_submissions_id_fk" FOREIGN KEY ("submission_id") REFERENCES "public"."submissions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "reports" ADD CONSTRAINT "reports_referee_id_users_id_fk" FOREIGN KEY ("referee_id") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "threads" ADD CONSTRAINT "threads_submission_id_submissions_id_fk" FOREIGN KEY ("submission_id") REFERENCES "public"."submissions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "threads" ADD CONSTRAINT "threads_opened_by_users_id_fk" FOREIGN KEY ("opened_by") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "threads" ADD CONSTRAINT "threads_closed_by_users_id_fk" FOREIGN KEY ("closed_by") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "comments_thread_idx" ON "comments" USING btree ("thread_id","written_at");--> statement-breakpoint
CREATE INDEX "assignments_editor_idx" ON "assignments" USING btree ("editor_id");--> statement-breakpoint
CREATE UNIQUE INDEX "invitations_once_live" ON "invitations" USING btree ("submission_id","referee_id") WHERE "invitations"."state" in ('asked', 'accepted');--> statement-breakpoint
CREATE INDEX "invitations_referee_idx" ON "invitations" USING btree ("referee_id","state");--> statement-breakpoint
CREATE INDEX "outbox_due_idx" ON "outbox" USING btree ("state","due_at");--> statement-breakpoint
CREATE INDEX "record_standings_record_idx" ON "record_standings" USING btree ("record_id","since");--> statement-breakpoint
CREATE INDEX "records_entered_idx" ON "records" USING btree ("entered_at");--> statement-breakpoint
CREATE INDEX "editor_notes_submission_idx" ON "editor_notes" USING btree ("submission_id","written_at");--> statement-breakpoint
CREATE INDEX "threads_submission_idx" ON "threads" USING btree ("submission_id","opened_at");