import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { database } from '@/db/client';
import { askStop } from '@/db/writes/runs/ask-stop';
import { err } from '@/lib/kernel/result';
import type { SignedInActor } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';
import { stopRun } from '@/lib/services/runs/stop-run';
import { updateDraft } from '@/lib/services/submissions/update-draft';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { getReview } from '@/lib/services/submissions/get-lodged';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { requestVariation } from '@/lib/services/variations/request-variation';
import { createS3Store } from '@/lib/storage/s3-store';
import type { ComputeSheet } from '@/lib/worker/compute';
import { runSubmission } from '@/lib/worker/handlers/run-submission';
import { STOPPED } from '@/lib/worker/threads/run-sheet';
import { draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let author: SignedInActor;
let referee: SignedInActor;
let id: string;

beforeAll(async () => {
  desk = await openServiceDesk();
  [author, referee] = [await desk.person('T. Marrable'), await desk.person('S. Vasterling')];
  id = await draftWithBursts(author);
});
afterAll(() => desk.close());

const run = (runId: string, compute: ComputeSheet) =>
  runSubmission({ runId }, { database: desk.worker, store: createS3Store(desk.store.env), mail: { SMTP_URL: 'smtp://127.0.0.1:9', MAIL_FROM: 'x@y.example' }, compute, signal: new AbortController().signal }, 1);

/** A computation that would never end by itself. */
const endless: ComputeSheet = (_, { stop }) => new Promise((resolve) => stop?.addEventListener('abort', () => resolve(err([STOPPED]))));

describe('a run that is wanted no longer', () => {
  it('never begins when it was still waiting, and the draft is its author’s again', async () => {
    const { runId } = must(await checkDraft(author, id));
    must(await stopRun(author, id, runId));
    must(await stopRun(author, id, runId));
    await desk.runAll();
    expect(must(await getDraft(author, id))).toMatchObject({ state: 'draft', check: { run: { id: runId, state: 'stopped' } } });
    expect(await desk.sql('select 1 from run_results')).toEqual([]);
    expect(await stopRun(author, id, runId)).toMatchObject({ ok: false, error: { code: 'conflict' } });
  });

  it('ends in the middle of its computation, and leaves no number', async () => {
    const { runId } = must(await checkDraft(author, id));
    const running = run(runId, endless);
    must(await stopRun(author, id, runId));
    await running;
    const { state, check } = must(await getDraft(author, id));
    expect({ state, run: check?.run.state, because: check?.run.state === 'stopped' && check.run.because }).toEqual({ state: 'draft', run: 'stopped', because: expect.stringContaining('Nothing was kept') });
  });

  it('is asked for again as if nothing had been', async () => {
    const { runId } = must(await checkDraft(author, id));
    await desk.runAll();
    expect(must(await getDraft(author, id)).check?.run).toMatchObject({ id: runId, state: 'measured' });
  });
});

describe('the numbers of the check before', () => {
  const allow = async (tolerance: unknown): Promise<void> => {
    const { revision: { version, title, statement, sheet: { waveforms, noise, claims } } } = must(await getDraft(author, id));
    must(await updateDraft(author, id, { version, title, statement, sheet: { waveforms, noise, claims: claims.map((claim) => ({ ...claim, tolerance })) } as never }));
  };

  it('stand where a later one is stopped, with who stopped it, and count again for the save they are of', async () => {
    const { revision: { sheet: { claims: [claim] } }, check: first } = must(await getDraft(author, id));
    await allow(0.4);
    const { runId } = must(await checkDraft(author, id));
    must(await stopRun(author, id, runId));
    await desk.runAll();
    const stopped = must(await getDraft(author, id));
    expect(stopped.check).toMatchObject({ run: { id: runId, state: 'stopped', stoppedAt: expect.stringMatching(/^20/) }, current: true, stoppedBy: 'T. Marrable', before: { run: { id: first?.run.id, state: 'measured' }, current: false } });
    expect(stopped.beforeLodging).toEqual([expect.stringContaining('of what is saved now')]);
    await allow(claim?.['tolerance']);
    const again = must(await getDraft(author, id));
    expect([again.check, again.beforeLodging]).toEqual([{ run: first?.run, current: true, stoppedBy: null, before: null }, []]);
    expect(must(await checkDraft(author, id))).toEqual({ runId: first?.run.id });
  });
});

describe('a run of others', () => {
  it('is not stopped: a check is its authors’, a variation belongs to who asked, and an official run goes to its end', async () => {
    const variation = must(await requestVariation(author, id, { claimId: 'C1', changes: { settings: { fLowHz: 30 } }, note: '' }));
    expect(await stopRun(referee, id, variation.runId)).toMatchObject({ ok: false, error: { code: 'not-found' } });
    must(await stopRun(author, id, variation.runId));
    await desk.runAll();
    const { runId } = must(await lodgeSubmission(author, id));
    expect(await stopRun(author, id, runId)).toMatchObject({ ok: false, error: { code: 'precondition' } });
    await desk.runAll();
    await desk.sql(`insert into invitations (submission_id, referee_id, invited_by, slot, state, answered_at) values ($1, $2, $2, 'C', 'accepted', now())`, id, referee.userId);
    await desk.sql(`update submissions set state = 'in-review', round = 1 where id = $1`, id);
    const theirs = must(await requestVariation(referee, id, { claimId: 'C1', changes: { settings: { fLowHz: 30 } }, note: '' }));
    expect(await stopRun(author, id, theirs.runId)).toMatchObject({ ok: false, error: { code: 'not-found' } });
    must(await stopRun(referee, id, theirs.runId));
  });

  it('takes no word to stop where it is official or of another submission, whatever a service saw', async () => {
    const grant = { submissionId: id } as SubmissionGrant<'submission.stop-run'>;
    const elsewhere = { submissionId: '00000000-0000-4000-8000-000000000000' } as SubmissionGrant<'submission.stop-run'>;
    const all = await desk.sql('select id, kind from runs') as { readonly id: string; readonly kind: string }[];
    const stopped = async () => (await desk.sql('select run_id from run_stops')).length;
    const before = await stopped();
    await database().transaction(async (tx) => {
      for (const { id: runId, kind } of all) {
        await askStop(tx, elsewhere, runId);
        if (kind === 'official') await askStop(tx, grant, runId);
      }
    });
    expect([all.some(({ kind }) => kind === 'official'), await stopped()]).toEqual([true, before]);
  });

  it('leaves the official numbers in sight where one of a later engine is given up', async () => {
    const before = must(await getReview(author, id));
    const [later] = await desk.sql<{ id: string }>(`insert into runs (submission_id, revision_id, kind, engine, sheet, inputs, inputs_digest) select submission_id, revision_id, kind, '99.0.0', sheet, inputs, inputs_digest from runs where kind = 'official' returning id`);
    await desk.sql(`insert into run_progress (run_id, state, stopped_because) values ($1, 'stopped', 'It broke off.')`, later?.id);
    const { run, laterRun } = must(await getReview(author, id));
    expect([before.laterRun, run, laterRun]).toEqual([null, before.run, expect.objectContaining({ id: later?.id, state: 'stopped', because: 'It broke off.' })]);
  });

  it('leaves a word that the database itself never changes', async () => {
    await desk.sql('grant update, delete on run_stops to counterfoil_web');
    for (const statement of ['update run_stops set asked_at = now()', 'delete from run_stops']) await expect(database().$client.query(statement), statement).rejects.toThrow('never changed or removed');
  });
});
