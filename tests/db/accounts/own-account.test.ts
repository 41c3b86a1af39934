import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SignedInActor } from '@/lib/policy/actor';
import { chooseLetters } from '@/lib/services/accounts/choose-letters';
import { exportOwnData } from '@/lib/services/accounts/export-own-data';
import { getOwnAccount } from '@/lib/services/accounts/get-own-account';
import { endOtherSessions, endSession, listOwnSessions } from '@/lib/services/accounts/own-sessions';
import { saveProfile } from '@/lib/services/accounts/save-profile';
import { getRecord } from '@/lib/services/records/get-record';
import { handInReport } from '@/lib/services/reviews/hand-in-report';
import { openThread } from '@/lib/services/reviews/open-thread';
import { remind } from '@/lib/services/reviews/remind';
import { getReview } from '@/lib/services/submissions/get-lodged';
import { documentOf } from '@/lib/services/records/record-document';
import { enterAtLevelOne, inTriage, openSigner, personOf, REPORT, withReferee, type SignerDesk } from '../../support/review-room';
import { must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let signer: SignerDesk;
let author: SignedInActor;
let editor: SignedInActor;
let referee: SignedInActor;
let submissionId: string;
const ORCID = '0000-0000-4210-7736';
const TYPED = '0000-0000-0000-001X';

beforeAll(async () => {
  desk = await openServiceDesk();
  signer = await openSigner(desk);
  author = await personOf('P. Adeyinka-Holt', 'northquay');
  editor = await personOf('R. Amsel', 'counterfoil', 'editor');
  referee = await personOf('Svenja Vasterling', 'saltern');
  submissionId = await inTriage(desk, author);
  await withReferee(submissionId, editor, referee);
});
afterAll(async () => {
  await signer.close();
  await desk.close();
});

const lettersTo = async (who: SignedInActor): Promise<string[]> =>
  (await desk.sql<{ subject: string }>('select o.subject from outbox o join users u on u.email = o.recipient where u.id = $1 order by o.created_at', who.userId)).map(({ subject }) => subject);

describe('letters', () => {
  it('that one may do without are not written for whoever declined them; needed ones are', async () => {
    const before = await lettersTo(referee);
    expect(before.some((subject) => subject.startsWith('Will you referee'))).toBe(true);
    must(await chooseLetters(referee, { reminder: false, 'report-received': true }));
    expect(must(await getOwnAccount(referee)).declinedLetters).toEqual(['reminder']);
    expect(await remind(editor, submissionId)).toMatchObject({ ok: false, error: { code: 'precondition', sentence: expect.stringContaining('want no reminders') } });
    expect(await lettersTo(referee)).toEqual(before);
    must(await chooseLetters(referee, { reminder: true, 'report-received': true }));
    expect(must(await remind(editor, submissionId))).toEqual({ reminded: 1 });
    expect((await lettersTo(referee)).filter((subject) => subject.startsWith('A reminder'))).toHaveLength(1);
  });

  it('about a report are not written for an editor who declined them', async () => {
    must(await chooseLetters(editor, { reminder: true, 'report-received': false }));
    must(await openThread(referee, submissionId, { kind: 'question', visibility: 'authors', anchor: { claim: 'C1', at: {} }, body: 'Which band is it?' }));
    must(await handInReport(referee, submissionId, REPORT));
    expect((await lettersTo(editor)).filter((subject) => subject.startsWith('A report'))).toEqual([]);
  });

  it('of a kind that is needed cannot be declined, not even in the database', async () => {
    await expect(desk.sql(`insert into declined_letters (user_id, letter) values ($1, 'decision')`, author.userId)).rejects.toThrow(/declined_letters_optional/);
  });
});

describe('an ORCID iD', () => {
  it('that is typed in is checked, marked as typed in, and not signed', async () => {
    expect(await saveProfile(author, { name: author.name, affiliation: 'North Quay', orcid: '0000-0000-0000-0012' })).toMatchObject({ ok: false, error: { code: 'invalid', sentence: expect.stringContaining('expected a last character') } });
    must(await saveProfile(author, { name: author.name, affiliation: 'North Quay', orcid: `https://orcid.org/${TYPED}` }));
    expect(must(await getReview(editor, submissionId)).authors[0]?.orcid).toEqual({ id: TYPED, authenticated: false });
  });

  it('that ORCID vouched for goes before it, and is signed with the record', async () => {
    await desk.sql(`insert into accounts (user_id, account_id, provider_id) values ($1, $2, 'orcid')`, author.userId, ORCID);
    expect(must(await getReview(editor, submissionId)).authors[0]?.orcid).toEqual({ id: ORCID, authenticated: true });
    must(await enterAtLevelOne(editor, submissionId, 'Two bursts in'));
    const done = await signer.run();
    expect(done).toMatchObject([{ outcome: 'signed' }]);
    const [row] = await desk.sql<{ id: string; document: Buffer }>('select id, document from records');
    if (!row) throw new Error('no record');
    expect(documentOf(row).orcids).toEqual([{ position: 1, orcid: ORCID }]);
    expect(must(await getRecord({ kind: 'visitor' }, row.id)).document.orcids).toEqual([{ position: 1, orcid: ORCID }]);
  });
});

describe('the export of one’s own data', () => {
  const exported = async (who: SignedInActor) => must(await exportOwnData(who)) as Record<string, never>;

  it('gives a referee their report and comments, and nothing of who else is there', async () => {
    const text = JSON.stringify(await exported(referee));
    for (const own of ['Svenja Vasterling', 'Which band is it?', REPORT.answers.definition]) expect(text).toContain(own);
    for (const other of [author.name, author.userId, editor.name, editor.userId, ORCID, '@northquay.example', '@counterfoil.example']) expect(text, other).not.toContain(other);
  });

  it('gives an author the sheet and its files, and nothing of a referee or editor', async () => {
    const data = await exported(author);
    const text = JSON.stringify(data);
    expect(data['submissions']).toMatchObject([{ id: submissionId, revisions: [{ number: 1, sheet: { claims: [{ id: 'C1' }] }, files: [{ name: 'a.txt' }, { name: 'b.txt' }, { name: 'psd.txt' }] }] }]);
    for (const other of [referee.name, referee.userId, editor.name, editor.userId, 'Which band is it?', REPORT.answers.definition, '@saltern.example']) expect(text, other).not.toContain(other);
  });

  it('gives an editor their decision, and not whom they asked', async () => {
    const text = JSON.stringify(await exported(editor));
    expect(text).toContain('I enter it at level 1.');
    for (const other of [referee.name, referee.userId, author.name, author.userId, 'Which band is it?']) expect(text, other).not.toContain(other);
  });

  it('holds no hash, token or secret', async () => {
    await desk.sql(`insert into sessions (user_id, token, expires_at) values ($1, 'a-token-of-a-session', now() + interval '1 day')`, author.userId);
    await desk.sql(`insert into two_factors (user_id, secret, backup_codes) values ($1, 'an-encrypted-secret', 'encrypted-codes')`, author.userId);
    const text = JSON.stringify(await exported(author));
    for (const secret of ['a-token-of-a-session', 'an-encrypted-secret', 'encrypted-codes', 'scrypt$']) expect(text).not.toContain(secret);
  });

  it('is for nobody who is not signed in', async () => {
    expect(await exportOwnData({ kind: 'visitor' })).toMatchObject({ ok: false, error: { code: 'signed-out' } });
  });
});

describe('sessions', () => {
  const begin = async (who: SignedInActor): Promise<string> => {
    const [row] = await desk.sql<{ id: string }>(`insert into sessions (user_id, token, expires_at, user_agent) values ($1, $2, now() + interval '1 day', 'Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0') returning id`, who.userId, randomUUID());
    return row?.id ?? '';
  };

  it('are listed with this one first, without those that have ended, and never another’s', async () => {
    const [first, second, others] = [await begin(referee), await begin(referee), await begin(editor)];
    await desk.sql(`insert into sessions (user_id, token, expires_at) values ($1, 'long-over', now() - interval '1 minute')`, referee.userId);
    const listed = must(await listOwnSessions(referee, second));
    expect(listed.map(({ id, current, device }) => [id, current, device])).toEqual([[second, true, 'Firefox on Linux'], [first, false, 'Firefox on Linux']]);
    expect(await endSession(referee, { id: others })).toMatchObject({ ok: false, error: { code: 'not-found' } });
    expect(must(await listOwnSessions(editor, null)).map(({ id }) => id)).toEqual([others]);
  });

  it('end one by one, or all but this one', async () => {
    const kept = await begin(author);
    const one = await begin(author);
    await begin(author);
    must(await endSession(author, { id: one }));
    expect(must(await listOwnSessions(author, kept)).map(({ id }) => id)).not.toContain(one);
    must(await endOtherSessions(author, kept));
    expect(must(await listOwnSessions(author, kept)).map(({ id }) => id)).toEqual([kept]);
  });
});
