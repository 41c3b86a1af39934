import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SignedInActor } from '@/lib/policy/actor';
import { takeOverFile } from '@/lib/services/files/take-over-file';
import { openFile } from '@/lib/services/files/open-file';
import { addCoAuthor, confirmAuthorship, removeCoAuthor, restoreCoAuthor } from '@/lib/services/submissions/change-people';
import { createDraft } from '@/lib/services/submissions/create-draft';
import { duplicateSubmission } from '@/lib/services/submissions/duplicate-submission';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { listEarlierParts } from '@/lib/services/submissions/list-earlier-parts';
import { draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let author: SignedInActor;
let stranger: SignedInActor;
let first: string;
beforeAll(async () => {
  desk = await openServiceDesk();
  author = await desk.person('T. Marrable');
  stranger = await desk.person('E. Stranger');
  first = await draftWithBursts(author);
});
afterAll(() => desk.close());

const emailOf = async (userId: string) => (await desk.sql<{ email: string }>('select email from users where id = $1', userId))[0]?.email ?? '';

describe('a duplicate', () => {
  it('is a draft of one’s own with sheet, statement and the same stored bytes', async () => {
    const { id } = must(await duplicateSubmission(author, first, {}));
    const [source, copy] = [must(await getDraft(author, first)), must(await getDraft(author, id))];
    expect(copy.title).toBe(`Copy of ${source.title}`);
    expect([copy.state, copy.revision.number, copy.revision.statement]).toEqual(['draft', 1, source.revision.statement]);
    expect([copy.revision.sheet.waveforms, copy.revision.sheet.noise, copy.revision.sheet.claims]).toEqual([source.revision.sheet.waveforms, source.revision.sheet.noise, source.revision.sheet.claims]);
    expect(copy.revision.files.map(({ name, sha256 }) => [name, sha256])).toEqual(source.revision.files.map(({ name, sha256 }) => [name, sha256]));
    const keys = await desk.sql<{ copies: number; keys: number }>('select count(*)::int copies, count(distinct storage_key)::int keys from stored_files where submission_id in ($1, $2)', first, id);
    expect(keys[0]).toEqual({ copies: 2 * source.revision.files.length, keys: source.revision.files.length });
  });

  it('keeps in the trail whose copy it is', async () => {
    const { id } = must(await duplicateSubmission(author, first, { revision: 1 }));
    const [entry] = await desk.sql<{ action: string; details: unknown }>('select action, details from audit_entries where subject_id = $1', id);
    expect(entry).toMatchObject({ action: 'submission.create', details: { copyOf: first, revision: 1 } });
  });

  it('of what one did not write is not given, and leaves nothing behind', async () => {
    const before = await desk.sql('select 1 from submissions');
    const refused = await duplicateSubmission(stranger, first, {});
    expect(refused.ok || refused.error.code).toBe('not-found');
    const absent = await duplicateSubmission(author, first, { revision: 7 });
    expect(absent.ok || absent.error.code).toBe('not-found');
    expect(await desk.sql('select 1 from submissions')).toHaveLength(before.length);
  });
});

describe('what one wrote earlier', () => {
  it('lists noise curves with their file and the settings of claims, and nobody else’s', async () => {
    const mine = must(await listEarlierParts(author)).find((one) => one.submissionId === first);
    const sheet = must(await getDraft(author, first)).revision.sheet;
    expect(mine?.noise.map(({ name, declaration }) => [name, declaration])).toEqual(Object.entries(sheet.noise));
    expect(mine?.claims.map(({ id, settings }) => [id, settings])).toEqual(sheet.claims.filter((c) => c['settings'] !== undefined).map((c) => [c['id'], c['settings']]));
    expect(must(await listEarlierParts(stranger))).toEqual([]);
  });

  it('lends a file to another draft without a second copy, to its author alone', async () => {
    const { id } = must(await createDraft(author));
    const [file] = must(await getDraft(author, first)).revision.files;
    if (!file) throw new Error('the draft has no file');
    const taken = must(await takeOverFile(author, id, { submissionId: first, fileId: file.id, name: 'curve.txt' }));
    expect(taken).toMatchObject({ name: 'curve.txt', sha256: file.sha256, bytes: file.bytes });
    expect(must(await openFile(author, id, taken.id)).sha256).toBe(file.sha256);
    const theirs = must(await createDraft(stranger));
    const refused = await takeOverFile(stranger, theirs.id, { submissionId: first, fileId: file.id, name: 'curve.txt' });
    expect(refused.ok || refused.error.code).toBe('not-found');
  });
});

describe('a co-author who was taken off', () => {
  it('comes back to the same place and stays confirmed; once, and not after the time is over', async () => {
    const [second, third] = [await desk.person('L. Quennell'), await desk.person('M. Ondaro')];
    for (const { userId } of [second, third]) must(await addCoAuthor(author, first, { email: await emailOf(userId) }));
    must(await confirmAuthorship(second, first));
    const before = must(await getDraft(author, first)).authors;
    must(await removeCoAuthor(author, first, { userId: second.userId }));
    expect((await getDraft(second, first)).ok).toBe(false);
    must(await restoreCoAuthor(author, first, { userId: second.userId }));
    expect(must(await getDraft(author, first)).authors).toEqual(before);
    expect((await restoreCoAuthor(author, first, { userId: second.userId })).ok).toBe(false);
    expect((await restoreCoAuthor(author, first, { userId: stranger.userId })).ok).toBe(false);
  });

  it('goes to the end when somebody stands in their place by now', async () => {
    const last = await desk.person('K. Dovrel');
    const newer = await desk.person('H. Brightwater');
    must(await addCoAuthor(author, first, { email: await emailOf(last.userId) }));
    must(await removeCoAuthor(author, first, { userId: last.userId }));
    must(await addCoAuthor(author, first, { email: await emailOf(newer.userId) }));
    must(await restoreCoAuthor(author, first, { userId: last.userId }));
    expect(must(await getDraft(author, first)).authors.slice(-2).map((a) => a.name)).toEqual(['H. Brightwater', 'K. Dovrel']);
  });
});
