CREATE TABLE "variation_sharings" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"variation_id" uuid NOT NULL,
	"readable" boolean NOT NULL,
	"at" timestamp with time zone DEFAULT clock_timestamp() NOT NULL
);
--> statement-breakpoint
ALTER TABLE "variations" ADD COLUMN "base_run_id" uuid;--> statement-breakpoint
ALTER TABLE "variation_sharings" ADD CONSTRAINT "variation_sharings_variation_id_variations_id_fk" FOREIGN KEY ("variation_id") REFERENCES "public"."variations"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "variation_sharings_last_idx" ON "variation_sharings" USING btree ("variation_id","at");--> statement-breakpoint
ALTER TABLE "variations" ADD CONSTRAINT "variations_base_run_id_runs_id_fk" FOREIGN KEY ("base_run_id") REFERENCES "public"."runs"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
SELECT public.make_append_only('variation_sharings'::regclass);
--> statement-breakpoint
GRANT SELECT, INSERT ON variation_sharings TO counterfoil_web;
