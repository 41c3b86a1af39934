import { closeThread } from '@/lib/services/reviews/close-thread';
import type { Course } from './course';
import { must } from './demo-room';
import { loadSpecimen, lodge } from './lodging';
import { beginReview, enterAtLevelOne, reply, report, startThread } from './reviewing';

/** The clean one: what is printed follows from the files. Entered at level 1. */
export const radiatedEnergy: Course = {
  title: 'Four per cent of the mass radiated',
  stands: 'entered',
  async run(room, { dovrel, vasterling, ondaro, amsel }) {
    const id = await loadSpecimen(dovrel, 'radiated-energy');
    await lodge(room, dovrel, id);
    await beginReview(amsel, id, [vasterling, ondaro]);
    const threadId = await startThread(vasterling, id, { kind: 'question', anchor: { claim: 'C1', at: null }, body: 'Is the energy before the first sample part of the 4 %?' });
    await reply(dovrel, threadId, 'No. The statement says so, and the setting `includeEnergyBeforeStart` is declared as false.');
    must(await closeThread(vasterling, threadId, 'resolved'));
    const answers = {
      definition: 'Yes: interval, modes and normalisation are declared.',
      conventions: 'They match the text.',
      data: 'The record begins quietly and ends after the ring-down. Three modes and their mirrors.',
      budget: 'The stated 0.0002 is wider than every known part. A second resolution is missing.',
      scope: 'One binary, one interval. Justified.',
    };
    await report(vasterling, id, 'enter-1', answers);
    await report(ondaro, id, 'enter-1', { ...answers, budget: 'Credible. Modes above ℓ = 4 are left out and named.' });
    await enterAtLevelOne(amsel, id, [], {
      prose: 'Both referees recommend it, and the two routes agree far within the stated tolerance. I enter it at level 1.',
      publicSentence: 'Energy of the record alone, without what was radiated before its first sample.',
    });
  },
};
