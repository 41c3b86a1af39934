import type { SignedInActor } from '@/lib/policy/actor';
import { closeThread } from '@/lib/services/reviews/close-thread';
import { sendToReview } from '@/lib/services/reviews/send-to-review';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { reviseSubmission } from '@/lib/services/submissions/revise-submission';
import { updateDraft } from '@/lib/services/submissions/update-draft';
import type { Course } from './course';
import { must } from './demo-room';
import { loadSpecimen, lodge } from './lodging';
import type { DemoActors } from './open-accounts';
import { beginReview, enterAtLevelOne, reply, report, sendBack, startThread } from './reviewing';

/** More digits than the data carry: back with the author, and entered in its second revision with fewer. */
export const preciseMatch: Course = {
  title: 'High-precision match of two models',
  stands: 'entered, digits reduced',
  beforeOpening: true,
  async run(room, people) {
    const { brightwater, amsel } = people;
    const id = await loadSpecimen(brightwater, 'precise-match');
    await lodge(room, brightwater, id);
    const threadId = await firstRound(id, people);
    await sendBack(amsel, id, 'The number agrees. Its last two digits do not rest on anything in the budget. Please print what the data carry, and say nothing of the mismatch of the two resolutions that they cannot resolve. I shall ask the same referees to look at it once more.');
    must(await reviseSubmission(brightwater, id));
    await reduceDigits(brightwater, id);
    await lodge(room, brightwater, id);
    await secondRound(id, threadId, people);
    await enterAtLevelOne(amsel, id, ['digits reduced'], {
      prose: 'Revision 2 prints four decimals, which both referees accept. I enter it at level 1.',
      publicSentence: 'The first revision printed six decimals; four are what the data carry.',
    });
  },
};

async function firstRound(id: string, { brightwater, vasterling, tansley, amsel }: DemoActors): Promise<string> {
  await beginReview(amsel, id, [vasterling, tansley]);
  const threadId = await startThread(tansley, id, { kind: 'should-change', anchor: { claim: 'C1', at: null }, body: 'I find the same number. Why six decimals? Half a window more or less at the beginning moves the third.' });
  await reply(brightwater, threadId, 'We printed what the program gave. Four would do.');
  await report(vasterling, id, 'minor', {
    definition: 'Yes.',
    conventions: 'They match the text.',
    data: 'Two resolutions of each model, which is good to have.',
    budget: 'The window is the largest part that is known. It supports no more than four decimals.',
    scope: 'One mass and one curve, as it says.',
  });
  await report(tansley, id, 'minor', {
    definition: 'Yes, it can be recomputed and I did.',
    conventions: 'Nothing is left open that matters here.',
    data: 'Long enough, finely sampled.',
    budget: 'Six decimals are too many; see the thread.',
    scope: 'Justified.',
  });
  return threadId;
}

async function reduceDigits(author: SignedInActor, id: string): Promise<void> {
  const { revision } = must(await getDraft(author, id));
  const [match] = revision.sheet.claims;
  const statement = [
    'Oxbow Relativity Unit, code *Oxbow-4*.',
    'The match of two of our equal-mass models, spins 0 and 0.2, at 100 solar masses with the second-generation design curve from 20 Hz is $\\mathcal M=0.9889$.',
  ].join('\n\n');
  must(await updateDraft(author, id, { version: revision.version, statement, sheet: { claims: [{ ...match, claimed: '0.9889' }] as never } }));
}

async function secondRound(id: string, threadId: string, { vasterling, tansley, amsel }: DemoActors): Promise<void> {
  must(await sendToReview(amsel, id));
  must(await closeThread(tansley, threadId, 'resolved'));
  for (const referee of [vasterling, tansley])
    await report(referee, id, 'enter-1', {
      definition: 'Yes, as before.',
      conventions: 'As before.',
      data: 'As before.',
      budget: 'Four decimals are what the known parts allow.',
      scope: 'Justified.',
    });
}
