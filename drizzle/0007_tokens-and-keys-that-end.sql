CREATE TABLE "api_tokens" (
	"id" uuid PRIMARY KEY DEFAULT gen_random_uuid() NOT NULL,
	"user_id" uuid NOT NULL,
	"name" text NOT NULL,
	"hint" text NOT NULL,
	"secret_digest" text NOT NULL,
	"scopes" text[] NOT NULL,
	"created_at" timestamp with time zone DEFAULT now() NOT NULL,
	"expires_at" timestamp with time zone NOT NULL,
	"last_used_at" timestamp with time zone,
	"revoked_at" timestamp with time zone,
	CONSTRAINT "api_tokens_secret_digest_unique" UNIQUE("secret_digest"),
	CONSTRAINT "api_tokens_digest_whole" CHECK ("api_tokens"."secret_digest" ~ '^[0-9a-f]{64}$'),
	CONSTRAINT "api_tokens_scopes_known" CHECK (cardinality("scopes") > 0 and "scopes" <@ array['read', 'draft', 'lodge', 'review'])
);
--> statement-breakpoint
ALTER TABLE "api_tokens" ADD CONSTRAINT "api_tokens_user_id_users_id_fk" FOREIGN KEY ("user_id") REFERENCES "public"."users"("id") ON DELETE cascade ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "api_tokens_user_id_idx" ON "api_tokens" USING btree ("user_id");--> statement-breakpoint
CREATE INDEX "idempotency_keys_created_idx" ON "idempotency_keys" USING btree ("created_at");--> statement-breakpoint
-- Using a token and revoking it are the only changes of a row; removing one would take a name from the audit trail.
GRANT SELECT, INSERT ON api_tokens TO counterfoil_web;
--> statement-breakpoint
GRANT UPDATE (last_used_at, revoked_at) ON api_tokens TO counterfoil_web;
--> statement-breakpoint
-- A kept answer holds for a day and is then let go, so that its key is free again.
CREATE FUNCTION public.refuse_change_within_a_day() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF TG_OP = 'DELETE' AND OLD.created_at < now() - interval '24 hours' THEN
    RETURN OLD;
  END IF;
  RAISE EXCEPTION 'a kept answer holds for a day and is never changed' USING ERRCODE = 'insufficient_privilege';
END $$;
--> statement-breakpoint
DROP TRIGGER append_only_rows ON idempotency_keys;
--> statement-breakpoint
CREATE TRIGGER append_only_rows BEFORE UPDATE OR DELETE ON idempotency_keys FOR EACH ROW EXECUTE FUNCTION public.refuse_change_within_a_day();
--> statement-breakpoint
GRANT DELETE ON idempotency_keys TO counterfoil_web;
