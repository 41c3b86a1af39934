import { detectorPoint, type PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { Band, Side } from '@/lib/engine/contract/route';
import type { Finding } from '@/lib/engine/contract/finding';
import { nyquistFrequency } from '@/lib/engine/conditioning/nyquist-frequency';
import { short } from '@/lib/engine/findings/spelt';

/** Products of pairs of modes at one frequency and mass, counted: with both routes and its error bar a claim of so many takes about two minutes of a core. */
const MOST_PRODUCTS = 2e7;
const MASS_RATIO = 1.02;

/** Parts that a line of sight only multiplies: modes, or at one inclination the modes of each m. */
function partsOf({ waveform: { content } }: Side, oneInclination: boolean): number {
  if (content.kind !== 'modes') return 1;
  return oneInclination ? new Set(content.modes.map(({ m }) => m)).size : content.modes.length;
}

/** Frequencies that tell the lags of two records apart, up to where the band or the shorter step ends. */
function linesOf(a: Side, b: Side, { fHighHz }: Band, heaviest: number): number {
  const spanS = ({ waveform: { axis, domain }, secondsPerUnit }: Side): number => (domain === 'time' ? (axis[axis.length - 1]! - axis[0]!) * secondsPerUnit : 0);
  const top = Math.min(fHighHz, ...[a, b].map((side) => nyquistFrequency(side.waveform) / side.secondsPerUnit));
  return (spanS(a) + heaviest * spanS(b)) * top;
}

/**
 * A search over mass, shift and azimuth of b for all sights of a is a table of products at every mass; its size is known beforehand.
 * Shape:  one finding or null; `b` is the second waveform, or the part of the first that stands for it.
 * Units:  none.
 * Error:  the count is good to a factor.
 * Fails:  never.
 * Source: our bound on the cost of a claim: about two minutes.
 */
export function sightStops(request: PointRequest, b: Side, inclinationRad: number | null): Finding | null {
  const { response, maximise, a, band, templateMassRange: [low, high] } = detectorPoint(request);
  if (response !== 'complex' || !maximise.includes('templateMass')) return null;
  const [ofA, ofB] = [partsOf(a, inclinationRad !== null), partsOf(b, inclinationRad !== null && !maximise.includes('inclination'))];
  const masses = Math.ceil(Math.log(high / low) / Math.log(MASS_RATIO)) + 1;
  const lines = linesOf(a, b, band, high);
  const products = ofA * ofB * masses * lines;
  if (!(products > MOST_PRODUCTS)) return null;
  return {
    code: 'engine/search-too-wide',
    level: 'stops-lodging',
    where: 'maximise',
    text: `The search over the template’s mass would tabulate ${ofA} × ${ofB} products of modes at ${masses} masses and some ${short(lines, 2)} frequencies, ${short(products, 2)} numbers; at most ${short(MOST_PRODUCTS, 2)} are tabulated.`,
    fix: 'Narrow templateMassRange, name fewer modes, declare inclinationRad, lower fHighHz, or shorten the record.',
  };
}
