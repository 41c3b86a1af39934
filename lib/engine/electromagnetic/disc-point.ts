import type { Finding } from '../contract/finding';
import type { MeasureRequest } from '../contract/quantity';
import type { DeclaredSettings } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { stop, type At } from '../tones/measure-tones';
import { MSUN_S } from '../units/constants';
import { curvePeakOnSamples, type Curve, type CurvePeak } from './curve-peak';
import { EDDINGTON_ERG_PER_S, MSUN_ERG, YEAR_S } from './em-units';

/** One point of a claim about a disc. */
export interface DiscPoint {
  readonly waveform: Waveform;
  /** erg/s against the file's own times. */
  readonly curve: Curve;
  readonly peak: CurvePeak;
  readonly totalMassMsun: number;
  readonly declared: DeclaredSettings;
}

export const eddingtonErgPerS = (massMsun: number): number => EDDINGTON_ERG_PER_S * massMsun;

/** What the disc should shine with by its own accretion; null where rate or efficiency is not declared. */
export function accretionErgPerS({ radiativeEfficiency, accretionRateMsunPerYear }: DeclaredSettings): number | null {
  if (radiativeEfficiency === undefined || accretionRateMsunPerYear === undefined) return null;
  return (radiativeEfficiency * accretionRateMsunPerYear * MSUN_ERG) / YEAR_S;
}

/** How long the gas could shine at a luminosity; null where its energy is not declared. */
export const coolingS = ({ internalEnergyErg }: DeclaredSettings, ergPerS: number): number | null => (internalEnergyErg === undefined ? null : internalEnergyErg / ergPerS);

/** How long the gas takes to move: √(r³/GM), r in units of GM/c². */
export const dynamicalS = ({ radiusM }: DeclaredSettings, massMsun: number): number | null => (radiusM === undefined ? null : radiusM ** 1.5 * massMsun * MSUN_S);

/**
 * Takes the curve and fills in the settings of each point.
 * Shape:  gives a function of the swept mass.
 * Units:  erg/s, M☉.
 * Error:  that of the peak.
 * Fails:  with the finding that stops: no curve, or one that never shines.
 * Source: settings.md section 7; domain reference Q28.
 */
export function discPreparer(request: MeasureRequest): (at: At) => DiscPoint | Finding {
  const { a } = request.inputs.of;
  if (a === undefined) return () => stop('engine/no-signal', request.claimId, 'The claim names no luminosity.', 'Name one in `of`.');
  if (a.content.kind !== 'line-of-sight') return () => stop('engine/no-signal', a.name, `${a.name} holds no curve of luminosity.`, 'Supply the columns t and L.');
  const curve: Curve = { axis: a.axis, values: a.content.plus };
  const peak = curvePeakOnSamples(curve);
  return (at) => {
    const declared: DeclaredSettings = { ...request.settings, ...at };
    const { totalMassMsun } = declared;
    if (!(peak.value > 0)) return stop('engine/no-signal', a.name, `The luminosity of ${a.name} is never above zero.`, 'Supply L in erg/s.');
    if (totalMassMsun === undefined) return stop('engine/no-signal', a.name, 'A luminosity in units of Eddington’s needs the total mass.', 'Declare totalMassMsun.');
    return { waveform: a, curve, peak, totalMassMsun, declared };
  };
}
