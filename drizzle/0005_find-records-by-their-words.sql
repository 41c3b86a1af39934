CREATE TABLE "register_claims" (
	"record_id" text NOT NULL,
	"position" integer NOT NULL,
	"claim_id" text NOT NULL,
	"quantity" text NOT NULL,
	"verdict" text NOT NULL,
	"noise" text NOT NULL,
	CONSTRAINT "register_claims_record_id_position_pk" PRIMARY KEY("record_id","position")
);
--> statement-breakpoint
CREATE TABLE "register_entries" (
	"record_id" text PRIMARY KEY NOT NULL,
	"title" text NOT NULL,
	"authors" text[] NOT NULL,
	"entered_at" timestamp with time zone NOT NULL,
	"entered_on" date NOT NULL,
	"search" "tsvector" NOT NULL
);
--> statement-breakpoint
ALTER TABLE "register_claims" ADD CONSTRAINT "register_claims_record_id_register_entries_record_id_fk" FOREIGN KEY ("record_id") REFERENCES "public"."register_entries"("record_id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
ALTER TABLE "register_entries" ADD CONSTRAINT "register_entries_record_id_records_id_fk" FOREIGN KEY ("record_id") REFERENCES "public"."records"("id") ON DELETE restrict ON UPDATE no action;--> statement-breakpoint
CREATE INDEX "register_claims_words_idx" ON "register_claims" USING btree ("quantity","verdict","noise");--> statement-breakpoint
CREATE INDEX "register_entries_search_idx" ON "register_entries" USING gin ("search");--> statement-breakpoint
CREATE INDEX "register_entries_entered_idx" ON "register_entries" USING btree ("entered_at","record_id");--> statement-breakpoint
SELECT public.make_append_only(t) FROM unnest(ARRAY['register_entries', 'register_claims']::regclass[]) AS t;
--> statement-breakpoint
-- Draws an entry from what was signed, and from the sheet and statement it was signed for. `json`, not `jsonb`:
-- only the fields that are asked for are read, so nothing else in a document can stop an entry.
CREATE FUNCTION public.put_in_register(entered records) RETURNS void LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
DECLARE
  document json := convert_from(entered.document, 'UTF8')::json;
  sheet json := (SELECT r.sheet FROM decisions d JOIN runs r ON r.id = d.run_id WHERE d.id = entered.decision_id);
  statement text := (SELECT v.statement FROM revisions v WHERE v.submission_id = entered.submission_id AND v.number = entered.revision);
  names text[] := ARRAY(SELECT json_array_elements_text(document->'authors'));
  quantities text := (SELECT string_agg(DISTINCT c->>'quantity', ' ') FROM json_array_elements(document->'claims') c);
BEGIN
  INSERT INTO register_entries (record_id, title, authors, entered_at, entered_on, search)
  VALUES (
    entered.id, document->>'title', names, entered.entered_at, (document->>'enteredAt')::date,
    setweight(to_tsvector('english', document->>'title'), 'A')
      -- Names as they are too: some are words that the language leaves out, such as Will or May.
      || setweight(to_tsvector('simple', array_to_string(names, ', ')), 'B') || setweight(to_tsvector('english', array_to_string(names, ', ')), 'B')
      || setweight(to_tsvector('english', replace(quantities, '-', ' ')), 'C')
      -- A vector holds one megabyte; a statement of this length stays well below.
      || setweight(to_tsvector('english', left(coalesce(statement, ''), 100000)), 'D')
  );
  INSERT INTO register_claims (record_id, position, claim_id, quantity, verdict, noise)
  SELECT entered.id, c.place, c.claim->>'id', c.claim->>'quantity', c.claim->>'verdict',
         coalesce((SELECT CASE WHEN s->>'noise' IS NULL THEN 'none' ELSE coalesce(sheet->'noise'->(s->>'noise')->>'curve', 'attached') END
                     FROM json_array_elements(sheet->'claims') s WHERE s->>'id' = c.claim->>'id' LIMIT 1), 'none')
    FROM json_array_elements(document->'claims') WITH ORDINALITY AS c(claim, place);
END $$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION public.put_in_register(records) FROM PUBLIC;
--> statement-breakpoint
CREATE FUNCTION public.put_new_record_in_register() RETURNS trigger LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
BEGIN
  PERFORM put_in_register(NEW);
  RETURN NULL;
END $$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION public.put_new_record_in_register() FROM PUBLIC;
--> statement-breakpoint
CREATE TRIGGER entered_records_are_found AFTER INSERT ON records FOR EACH ROW EXECUTE FUNCTION public.put_new_record_in_register();
--> statement-breakpoint
-- Records that were entered before.
SELECT public.put_in_register(r) FROM records r ORDER BY r.entered_at;
--> statement-breakpoint
GRANT SELECT ON register_entries, register_claims TO counterfoil_web;
