import { closeThread } from '@/lib/services/reviews/close-thread';
import type { Course } from './course';
import { must } from './demo-room';
import { loadTogether, lodge } from './lodging';
import { plainReport } from './plain-report';
import { beginReview, enterAtLevelOne, reply, report, startThread } from './reviewing';

/** D11: the same word for two quantities. Entered with the definition in its sentence. */
export const spinBlindSearch: Course = {
  title: 'What a spin-blind search sees',
  stands: 'entered at level 1, scope narrowed',
  beforeOpening: false,
  async run(room, { brightwater, hartsease, vasterling, marrable, okonjo }) {
    const id = await loadTogether(brightwater, hartsease, 'spin-blind-search');
    await lodge(room, brightwater, id);
    await beginReview(okonjo, id, [vasterling, marrable]);
    const threadId = await startThread(vasterling, id, { kind: 'should-change', anchor: { claim: 'C1', at: null }, body: '65 % is the part at fixed mass. A search moves its mass as well, and then it is 99 %. Both are claimed; whoever quotes the first should have to say which it is.' });
    await reply(hartsease, threadId, 'The statement says “at fixed mass” beside it. We have no objection to the record saying so in its sentence.');
    must(await closeThread(vasterling, threadId, 'resolved'));
    const answers = plainReport({ definition: 'Both fractions are defined, by what the template may do.', scope: 'At fixed mass for the first two numbers. The title does not say it.' });
    await report(vasterling, id, 'enter-1', answers);
    await report(marrable, id, 'enter-1', answers);
    await enterAtLevelOne(okonjo, id, ['scope narrowed'], {
      prose: 'All five numbers agree for the definitions declared. I enter them at level 1, with the definition in the sentence that everybody reads.',
      publicSentence: '65.5 % is the part of the plane at fixed mass; with the mass of the template free it is 99.1 %.',
    });
  },
};
