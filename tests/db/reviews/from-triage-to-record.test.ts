import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { VISITOR, type SignedInActor } from '@/lib/policy/actor';
import { draftDecision } from '@/lib/services/decisions/draft-decision';
import { getRecord } from '@/lib/services/records/get-record';
import { getPublicKey, getRecordBytes, type RecordPart } from '@/lib/services/records/get-record-bytes';
import { listRecords } from '@/lib/services/records/list-records';
import { answerInvitation } from '@/lib/services/reviews/answer-invitation';
import { closeThread } from '@/lib/services/reviews/close-thread';
import { getDesk } from '@/lib/services/reviews/get-desk';
import { getQueue } from '@/lib/services/reviews/get-queue';
import { handInReport } from '@/lib/services/reviews/hand-in-report';
import { inviteReferee } from '@/lib/services/reviews/invite-referee';
import { listOwnInvitations } from '@/lib/services/reviews/list-own-invitations';
import { openThread } from '@/lib/services/reviews/open-thread';
import { replyToThread } from '@/lib/services/reviews/reply-to-thread';
import { runVerify } from '@/lib/tools/verify-command';
import { burstFiles, burstSheet } from '../../support/burst-sheet';
import { ANSWERS, enterAtLevelOne, inTriage, openSigner, personOf, REPORT, type SignerDesk } from '../../support/review-room';
import { must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let signer: SignerDesk;
let author: SignedInActor;
let editor: SignedInActor;
let referee: SignedInActor;
let other: SignedInActor;
let stranger: SignedInActor;

beforeAll(async () => {
  desk = await openServiceDesk();
  signer = await openSigner(desk);
  author = await personOf('T. Marrable', 'larkfield');
  editor = await personOf('R. Amsel', 'counterfoil', 'editor');
  referee = await personOf('S. Vasterling', 'saltern');
  other = await personOf('H. Brightwater', 'oxbow');
  stranger = await personOf('L. Quennell', 'northquay');
});
afterAll(async () => {
  await signer.close();
  await desk.close();
});

const stateOf = async (id: string) => (await desk.sql<{ state: string }>('select state from submissions where id = $1', id))[0]?.state;

describe('from triage to a record that a stranger verifies', () => {
  let id: string;
  let threadId: string;
  let recordId: string;

  it('a lodged submission waits in the queue for an editor', async () => {
    id = await inTriage(desk, author);
    const queue = must(await getQueue(editor));
    expect(queue.groups.map((g) => [g.group, g.rows.map((r) => [r.submissionId, r.next, r.because])])).toEqual([['assign', [[id, 'take', 'nobody has taken it']]]]);
    expect(await getQueue(author)).toMatchObject({ ok: false, error: { code: 'denied' } });
  });

  it('two referees are asked, told by mail, and answer; the first acceptance begins round 1', async () => {
    const first = must(await inviteReferee(editor, id, { refereeId: referee.userId }));
    const second = must(await inviteReferee(editor, id, { refereeId: other.userId }));
    expect(await inviteReferee(editor, id, { refereeId: other.userId })).toMatchObject({ ok: false, error: { code: 'conflict' } });
    expect(await getDesk(referee, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
    expect(must(await listOwnInvitations(referee)).map((i) => [i.submissionId, i.state, i.quantities])).toEqual([[id, 'asked', ['match']]]);
    expect(await answerInvitation(other, first.invitationId, { accept: true, noConflict: true })).toMatchObject({ ok: false, error: { code: 'not-found' } });
    expect(await answerInvitation(referee, first.invitationId, { accept: true, noConflict: false })).toMatchObject({ ok: false, error: { code: 'invalid' } });
    must(await answerInvitation(referee, first.invitationId, { accept: true, noConflict: true }));
    expect(must(await getDesk(referee, id))).toMatchObject({ stateWords: 'In review (round 1)', you: { role: 'referee' }, may: { report: true, decide: false } });
    must(await answerInvitation(other, second.invitationId, { accept: true, noConflict: true }));
    const mails = await desk.sql<{ recipient: string; subject: string }>('select recipient, subject from outbox order by created_at');
    expect(mails.map((m) => m.recipient.split('@')[1])).toEqual(['saltern.example', 'oxbow.example']);
  });

  it('a thread hangs on the number, is answered across the line, and resolved by its opener alone', async () => {
    const anchor = { claim: 'C1', at: {} };
    expect(await openThread(referee, id, { kind: 'question', visibility: 'authors', anchor: { claim: 'C9', at: null }, body: 'Where?' })).toMatchObject({ ok: false, error: { code: 'invalid' } });
    ({ threadId } = must(await openThread(referee, id, { kind: 'must-change', visibility: 'authors', anchor, body: 'State the *band* with $f_l$.' })));
    must(await openThread(other, id, { kind: 'note', visibility: 'referees', anchor, body: 'Between us: I get the same.' }));
    must(await replyToThread(author, threadId, { body: 'It is stated now.' }));
    expect(must(await getDesk(author, id)).threads.map((t) => [t.kind, t.state, t.comments.length])).toEqual([['must-change', 'answered', 2]]);
    expect(await closeThread(author, threadId, 'resolved')).toMatchObject({ ok: false, error: { code: 'denied' } });
    expect(await closeThread(other, threadId, 'resolved')).toMatchObject({ ok: false, error: { code: 'denied' } });
    expect(await closeThread(stranger, threadId, 'resolved')).toMatchObject({ ok: false, error: { code: 'not-found' } });
    must(await closeThread(referee, threadId, 'resolved'));
    expect(await replyToThread(author, threadId, { body: 'One more word.' })).toMatchObject({ ok: false, error: { code: 'conflict' } });
  });

  it('a report needs its answers, is seen by no author yet, and the last one moves to Deciding', async () => {
    expect(await handInReport(referee, id, { ...REPORT, answers: { ...ANSWERS, scope: ' ' } })).toMatchObject({ ok: false, error: { code: 'invalid', problems: [{ where: '/answers/scope' }] } });
    expect(must(await handInReport(referee, id, { ...REPORT, noteToEditor: 'I worked with similar data in 2023.' })).allIn).toBe(false);
    expect(await handInReport(referee, id, REPORT)).toMatchObject({ ok: false, error: { code: 'conflict' } });
    expect(must(await getDesk(author, id)).reports).toEqual([]);
    expect(must(await getDesk(other, id)).reports).toEqual([]);
    expect(must(await handInReport(other, id, { ...REPORT, recommendation: 'minor' })).allIn).toBe(true);
    expect(await stateOf(id)).toBe('deciding');
    expect(must(await getDesk(editor, id))).toMatchObject({ reports: [{ yours: false }, { yours: false }], notes: [{ by: 'S. Vasterling' }], may: { decide: true } });
    expect(must(await getDesk(other, id)).notes).toEqual([]);
  });

  it('the decision page says which levels are open and why the others are not', async () => {
    const draft = must(await draftDecision(editor, id));
    expect(draft.levels.map((l) => [l.level, l.open, l.covers])).toEqual([[1, true, ['C1']], [2, false, []], [3, false, []]]);
    expect(draft.levels[1]?.refusals.map((r) => r.code)).toEqual(['reviews/not-covered']);
    expect(draft.letter.numbers.map((n) => [n.claim, n.verdict])).toEqual([['C1', 'agrees']]);
    expect(await draftDecision(referee, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
  });

  it('a decision has to be signed by the title’s first words, and a closed level stays closed', async () => {
    expect(await enterAtLevelOne(editor, id, 'Some other words')).toMatchObject({ ok: false, error: { code: 'invalid', problems: [{ where: '/typed' }] } });
    const { signingWords } = must(await draftDecision(editor, id));
    const two = { kind: 'enter', level: 2, remarks: [], prose: 'At level 2.', typed: signingWords } as const;
    const { decide } = await import('@/lib/services/decisions/decide');
    expect(await decide(editor, id, two)).toMatchObject({ ok: false, error: { code: 'precondition' } });
    expect(await decide(author, id, two)).toMatchObject({ ok: false, error: { code: 'denied' } });
    must(await enterAtLevelOne(editor, id, signingWords));
    expect(await stateOf(id)).toBe('deciding');
    expect(must(await getDesk(author, id)).decisions).toMatchObject([{ kind: 'enter', level: 1, covers: ['C1'], signing: { state: 'waiting' } }]);
    expect(await enterAtLevelOne(editor, id, signingWords)).toMatchObject({ ok: false, error: { code: 'conflict' } });
  });

  it('the decision releases the reports together, dated to its own day', async () => {
    const { reports } = must(await getDesk(author, id));
    const today = new Date().toISOString().slice(0, 10);
    expect(reports.map((r) => [/^Referee [A-H]$/.test(r.by), r.when])).toEqual([[true, { precision: 'day', on: today }], [true, { precision: 'day', on: today }]]);
  });

  it('the signer enters it, and the record reads as decided', async () => {
    const done = await signer.run();
    expect(done.map((d) => d.outcome)).toEqual(['signed']);
    recordId = done[0]?.outcome === 'signed' ? done[0].recordId : '';
    expect(await stateOf(id)).toBe('entered');
    const record = must(await getRecord(VISITOR, recordId));
    expect(record.document).toMatchObject({
      format: 'counterfoil-record/1', domain: 'http://127.0.0.1:3210', title: burstSheet().title, authors: ['T. Marrable'], revision: 1,
      decision: { by: 'R. Amsel', role: 'editor', level: 1, remarks: ['corrected during review'], reports: 2 },
      claims: [{ id: 'C1', verdict: 'agrees', covered: true }], supersedes: null, logIndex: null,
    });
    expect(record.document.files.map((f) => f.name).sort()).toEqual(Object.keys(burstFiles()).sort());
    expect(record.document.cautions.map((c) => c.number)).toEqual(expect.arrayContaining([1, 2, 3, 5, 14, 15]));
    expect(record.threads.map((t) => t.kind)).toEqual(['must-change']);
    expect(record.reports).toHaveLength(2);
    expect(await signer.run()).toEqual([]);
    expect(must(await listRecords(VISITOR, { text: 'marrable', verdict: 'agrees' })).map((r) => r.id)).toEqual([recordId]);
    expect(must(await listRecords(VISITOR, { verdict: 'differs' }))).toEqual([]);
  });

  it('what a visitor can download verifies offline, with the files, and not after one byte of a file changed', async () => {
    const folder = mkdtempSync(path.join(tmpdir(), 'counterfoil-stranger-'));
    const save = async (part: RecordPart, name: string) => writeFileSync(path.join(folder, name), must(await getRecordBytes(recordId, part)).bytes);
    await save('record', 'r.json');
    await save('signature', 'r.sig.json');
    await save('signed-record', 'both.json');
    const record = must(await getRecord(VISITOR, recordId));
    const key = path.join(folder, 'key.pem');
    writeFileSync(key, must(await getPublicKey(record.document.keyId)).bytes);
    for (const [name, text] of Object.entries(burstFiles())) writeFileSync(path.join(folder, name), text);
    const said: string[] = [];
    const io = { out: (line: string) => void said.push(line), complain: (line: string) => void said.push(line) };
    expect(await runVerify([path.join(folder, 'r.json'), '--key', key, '--files', folder], io)).toBe(0);
    expect(await runVerify([path.join(folder, 'both.json'), '--key', key], io)).toBe(0);
    expect(said.join('\n')).toContain('whether the record has been struck');
    const [name, text] = Object.entries(burstFiles())[0] ?? ['', ''];
    writeFileSync(path.join(folder, name), text.replace('1', '2'));
    expect(await runVerify([path.join(folder, 'r.json'), '--key', key, '--files', folder], io)).toBe(1);
  });
});
