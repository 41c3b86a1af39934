import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SignedInActor } from '@/lib/policy/actor';
import { addCoAuthor, confirmAuthorship, removeCoAuthor } from '@/lib/services/submissions/change-people';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { updateDraft } from '@/lib/services/submissions/update-draft';
import { withdrawSubmission } from '@/lib/services/submissions/withdraw-submission';
import { draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let author: SignedInActor;
let second: SignedInActor;
let id: string;
let address: string;

beforeAll(async () => {
  desk = await openServiceDesk();
  [author, second] = [await desk.person('T. Marrable'), await desk.person('I. Szenthe-Crowe')];
  id = await draftWithBursts(author);
  address = (await desk.sql<{ email: string }>('select email from users where id = $1', second.userId))[0]?.email ?? '';
});
afterAll(() => desk.close());

describe('co-authors', () => {
  it('see and edit the draft once they are named, and cannot lodge, withdraw or name others', async () => {
    expect(await getDraft(second, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
    must(await addCoAuthor(author, id, { email: address.toUpperCase() }));
    const { version } = must(await updateDraft(second, id, { version: 2, statement: 'A word of mine.' }));
    expect(version).toBe(3);
    for (const refused of [await lodgeSubmission(second, id), await withdrawSubmission(second, id, { reason: 'x' }), await addCoAuthor(second, id, { email: address })])
      expect(refused).toMatchObject({ ok: false, error: { code: 'denied' } });
  });

  it('stand before lodging until each has confirmed for themselves', async () => {
    must(await checkDraft(author, id));
    await desk.runAll();
    expect(must(await getDraft(author, id)).beforeLodging).toEqual(['I. Szenthe-Crowe has not confirmed authorship and the release of the data. Ask them to.']);
    expect(await confirmAuthorship(author, id)).toMatchObject({ ok: false, error: { code: 'conflict' } });
    must(await confirmAuthorship(second, id));
    expect(must(await getDraft(author, id)).beforeLodging).toEqual([]);
  });

  it('are named by an address that has an account, once, and never the author', async () => {
    for (const email of ['nobody@larkfield.example', address]) expect(await addCoAuthor(author, id, { email })).toMatchObject({ ok: false, error: { code: 'invalid' } });
    expect(await removeCoAuthor(author, id, { userId: author.userId })).toMatchObject({ ok: false, error: { code: 'not-found' } });
    must(await removeCoAuthor(author, id, { userId: second.userId }));
    expect(await getDraft(second, id)).toMatchObject({ ok: false, error: { code: 'not-found' } });
  });
});
