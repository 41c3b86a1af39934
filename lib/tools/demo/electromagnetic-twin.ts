import { sendToReview } from '@/lib/services/reviews/send-to-review';
import { closeThread } from '@/lib/services/reviews/close-thread';
import type { Course } from './course';
import { must } from './demo-room';
import { loadTogether, lodge, restate, type DraftClaim } from './lodging';
import { plainReport } from './plain-report';
import { beginReview, enterAtLevelOne, reply, report, sendBack, startThread } from './reviewing';

/** D9: a linear rule where the field enters squared, and a signal below the cut-off of the plasma. Corrected, and entered. */
export const electromagneticTwin: Course = {
  title: 'Electromagnetic twin of a supermassive merger',
  stands: 'entered, corrected during review and scope narrowed',
  beforeOpening: false,
  async run(room, { pellworm, vasterling, ondaro, dovrel, amsel }) {
    const id = await loadTogether(pellworm, vasterling, 'electromagnetic-twin');
    await lodge(room, pellworm, id);
    await beginReview(amsel, id, [ondaro, dovrel]);
    const scaling = await startThread(ondaro, id, { kind: 'must-change', anchor: { claim: 'C2', at: null }, body: 'From $10^4$ to $10^6$ G your energy grows a hundredfold. Your own exponent is 2.00, which makes it ten thousandfold.' });
    await reply(pellworm, scaling, 'The table scaled the first run by $B$ instead of $B^2$. The second run was never read. We shall print what it gives.');
    const seen = await startThread(dovrel, id, { kind: 'must-change', anchor: { claim: 'C5', at: null }, body: 'The signal is at $1.8\\times10^{-4}$ Hz. Nothing below 1.6 kHz propagates in your plasma. “Observable in low-frequency radio” cannot stand.' });
    await reply(vasterling, seen, 'Agreed. It is emitted, and not observed. We shall say “emitted” and claim the frequency itself.');
    const answers = plainReport({ scope: 'The claim on observation is not supported by anything in the files.', conventions: 'One energy was scaled linearly with the field, against the exponent claimed beside it.' });
    await report(ondaro, id, 'major', answers);
    await report(dovrel, id, 'major', answers);
    await sendBack(amsel, id, 'Two things: the energy in the strong field, and the word “observable”. Both referees are plain about them, and so are the authors.');
    await restate(pellworm, id, { statement: EMITTED, claims: (claims) => claims.map(corrected) });
    await lodge(room, pellworm, id);
    must(await sendToReview(amsel, id));
    must(await closeThread(ondaro, scaling, 'resolved'));
    must(await closeThread(dovrel, seen, 'resolved'));
    await report(ondaro, id, 'enter-1', plainReport({}));
    await report(dovrel, id, 'enter-1', plainReport({}));
    await enterAtLevelOne(amsel, id, ['corrected during review', 'scope narrowed'], {
      prose: 'Both points are answered in revision 2. I enter it at level 1.',
      publicSentence: 'The energy is emitted in a uniform field; nothing is said of whether it could be observed.',
    });
  },
};

function corrected(claim: DraftClaim): DraftClaim {
  if (claim.id === 'C2') return { ...claim, claimed: '1.0e-11' };
  return claim.id === 'C5' ? { ...claim, claimed: '1.79e-4' } : claim;
}

const EMITTED = [
  'North Quay Astrophysics, code *Ferrywright*.',
  'An equal-mass merger of $10^8$ solar masses in a uniform magnetic field emits an electromagnetic twin of its gravitational wave. In a field of $10^4$ G the energy is $E_{EM}/M=10^{-15}$, or $2.8\\times10^{-14}$ of what goes into gravitational waves from $t=100\\,M$ on; in $10^6$ G it is $10^{-11}$. The two signals mirror each other. The twin is emitted at $1.79\\times10^{-4}$ Hz, far below the cut-off of the surrounding plasma.',
].join('\n\n');
