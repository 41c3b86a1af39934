CREATE TABLE "candidate_answers" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"submission_id" uuid NOT NULL,
	"revision_id" uuid NOT NULL,
	"run_id" uuid NOT NULL,
	"claim_id" text NOT NULL,
	"candidate_id" text NOT NULL,
	"reading" integer,
	"clause" text NOT NULL,
	"answer" text NOT NULL,
	"note" text DEFAULT '' NOT NULL,
	"answered_by" uuid NOT NULL,
	"answered_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "candidate_answers_answer_known" CHECK ("answer" in ('confirmed', 'not-so', 'cannot-tell')),
	CONSTRAINT "candidate_answers_lengths" CHECK (char_length("candidate_answers"."note") <= 2000 and char_length("candidate_answers"."clause") <= 2000)
);
--> statement-breakpoint
ALTER TABLE "candidate_answers" ADD CONSTRAINT "candidate_answers_submission_id_submissions_id_fk" FOREIGN KEY ("submission_id") REFERENCES "public"."submissions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "candidate_answers" ADD CONSTRAINT "candidate_answers_revision_id_revisions_id_fk" FOREIGN KEY ("revision_id") REFERENCES "public"."revisions"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "candidate_answers" ADD CONSTRAINT "candidate_answers_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "candidate_answers" ADD CONSTRAINT "candidate_answers_answered_by_users_id_fk" FOREIGN KEY ("answered_by") REFERENCES "public"."users"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "candidate_answers_asked_idx" ON "candidate_answers" USING btree ("submission_id","answered_at");
--> statement-breakpoint
SELECT public.make_append_only('candidate_answers'::regclass);
--> statement-breakpoint
GRANT SELECT, INSERT ON candidate_answers TO counterfoil_web;
