import type { Course } from './course';
import { loadTogether, lodge } from './lodging';
import { plainReport } from './plain-report';
import { beginReview, reply, report, startThread } from './reviewing';

/** D14: the arithmetic agrees, the stated one per cent does not cover the join. Both reports are in. */
export const longSignal: Course = {
  title: 'Long signals by amplitude stitching',
  stands: 'deciding',
  beforeOpening: false,
  async run(room, { pellworm, vasterling, ondaro, marrable, okonjo }) {
    const id = await loadTogether(pellworm, vasterling, 'long-signal');
    await lodge(room, pellworm, id);
    await beginReview(okonjo, id, [ondaro, marrable]);
    const threadId = await startThread(marrable, id, { kind: 'should-change', anchor: { claim: 'C1', at: null }, body: 'With the corrected amplitude below the join I find 41.1 instead of 42.7. You state one per cent, and this is four.' });
    await reply(pellworm, threadId, 'The one per cent is from moving the join between 80 and 120 Hz. We had not counted the amplitude itself.');
    const answers = plainReport({ budget: 'Understated. What the post-Newtonian amplitude leaves open is several per cent, by the server’s own budget.' });
    await report(ondaro, id, 'enter-1', answers);
    await report(marrable, id, 'minor', { ...answers, scope: 'The number is right for the recipe. The recipe is not right to one per cent.' });
  },
};
