import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SignedInActor } from '@/lib/policy/actor';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { getReview } from '@/lib/services/submissions/get-lodged';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { getFigures, listRuns } from '@/lib/services/runs/list-runs';
import { listVariations } from '@/lib/services/variations/list-variations';
import { requestVariation } from '@/lib/services/variations/request-variation';
import { varySheet } from '@/lib/services/variations/vary-sheet';
import { burstSheet } from '../../support/burst-sheet';
import { draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let author: SignedInActor;
let referee: SignedInActor;
let editor: SignedInActor;
let id: string;

beforeAll(async () => {
  desk = await openServiceDesk();
  [author, referee, editor] = [await desk.person('T. Marrable'), await desk.person('S. Vasterling'), await desk.person('R. Amsel', 'editor')];
  id = await draftWithBursts(author);
  must(await checkDraft(author, id));
  await desk.runAll();
  must(await lodgeSubmission(author, id));
  await desk.runAll();
  await desk.sql(`insert into invitations (submission_id, referee_id, invited_by, slot, state, answered_at) values ($1, $2, $3, 'C', 'accepted', now())`, id, referee.userId, editor.userId);
  await desk.sql(`update submissions set state = 'in-review', round = 1 where id = $1`, id);
});
afterAll(() => desk.close());

const ask = (actor: SignedInActor, changes: Record<string, unknown> = { fLowHz: 30 }) => requestVariation(actor, id, { claimId: 'C1', changes, note: '' });

describe('a variation', () => {
  it('is computed beside the official number, which does not change', async () => {
    const before = must(await getReview(referee, id)).run;
    const { runId } = must(await ask(referee));
    await desk.runAll();
    const { variations, left } = must(await listVariations(referee, id));
    expect(variations).toMatchObject([{ claimId: 'C1', changes: { fLowHz: 30 }, run: { id: runId, kind: 'variation', state: 'measured' } }]);
    expect(left).toBe(59);
    expect(must(await getReview(referee, id)).run).toEqual(before);
    expect(must(await getFigures(referee, id, runId)).runId).toBe(runId);
  });

  it('is seen by the one who asked and by nobody else', async () => {
    const runId = must(await listVariations(referee, id)).variations[0]?.run.id ?? '';
    for (const other of [author, editor]) {
      expect(must(await listVariations(other, id)).variations).toEqual([]);
      expect(must(await listRuns(other, id)).items.map((r) => r.id)).not.toContain(runId);
      expect(await getFigures(other, id, runId)).toMatchObject({ ok: false, error: { code: 'not-found' } });
    }
  });

  it('leaves no trace of who asked where the worker can read, its queue included', async () => {
    await ask(referee, { fLowHz: 40 });
    const seen = await desk.worker.$client.query(`select r::text as row from runs r union all select j::text from graphile_worker._private_jobs j union all select q::text from graphile_worker._private_job_queues q`);
    expect(seen.rows.length).toBeGreaterThan(3);
    for (const { row } of seen.rows as { row: string }[]) expect(row).not.toContain(referee.userId);
  });

  it('waits when three of one person are under way, and ends with the day’s quota', async () => {
    must(await ask(referee, { fHighHz: 900 }));
    must(await ask(referee, { fHighHz: 800 }));
    expect(await ask(referee, { fHighHz: 700 })).toMatchObject({ ok: false, error: { code: 'limit' } });
    must(await ask(editor));
    await desk.runAll();
    await desk.sql(`insert into runs (submission_id, revision_id, kind, engine, sheet, inputs, inputs_digest) select submission_id, revision_id, 'variation', engine, sheet, inputs, inputs_digest from runs, generate_series(1, 60) where kind = 'official'`);
    await desk.sql(`insert into variations (run_id, submission_id, revision_id, claim_id, changes, requested_by) select id, submission_id, revision_id, 'C1', '{}', $1 from runs r where kind = 'variation' and not exists (select 1 from variations v where v.run_id = r.id)`, referee.userId);
    expect(await ask(referee)).toMatchObject({ ok: false, error: { code: 'limit' } });
  });
});

describe('the sheet of a variation', () => {
  const sweep = { ...burstSheet(), claims: [{ ...burstSheet().claims[0], over: { totalMassMsun: [60, 100, 200] }, claimed: ['0.1', '0.2', '0.3'] }, { id: 'C2' }] };

  it('holds the one claim, at one mass, against the value claimed nearest to it', () => {
    const [claim, ...others] = must(varySheet(sweep, 'C1', { totalMassMsun: 110 })).claims;
    expect(others).toEqual([]);
    expect(claim).toMatchObject({ claimed: '0.2', settings: { totalMassMsun: 110, fLowHz: 10, fHighHz: 1900 } });
    expect(claim).not.toHaveProperty('over');
  });

  it('takes a built-in curve or another of the sheet, and refuses one that is not there', () => {
    const built = must(varySheet(sweep, 'C1', { noise: { curve: 'G2' } }));
    expect(built.noise[String(built.claims[0]?.['noise'])]).toEqual({ curve: 'G2' });
    expect(must(varySheet(sweep, 'C1', { noise: { named: 'W' } })).claims[0]).toMatchObject({ noise: 'W' });
    expect(varySheet(sweep, 'C1', { noise: { named: 'Z' } })).toMatchObject({ ok: false, error: { code: 'invalid' } });
    expect(varySheet(sweep, 'C9', { fLowHz: 1 })).toMatchObject({ ok: false, error: { code: 'invalid' } });
  });
});
