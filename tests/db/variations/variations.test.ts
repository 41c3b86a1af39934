import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { database } from '@/db/client';
import { ENGINE_VERSION } from '@/lib/engine/version';
import { VISITOR, type SignedInActor } from '@/lib/policy/actor';
import { openThread } from '@/lib/services/reviews/open-thread';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { getReview } from '@/lib/services/submissions/get-lodged';
import { updateDraft } from '@/lib/services/submissions/update-draft';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { getFigures, listRuns } from '@/lib/services/runs/list-runs';
import { changesInput } from '@/lib/services/variations/changes';
import { getVariation } from '@/lib/services/variations/get-variation';
import { openByLink } from '@/lib/services/variations/open-by-link';
import { listVariations, pageWithReadings } from '@/lib/services/variations/list-variations';
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

const ask = (actor: SignedInActor, settings: Record<string, unknown> = { fLowHz: 30 }, more: Record<string, unknown> = {}) =>
  requestVariation(actor, id, { claimId: 'C1', changes: { settings }, note: '', ...more });
const VISITOR_SEES_NOTHING = { ok: false, error: { code: 'not-found' } };

describe('a variation', () => {
  it('is computed beside the official number, which does not change', async () => {
    const before = must(await getReview(referee, id)).run;
    const { runId } = must(await ask(referee));
    await desk.runAll();
    const { variations, left } = must(await listVariations(referee, id));
    expect(variations).toMatchObject([{ claimId: 'C1', changes: { settings: { fLowHz: 30 } }, revision: 1, ofDraft: false, visibility: 'private', run: { id: runId, kind: 'variation', state: 'measured' } }]);
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
    await desk.sql(`insert into run_results (run_id, outcome, engine, result, figures, result_digest) select r.id, o.outcome, o.engine, o.result, o.figures, o.result_digest from runs r, run_results o where r.kind = 'variation' and o.run_id = (select id from runs where kind = 'official') and not exists (select 1 from run_results d where d.run_id = r.id)`);
  });
});

describe('a view of one variation', () => {
  it('sets the number beside the official one, and says what it stands on', async () => {
    const [own] = must(await listVariations(referee, id)).variations.toReversed();
    const view = must(await getVariation(referee, own?.id ?? ''));
    const official = must(await getReview(referee, id)).run;
    expect(view).toMatchObject({ claimId: 'C1', changes: { settings: { fLowHz: 30 } }, revision: 1, visibility: 'private', yours: true, mayShare: false, officialRunId: official?.id, engine: ENGINE_VERSION, from: { kind: 'review', id }, run: { state: 'measured', claim: { id: 'C1' } } });
    expect(view.official).toEqual(official?.state === 'measured' ? official.result.claims[0] : null);
  });

  it('is not there for anybody else while it is private, nor for a visitor', async () => {
    const [own] = must(await listVariations(referee, id)).variations;
    for (const other of [author, editor, VISITOR]) expect(await getVariation(other, own?.id ?? '')).toMatchObject(VISITOR_SEES_NOTHING);
    expect(await getVariation(referee, 'b6f1c2de-0a4f-4d55-9d2b-6a1b8f4e0c11')).toMatchObject(VISITOR_SEES_NOTHING);
  });

  it('is seen, with its figures, by those who read the comment it is attached to, and tells them nothing of who asked or when', async () => {
    const [own, other] = must(await listVariations(referee, id)).variations;
    const speak = (visibility: 'authors' | 'referees', variationId: string) => openThread(referee, id, { kind: 'question', visibility, anchor: { claim: 'C1', at: null }, body: 'See the rerun.', variationId });
    must(await speak('authors', own?.id ?? ''));
    must(await speak('referees', other?.id ?? ''));
    const seen = must(await getVariation(author, own?.id ?? ''));
    expect(seen).toMatchObject({ visibility: 'comment', yours: false, mayShare: false, from: { kind: 'submission' } });
    const said = JSON.stringify(seen);
    for (const secret of [referee.userId, referee.name, 'requestedAt', 'finishedAt', own?.requestedAt ?? '?']) expect(said).not.toContain(secret);
    expect(must(await getFigures(author, id, own?.run.id ?? '')).runId).toBe(own?.run.id);
    expect(must(await listRuns(author, id)).items.map((r) => r.id)).not.toContain(own?.run.id);
    expect(await getVariation(author, other?.id ?? '')).toMatchObject(VISITOR_SEES_NOTHING);
    expect(must(await getVariation(editor, other?.id ?? ''))).toMatchObject({ visibility: 'comment' });
  });

  it('reads rows of the first version, in which four things could be changed', async () => {
    const [run] = await desk.sql<{ id: string; revision_id: string }>(`insert into runs (submission_id, revision_id, kind, engine, sheet, inputs, inputs_digest) select submission_id, revision_id, 'variation', engine, sheet, inputs, inputs_digest from runs where kind = 'official' limit 1 returning id, revision_id`);
    await desk.sql(`insert into run_progress (run_id, state) values ($1, 'queued')`, run?.id);
    const [row] = await desk.sql<{ id: string }>(`insert into variations (run_id, submission_id, revision_id, claim_id, changes, requested_by) values ($1, $2, $3, 'C1', '{"fLowHz": 25, "noise": {"curve": "G2"}}', $4) returning id`, run?.id, id, run?.revision_id, author.userId);
    expect(must(await getVariation(author, row?.id ?? ''))).toMatchObject({ changes: { settings: { fLowHz: 25 }, noise: { curve: 'G2' } }, run: { state: 'queued' } });
    await desk.runAll();
  });
});

