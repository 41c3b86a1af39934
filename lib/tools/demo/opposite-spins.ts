import { sendToReview } from '@/lib/services/reviews/send-to-review';
import { closeThread } from '@/lib/services/reviews/close-thread';
import type { Course } from './course';
import { must } from './demo-room';
import { loadTogether, lodge, restate, type DraftClaim } from './lodging';
import { plainReport } from './plain-report';
import { beginReview, enterAtLevelOne, reply, report, sendBack, startThread } from './reviewing';

/** D10: true of the quadrupole and near the axis, claimed for every side. Entered for the narrower statement. */
export const oppositeSpins: Course = {
  title: 'Opposite spins cannot be told apart',
  stands: 'entered at level 1, scope narrowed',
  beforeOpening: false,
  async run(room, { dovrel, tansley, brightwater, ondaro, okonjo }) {
    const id = await loadTogether(dovrel, tansley, 'opposite-spins');
    await lodge(room, dovrel, id);
    await beginReview(okonjo, id, [brightwater, ondaro]);
    const edgeOn = await startThread(brightwater, id, { kind: 'must-change', anchor: { claim: 'C1', at: null }, body: 'From 60° on the match is below your limit, edge-on by a good hundredth. Why “at every inclination”?' });
    await reply(dovrel, edgeOn, 'For the (2,±2) modes it holds from every side; the second claim shows it.');
    await reply(brightwater, edgeOn, 'The detector does not receive the (2,±2) modes alone. You have modes up to ℓ = 4 in your files, and (2,±1) and (3,±3) are what spins of opposite sign excite.');
    await reply(dovrel, edgeOn, 'We had thought them too weak to matter. At 60° they do.');
    await reply(brightwater, edgeOn, 'Then say up to which angle the statement holds. By the server’s points 30° holds, and only just.');
    await reply(tansley, edgeOn, 'Up to about 30°. We shall claim that and no more, and name the modes.');
    const answers = plainReport({ scope: 'Not justified. It holds near the axis, and for the quadrupole alone.' });
    await report(brightwater, id, 'major', answers);
    await report(ondaro, id, 'major', { ...answers, budget: 'No resolution is given. The difference edge-on is far beyond anything it could do.' });
    await sendBack(okonjo, id, 'The statement holds for a narrower scope than it has. Level 3 cannot be given to it. Please claim what your own points support.');
    await restate(dovrel, id, { statement: NEAR_THE_AXIS, claims: (claims) => claims.map(narrowed) });
    await lodge(room, dovrel, id);
    must(await sendToReview(okonjo, id));
    must(await closeThread(brightwater, edgeOn, 'resolved'));
    await report(brightwater, id, 'enter-1', plainReport({}));
    await report(ondaro, id, 'enter-1', plainReport({}));
    await enterAtLevelOne(okonjo, id, ['scope narrowed'], {
      prose: 'Revision 2 claims what its points show. I enter it at level 1; level 2 waits for a second resolution.',
      publicSentence: 'Up to an inclination of 30°. Seen from the side the two can be told apart.',
    });
  },
};

const narrowed = (claim: DraftClaim): DraftClaim => (claim.id === 'C1' ? { ...claim, over: { inclinationRad: [0, 0.2618, 0.5236] } } : claim);

const NEAR_THE_AXIS = [
  'Hollowell Computation Centre, code *Ninefold*.',
  'At 100 solar masses an equal-mass binary with spins of 0.6 and −0.6 cannot be told from one without spin when it is seen within 30° of its axis: their match, all modes to ℓ = 4, is above 0.999 there, from 20 Hz in the second-generation design curve. With the (2,±2) modes alone it is so from every side.',
].join('\n\n');
