import { sendToReview } from '@/lib/services/reviews/send-to-review';
import type { Course } from './course';
import { must } from './demo-room';
import { loadTogether, lodge, restate } from './lodging';
import { plainReport } from './plain-report';
import { beginReview, reply, report, sendBack, startThread } from './reviewing';

/** D4: a mass at the source, a number of the detector. One number may be chance; the second revision claims two. */
export const sourceFrame: Course = {
  title: 'A 60-solar-mass source at redshift 0.197',
  stands: 'in review, second round',
  beforeOpening: false,
  async run(room, { pellworm, vasterling, tansley, brightwater, amsel }) {
    const id = await loadTogether(pellworm, vasterling, 'source-frame');
    await lodge(room, pellworm, id);
    await beginReview(amsel, id, [tansley, brightwater]);
    const threadId = await startThread(brightwater, id, { kind: 'must-change', anchor: { claim: 'C1', at: null }, body: 'The number would fit a mass of 60 in the detector. It might fit something else as well: one number cannot tell. Please give a second mass.' });
    const answers = plainReport({ conventions: 'The text says that the mass is that at the source. The number is 12 % below what that gives.' });
    await report(brightwater, id, 'major', answers);
    await report(tansley, id, 'major', { ...answers, scope: 'One mass, one redshift. A second mass would show what was done.' });
    await sendBack(amsel, id, 'One number does not show why it is 12 % low. Please claim a second mass, computed in the same way.');
    await restate(pellworm, id, { statement: TWO_MASSES, claims: (claims) => claims.map(atTwoMasses) });
    await reply(pellworm, threadId, 'Revision 2 has 100 solar masses beside 60, from the same program.');
    await lodge(room, pellworm, id);
    must(await sendToReview(amsel, id));
  },
};

function atTwoMasses({ settings, ...claim }: { readonly id: string; readonly settings?: Readonly<Record<string, unknown>> }) {
  const { totalMassMsun: _one, ...others } = settings ?? {};
  return { ...claim, settings: others, over: { totalMassMsun: [60, 100] }, claimed: ['36.30', '52.68'] };
}

const TWO_MASSES = [
  'North Quay Astrophysics, code *Ferrywright*.',
  'Equal-mass mergers without spin have 60 and 100 solar masses in their own frame. At redshift 0.1972, a luminosity distance of 1000 Mpc, they are heard face-on with signal-to-noise ratios of 36.30 and 52.68 in the second-generation design curve from 20 Hz.',
].join('\n\n');
