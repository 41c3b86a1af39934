import { closeThread } from '@/lib/services/reviews/close-thread';
import type { Course } from './course';
import { must } from './demo-room';
import { loadTogether, lodge } from './lodging';
import { plainReport } from './plain-report';
import { beginReview, enter, reply, report, startThread } from './reviewing';

/** D13, the clean example: three resolutions, four radii, and an uncertainty that covers them. Entered at level 2. */
export const remnant: Course = {
  title: 'Remnant of a 2:1 merger by balance',
  stands: 'entered at level 2',
  beforeOpening: false,
  async run(room, { marrable, quennell, tansley, ondaro, amsel }) {
    const id = await loadTogether(marrable, quennell, 'remnant-by-balance');
    await lodge(room, marrable, id);
    await beginReview(amsel, id, [tansley, ondaro]);
    const threadId = await startThread(ondaro, id, { kind: 'question', anchor: { claim: 'C1', at: null }, body: 'Where does the balance begin: at the first sample, or after the burst?' });
    await reply(quennell, threadId, 'At $t=150\\,M$, after the burst. The mass that was there at that moment is taken from the post-Newtonian binding energy.');
    must(await closeThread(ondaro, threadId, 'resolved'));
    const answers = plainReport({ data: 'Three resolutions and four radii of one simulation; the burst is declared and left out.', budget: 'Resolution and radius are measured, and the stated uncertainty covers both.' });
    await report(tansley, id, 'enter-2', answers);
    await report(ondaro, id, 'enter-3', { ...answers, scope: 'One mass ratio without spin, as it says. Fits and ring-down are consistent with it.' });
    await enter(amsel, id, 2, [], {
      prose: 'The numbers agree, and so do their uncertainties. One referee recommends level 3; nobody has scanned a wider domain, so I enter it at level 2.',
      publicSentence: 'Mass and spin by balance, with three resolutions and four radii behind their uncertainties.',
    });
  },
};
