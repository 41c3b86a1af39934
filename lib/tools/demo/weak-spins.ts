import { sayOfCandidate } from './answer-candidate';
import type { Course } from './course';
import { loadTogether, lodge } from './lodging';
import { plainReport } from './plain-report';
import { beginReview, reply, report, sendBack, startThread } from './reviewing';

/** D2: an amplitude density taken for a power density. Confirmed, and back with the author. */
export const weakSpins: Course = {
  title: 'Distinguishing weak spins with next detectors',
  stands: 'back with the author',
  beforeOpening: false,
  async run(room, { brightwater, hartsease, vasterling, dovrel, okonjo }) {
    const id = await loadTogether(brightwater, hartsease, 'weak-spins');
    await lodge(room, brightwater, id);
    await beginReview(okonjo, id, [vasterling, dovrel]);
    const body = 'The second column of `noise.txt` is headed *ASD (Hz^-1/2)*, and that is how the sheet declares it. If it went into your integrals unsquared, the low frequencies weigh too much. Did it?';
    const threadId = await startThread(dovrel, id, { kind: 'must-change', anchor: { claim: 'C1', at: { totalMassMsun: 60 } }, body });
    await reply(hartsease, threadId, 'It did. Our program expects a power density and was given the file as it is. The recomputed numbers are what we should have printed.');
    const answers = plainReport({ conventions: 'The column is an amplitude density by its heading and by its size. The printed matches are those of a curve that was not squared.' });
    await report(dovrel, id, 'major', answers);
    await report(vasterling, id, 'major', { ...answers, scope: 'The conclusion changes: weak spins are told apart less easily than claimed.' });
    await sayOfCandidate(brightwater, id, { claim: 'C1', convention: 'C01', answer: 'confirmed', note: 'The column was never squared.' });
    await sendBack(okonjo, id, 'The curve was used without being squared; the authors have found it themselves. Please print the numbers of the curve as it is declared, and say what becomes of the conclusion.');
  },
};
