CREATE TABLE "finding_answers" (
	"revision_id" uuid NOT NULL,
	"code" text NOT NULL,
	"place" text NOT NULL,
	"finding" text NOT NULL,
	"answer" text NOT NULL,
	"answered_at" timestamp with time zone DEFAULT now() NOT NULL,
	CONSTRAINT "finding_answers_revision_id_code_place_finding_pk" PRIMARY KEY("revision_id","code","place","finding"),
	CONSTRAINT "finding_answers_lengths" CHECK (octet_length("finding_answers"."finding") <= 2000 and char_length("finding_answers"."answer") between 1 and 2000)
);
--> statement-breakpoint
ALTER TABLE "finding_answers" ADD CONSTRAINT "finding_answers_revision_id_revisions_id_fk" FOREIGN KEY ("revision_id") REFERENCES "public"."revisions"("id") ON DELETE restrict ON UPDATE no action;
--> statement-breakpoint
-- The revision is locked while it is read, so that an answer cannot slip in beside the transaction that lodges.
CREATE FUNCTION public.refuse_answers_after_lodging() RETURNS trigger LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
DECLARE lodged timestamptz;
BEGIN
  SELECT lodged_at INTO lodged FROM revisions
   WHERE id = CASE WHEN TG_OP = 'INSERT' THEN NEW.revision_id ELSE OLD.revision_id END FOR SHARE;
  IF lodged IS NOT NULL OR TG_OP = 'UPDATE' THEN
    RAISE EXCEPTION 'the answers of a lodged revision never change' USING ERRCODE = 'insufficient_privilege';
  END IF;
  RETURN COALESCE(NEW, OLD);
END $$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION public.refuse_answers_after_lodging() FROM PUBLIC;
--> statement-breakpoint
CREATE TRIGGER lodged_answers_stand BEFORE INSERT OR UPDATE OR DELETE ON finding_answers
  FOR EACH ROW EXECUTE FUNCTION public.refuse_answers_after_lodging();
--> statement-breakpoint
CREATE TRIGGER finding_answers_not_emptied BEFORE TRUNCATE ON finding_answers
  FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();
--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON finding_answers TO counterfoil_web;
