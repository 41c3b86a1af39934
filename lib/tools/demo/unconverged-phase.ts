import { sendToReview } from '@/lib/services/reviews/send-to-review';
import type { Course } from './course';
import { must } from './demo-room';
import { loadTogether, lodge, restate } from './lodging';
import { plainReport } from './plain-report';
import { beginReview, enterAtLevelOne, reply, report, sendBack, startThread } from './reviewing';

/** D6: the order of the code is not the order of the data. Entered at level 1 for a narrower statement. */
export const unconvergedPhase: Course = {
  title: 'Fourth-order phase accuracy of Gridlark',
  stands: 'entered at level 1, scope narrowed',
  beforeOpening: false,
  async run(room, { ondaro, lindmere, vasterling, marrable, amsel }) {
    const id = await loadTogether(ondaro, lindmere, 'unconverged-phase');
    await lodge(room, ondaro, id);
    await beginReview(amsel, id, [vasterling, marrable]);
    const threadId = await startThread(marrable, id, { kind: 'must-change', anchor: { claim: 'C1', at: null }, body: 'The two differences are in the ratio 1.90; fourth order would have 2.33. What is measured is order 2.8. Is there a fourth resolution?' });
    await reply(lindmere, threadId, 'There is none, and it would take months. We withdraw the order and the limit, and keep the difference between the two best runs.');
    const answers = plainReport({ data: 'Three resolutions, which do not converge with the order claimed.', budget: 'The stated 0.18 rad assumes fourth order. By what the runs show it is 0.28 rad at least.' });
    await report(vasterling, id, 'major', { ...answers, scope: 'No limit can be claimed from these runs.' });
    await report(marrable, id, 'major', answers);
    await sendBack(amsel, id, 'Level 2 is out of reach without a fourth resolution. If you claim the phase difference between the two best runs, and nothing of a limit, I shall send it to the referees again.');
    const runs = { id: 'C1', quantity: 'phase-difference', of: { a: 'high', b: 'medium' }, settings: { alignment: 'none', at: 'peak' }, claimed: '0.152' };
    await restate(ondaro, id, { statement: NARROWER, claims: () => [runs] });
    await lodge(room, ondaro, id);
    must(await sendToReview(amsel, id));
    await report(vasterling, id, 'enter-1', plainReport({}));
    await report(marrable, id, 'enter-1', plainReport({}));
    await enterAtLevelOne(amsel, id, ['corrected during review', 'scope narrowed'], {
      prose: 'What is claimed now follows from the files. I enter it at level 1; level 2 was asked for and is declined.',
      publicSentence: 'A difference between two runs. It says nothing of the distance from the limit.',
    });
  },
};

const NARROWER = [
  'Saltern Institute of Strong Gravity, code *Gridlark*.',
  'At the peak the phases of the (2,2) mode of our two best runs, 96 and 112 points to the unit of length, differ by 0.152 rad as the files stand. We claim no order of convergence and no limit.',
].join('\n\n');
