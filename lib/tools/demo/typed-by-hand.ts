import type { Course } from './course';
import { loadTogether, lodge } from './lodging';
import { plainReport } from './plain-report';
import { beginReview, reply, report, sendBack, startThread } from './reviewing';

/** D15: the number agrees with a curve in which two digits are changed about. Back with the author before anything is entered. */
export const typedByHand: Course = {
  title: 'Noise curve typed by hand',
  stands: 'back with the author',
  beforeOpening: false,
  async run(room, { dovrel, tansley, ondaro, brightwater, amsel }) {
    const id = await loadTogether(dovrel, tansley, 'typed-by-hand');
    await lodge(room, dovrel, id);
    await beginReview(amsel, id, [ondaro, brightwater]);
    const body = 'The number follows from your file, and your file is not the curve that it names: below 60 Hz it lies up to 1.83 above the published fit, above 300 Hz it is the fit. 0.0512 for 0.0152 in the first coefficient would do that.';
    const threadId = await startThread(ondaro, id, { kind: 'must-change', anchor: { claim: 'C1', at: null }, body });
    await reply(dovrel, threadId, 'You are right, I typed the coefficients from the paper. With 0.0152 it becomes 36.3. I shall attach the right curve.');
    const answers = plainReport({ conventions: 'They match the text, but the curve is not the one that the text names.', data: 'The record is fit. The noise table has a mistyped coefficient.' });
    await report(ondaro, id, 'minor', answers);
    await report(brightwater, id, 'minor', answers);
    await sendBack(amsel, id, 'The number agrees with the attached file, and would be entered as such. A reader would take it for the design curve. Please attach that curve, or call yours something else.');
  },
};