describe('what may be changed', () => {
  it('is every setting of the quantity, a declared one being taken away by null', async () => {
    const { variationId } = must(await ask(author, { response: 'complex', taper: null, maximise: ['time'] }));
    await desk.runAll();
    const view = must(await getVariation(author, variationId));
    const used = view.run.state === 'measured' ? view.run.claim.settings : [];
    expect(used.find((s) => s.name === 'response')).toMatchObject({ value: 'complex', standing: 'declared' });
    expect(used.find((s) => s.name === 'taper')).toMatchObject({ standing: 'assumed' });
  });

  it('is refused where the sheet would be, at the place in the changes', async () => {
    expect(await ask(author, { average: 'sky' })).toMatchObject({ ok: false, error: { code: 'invalid', problems: [{ where: '/changes/settings/average', saw: 'the setting "average"' }] } });
    expect(await ask(author, { fLowHz: 1950 })).toMatchObject({ ok: false, error: { code: 'invalid', problems: [{ where: '/claims/0/settings/fHighHz', saw: 'an upper edge of 1900 Hz with a lower edge of 1950 Hz' }] } });
    expect(await ask(author, { lMax: null })).toMatchObject({ ok: false, error: { code: 'invalid', problems: [{ where: '/changes/settings/lMax', saw: 'null' }] } });
    expect(await requestVariation(author, id, { claimId: 'C1', changes: { noise: { curve: 'Q7' } }, note: '' })).toMatchObject({ ok: false, error: { code: 'invalid', problems: [{ where: '/changes/noise' }] } });
    expect(changesInput.safeParse({ settings: { fLowHz: -1 } }).success).toBe(false);
    expect(changesInput.safeParse({ settings: { fLow: 20 } }).success).toBe(false);
    expect(changesInput.safeParse({}).success).toBe(false);
  });
});

