import { sayOfCandidate } from './answer-candidate';
import type { Course } from './course';
import { loadSpecimen, lodge } from './lodging';
import { beginReview, reply, report, startThread } from './reviewing';

/** The missing factor: both numbers are short by the square root of two. Both reports are in. */
export const loudness: Course = {
  title: 'Loudness of non-spinning mergers at 1 Gpc',
  stands: 'deciding',
  beforeOpening: true,
  async run(room, { ondaro, vasterling, tansley, amsel }) {
    const id = await loadSpecimen(ondaro, 'loudness');
    await lodge(room, ondaro, id);
    await beginReview(amsel, id, [vasterling, tansley]);
    await sayOfCandidate(ondaro, id, { claim: 'C1', convention: 'C02', answer: 'cannot-tell', note: 'A factor √2, certainly. Whether the spectrum or the product carries it I have to look up in the code.' });
    const body = 'Both of your numbers are smaller than the recomputed ones by the same factor, $1/\\sqrt2$. A one-sided curve taken for a two-sided one would do that, and so would a prefactor of 2 where your formula has 4. The numbers alone cannot tell these apart. Which is it?';
    const threadId = await startThread(vasterling, id, { kind: 'must-change', anchor: { claim: 'C1', at: { totalMassMsun: 60 } }, body });
    await reply(ondaro, threadId, 'The prefactor. The formula in the statement is right; our program integrates over positive frequencies alone and multiplies by 2. We shall correct both numbers.');
    await report(vasterling, id, 'minor', {
      definition: 'Yes, by the formula of the statement.',
      conventions: 'The settings match the text. The numbers do not follow from either.',
      data: 'Fit for both masses.',
      budget: 'The numerical part is negligible beside the difference. One resolution only, so the part of the simulation is unknown.',
      scope: 'Face-on and optimally placed, as it says.',
    });
    await report(tansley, id, 'minor', {
      definition: 'Yes.',
      conventions: 'They match. The factor that is missing is found and named in the thread.',
      data: 'One record of sufficient length. I looked at the beginning and found no burst.',
      budget: 'Not stated. It need not be small to see a factor of 1.41.',
      scope: 'Fine.',
    });
  },
};
