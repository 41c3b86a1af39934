import { LEAST, ROOT3 } from '../budget/half-width';
import type { Finding } from '../contract/finding';
import type { DeclaredSettings } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { energyOnPanels } from '../radiation/energy-on-panels';
import { energyOnSamples, totalEnergy, type ModeEnergy } from '../radiation/energy-on-samples';
import { relativeSlip } from '../radiation/input-rounding';
import { houseSamples, radiationOnSamples, type SampledRadiation } from '../radiation/news-on-samples';
import { NO_FLOOR } from '../radiation/radiation-recipe';
import { isFinding, stop, type At } from '../tones/measure-tones';
import { fieldScale, type FieldScale } from './field-scale';
import { phi2Record, type Phi2Record } from './phi2-record';

export interface EmUncertainty {
  readonly quadrature: number;
  readonly rounding: number;
}

/** φ₂ of one file from a start on: everything but the field to which it is rescaled. */
export interface EmSource extends Phi2Record {
  readonly waveform: Waveform;
  readonly startM: number;
  readonly radiation: SampledRadiation;
  /** E/M of each mode as the file has it, by route A. */
  readonly modes: readonly ModeEnergy[];
  /** E/M as the file has it, by route B; computed when first asked for. */
  readonly byRouteB: () => number;
  /** Standard uncertainties as shares of E, the same at every field; computed when first asked for. */
  readonly shares: () => EmUncertainty;
}

/** One point of a claim: a source at a field. */
export interface EmPoint {
  readonly at: At;
  readonly source: EmSource;
  readonly scale: FieldScale;
}

/** Makes a value when it is first asked for. */
export function once<T>(make: () => T): () => T {
  let made: { readonly value: T } | null = null;
  return () => (made ??= { value: make() }).value;
}

/**
 * Reads φ₂ of a file and takes its energy by route A on the samples, and by route B on splines and Gauss
 * panels when that is asked for.
 * Shape:  one source.
 * Units:  startM in M; energies as fractions of M.
 * Error:  that of energyOnSamples and energyOnPanels.
 * Fails:  with the finding that stops: no modes, no signal, a start outside the record.
 * Source: Q23; settings.md section 7.
 */
export function emSource(waveform: Waveform, declared: DeclaredSettings): EmSource | Finding {
  const found = phi2Record(waveform);
  if (isFinding(found)) return found;
  const { record, overFlux } = found;
  const [first, last] = [record.axis[0]!, record.axis[record.axis.length - 1]!];
  const startM = declared.startM ?? waveform.junkEndM ?? first;
  // A printed start may be a rounding below the first sample.
  if (!(startM >= first - 1e-9 * (last - first) && startM < last)) return stop('engine/no-signal', waveform.name, `The integral starts at t = ${startM} M, but ${waveform.name} runs from ${first} to ${last} M.`, 'Give a startM inside the record, on its own time axis.');
  const radiation = radiationOnSamples(record, NO_FLOOR, houseSamples, false);
  const scaled = (modes: readonly ModeEnergy[]): ModeEnergy[] => modes.map((mode) => ({ ...mode, energy: overFlux * mode.energy }));
  const byRouteB = once(() => totalEnergy(scaled(energyOnPanels(record, startM, NO_FLOOR))));
  return { ...found, waveform, startM, radiation, modes: scaled(energyOnSamples(radiation, startM)), byRouteB, shares: once(() => sharesOf(radiation, startM, waveform.significantDigits)) };
}

/**
 * A source at the field of each point of a sweep; the source is read once.
 * Shape:  gives a function of the swept setting's value.
 * Units:  as EmPoint.
 * Error:  none of its own.
 * Fails:  with the finding that stops the claim.
 * Source: settings.md section 7.
 */
export function emPreparer(waveform: Waveform, declared: DeclaredSettings): (at: At) => EmPoint | Finding {
  const source = emSource(waveform, declared);
  return (at) => {
    if (isFinding(source)) return source;
    const scale = fieldScale(waveform, { ...declared, ...at }, Object.keys(at).length > 0);
    return isFinding(scale) ? scale : { at, source, scale };
  };
}

/** E/M by route A. */
export const emEnergyA = ({ source, scale }: EmPoint): number => scale.factor * totalEnergy(source.modes);

/** E/M by route B. */
export const emEnergyB = ({ source, scale }: EmPoint): number => scale.factor * source.byRouteB();

/** At twice the step a sum of fourth order or better errs at least so many times more than at the step itself. */
const BY_STEP = 15;

/** Every second sample, and the last: what a record of twice the step would have shown. */
function coarser({ axis, news, ...rest }: SampledRadiation): SampledRadiation {
  const last = axis.length - 1;
  const kept = (values: Float64Array): Float64Array => values.filter((_, i) => i % 2 === 0 || i === last);
  return { ...rest, isEven: rest.isEven && last % 2 === 0, axis: kept(axis), news: news.map((mode) => ({ ...mode, re: kept(mode.re), im: kept(mode.im) })) };
}

/**
 * How far route A moves with local polynomials of order 6 instead of 8 and on half of the samples, and with
 * the last printed digit of every sample: nothing is differentiated, so that a slip in common bounds the whole.
 * Half of the samples count as a fifteenth, as a rule of fourth order would have it.
 */
function sharesOf(radiation: SampledRadiation, startM: number, digits: number | null): EmUncertainty {
  const summed = (of: SampledRadiation, order: 6 | 8): number => totalEnergy(energyOnSamples(of, startM, order));
  const here = summed(radiation, 8);
  const moved = Math.abs(summed(radiation, 6) - here) + Math.abs(summed(coarser(radiation), 8) - here) / BY_STEP;
  return { quadrature: Math.max(moved / here / ROOT3, LEAST), rounding: digits === null ? 0 : 2 * relativeSlip(digits) };
}

/** The standard uncertainties of a point's E/M. */
export function emUncertainty(point: EmPoint): EmUncertainty {
  const { quadrature, rounding } = point.source.shares();
  const here = emEnergyA(point);
  return { quadrature: quadrature * here, rounding: rounding * here };
}