describe('a convention read otherwise', () => {
  const read = (changes: { readings?: string[]; mask?: { from: number; to: number } }) => requestVariation(author, id, { claimId: 'C1', changes, note: '' });

  it('is one of those that the base run offers, and is kept in its words', async () => {
    const offered = must(await listVariations(author, id, 1)).readings?.['C1'] ?? [];
    const perCent = offered.find((reading) => reading.id === 'C55:per-cent');
    expect(perCent).toEqual({ id: 'C55:per-cent', convention: 'C55', clause: 'it is given in per cent', says: null, factor: 100 });
    const { variationId } = must(await read({ readings: ['C55:per-cent'] }));
    await desk.runAll();
    const view = must(await getVariation(author, variationId));
    expect(view.changes).toEqual({ readings: [{ id: 'C55:per-cent', clause: 'it is given in per cent' }] });
    const [varied, official] = [view.run.state === 'measured' ? view.run.claim.points[0] : undefined, view.official.points[0]];
    expect(varied?.value).toBe(100 * (official?.value ?? Number.NaN));
    expect(varied?.expandedUncertainty).toBe(100 * (official?.expandedUncertainty ?? Number.NaN));
    expect(must(await pageWithReadings(author, id, { limit: 1, claimId: 'C1' })).readings).toEqual(offered);
  });

  it('is refused by name where it is not offered, and told by the run where a setting contradicts it', async () => {
    expect(await read({ readings: ['C20:doubled'] })).toMatchObject({ ok: false, error: { code: 'invalid', problems: [{ where: '/changes/readings/0', saw: 'C20:doubled' }] } });
    for (const changes of [{ readings: ['C02:louder', 'C02:quieter'] }, { readings: ['loud'] }, { mask: { from: 1, to: 1 } }]) expect(changesInput.safeParse(changes).success).toBe(false);
    const { variationId } = must(await read({ mask: { from: 7, to: 8 } }));
    await desk.runAll();
    expect(must(await getVariation(author, variationId)).run).toMatchObject({ state: 'refused', problems: [{ where: '/changes/mask', saw: '7 to 8' }] });
  });

  it('can be of no check and no official run: the database refuses it', async () => {
    await expect(desk.sql(`insert into runs (submission_id, revision_id, kind, engine, sheet, inputs, inputs_digest, otherwise) select submission_id, revision_id, 'check', engine, sheet, inputs, inputs_digest, '{"readings":["C55:per-cent"]}' from runs where kind = 'official' limit 1`)).rejects.toThrow(/runs_otherwise_only_varied/);
  });
});

describe('a variation of a draft', () => {
  it('stands beside the latest check, is its author’s alone, and is never attached or opened', async () => {
    const draft = await draftWithBursts(author);
    const vary = (who: SignedInActor) => requestVariation(who, draft, { claimId: 'C1', changes: { settings: { fLowHz: 30 } }, note: '' });
    expect(await vary(author)).toMatchObject({ ok: false, error: { code: 'precondition' } });
    const { runId } = must(await checkDraft(author, draft));
    await desk.runAll();
    expect(await vary(referee)).toMatchObject(VISITOR_SEES_NOTHING);
    const { variationId } = must(await vary(author));
    await desk.runAll();
    expect(must(await getVariation(author, variationId))).toMatchObject({ ofDraft: true, officialRunId: runId, revision: 1, mayShare: false, from: { kind: 'draft' }, run: { state: 'measured' } });
    must(await lodgeSubmission(author, draft));
    await desk.runAll();
    await desk.sql(`update submissions set state = 'entered' where id = $1`, draft);
    expect(await openByLink(author, draft, variationId, { readable: true })).toMatchObject({ ok: false, error: { code: 'precondition' } });
    await desk.sql(`insert into variation_sharings (variation_id, readable) values ($1, true)`, variationId);
    expect(await getVariation(VISITOR, variationId)).toMatchObject(VISITOR_SEES_NOTHING);
    expect(must(await getVariation(author, variationId))).toMatchObject({ from: { kind: 'submission' } });
  });

  it('waits for a check when the draft has changed', async () => {
    const draft = await draftWithBursts(author);
    must(await checkDraft(author, draft));
    await desk.runAll();
    const [{ version } = { version: 0 }] = await desk.sql<{ version: number }>('select version from revisions where submission_id = $1', draft);
    must(await updateDraft(author, draft, { version, title: 'Another title' }));
    const sheet = burstSheet('0.9');
    must(await updateDraft(author, draft, { version: version + 1, sheet: { claims: sheet.claims as never } }));
    expect(await requestVariation(author, draft, { claimId: 'C1', changes: { settings: { fLowHz: 30 } }, note: '' })).toMatchObject({ ok: false, error: { code: 'precondition' } });
  });
});

