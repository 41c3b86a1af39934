import type { Course } from './course';
import { checkWell, loadSpecimen, nameCoAuthor, specimenSheet } from './lodging';
import { DEMO_PEOPLE } from './people';

const TITLE = 'How much louder spin 0.2 is';

/** The same two waveforms as in *Spin 0.2 is visible*, for another number. */
function sheetText(): string {
  const { format, waveforms } = JSON.parse(specimenSheet('spin-visible')) as { format: string; waveforms: object };
  const statement = [
    'Larkfield Wave Group, code *Tinderbox*.',
    'With $\\chi_1=\\chi_2=0.2$ an equal-mass merger is louder than without spin, in the second-generation design curve from 20 Hz, by a few per cent at 60 and 100 solar masses.',
  ].join('\n\n');
  const settings = { fLowHz: 20, massFrame: 'detector', inclinationRad: 0 };
  const claim = { id: 'C1', quantity: 'snr-ratio', of: { a: 'B', b: 'A' }, noise: 'S', settings, over: { totalMassMsun: [60, 100] }, claimed: CLAIMED };
  return JSON.stringify({ format, title: TITLE, statement, waveforms, noise: { S: { curve: 'G2' } }, claims: [claim] });
}

const CLAIMED = ['1.04', '1.04'];

/** Checked, and waiting for the co-author to confirm before it can be lodged. */
export const draft: Course = {
  title: TITLE,
  stands: 'a draft',
  beforeOpening: true,
  async run(room, { marrable }) {
    const id = await loadSpecimen(marrable, 'spin-visible', sheetText(), (name) => name !== 'noise.txt');
    await nameCoAuthor(marrable, id, DEMO_PEOPLE.quennell.email);
    await checkWell(room, marrable, id);
  },
};
