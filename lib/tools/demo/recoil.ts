import type { Course } from './course';
import { loadTogether, lodge } from './lodging';
import { plainReport } from './plain-report';
import { ask, beginReview, reply, report, startThread } from './reviewing';

/** D7: a sign missing in the modes of negative m and odd ℓ. In review, one report in. */
export const recoil: Course = {
  title: 'Recoil of a 2:1 merger',
  stands: 'in review',
  beforeOpening: false,
  async run(room, { marrable, quennell, vasterling, tansley, brightwater, okonjo }) {
    const id = await loadTogether(marrable, quennell, 'recoil-of-two-to-one');
    await lodge(room, marrable, id);
    await beginReview(okonjo, id, [vasterling, tansley]);
    await ask(okonjo, id, brightwater);
    const body = 'Published fits give 157 km/s for this mass ratio, and the server 140 from the modes with $m>0$ and their mirrors. In your file the modes (3,−3) and (3,−2) have the sign of $H^*$, without $(-1)^\\ell$. What does your program sum?';
    const threadId = await startThread(vasterling, id, { kind: 'must-change', anchor: { claim: 'C1', at: null }, body });
    await reply(quennell, threadId, 'All modes of the file as they stand. We are looking for the place where the sign was lost, and whether it is in the file alone or in the program.');
    await report(tansley, id, 'major', plainReport({ conventions: 'The file breaks the mirror rule of a binary without precession in ℓ = 3. The energy does not feel it; a recoil does.', budget: 'A wrong sign in ℓ = 3 halves the recoil. Beside that the rest is small.' }));
  },
};
