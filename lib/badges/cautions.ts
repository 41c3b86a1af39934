import type { ResultClaim } from '@/lib/pipeline/result';

/** What a record does not say. The wording is fixed; which of them apply follows from quantities, coverage and data. */
export interface Caution {
  readonly number: number;
  readonly text: string;
}

const TEXTS: Readonly<Record<number, string>> = {
  1: "Verified means: this number follows from these files and these settings, within this tolerance, by this engine version. It does not mean that the simulation solves the right equations accurately, that the source exists, that the noise curve is the detector's, or that the conclusion drawn is right.",
  2: "Recomputing from the author's own files is not an independent simulation. Only the mark second data set says so.",
  3: 'Agreement of our two routes excludes slips of calculation, not a shared wrong convention; conventions are printed with each number.',
  4: 'A suggested explanation is a hypothesis; with enough alternatives something always fits. The number of alternatives and the chance rate are part of the result.',
  5: 'A match describes similarity for one noise curve, band, mass, and set of maximisations. It is no statement about other detectors, masses, orientations.',
  6: 'The indistinguishability SNR is a sufficient condition and usually too strict; failing it does not prove a biased measurement, and passing it for one pair says nothing on parameter degeneracy.',
  7: 'Detectability here assumes Gaussian stationary noise and a threshold on match or SNR; real searches have vetoes, false alarms and banks.',
  8: 'Rates scale as the cube of a loudness ratio only without cosmology and with equal populations; no astrophysical population is implied.',
  9: 'Energy, momentum and remnant values refer to the interval of the record; what was added or left out is stated.',
  10: 'Uncertainties marked not available are unknown, not zero. A small numerical uncertainty beside an unknown data uncertainty must not be read as accuracy.',
  11: 'Published fits are themselves fitted to simulations, have ranges of validity, and are not independent of the data they are compared with.',
  12: 'Electromagnetic estimates are idealised (vacuum or test field, no plasma or radiation transport unless given); emitted is not observable; below a plasma cut-off the waves do not arrive.',
  13: 'Disc luminosities from simple emission rules can violate their own assumptions; the tool checks consistency, not truth.',
  14: 'Badges lapse, may be suspended after engine changes, and belong to one version of a claim.',
  15: 'Referee identity, anonymity and conflict rules reduce bias but do not remove it; waveforms can reveal their origin.',
  16: 'The demonstration data are stylised closed-form signals (energies within about 6 % of fits, peak luminosity 5–14 % high, non-spinning recoil 10–15 % low, spin-driven recoil far too low); they must never be used as reference waveforms and are watermarked in the header.',
};

/** Beside every record, badge and letter: who says what a badge is worth. */
export const RULES_SENTENCE = 'Whether and how this counts for a publication is decided by the rules of your journal or collaboration, not by this service.';

const MATCH_TYPE = ['overlap', 'match', 'mismatch', 'fitting-factor', 'detectable-fraction', 'distinguishability-snr', 'mode-content', 'degeneracy'];
const DETECTABILITY = ['detectable-fraction', 'horizon-distance', 'horizon-redshift', 'volume-ratio'];
const RATES = ['snr-ratio', 'volume-ratio'];
const BALANCE = ['radiated-energy', 'radiated-angular-momentum', 'recoil', 'peak-luminosity', 'remnant-mass', 'remnant-spin', 'em-energy'];
const ELECTROMAGNETIC = ['em-energy', 'em-ratio', 'field-exponent', 'em-frequency', 'em-mirroring'];

const ALWAYS = [1, 2, 3, 14, 15];
const BY_QUANTITY: readonly (readonly [number, readonly string[]])[] = [
  [5, MATCH_TYPE],
  [6, ['distinguishability-snr']],
  [7, DETECTABILITY],
  [8, RATES],
  [9, BALANCE],
  [11, ['remnant-fit']],
  [12, ELECTROMAGNETIC],
  [13, ['disc-luminosity']],
];

export interface CautionFacts {
  readonly claims: readonly Pick<ResultClaim, 'quantity' | 'coverage' | 'budget' | 'candidates'>[];
  /** Any input file carries the watermark of the closed-form generator. */
  readonly isDemonstration: boolean;
}

export function cautionsFor({ claims, isDemonstration }: CautionFacts): Caution[] {
  const quantities = new Set(claims.map((c) => c.quantity));
  const byQuantity = BY_QUANTITY.filter(([, ids]) => ids.some((id) => quantities.has(id))).map(([number]) => number);
  const hasUnknown = claims.some((c) => c.coverage.state === 'unknown' || c.budget.some((line) => line.u === null));
  const hasCandidates = claims.some((c) => c.candidates.length > 0);
  const numbers = [...ALWAYS, ...byQuantity, ...(hasCandidates ? [4] : []), ...(hasUnknown ? [10] : []), ...(isDemonstration ? [16] : [])];
  return numbers.sort((a, b) => a - b).map((number) => ({ number, text: TEXTS[number] ?? '' }));
}
