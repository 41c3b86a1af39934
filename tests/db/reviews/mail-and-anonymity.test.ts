import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SignedInActor } from '@/lib/policy/actor';
import { VISITOR } from '@/lib/policy/actor';
import { createMailTransport } from '@/lib/mail/transport';
import { decide } from '@/lib/services/decisions/decide';
import { getRecord } from '@/lib/services/records/get-record';
import { getDesk } from '@/lib/services/reviews/get-desk';
import { handInReport } from '@/lib/services/reviews/hand-in-report';
import { openThread } from '@/lib/services/reviews/open-thread';
import { replyToThread } from '@/lib/services/reviews/reply-to-thread';
import { remind } from '@/lib/services/reviews/remind';
import { sendToReview } from '@/lib/services/reviews/send-to-review';
import { getReview } from '@/lib/services/submissions/get-lodged';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { reviseSubmission } from '@/lib/services/submissions/revise-submission';
import { updateDraft } from '@/lib/services/submissions/update-draft';
import { requestVariation } from '@/lib/services/variations/request-variation';
import { deliverDueMail, waitAfter } from '@/lib/worker/handlers/deliver-outbox';
import { burstSheet } from '../../support/burst-sheet';
import { startMailSink, type TestMailSink } from '../../support/fakes';
import { ANSWERS, enterAtLevelOne, inDeciding, inTriage, openSigner, personOf, REPORT, withReferee, type SignerDesk } from '../../support/review-room';
import { must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let signer: SignerDesk;
let sink: TestMailSink;
let author: SignedInActor;
let editor: SignedInActor;
let referee: SignedInActor;
let other: SignedInActor;
const TYPED = 'Two bursts in';
const MAIL_FROM = 'Counterfoil <desk@counterfoil.example>';

beforeAll(async () => {
  desk = await openServiceDesk();
  [signer, sink] = [await openSigner(desk), await startMailSink()];
  author = await personOf('P. Adeyinka-Holt', 'northquay');
  editor = await personOf('R. Amsel', 'counterfoil', 'editor');
  referee = await personOf('Svenja Vasterling', 'saltern');
  other = await personOf('Hollis Brightwater', 'oxbow');
});
afterAll(async () => {
  await Promise.all([signer.close(), sink.stop()]);
  await desk.close();
});

const deliver = async (smtpUrl: string) => {
  const transport = createMailTransport({ SMTP_URL: smtpUrl, MAIL_FROM });
  return deliverDueMail(desk.worker, transport).finally(() => transport.close());
};
const dueNow = () => desk.sql(`update outbox set due_at = now() where state = 'waiting'`);
const outbox = () => desk.sql<{ state: string; attempts: number; message_id: string; recipient: string; body: string; last_error: string | null }>('select * from outbox order by created_at');

describe('mail goes out though the mail server was away', () => {
  it('waits with the fault, then goes once under the same Message-ID, and leaves no name behind', async () => {
    await inDeciding(desk, { author, editor, referee });
    const written = await outbox();
    expect(written.map((m) => m.recipient.split('@')[1])).toEqual(['saltern.example', 'counterfoil.example']);
    expect(await deliver('smtp://127.0.0.1:9')).toEqual({ sent: 0, putOff: 2 });
    expect((await outbox()).map((m) => [m.state, m.attempts, m.last_error !== null])).toEqual([['waiting', 1, true], ['waiting', 1, true]]);
    expect(await deliver(sink.smtpUrl)).toEqual({ sent: 0, putOff: 0 });
    await dueNow();
    expect(await deliver(sink.smtpUrl)).toEqual({ sent: 2, putOff: 0 });
    expect(await deliver(sink.smtpUrl)).toEqual({ sent: 0, putOff: 0 });
    expect(sink.messages().map((m) => m.messageId).sort()).toEqual(written.map((m) => m.message_id).sort());
    expect((await outbox()).map((m) => [m.state, m.recipient, m.body])).toEqual([['sent', '', ''], ['sent', '', '']]);
  });

  it('a worker that died after sending sends again, under the same id', async () => {
    const [mail] = await desk.sql<{ id: string; message_id: string }>(`select id, message_id from outbox limit 1`);
    await desk.sql(`update outbox set state = 'waiting', due_at = now(), recipient = 'again@saltern.example', subject = 's', body = 'b' where id = $1`, mail?.id);
    expect(await deliver(sink.smtpUrl)).toEqual({ sent: 1, putOff: 0 });
    expect(sink.messages().filter((m) => m.messageId === mail?.message_id)).toHaveLength(2);
  });

  it('waits longer each time, and never longer than three hours', () => {
    expect([0, 1, 2, 3, 12, 100].map(waitAfter)).toEqual([15, 30, 60, 120, 10_800, 10_800]);
  });

  it('who owes a report is reminded once a day, and nobody else', async () => {
    const id = await inTriage(desk, author);
    await withReferee(id, editor, referee);
    await withReferee(id, editor, other);
    must(await handInReport(other, id, REPORT));
    for (let i = 0; i < 2; i++) expect(must(await remind(editor, id))).toEqual({ reminded: 1 });
    const reminders = await desk.sql<{ recipient: string }>(`select recipient from outbox where dedupe_key like 'reminder:%'`);
    expect(reminders.map((m) => m.recipient.split('@')[1])).toEqual(['saltern.example']);
    expect(await remind(referee, id)).toMatchObject({ ok: false, error: { code: 'denied' } });
  });

  it('an act that is undone sends nothing', async () => {
    const before = (await outbox()).length;
    const id = await inTriage(desk, author);
    expect(await decide(editor, id, { kind: 'set-aside', prose: '', typed: TYPED })).toMatchObject({ ok: false });
    expect(await outbox()).toHaveLength(before);
  });
});

describe('nothing an author or reader gets tells who referees', () => {
  /** Name, parts of it, address, account id, letter-free traces of the two referees. */
  const traces = () => [referee, other].flatMap((r) => [r.userId, ...r.name.split(' '), r.name.toLowerCase().replace(' ', '-'), 'saltern.example', 'oxbow.example']);
  const tracesIn = (seen: unknown) => traces().filter((trace) => JSON.stringify(seen).toLowerCase().includes(trace.toLowerCase()));

  it('desk, review page, record and letters hold no name, address or id, and no time finer than a day', async () => {
    const id = await inTriage(desk, author);
    await withReferee(id, editor, referee);
    await withReferee(id, editor, other);
    const { threadId } = must(await openThread(referee, id, { kind: 'must-change', visibility: 'authors', anchor: { claim: 'C1', at: {} }, body: 'State the band.' }));
    must(await replyToThread(author, threadId, { body: 'Stated.' }));
    must(await replyToThread(other, threadId, { body: 'And the taper?' }));
    must(await handInReport(referee, id, { ...REPORT, noteToEditor: 'Between us.' }));
    must(await handInReport(other, id, REPORT));
    must(await enterAtLevelOne(editor, id, TYPED));
    const [signed] = await signer.run();
    const own = must(await getDesk(author, id));
    const record = must(await getRecord(VISITOR, signed?.outcome === 'signed' ? signed.recordId : ''));
    expect(own.threads[0]?.comments.map((c) => [c.side, c.when.precision])).toEqual([['referee', 'day'], ['authors', 'instant'], ['referee', 'day']]);
    expect([own, must(await getReview(author, id)), record].map(tracesIn)).toEqual([[], [], []]);
    expect(must(await getReview(author, id)).stateChangedAt).toMatch(/T00:00:00\.000Z$/);
    expect(own.notes).toEqual([]);
    expect(own.invitations).toBeNull();
    await deliver(sink.smtpUrl);
    const letters = sink.messages().filter((m) => JSON.stringify(m).includes('northquay.example'));
    expect(letters.length).toBeGreaterThan(0);
    expect(letters.map(tracesIn).flat()).toEqual([]);
    expect(JSON.stringify(letters)).not.toMatch(/nodemailer|X-Mailer/i);
  });

  it('a referee sees the other by letter alone', async () => {
    const id = await inTriage(desk, author);
    await withReferee(id, editor, referee);
    await withReferee(id, editor, other);
    must(await openThread(referee, id, { kind: 'note', visibility: 'referees', anchor: { claim: 'C1', at: {} }, body: 'Between us.' }));
    const seen = must(await getDesk(other, id));
    expect(seen.threads[0]?.comments[0]).toMatchObject({ by: expect.stringMatching(/^Referee [A-H]$/) as string, when: { precision: 'day' } });
    expect(JSON.stringify(seen)).not.toMatch(/Vasterling/);
    expect(must(await getDesk(author, id)).threads).toEqual([]);
  });

  it('a rerun is its asker’s alone until it is attached', async () => {
    const id = await inTriage(desk, author);
    await withReferee(id, editor, referee);
    const asked = must(await requestVariation(referee, id, { claimId: 'C1', changes: { settings: { fLowHz: 30 } }, note: 'Higher.' } as never)) as { variationId?: string; id?: string };
    await desk.runAll();
    const variationId = asked.variationId ?? asked.id ?? '';
    expect(must(await getDesk(referee, id)).variations).toMatchObject([{ id: variationId, seenBy: 'you alone', changes: ['lower cut-off 30 Hz'] }]);
    expect(JSON.stringify([must(await getDesk(author, id)), must(await getDesk(editor, id))])).not.toContain(variationId);
    const request = { kind: 'question', visibility: 'authors', anchor: { claim: 'C1', at: {} }, body: 'See the rerun.', variationId } as const;
    expect(await openThread(author, id, request)).toMatchObject({ ok: false, error: { code: 'invalid' } });
    must(await openThread(referee, id, request));
    expect(must(await getDesk(author, id)).threads[0]?.comments[0]?.variation).toMatchObject({ id: variationId, seenBy: 'authors too', state: 'finished' });
    expect(await openThread(referee, id, request)).toMatchObject({ ok: false, error: { code: 'conflict' } });
  });
});

describe('back with the author, and a second round', () => {
  it('the revision goes through everything anew, and threads say what became of their numbers', async () => {
    const id = await inTriage(desk, author);
    await withReferee(id, editor, referee);
    must(await openThread(referee, id, { kind: 'must-change', visibility: 'authors', anchor: { claim: 'C1', at: {} }, body: 'Too many digits.' }));
    must(await handInReport(referee, id, { ...REPORT, answers: ANSWERS, recommendation: 'minor' }));
    must(await decide(editor, id, { kind: 'back-with-author', prose: 'Please reduce the digits.', typed: TYPED }));
    const sent = must(await getDesk(author, id));
    expect(sent).toMatchObject({ state: 'back-with-author', decisions: [{ kind: 'back-with-author', letter: { points: [{ kind: 'must-change', text: 'Too many digits.' }] } }], reports: [{ recommendation: 'minor' }] });
    must(await reviseSubmission(author, id));
    const draft = must(await getDraft(author, id));
    const sheet = burstSheet('0.99');
    must(await updateDraft(author, id, { version: draft.revision.version, sheet: { waveforms: sheet.waveforms, noise: sheet.noise, claims: sheet.claims } } as never));
    must(await checkDraft(author, id));
    await desk.runAll();
    must(await lodgeSubmission(author, id));
    await desk.runAll();
    expect(must(await sendToReview(editor, id))).toEqual({ round: 2 });
    const again = must(await getDesk(referee, id));
    expect(again).toMatchObject({ stateWords: 'In review (round 2)', revision: 2, report: { handedIn: false }, may: { report: true } });
    expect(again.threads[0]?.anchor.now).toMatchObject({ standing: 'changed', was: { printed: burstSheet().claims[0]?.['claimed'] }, now: { printed: '0.99' } });
    expect(again.changes).toMatchObject([{ claim: 'C1', standing: { standing: 'changed' } }]);
    must(await handInReport(referee, id, REPORT));
    must(await enterAtLevelOne(editor, id, TYPED));
    expect((await signer.run()).map((d) => d.outcome)).toEqual(['signed']);
    expect(must(await getDesk(author, id)).reports.map((r) => [r.round, r.revision])).toEqual([[1, 1], [2, 2]]);
  });
});
