import { closeThread } from '@/lib/services/reviews/close-thread';
import { sendToReview } from '@/lib/services/reviews/send-to-review';
import type { Course } from './course';
import { must } from './demo-room';
import { loadTogether, lodge, restate } from './lodging';
import { beginReview, enterAtLevelOne, reply, report, sendBack, startThread } from './reviewing';

/** D5: the burst of start-up radiation was counted in. Corrected in the second revision, and entered at level 1. */
export const radiatedEnergy: Course = {
  title: 'Four per cent of the mass radiated',
  stands: 'entered, corrected during review',
  beforeOpening: true,
  async run(room, { dovrel, tansley, vasterling, ondaro, amsel }) {
    const id = await loadTogether(dovrel, tansley, 'start-up-radiation');
    await lodge(room, dovrel, id);
    await beginReview(amsel, id, [vasterling, ondaro]);
    const threadId = await startThread(vasterling, id, { kind: 'must-change', anchor: { claim: 'C1', at: null }, body: 'The first 150 $M$ of the record hold a burst that belongs to no merger. Without it I read 0.0399. Is it in your 4.04 %?' });
    await reply(dovrel, threadId, 'It is. We summed from the first sample. We shall begin after the burst, and put what an inspiral radiates in that time in its place.');
    const answers = {
      definition: 'Yes: interval, modes and normalisation are declared.',
      conventions: 'The sheet leaves the first 150 M out. The printed number does not.',
      data: 'The record begins with a burst and ends after the ring-down. Three modes and their mirrors.',
      budget: 'The stated 0.0002 is narrower than the burst. A second resolution is missing.',
      scope: 'One binary, one interval. Justified.',
    };
    await report(vasterling, id, 'minor', answers);
    await report(ondaro, id, 'minor', { ...answers, budget: 'The burst is 1.3 % of the energy. Modes above ℓ = 4 are left out and named.' });
    await sendBack(amsel, id, 'The number counts the start-up burst, which the sheet leaves out. Please print the energy that the sheet describes.');
    await restate(dovrel, id, { statement: CORRECTED, claims: (claims) => claims.map((claim) => ({ ...claim, claimed: '0.0399' })) });
    await lodge(room, dovrel, id);
    must(await sendToReview(amsel, id));
    must(await closeThread(vasterling, threadId, 'resolved'));
    const again = { ...answers, conventions: 'They match the text now.', budget: 'The stated 0.0002 is wider than every known part.' };
    await report(vasterling, id, 'enter-1', again);
    await report(ondaro, id, 'enter-1', again);
    await enterAtLevelOne(amsel, id, ['corrected during review'], {
      prose: 'Both referees recommend it, and the two routes agree far within the stated tolerance. I enter it at level 1.',
      publicSentence: 'The first revision counted a burst at the start of the simulation; this one does not.',
    });
  },
};

const CORRECTED = [
  'Hollowell Computation Centre, code *Ninefold*.',
  'From the start of the run an equal-mass, non-spinning merger radiates 3.99 % of its mass. The first $150\\,M$ hold start-up radiation; in its place stands what the inspiral radiates meanwhile, by the post-Newtonian flux.',
  'Modes (2,±2), (3,±2), (4,±4).',
].join('\n\n');
