ALTER TABLE "run_results" ADD COLUMN "readings" json;--> statement-breakpoint
ALTER TABLE "runs" ADD COLUMN "otherwise" json;--> statement-breakpoint
ALTER TABLE "runs" ADD CONSTRAINT "runs_otherwise_only_varied" CHECK ("runs"."otherwise" is null or "runs"."kind" = 'variation');