import { createHash } from 'node:crypto';
import { Readable } from 'node:stream';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { database } from '@/db/client';
import type { SignedInActor } from '@/lib/policy/actor';
import { VISITOR } from '@/lib/policy/actor';
import { addFile } from '@/lib/services/files/add-file';
import { openFile } from '@/lib/services/files/open-file';
import { removeFile } from '@/lib/services/files/remove-file';
import { digestOf } from '@/lib/services/runs/inputs-digest';
import { getFigures } from '@/lib/services/runs/list-runs';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { exportSheet } from '@/lib/services/submissions/export-sheet';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { getReview } from '@/lib/services/submissions/get-lodged';
import { listOwnSubmissions } from '@/lib/services/submissions/list-own-submissions';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { reviseSubmission } from '@/lib/services/submissions/revise-submission';
import { updateDraft } from '@/lib/services/submissions/update-draft';
import { withdrawSubmission } from '@/lib/services/submissions/withdraw-submission';
import { BURST_MATCH, burstFiles, burstSheet } from '../../support/burst-sheet';
import { draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let author: SignedInActor;
let stranger: SignedInActor;
let editor: SignedInActor;

beforeAll(async () => {
  desk = await openServiceDesk();
  [author, stranger, editor] = [await desk.person('T. Marrable'), await desk.person('L. Quennell'), await desk.person('R. Amsel', 'editor')];
});
afterAll(() => desk.close());

const stateOf = async (id: string): Promise<string | undefined> => (await desk.sql<{ state: string }>('select state from submissions where id = $1', id))[0]?.state;

describe('from draft to triage', () => {
  let id: string;

  it('a new draft says what stands before lodging', async () => {
    id = await draftWithBursts(author);
    const draft = must(await getDraft(author, id));
    expect(draft.beforeLodging).toEqual(['Nothing has been checked yet. Run a check.']);
    expect(draft.revision.files.map((f) => [f.name, f.sha256])).toEqual(
      Object.entries(burstFiles()).map(([name, text]) => [name, createHash('sha256').update(text).digest('hex')]),
    );
    expect(await lodgeSubmission(author, id)).toMatchObject({ ok: false, error: { code: 'precondition' } });
  });

  it('a check moves it to Checking, and nothing can be edited or lodged meanwhile', async () => {
    must(await checkDraft(author, id));
    expect(await stateOf(id)).toBe('checking');
    expect(await updateDraft(author, id, { version: 2, title: 'Another' })).toMatchObject({ ok: false, error: { code: 'conflict' } });
    expect(await lodgeSubmission(author, id)).toMatchObject({ ok: false, error: { code: 'conflict' } });
    expect(await checkDraft(author, id)).toMatchObject({ ok: false, error: { code: 'conflict' } });
    const jobs = await desk.worker.$client.query(`select task_identifier, max_attempts from graphile_worker.jobs`);
    expect(jobs.rows).toEqual([{ task_identifier: 'run-submission', max_attempts: 3 }]);
  });

  it('the worker gives the number and the draft back', async () => {
    await desk.runAll();
    expect(await stateOf(id)).toBe('draft');
    const { check, beforeLodging } = must(await getDraft(author, id));
    expect(beforeLodging).toEqual([]);
    if (check?.run.state !== 'measured') throw new Error(`the run is ${JSON.stringify(check?.run)}`);
    const claim = check.run.result.claims[0];
    expect(claim?.points[0]?.value).toAgreeWith(BURST_MATCH, 2e-4);
    expect(claim?.verdict).toBe('agrees');
    expect(check.run.resultDigest).toBe(digestOf(check.run.result));
    expect(Object.keys(must(await getFigures(author, id, check.run.id)).figures)).toEqual(['C1']);
  });

  it('keeps what the run did, in order and with the time of each step, beside the result', async () => {
    const { check } = must(await getDraft(author, id));
    if (check?.run.state !== 'measured') throw new Error('there is no measured run');
    const { log } = check.run;
    expect(log[0]?.doing).toBe('fetching the files');
    expect(log.at(-1)?.doing).toBe('done');
    expect(log.some((step) => step.doing.startsWith('C1: '))).toBe(true);
    expect(log.map((step) => step.atMs)).toEqual(log.map((step) => step.atMs).toSorted((a, b) => a - b));
    expect(JSON.stringify(check.run.result)).not.toContain('atMs');
  });

  it('a change of prose leaves the check standing, a change of a setting or a file does not', async () => {
    const { revision } = must(await getDraft(author, id));
    const { version } = must(await updateDraft(author, id, { version: revision.version, statement: 'Other words.' }));
    expect(must(await getDraft(author, id)).check?.current).toBe(true);
    must(await addFile(author, id, { name: 'notes.txt', stream: Readable.from('1 2\n') }));
    expect(must(await getDraft(author, id)).beforeLodging).toEqual(['Files, settings or claims have changed since the last check. Check again.']);
    expect(await lodgeSubmission(author, id)).toMatchObject({ ok: false, error: { code: 'precondition' } });
    must(await removeFile(author, id, { name: 'notes.txt' }));
    expect(must(await getDraft(author, id)).check?.current).toBe(true);
    expect(await updateDraft(author, id, { version: version - 1, title: 'Stale' })).toMatchObject({ ok: false, error: { code: 'conflict' } });
  });

  it('nobody else can see, change, check or lodge it', async () => {
    for (const other of [stranger, editor]) {
      expect(await getDraft(other, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
      expect(await updateDraft(other, id, { version: 3, title: 'Mine' })).toMatchObject({ ok: false, error: { code: 'not-found' } });
      expect(await checkDraft(other, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
      expect(await lodgeSubmission(other, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
      expect(await exportSheet(other, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
    }
    expect(await lodgeSubmission(VISITOR, id)).toMatchObject({ ok: false, error: { code: 'signed-out' } });
  });

  it('of two who lodge at once one lodges, and the official run takes it to triage', async () => {
    const both = await Promise.all([lodgeSubmission(author, id), lodgeSubmission(author, id)]);
    expect(both.map((o) => o.ok).sort()).toEqual([false, true]);
    expect(await stateOf(id)).toBe('lodged');
    await desk.runAll();
    expect(await stateOf(id)).toBe('triage');
    expect(must(await getReview(editor, id)).run?.state).toBe('measured');
    expect(await getReview(stranger, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
    const audit = await desk.sql<{ action: string }>('select action from audit_entries where subject_id = $1 order by at', id);
    expect(audit.map((a) => a.action)).toEqual(expect.arrayContaining(['submission.create', 'submission.edit', 'submission.check', 'run.finish-check', 'submission.lodge', 'run.finish-official']));
  });

  it('what is lodged stands: no verb and no role can change it', async () => {
    expect(await updateDraft(author, id, { version: 3, title: 'Later' })).toMatchObject({ ok: false, error: { code: 'conflict' } });
    expect(await addFile(author, id, { name: 'late.txt', stream: Readable.from('x') })).toMatchObject({ ok: false, error: { code: 'conflict' } });
    await expect(database().$client.query(`update revisions set statement = 'x' where submission_id = $1`, [id])).rejects.toThrow(/lodged and never changes/);
    await expect(desk.sql(`update revisions set statement = 'x' where submission_id = $1`, id)).rejects.toThrow(/lodged and never changes/);
    await expect(database().$client.query('delete from revision_files where revision_id in (select id from revisions where submission_id = $1)', [id])).rejects.toThrow(/never change/);
  });

  it('sent back, it begins a second revision with the same files, which goes through everything anew', async () => {
    await desk.sql(`update submissions set state = 'back-with-author' where id = $1`, id);
    expect(must(await reviseSubmission(author, id))).toEqual({ revision: 2 });
    expect(await reviseSubmission(author, id)).toMatchObject({ ok: false, error: { code: 'conflict' } });
    const { revision } = must(await getDraft(author, id));
    expect([revision.number, revision.files.length, revision.lodgedAt]).toEqual([2, 3, null]);
    const { claims } = burstSheet('0.9999') as unknown as { claims: never };
    must(await updateDraft(author, id, { version: revision.version, sheet: { claims } }));
    must(await checkDraft(author, id));
    await desk.runAll();
    expect(await stateOf(id)).toBe('back-with-author');
    must(await lodgeSubmission(author, id));
    await desk.runAll();
    expect(await stateOf(id)).toBe('triage');
    const [first, second] = [must(await getReview(editor, id, 1)), must(await getReview(editor, id))];
    expect([first.revision.number, second.revision.number, second.revisions.length]).toEqual([1, 2, 2]);
    expect(second.run?.state === 'measured' && second.run.result.claims[0]?.verdict).toBe('differs');
  });

  it('is in the list of its author with the verdicts of the latest run, and in nobody else’s', async () => {
    const [line] = must(await listOwnSubmissions(author));
    expect(line).toMatchObject({ id, state: 'triage', revision: 2, role: 'author', verdicts: [{ claim: 'C1', verdict: 'differs' }] });
    expect(must(await listOwnSubmissions(stranger))).toEqual([]);
  });
});

describe('a sheet that cannot be read', () => {
  it('is refused by the check with every problem, and cannot be lodged', async () => {
    const sheet = burstSheet();
    const id = await draftWithBursts(author, { ...sheet, claims: [{ ...sheet.claims[0], quantity: 'mach' }, { ...sheet.claims[0], id: 'C2', noise: 'Z' }] });
    must(await checkDraft(author, id));
    await desk.runAll();
    const { check, state } = must(await getDraft(author, id));
    expect(state).toBe('draft');
    if (check?.run.state !== 'refused') throw new Error('the sheet was read');
    expect(check.run.problems.map((p) => p.where)).toEqual(expect.arrayContaining(['/claims/0/quantity', '/claims/1/noise']));
    expect(await lodgeSubmission(author, id)).toMatchObject({ ok: false, error: { code: 'precondition' } });
  });
});

describe('files', () => {
  it('are refused with a name that leaves the folder', async () => {
    const id = await draftWithBursts(author);
    for (const name of ['../x.txt', '/etc/x', 'a//b', 'A.TXT', ''])
      expect(await addFile(author, id, { name, stream: Readable.from('x') }), name).toMatchObject({ ok: false, error: { code: 'invalid' } });
  });

  it('with the same bytes are kept once, and a broken stream leaves nothing', async () => {
    const id = await draftWithBursts(author);
    const before = await desk.sql<{ n: number }>('select count(distinct storage_key)::int as n from stored_files');
    must(await addFile(author, id, { name: 'copy.txt', stream: Readable.from(Buffer.from(burstFiles()['a.txt'] ?? '')) }));
    expect(await desk.sql('select count(distinct storage_key)::int as n from stored_files')).toEqual(before);
    const broken = Readable.from((async function* () { yield Buffer.from('half'); throw new Error('the line went dead'); })());
    await expect(addFile(author, id, { name: 'half.txt', stream: broken })).rejects.toThrow('the line went dead');
    expect(must(await getDraft(author, id)).revision.files.map((f) => f.name)).not.toContain('half.txt');
  });

  it('of a draft are for its authors, of a lodged revision for those who review it', async () => {
    const id = await draftWithBursts(author);
    const fileId = must(await getDraft(author, id)).revision.files[0]?.id ?? '';
    expect(must(await openFile(author, id, fileId)).name).toBe('a.txt');
    for (const other of [stranger, editor, VISITOR]) expect(await openFile(other, id, fileId)).toMatchObject({ ok: false, error: { code: 'not-found' } });
  });
});

describe('withdrawing', () => {
  it('needs a reason, is kept in the trail, and a run that ends later does not bring it back', async () => {
    const id = await draftWithBursts(author);
    must(await checkDraft(author, id));
    expect(await withdrawSubmission(author, id, { reason: ' ' })).toMatchObject({ ok: false, error: { code: 'invalid' } });
    must(await withdrawSubmission(author, id, { reason: 'The files were of another run.' }));
    await desk.runAll();
    expect(await stateOf(id)).toBe('withdrawn');
    expect(must(await getDraft(author, id)).check?.run.state).toBe('measured');
    const [entry] = await desk.sql<{ details: unknown }>(`select details from audit_entries where action = 'submission.withdraw' and subject_id = $1`, id);
    expect(entry?.details).toEqual({ reason: 'The files were of another run.' });
  });
});
