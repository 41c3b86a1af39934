-- Who may touch which table, and which rows can never change.
-- The owner migrates; web, worker and signer hold no right that is not written here.

CREATE FUNCTION public.refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  -- Owner only, for migrations: not superusers, whose accidents count too.
  IF current_user = (SELECT pg_get_userbyid(relowner) FROM pg_class WHERE oid = TG_RELID) THEN
    RETURN COALESCE(NEW, OLD);
  END IF;
  RAISE EXCEPTION 'rows of % are never changed or removed', TG_TABLE_NAME USING ERRCODE = 'insufficient_privilege';
END $$;
--> statement-breakpoint
-- Later migrations call this for their own append-only tables.
CREATE FUNCTION public.make_append_only(target regclass) RETURNS void LANGUAGE plpgsql AS $$
BEGIN
  EXECUTE format('CREATE TRIGGER append_only_rows BEFORE UPDATE OR DELETE ON %s FOR EACH ROW EXECUTE FUNCTION public.refuse_change()', target);
  EXECUTE format('CREATE TRIGGER append_only_table BEFORE TRUNCATE ON %s FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change()', target);
END $$;
--> statement-breakpoint
REVOKE ALL ON FUNCTION public.make_append_only(regclass) FROM PUBLIC;
--> statement-breakpoint
SELECT public.make_append_only(t) FROM unnest(ARRAY[
  'audit_entries', 'stored_files', 'runs', 'run_results', 'variations', 'failed_jobs', 'idempotency_keys'
]::regclass[]) AS t;
--> statement-breakpoint
-- A lodged revision is frozen for every role, the owner's included: there is no honest reason to touch it.
CREATE FUNCTION public.refuse_change_after_lodging() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF TG_OP <> 'UPDATE' OR OLD.lodged_at IS NOT NULL THEN
    RAISE EXCEPTION 'revision % is lodged and never changes', OLD.number USING ERRCODE = 'insufficient_privilege';
  END IF;
  RETURN NEW;
END $$;
--> statement-breakpoint
CREATE TRIGGER lodged_revisions_stand BEFORE UPDATE OR DELETE ON revisions
  FOR EACH ROW EXECUTE FUNCTION public.refuse_change_after_lodging();
--> statement-breakpoint
CREATE TRIGGER revisions_not_emptied BEFORE TRUNCATE ON revisions
  FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();
--> statement-breakpoint
-- SECURITY DEFINER: whoever adds or removes a file, the rule reads the revision itself. The row is locked,
-- so that a file cannot slip in beside the transaction that lodges.
CREATE FUNCTION public.refuse_files_after_lodging() RETURNS trigger LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
DECLARE lodged timestamptz;
BEGIN
  SELECT lodged_at INTO lodged FROM revisions
   WHERE id = CASE WHEN TG_OP = 'INSERT' THEN NEW.revision_id ELSE OLD.revision_id END FOR SHARE;
  IF lodged IS NOT NULL OR TG_OP = 'UPDATE' THEN
    RAISE EXCEPTION 'the files of a lodged revision never change' USING ERRCODE = 'insufficient_privilege';
  END IF;
  RETURN COALESCE(NEW, OLD);
END $$;
--> statement-breakpoint
CREATE TRIGGER lodged_files_stand BEFORE INSERT OR UPDATE OR DELETE ON revision_files
  FOR EACH ROW EXECUTE FUNCTION public.refuse_files_after_lodging();
--> statement-breakpoint
CREATE TRIGGER revision_files_not_emptied BEFORE TRUNCATE ON revision_files
  FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();
--> statement-breakpoint
GRANT USAGE ON SCHEMA public TO counterfoil_web, counterfoil_worker, counterfoil_signer;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON users, submissions, revisions, submission_people TO counterfoil_web;
--> statement-breakpoint
GRANT DELETE ON submission_people TO counterfoil_web;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE, DELETE ON sessions, accounts, verifications, rate_limits, rate_points TO counterfoil_web;
--> statement-breakpoint
GRANT SELECT, INSERT, DELETE ON revision_files TO counterfoil_web;
--> statement-breakpoint
GRANT SELECT, INSERT ON audit_entries, stored_files, runs, variations, idempotency_keys TO counterfoil_web;
--> statement-breakpoint
GRANT SELECT ON run_results, failed_jobs TO counterfoil_web;
--> statement-breakpoint
GRANT SELECT, INSERT ON run_progress TO counterfoil_web;
--> statement-breakpoint
-- The worker sees what it computes and where that stands; not people, variations or the audit trail.
GRANT SELECT ON runs TO counterfoil_worker;
--> statement-breakpoint
GRANT SELECT, INSERT ON run_results, failed_jobs TO counterfoil_worker;
--> statement-breakpoint
GRANT SELECT, INSERT, UPDATE ON run_progress TO counterfoil_worker;
--> statement-breakpoint
GRANT SELECT (id, state, round, current_revision) ON submissions TO counterfoil_worker;
--> statement-breakpoint
GRANT UPDATE (state, state_changed_at, updated_at) ON submissions TO counterfoil_worker;
--> statement-breakpoint
GRANT SELECT (id, submission_id, number, lodged_at) ON revisions TO counterfoil_worker;
--> statement-breakpoint
GRANT INSERT ON audit_entries TO counterfoil_worker;
--> statement-breakpoint
-- The signer reads what it re-hashes and the names it prints.
GRANT SELECT ON submissions, revisions, submission_people, stored_files, revision_files, runs, run_results TO counterfoil_signer;
--> statement-breakpoint
GRANT SELECT (id, name, affiliation) ON users TO counterfoil_signer;
--> statement-breakpoint
GRANT INSERT ON audit_entries TO counterfoil_signer;
