import { database, type Reader } from '@/db/client';
import { listAuthorNames, listEntering, listLiveReferees, listLodgedRuns, listUnderReview } from '@/db/reads/reviews/queue';
import { ok } from '@/lib/kernel/result';
import type { VerdictWord } from '@/lib/pipeline/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { placeInQueue, QUEUE_GROUPS, type QueueFacts, type QueueGroup } from '@/lib/reviews/queue';
import { formatState } from '@/lib/reviews/states';
import type { Outcome } from '@/lib/services/app-error';
import type { QueueRow, QueueView } from './queue-view';

type Submission = Awaited<ReturnType<typeof listUnderReview>>[number];
type Run = Awaited<ReturnType<typeof listLodgedRuns>>[number];

/** The editor's queue: what is needed now, who has the ball, and for how long. */
export async function getQueue(actor: Actor, now: Date = new Date()): Promise<Outcome<QueueView>> {
  const grant = mayGenerally('queue.read', actor);
  if (!grant.ok) return grant;
  const rows = await loadRows(database(), userIdOf(actor) ?? '', now.toISOString());
  const groups = QUEUE_GROUPS.map((group) => ({ group, rows: rows.filter((r) => r.place === group).map((r) => r.row) })).filter((g) => g.rows.length > 0);
  return ok({ total: rows.length, needYou: rows.filter((r) => r.place !== 'waiting').length, groups });
}

interface Placed {
  readonly place: QueueGroup;
  readonly row: QueueRow;
}

async function loadRows(reader: Reader, editorId: string, now: string): Promise<Placed[]> {
  const submissions = await listUnderReview(reader, editorId);
  const ids = submissions.map((s) => s.id);
  if (ids.length === 0) return [];
  const authors = await listAuthorNames(reader, ids);
  const referees = await listLiveReferees(reader, ids);
  const runs = await listLodgedRuns(reader, ids);
  const entering = await listEntering(reader, ids);
  return submissions.flatMap((s) => {
    const run = runs.find((r) => r.submissionId === s.id);
    const facts = factsOf(s, editorId, referees.filter((r) => r.submissionId === s.id), run, entering.find((e) => e.submissionId === s.id && e.revision === run?.revision));
    const place = placeInQueue(facts, now);
    if (!place) return [];
    const own = authors.filter((a) => a.submissionId === s.id);
    const row: QueueRow = {
      submissionId: s.id,
      title: run?.title ?? '',
      authors: own.map((a) => a.name),
      group: own[0]?.affiliation ?? null,
      state: s.state,
      stateWords: formatState(s.state, s.round),
      revision: run?.revision ?? 0,
      verdicts: facts.verdicts.map((v) => v.verdict),
      ball: { with: place.ball.with, you: s.editorId === editorId && place.ball.with === s.editorName, day: place.ball.day, of: place.ball.of },
      because: place.because,
      next: place.next,
    };
    return [{ place: place.group, row }];
  });
}

function factsOf(
  s: Submission,
  editorId: string,
  referees: Awaited<ReturnType<typeof listLiveReferees>>,
  run: Run | undefined,
  entering: { readonly recordId: string | null; readonly refusal: string | null } | undefined,
): QueueFacts {
  return {
    state: s.state,
    round: s.round,
    stateSince: s.since.toISOString(),
    editorName: s.editorName,
    isYours: s.editorId === editorId,
    referees: referees.map((r) => ({
      slot: r.slot,
      state: r.state === 'accepted' ? 'accepted' : 'asked',
      since: (r.answeredAt ?? r.invitedAt).toISOString(),
      hasReported: r.reportId !== null,
    })),
    verdicts: (run?.verdicts ?? []).map((v) => ({ claim: v.claim, verdict: v.verdict as VerdictWord })),
    run: runState(run),
    signing: !entering || s.state !== 'deciding' ? 'not-needed' : entering.refusal !== null ? 'refused' : 'waiting',
  };
}

function runState(run: Run | undefined): QueueFacts['run'] {
  if (!run || run.progress === null) return 'none';
  if (run.outcome === 'measured') return 'finished';
  return run.outcome === 'refused' || run.progress === 'stopped' ? 'stopped' : 'working';
}
