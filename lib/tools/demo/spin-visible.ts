import { closeThread } from '@/lib/services/reviews/close-thread';
import { sendToReview } from '@/lib/services/reviews/send-to-review';
import { sayOfCandidate } from './answer-candidate';
import type { Course } from './course';
import { must, type DemoRoom } from './demo-room';
import { loadTogether, lodge, restate } from './lodging';
import type { DemoActors } from './open-accounts';
import { ask, askWithRerun, beginReview, reply, report, sendBack, startThread } from './reviewing';

/** D1, the wrong cut-off: the text says 20 Hz, the numbers are those of 30 Hz. Restated, and in its second round with one report in. */
export const spinVisible: Course = {
  title: 'Spin 0.2 is visible at 60 solar masses',
  stands: 'in review, second round',
  beforeOpening: true,
  async run(room, people) {
    const { marrable, quennell, tansley, ondaro, amsel } = people;
    const id = await loadTogether(marrable, quennell, 'spin-visible');
    await lodge(room, marrable, id);
    const edge = await firstRound(room, id, people);
    await sayOfCandidate(marrable, id, { claim: 'C1', convention: 'C04', answer: 'confirmed', note: 'The script that made the table reads its edge from a file of settings, and that file says 30 Hz; the text says 20 Hz.' });
    await sendBack(amsel, id, 'None of the three numbers follows from a lower edge of 20 Hz, and all three follow from 30 Hz. Please restate either the edge or the numbers. The same referees will look once more.');
    await restate(marrable, id, { statement: RESTATED, claims: (claims) => claims.map((claim) => ({ ...claim, settings: { ...claim.settings, fLowHz: 30 } })) });
    await reply(marrable, edge, 'The table was made with 30 Hz, and that is the band we mean. Revision 2 says so, in the text and in the sheet; the numbers stay.');
    await lodge(room, marrable, id);
    must(await sendToReview(amsel, id));
    await ask(amsel, id, ondaro);
    await report(tansley, id, 'enter-1', { ...SECOND_REPORT });
  },
};

const RESTATED = [
  'Larkfield Wave Group, code *Tinderbox*.',
  'Two equal-mass binaries, one without spin and one with $\\chi_1=\\chi_2=0.2$ along the orbital angular momentum, are told apart by a second-generation detector: with a lower cut-off of **30 Hz** (revision 1 said 20 Hz) their match is $\\mathcal M=0.9753$ at 60 solar masses, and 0.9959 and 0.9932 at 100 and 200 solar masses.',
  'Only the (2,±2) modes are used; masses are detector-frame.',
].join('\n\n');

async function firstRound(room: DemoRoom, id: string, { marrable, quennell, vasterling, tansley, amsel }: DemoActors): Promise<string> {
  await beginReview(amsel, id, [vasterling, tansley]);
  const edge = await askWithRerun(room, vasterling, id, {
    claim: 'C1',
    at: { totalMassMsun: 60 },
    settings: { fLowHz: 30 },
    note: 'The 20 Hz edge: does 30 Hz give the printed numbers?',
    body: 'The text and the sheet say $f_l=20$ Hz. I reran the claim with **30 Hz** and nothing else changed. Which edge do you mean?',
  });
  await reply(marrable, edge, 'Thank you. The script that made the table reads its edge from a file of settings, and that file says 30 Hz. We are finding out which of the two we want to claim.');
  const curve = await startThread(tansley, id, { kind: 'question', anchor: { claim: 'C1', at: { totalMassMsun: 200 } }, body: 'Is `noise.txt` the published design fit or a curve of your own? At 200 solar masses the difference would show.' });
  await reply(quennell, curve, 'It is the fit, written out at 600 points as an amplitude density.');
  must(await closeThread(tansley, curve, 'resolved'));
  await startThread(tansley, id, { kind: 'note', visibility: 'referees', anchor: { claim: 'C1', at: null }, body: 'The lower edge was my first thought too. I leave that thread to you and look at the noise curve.' });
  await report(tansley, id, 'major', FIRST_REPORT);
  await report(vasterling, id, 'major', { ...FIRST_REPORT, conventions: 'The declared edge of 20 Hz does not give the numbers; 30 Hz gives all three. See the thread.', scope: 'One detector, three masses. It should stay worded so.' });
  return edge;
}

const FIRST_REPORT = {
  definition: 'Yes. The match is maximised over time and phase, and the maximisation is declared.',
  conventions: 'Not all of them. With the declared lower edge of 20 Hz none of the three numbers comes out.',
  data: 'Fit. Both records begin well below the band at the three masses, and the sampling is fine enough.',
  budget: 'The numerical part is far smaller than the claimed digits. A second resolution is missing, so the part of the simulation stays unknown.',
  scope: 'The conclusion is worded for one detector and one mass, and should stay there.',
};

const SECOND_REPORT = {
  ...FIRST_REPORT,
  conventions: 'Now they do. The edge is 30 Hz in text and sheet, and the three numbers come out.',
};