describe('a variation of a record', () => {
  it('is asked for by any signed-in reader, and opened to whoever has the link, or shut again, by its owner alone', async () => {
    const reader = await desk.person('P. Lindqvall');
    await desk.sql(`update submissions set state = 'entered' where id = $1`, id);
    expect(await requestVariation(VISITOR, id, { claimId: 'C1', changes: { settings: { fLowHz: 30 } }, note: '' })).toMatchObject({ ok: false, error: { code: 'signed-out' } });
    const { variationId, runId } = must(await ask(reader, { fLowHz: 50 }));
    await desk.runAll();
    expect(must(await getVariation(reader, variationId))).toMatchObject({ visibility: 'private', mayShare: true });
    for (const other of [author, VISITOR]) expect(await getVariation(other, variationId)).toMatchObject(VISITOR_SEES_NOTHING);
    expect(await openByLink(author, id, variationId, { readable: true })).toMatchObject(VISITOR_SEES_NOTHING);
    expect(must(await openByLink(reader, id, variationId, { readable: true }))).toEqual({ visibility: 'link' });
    for (const other of [author, VISITOR]) expect(must(await getVariation(other, variationId))).toMatchObject({ visibility: 'link', yours: false, mayShare: false });
    expect(must(await getFigures(VISITOR, id, runId)).runId).toBe(runId);
    expect(JSON.stringify(must(await getVariation(VISITOR, variationId)))).not.toMatch(new RegExp(`${reader.userId}|${reader.name}|requestedAt`));
    must(await openByLink(reader, id, variationId, { readable: true }));
    must(await openByLink(reader, id, variationId, { readable: false }));
    expect(await desk.sql(`select readable from variation_sharings where variation_id = $1 order by at`, variationId)).toEqual([{ readable: true }, { readable: false }]);
    expect(await getVariation(VISITOR, variationId)).toMatchObject(VISITOR_SEES_NOTHING);
  });

  it('is seen by everybody where it hangs on a comment that the record shows, and by nobody new where it does not', async () => {
    const rows = await desk.sql<{ id: string; visibility: string }>('select c.variation_id as id, t.visibility from comments c join threads t on t.id = c.thread_id where c.variation_id is not null');
    expect(rows.map((r) => r.visibility).sort()).toEqual(['authors', 'referees']);
    for (const row of rows) expect((await getVariation(VISITOR, row.id)).ok, row.visibility).toBe(row.visibility === 'authors');
  });

  it('keeps what was said of its link for ever', async () => {
    await expect(database().$client.query('update variation_sharings set readable = true')).rejects.toThrow();
    await expect(database().$client.query('delete from variation_sharings')).rejects.toThrow();
  });
});

describe('the sheet of a variation', () => {
  const sweep = { ...burstSheet(), claims: [{ ...burstSheet().claims[0], over: { totalMassMsun: [60, 100, 200] }, claimed: ['0.1', '0.2', '0.3'] }, { id: 'C2' }] };

  it('holds the one claim, at one mass, against the value claimed nearest to it', () => {
    const [claim, ...others] = must(varySheet(sweep, 'C1', { settings: { totalMassMsun: 110 } })).claims;
    expect(others).toEqual([]);
    expect(claim).toMatchObject({ claimed: '0.2', settings: { totalMassMsun: 110, fLowHz: 10, fHighHz: 1900 } });
    expect(claim).not.toHaveProperty('over');
  });

  it('takes a built-in curve or another of the sheet, and refuses one that is not there', () => {
    const built = must(varySheet(sweep, 'C1', { noise: { curve: 'G2' } }));
    expect(built.noise[String(built.claims[0]?.['noise'])]).toEqual({ curve: 'G2' });
    expect(must(varySheet(sweep, 'C1', { noise: { named: 'W' } })).claims[0]).toMatchObject({ noise: 'W' });
    expect(varySheet(sweep, 'C1', { noise: { named: 'Z' } })).toMatchObject({ ok: false, error: { code: 'invalid' } });
    expect(varySheet(sweep, 'C9', { settings: { fLowHz: 1 } })).toMatchObject({ ok: false, error: { code: 'invalid' } });
  });
});
