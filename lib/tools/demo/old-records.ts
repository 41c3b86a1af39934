import type { Course } from './course';
import { loadSpecimen, lodge, nameCoAuthor, specimenSheet } from './lodging';
import { confirmAuthorship } from '@/lib/services/submissions/change-people';
import { must } from './demo-room';
import { DEMO_PEOPLE } from './people';
import { plainReport } from './plain-report';
import { beginReview, enterAtLevelOne, reply, report, startThread } from './reviewing';

const CORRECTED = 'Loudness of non-spinning mergers at 1 Gpc, corrected';
const EARLIER = 'Energy of a merger without start-up burst';

/** D16: measured by an earlier engine and by this one, which moves it by far less than its uncertainty. */
export const keptLoudness: Course = {
  title: CORRECTED,
  stands: 'entered, still valid after a change of the engine',
  beforeOpening: true,
  async run(room, { ondaro, lindmere, brightwater, okonjo }) {
    const id = await loadSpecimen(ondaro, 'loudness', sheetOf('loudness', CORRECTED, ['36.30', '52.72'], 'Saltern Institute of Strong Gravity, code *Gridlark*.\n\nAn equal-mass, non-spinning merger at 1000 Mpc, face-on, has signal-to-noise ratios of 36.30 at 60 and 52.72 at 100 solar masses (detector frame) in the second-generation design curve from 20 Hz. An earlier paper of ours was short by a factor of $\\sqrt2$.'));
    await nameCoAuthor(ondaro, id, DEMO_PEOPLE.lindmere.email);
    must(await confirmAuthorship(lindmere, id));
    await lodge(room, ondaro, id);
    await room.storeOldResult(id, ({ expandedUncertainty }) => (expandedUncertainty ?? 0) / 20);
    await beginReview(okonjo, id, [brightwater]);
    const threadId = await startThread(brightwater, id, { kind: 'question', anchor: { claim: 'C1', at: null }, body: 'Is the factor of 4 in front of the integral now in the program, or in the table?' });
    await reply(lindmere, threadId, 'In the program.');
    await report(brightwater, id, 'enter-1', plainReport({}));
    await enterAtLevelOne(okonjo, id, [], { prose: 'The numbers agree. I enter them at level 1.', publicSentence: 'Both numbers replace earlier ones that were short by √2.' });
  },
};

/** D16: an earlier engine was off by more than the uncertainty it gave, so the record stands under recheck with both numbers. */
export const movedEnergy: Course = {
  title: EARLIER,
  stands: 'under recheck after a change of the engine',
  beforeOpening: true,
  async run(room, { tansley, dovrel, brightwater, amsel }) {
    const id = await loadSpecimen(tansley, 'radiated-energy', sheetOf('radiated-energy', EARLIER, '0.0399'));
    await nameCoAuthor(tansley, id, DEMO_PEOPLE.dovrel.email);
    must(await confirmAuthorship(dovrel, id));
    await lodge(room, tansley, id);
    await room.storeOldResult(id, () => 6e-5);
    await beginReview(amsel, id, [brightwater]);
    const threadId = await startThread(brightwater, id, { kind: 'question', anchor: { claim: 'C1', at: null }, body: 'Is the energy before the first sample part of the 4 %?' });
    await reply(dovrel, threadId, 'No. The statement says so, and the setting `includeEnergyBeforeStart` is declared as false.');
    await report(brightwater, id, 'enter-1', plainReport({}));
    await enterAtLevelOne(amsel, id, [], { prose: 'It agrees far within the stated tolerance. I enter it at level 1.', publicSentence: 'Energy of the record alone, without what was radiated before its first sample.' });
  },
};

interface Sheet {
  readonly statement: string;
  readonly claims: readonly object[];
}

function sheetOf(folder: string, title: string, claimed: unknown, statement?: string): string {
  const sheet = JSON.parse(specimenSheet(folder)) as Sheet;
  return JSON.stringify({ ...sheet, title, statement: statement ?? sheet.statement, claims: sheet.claims.map((claim) => ({ ...claim, claimed })) });
}
