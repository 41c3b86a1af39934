import { sendToReview } from '@/lib/services/reviews/send-to-review';
import type { Course } from './course';
import { must } from './demo-room';
import { loadTogether, lodge, restate } from './lodging';
import { plainReport } from './plain-report';
import { askWithRerun, beginReview, reply, report, sendBack } from './reviewing';

/** D12: a horizon whose mass was not redshifted on the way. Confirmed, restated, and deciding. */
export const horizon: Course = {
  title: 'Horizon of a non-spinning 60-solar-mass system',
  stands: 'deciding, second round',
  beforeOpening: false,
  async run(room, { ondaro, lindmere, vasterling, brightwater, okonjo }) {
    const id = await loadTogether(ondaro, lindmere, 'horizon-of-sixty');
    await lodge(room, ondaro, id);
    await beginReview(okonjo, id, [vasterling, brightwater]);
    const threadId = await askWithRerun(room, vasterling, id, {
      claim: 'C1',
      at: null,
      settings: { massFrame: 'detector' },
      note: 'Is the mass of 60 the one at the detector?',
      body: 'A source of 60 solar masses weighs 129 in the detector at the redshift that the server finds. I reran the claim with 60 **in the detector**.',
    });
    await reply(lindmere, threadId, 'That is what we did: the mass was held at 60 on the way out. We confirm the reading, and shall restate the number for a mass at the source.');
    const answers = plainReport({ conventions: 'Text and sheet say that the mass is that at the source. The printed number holds it fixed at the detector.' });
    await report(vasterling, id, 'minor', answers);
    await report(brightwater, id, 'minor', answers);
    await sendBack(okonjo, id, 'The mass was not redshifted. Please print the horizon of a mass at the source.');
    await restate(ondaro, id, { statement: RESTATED, claims: (claims) => claims.map((claim) => ({ ...claim, claimed: '1.14' })) });
    await lodge(room, ondaro, id);
    must(await sendToReview(okonjo, id));
    await report(vasterling, id, 'enter-1', plainReport({}));
    await report(brightwater, id, 'enter-1', plainReport({}));
  },
};

const RESTATED = [
  'Saltern Institute of Strong Gravity, code *Gridlark*.',
  'A non-spinning, equal-mass system of 60 solar masses at the source is heard with a signal-to-noise ratio of 8, face-on and optimally placed, up to a redshift of 1.14 in the second-generation design curve from 20 Hz. Revision 1 had 0.72, for a mass of 60 in the detector.',
].join('\n\n');
