import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { Readable } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import type { SignedInActor } from '@/lib/policy/actor';
import { decide } from '@/lib/services/decisions/decide';
import { getDesk } from '@/lib/services/reviews/get-desk';
import { getQueue } from '@/lib/services/reviews/get-queue';
import { answerInvitation } from '@/lib/services/reviews/answer-invitation';
import { handInReport } from '@/lib/services/reviews/hand-in-report';
import { inviteReferee } from '@/lib/services/reviews/invite-referee';
import { listRefereeCandidates } from '@/lib/services/reviews/list-referee-candidates';
import { createS3Store } from '@/lib/storage/s3-store';
import { enterAtLevelOne, inDeciding, inTriage, openSigner, personOf, REPORT, type SignerDesk } from '../../support/review-room';
import { must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let signer: SignerDesk;
let author: SignedInActor;
let editor: SignedInActor;
let second: SignedInActor;
let referee: SignedInActor;
const TYPED = 'Two bursts in';

beforeAll(async () => {
  desk = await openServiceDesk();
  signer = await openSigner(desk);
  author = await personOf('K. Dovrel', 'hollowell');
  editor = await personOf('R. Amsel', 'counterfoil', 'editor');
  second = await personOf('J. Okonjo-Vale', 'counterfoil', 'editor');
  referee = await personOf('S. Vasterling', 'saltern');
});
afterAll(async () => {
  await signer.close();
  await desk.close();
});

const stateOf = async (id: string) => (await desk.sql<{ state: string }>('select state from submissions where id = $1', id))[0]?.state;
const count = async (table: string, id: string) => (await desk.sql<{ n: number }>(`select count(*)::int as n from ${table} where submission_id = $1`, id))[0]?.n;
const codes = (outcomes: readonly ({ ok: true } | { ok: false; error: { code: string } })[]) => outcomes.map((o) => (o.ok ? 'done' : o.error.code)).sort();

describe('two who act at once: one does, the other learns it', () => {
  it('two editors enter the same submission', async () => {
    const id = await inDeciding(desk, { author, editor, referee });
    expect(codes(await Promise.all([enterAtLevelOne(editor, id, TYPED), enterAtLevelOne(second, id, TYPED)]))).toEqual(['conflict', 'done']);
    expect(await count('decisions', id)).toBe(1);
    expect(await desk.sql(`select 1 from outbox where dedupe_key like 'decision:%' and recipient like 'k-dovrel%'`)).toHaveLength(1);
  });

  it('one enters while the other sends it back', async () => {
    const id = await inDeciding(desk, { author, editor, referee });
    const back = decide(second, id, { kind: 'back-with-author', prose: 'Please restate the band.', typed: TYPED });
    expect(codes(await Promise.all([enterAtLevelOne(editor, id, TYPED), back]))).toEqual(['conflict', 'done']);
    expect(await count('decisions', id)).toBe(1);
  });

  it('the same invitation is accepted twice, the same report handed in twice', async () => {
    const id = await inTriage(desk, author);
    const { invitationId } = must(await inviteReferee(editor, id, { refereeId: referee.userId }));
    const accept = () => answerInvitation(referee, invitationId, { accept: true, noConflict: true });
    expect(codes(await Promise.all([accept(), accept()]))).toEqual(['denied', 'done']);
    expect((await desk.sql<{ round: number }>('select round from submissions where id = $1', id))[0]?.round).toBe(1);
    expect(codes(await Promise.all([handInReport(referee, id, REPORT), handInReport(referee, id, REPORT)]))).toEqual(['conflict', 'done']);
    expect(await count('reports', id)).toBe(1);
  });

  it('two signers on one decision make one record', async () => {
    const id = await inDeciding(desk, { author, editor, referee });
    must(await enterAtLevelOne(editor, id, TYPED));
    await Promise.all([signer.run(), signer.run()]);
    expect(await count('records', id)).toBe(1);
    expect(await stateOf(id)).toBe('entered');
  });
});

describe('what may not be seen looks like what is not there', () => {
  it('desk, candidates, decision and invitation answer the same for a denied and an unknown id', async () => {
    const id = await inTriage(desk, author);
    const stranger = await personOf('L. Quennell', 'northquay');
    const unknown = '3f1d9c1e-8f6b-4a52-9d55-0a7d4a0f6b11';
    for (const read of [getDesk, listRefereeCandidates]) expect(await read(stranger, id)).toEqual(await read(stranger, unknown));
    expect(await decide(stranger, id, { kind: 'set-aside', prose: 'x', typed: TYPED })).toEqual(await decide(stranger, unknown, { kind: 'set-aside', prose: 'x', typed: TYPED }));
    const { invitationId } = must(await inviteReferee(editor, id, { refereeId: referee.userId }));
    const answer = { accept: true, noConflict: true };
    expect(await answerInvitation(stranger, invitationId, answer)).toEqual(await answerInvitation(stranger, unknown, answer));
    expect(await listRefereeCandidates(author, id)).toEqual(await listRefereeCandidates(author, unknown));
  });

  it('an editor who wrote it or referees it finds it in no queue of theirs', async () => {
    const id = await inTriage(desk, second);
    const shown = async (who: SignedInActor) => must(await getQueue(who)).groups.flatMap((g) => g.rows.map((r) => r.submissionId)).includes(id);
    expect([await shown(editor), await shown(second)]).toEqual([true, false]);
    expect(await decide(second, id, { kind: 'set-aside', prose: 'x', typed: TYPED })).toMatchObject({ ok: false, error: { code: 'denied' } });
  });
});

describe('conflicts stand beside a name and are kept', () => {
  it('a colleague needs the editor’s sentence, an author cannot be asked at all', async () => {
    const colleague = await personOf('H. Brightwater', 'hollowell');
    const id = await inTriage(desk, author);
    const listed = must(await listRefereeCandidates(editor, id));
    expect(listed.find((c) => c.userId === colleague.userId)?.flags.map((f) => f.code)).toEqual(['same-mail-domain']);
    expect(listed.some((c) => c.userId === author.userId)).toBe(false);
    expect(await inviteReferee(editor, id, { refereeId: colleague.userId })).toMatchObject({ ok: false, error: { code: 'invalid', problems: [{ where: '/reason' }] } });
    must(await inviteReferee(editor, id, { refereeId: colleague.userId, reason: 'Another institute under the same address.' }));
    expect(must(await getDesk(editor, id)).invitations).toMatchObject([{ name: 'H. Brightwater', flags: [{ level: 'ask' }], reason: 'Another institute under the same address.' }]);
    expect(await inviteReferee(editor, id, { refereeId: author.userId, reason: 'No one else.' })).toMatchObject({ ok: false, error: { code: 'precondition' } });
  });
});

describe('the signer judges for itself and refuses with a reason', () => {
  /** Past the review, as a web process gone wrong might. */
  async function decided(change: (id: string) => Promise<void>): Promise<string> {
    const id = await inDeciding(desk, { author, editor, referee });
    must(await enterAtLevelOne(editor, id, TYPED));
    await change(id);
    return id;
  }
  const refusalOf = async (id: string) => {
    const done = await signer.run();
    expect(await count('records', id)).toBe(0);
    expect(await stateOf(id)).toBe('deciding');
    return done.map((d) => (d.outcome === 'refused' ? d.refusal.code : d.outcome));
  };
  const runOf = `(select run_id from decisions where submission_id = $1)`;

  /** Bytes are stored under their digest and shared by submissions, so they are put back afterwards. */
  async function spoiling(id: string, spoil: (key: string) => Promise<unknown>, work: () => Promise<void>): Promise<void> {
    const [file] = await desk.sql<{ storage_key: string }>('select storage_key from stored_files where submission_id = $1 order by original_name limit 1', id);
    const key = file?.storage_key ?? '';
    const kept = await buffer(await createS3Store(desk.store.env).get(key));
    await spoil(key);
    await work().finally(() => createS3Store(desk.store.env).put(key, Readable.from(kept)));
  }

  it('a stored file was changed', async () => {
    const id = await decided(async () => undefined);
    await spoiling(id, (key) => createS3Store(desk.store.env).put(key, Readable.from('0 1\n1 2\n')), async () => expect(await refusalOf(id)).toEqual(['signer/file-changed']));
    expect(must(await getDesk(editor, id)).decisions).toMatchObject([{ signing: { state: 'refused', reason: expect.stringContaining('SHA-256') as string } }]);
    expect(must(await getDesk(author, id)).decisions).toMatchObject([{ signing: { state: 'waiting' } }]);
    expect(must(await getQueue(editor)).groups.find((g) => g.group === 'unsettled-runs')?.rows.map((r) => r.submissionId)).toContain(id);
    must(await decide(editor, id, { kind: 'back-with-author', prose: 'A file was lost on our side; please attach it again.', typed: TYPED }));
    expect(await stateOf(id)).toBe('back-with-author');
  });

  it('a stored file is gone', async () => {
    const id = await decided(async () => undefined);
    await spoiling(id, (key) => createS3Store(desk.store.env).remove(key), async () => expect(await refusalOf(id)).toEqual(['signer/file-missing']));
  });

  it('the stored result was changed', async () => {
    const id = await decided((submission) => desk.sql(`update run_results set result = replace(result::text, '"engine":"', '"engine":"9.')::json where run_id = ${runOf}`, submission).then(() => undefined));
    expect(await refusalOf(id)).toEqual(['signer/result-changed']);
  });

  it('the routes disagree, though result and digest fit together', async () => {
    const id = await decided(async (submission) => {
      const [row] = await desk.sql<{ result: { claims: { points: { routes: { A: number; B: number } }[] }[] } }>(`select result from run_results where run_id = ${runOf}`, submission);
      const point = row?.result.claims[0]?.points[0];
      if (point) point.routes.B = point.routes.A + 0.01;
      const { digestOf } = await import('@/lib/badges/canonical-json');
      await desk.sql(`update run_results set result = $2, result_digest = $3 where run_id = ${runOf}`, submission, JSON.stringify(row?.result), digestOf(row?.result));
    });
    expect(await refusalOf(id)).toEqual(['signer/routes']);
  });

  it('no report was handed in', async () => {
    const id = await decided((submission) => desk.sql('delete from reports where submission_id = $1', submission).then(() => undefined));
    expect(await refusalOf(id)).toEqual(['signer/reports']);
  });

  it('the decision covers a claim that differs, or one that is not there', async () => {
    const id = await decided((submission) => desk.sql(`update decisions set covers = '["C1","C9"]' where submission_id = $1`, submission).then(() => undefined));
    expect(await refusalOf(id)).toEqual(['signer/no-such-claim']);
  });

  it('the level is higher than the coverage allows', async () => {
    const id = await decided((submission) => desk.sql(`update decisions set level = 2 where submission_id = $1`, submission).then(() => undefined));
    await desk.sql(`insert into reports (submission_id, referee_id, slot, round, revision, answers, recommendation, confidence) values ($1, $2, 'Z', 1, 1, '{}', 'enter-2', 3)`, id, author.userId);
    expect(await refusalOf(id)).toEqual(['signer/coverage']);
  });

  it('a store that is away is no refusal: the decision waits, and is told as broken', async () => {
    const id = await decided(async () => undefined);
    const { signWaiting } = await import('@/lib/signer/sign-decision');
    const away = createS3Store({ ...desk.store.env, S3_ENDPOINT: 'http://127.0.0.1:9' });
    expect((await signWaiting({ ...signer, store: away })).map((d) => d.outcome)).toEqual(['broken']);
    expect(await count('records', id)).toBe(0);
    expect((await signer.run()).map((d) => d.outcome)).toEqual(['signed']);
  });
});

describe('what is written stays written', () => {
  it('no role but the owner changes or removes what was said, decided or published', async () => {
    const id = await inDeciding(desk, { author, editor, referee });
    must(await enterAtLevelOne(editor, id, TYPED));
    await signer.run();
    const tables = ['comments', 'reports', 'editor_notes', 'decisions', 'records', 'signing_keys', 'record_standings', 'signing_refusals', 'threads', 'invitations'];
    const { database } = await import('@/db/client');
    const refused: string[] = [];
    for (const role of [database(), desk.worker, signer.database])
      for (const table of tables)
        for (const act of [`delete from ${table}`, `truncate ${table} cascade`]) await role.$client.query(act).catch(() => refused.push(`${table}: ${act}`));
    expect(refused).toHaveLength(3 * tables.length * 2);
  });

  it('the worker and the signer cannot read who referees', async () => {
    for (const role of [desk.worker, signer.database]) {
      await expect(role.$client.query('select referee_id from invitations')).rejects.toThrow(/permission denied/);
      await expect(role.$client.query('select referee_id from reports')).rejects.toThrow(/permission denied/);
      await expect(role.$client.query('select writer_id from comments')).rejects.toThrow(/permission denied/);
    }
    await expect(signer.database.$client.query('select email from users')).rejects.toThrow(/permission denied/);
  });

  it('the web cannot publish a record or move a submission to entered past the signer’s table', async () => {
    const { database } = await import('@/db/client');
    await expect(database().$client.query(`insert into records (id) values ('aaaa-aaaa')`)).rejects.toThrow(/permission denied/);
    await expect(database().$client.query(`insert into signing_keys values ('00', 'x')`)).rejects.toThrow(/permission denied/);
  });
});
