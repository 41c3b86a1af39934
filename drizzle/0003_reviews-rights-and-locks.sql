-- Who may touch what people say, decide and publish, and which of it can never change.

SELECT public.make_append_only(t) FROM unnest(ARRAY[
  'comments', 'reports', 'editor_notes', 'decisions', 'records', 'signing_keys', 'record_standings', 'signing_refusals'
]::regclass[]) AS t;
--> statement-breakpoint
-- A thread moves, but where it hangs, what it asks and who reads it are fixed when it is opened.
CREATE FUNCTION public.refuse_moving_a_thread() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF TG_OP = 'UPDATE' AND (NEW.id, NEW.submission_id, NEW.kind, NEW.visibility, NEW.anchor::text, NEW.anchored::text, NEW.opened_on_revision, NEW.opened_by, NEW.opened_at)
     IS NOT DISTINCT FROM (OLD.id, OLD.submission_id, OLD.kind, OLD.visibility, OLD.anchor::text, OLD.anchored::text, OLD.opened_on_revision, OLD.opened_by, OLD.opened_at) THEN
    RETURN NEW;
  END IF;
  RAISE EXCEPTION 'a thread is never moved or removed' USING ERRCODE = 'insufficient_privilege';
END $$;
--> statement-breakpoint
CREATE TRIGGER threads_stand BEFORE UPDATE OR DELETE ON threads FOR EACH ROW EXECUTE FUNCTION public.refuse_moving_a_thread();
--> statement-breakpoint
CREATE TRIGGER threads_not_emptied BEFORE TRUNCATE ON threads FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();
--> statement-breakpoint
-- An invitation is answered; who was asked, as which letter and in spite of what, is fixed.
CREATE FUNCTION public.refuse_changing_an_invitation() RETURNS trigger LANGUAGE plpgsql AS $$
BEGIN
  IF TG_OP = 'UPDATE' AND (NEW.id, NEW.submission_id, NEW.referee_id, NEW.invited_by, NEW.slot, NEW.flags::text, NEW.reason, NEW.invited_at)
     IS NOT DISTINCT FROM (OLD.id, OLD.submission_id, OLD.referee_id, OLD.invited_by, OLD.slot, OLD.flags::text, OLD.reason, OLD.invited_at) THEN
    RETURN NEW;
  END IF;
  RAISE EXCEPTION 'an invitation is answered, never changed or removed' USING ERRCODE = 'insufficient_privilege';
END $$;
--> statement-breakpoint
CREATE TRIGGER invitations_stand BEFORE UPDATE OR DELETE ON invitations FOR EACH ROW EXECUTE FUNCTION public.refuse_changing_an_invitation();
--> statement-breakpoint
CREATE TRIGGER invitations_not_emptied BEFORE TRUNCATE ON invitations FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();
--> statement-breakpoint
GRANT SELECT, INSERT ON assignments, invitations, threads, comments, reports, editor_notes, decisions, record_standings TO counterfoil_web;
--> statement-breakpoint
GRANT UPDATE (state, answered_at, stated_no_conflict) ON invitations TO counterfoil_web;
--> statement-breakpoint
GRANT UPDATE (state, closed_by, closed_at) ON threads TO counterfoil_web;
--> statement-breakpoint
GRANT SELECT ON records, signing_keys, signing_refusals TO counterfoil_web;
--> statement-breakpoint
GRANT SELECT, INSERT ON outbox TO counterfoil_web;
--> statement-breakpoint
-- The worker delivers mail that was written for it; it cannot read who referees, says or decides what.
GRANT SELECT ON outbox TO counterfoil_worker;
--> statement-breakpoint
GRANT UPDATE (recipient, subject, body, state, attempts, last_error, due_at, sent_at) ON outbox TO counterfoil_worker;
--> statement-breakpoint
-- The signer reads the decision and counts reports by their letters; a referee's identity is beyond it.
GRANT SELECT ON decisions, record_standings TO counterfoil_signer;
--> statement-breakpoint
GRANT SELECT (id, submission_id, slot, round, revision, recommendation) ON reports TO counterfoil_signer;
--> statement-breakpoint
GRANT SELECT, INSERT ON records, signing_keys, signing_refusals TO counterfoil_signer;
--> statement-breakpoint
GRANT INSERT ON record_standings TO counterfoil_signer;
--> statement-breakpoint
GRANT UPDATE (state, state_changed_at, updated_at) ON submissions TO counterfoil_signer;
