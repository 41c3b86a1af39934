import type { ResultPoint } from '@/lib/pipeline/result';
import type { SignedInActor } from '@/lib/policy/actor';
import { listVariations } from '@/lib/services/variations/list-variations';
import { requestVariation } from '@/lib/services/variations/request-variation';
import { confirmAuthorship } from '@/lib/services/submissions/change-people';
import type { Course } from './course';
import { must, type DemoRoom } from './demo-room';
import { loadSpecimen, lodge, nameCoAuthor } from './lodging';
import { DEMO_PEOPLE } from './people';
import { ask, beginReview, reply, report, startThread } from './reviewing';

/** The wrong cut-off: the text says 20 Hz, the numbers are those of 30 Hz. In review, with one report in. */
export const spinVisible: Course = {
  title: 'Spin 0.2 is visible at 60 solar masses',
  stands: 'in review',
  async run(room, { marrable, quennell, vasterling, tansley, ondaro, amsel }) {
    const id = await loadSpecimen(marrable, 'spin-visible');
    await nameCoAuthor(marrable, id, DEMO_PEOPLE.quennell.email);
    must(await confirmAuthorship(quennell, id));
    await lodge(room, marrable, id);
    await beginReview(amsel, id, [vasterling, tansley]);
    await ask(amsel, id, ondaro);
    await talkAboutTheEdge(room, id, vasterling, marrable);
    await talkAboutTheCurve(id, tansley, quennell);
    await startThread(tansley, id, { kind: 'note', visibility: 'referees', anchor: { claim: 'C1', at: null }, body: 'The lower edge was my first thought too. I leave that thread to you and look at the noise curve.' });
    await report(tansley, id, 'major', {
      definition: 'Yes. The match is maximised over time and phase, and the maximisation is declared.',
      conventions: 'Not all of them. With the declared lower edge of 20 Hz none of the three numbers comes out.',
      data: 'Fit. Both records begin well below the band at the three masses, and the sampling is fine enough.',
      budget: 'The numerical part is far smaller than the claimed digits. A second resolution is missing, so the part of the simulation stays unknown.',
      scope: 'The conclusion is worded for one detector and one mass, and should stay there.',
    });
  },
};

async function talkAboutTheEdge(room: DemoRoom, id: string, referee: SignedInActor, author: SignedInActor): Promise<void> {
  const claim = { claim: 'C1', at: { totalMassMsun: 60 } };
  const note = 'The 20 Hz edge: does 30 Hz give the printed numbers?';
  const { variationId, runId } = must(await requestVariation(referee, id, { claimId: 'C1', changes: { settings: { fLowHz: 30 } }, note }));
  await room.compute(runId);
  const found = (await pointsOf(referee, id, variationId)).map((p) => `${numberAt(p)} at ${p.at['totalMassMsun']} solar masses`);
  const body = `The text and the sheet say $f_l=20$ Hz. I reran the claim with **30 Hz** and nothing else changed: ${found.join(', ')}. Which edge do you mean?`;
  const threadId = await startThread(referee, id, { kind: 'must-change', anchor: claim, body, variationId });
  await reply(author, threadId, 'Thank you. The script that made the table reads its edge from a file of settings, and that file says 30 Hz. We are finding out which of the two we want to claim, and will restate either the edge or the numbers.');
}

async function talkAboutTheCurve(id: string, referee: SignedInActor, author: SignedInActor): Promise<void> {
  const anchor = { claim: 'C1', at: { totalMassMsun: 200 } };
  const threadId = await startThread(referee, id, { kind: 'question', anchor, body: 'Is `noise.txt` the published design fit or a curve of your own? At 200 solar masses the difference would show.' });
  await reply(author, threadId, 'It is the fit, written out at 600 points as an amplitude density.');
}

async function pointsOf(actor: SignedInActor, id: string, variationId: string): Promise<readonly ResultPoint[]> {
  const { variations } = must(await listVariations(actor, id));
  const run = variations.find((v) => v.id === variationId)?.run;
  if (run?.state !== 'measured') throw new Error(`the rerun of ${id} is ${run?.state ?? 'not there'}`);
  return run.result.claims[0]?.points ?? [];
}

const numberAt = ({ value }: ResultPoint): string => (value === null ? 'no number' : value.toFixed(4));
