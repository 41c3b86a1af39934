CREATE TABLE "run_stops" (
	"run_id" uuid PRIMARY KEY NOT NULL,
	"asked_at" timestamp with time zone DEFAULT now() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "run_stops" ADD CONSTRAINT "run_stops_run_id_runs_id_fk" FOREIGN KEY ("run_id") REFERENCES "public"."runs"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
SELECT public.make_append_only('run_stops'::regclass);
--> statement-breakpoint
GRANT SELECT, INSERT ON run_stops TO counterfoil_web;
--> statement-breakpoint
GRANT SELECT ON run_stops TO counterfoil_worker;
