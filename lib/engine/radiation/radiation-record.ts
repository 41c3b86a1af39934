/**
 * Radiation: what a set of modes carries away. Everything here works in units of the total mass M,
 * on r·h/M or its derivatives. Two routes evaluate the one definition of settings.md rules 2.3, 2.9
 * and section 5: route A on the samples themselves (differences, sums, one padded transform, sums over
 * neighbouring modes), route B on splines and Gauss panels (derivative splines, antiderivatives, a
 * closed-form kernel, a grid on the sphere). A quantity of the family is a `RadiationRecipe`.
 */
import type { Mode, Waveform } from '../contract/waveform';
import { MSUN_PER_MPC, MSUN_S } from '../units/constants';

export type RadiationVariable = 'strain' | 'news' | 'psi4';

/** Modes of r·h/M, r·ḣ or r·M·ψ4 against t/M. */
export interface RadiationRecord {
  readonly axis: Float64Array;
  /** Equal step in M, or null. */
  readonly step: number | null;
  readonly variable: RadiationVariable;
  readonly modes: readonly Mode[];
}

const derivatives: Readonly<Record<RadiationVariable, number>> = { strain: 0, news: 1, psi4: 2 };

/** How often a series must be integrated to give Ḣ, or H as well. */
export const divisionsTo = (variable: RadiationVariable, withStrain: boolean): number => Math.max(0, derivatives[variable] - (withStrain ? 0 : 1));

const isRadiation = (variable: Waveform['variable']): variable is RadiationVariable => variable in derivatives;

/** The record without the modes of ℓ > lMax. */
export const upTo = (record: RadiationRecord, lMax: number | null): RadiationRecord => (lMax === null ? record : { ...record, modes: record.modes.filter(({ l }) => l <= lMax) });

/** How a claim's lMax is said behind a mode that is not there. */
export const upToWords = (lMax: number | null): string => (lMax === null ? '' : ` up to ℓ = ${lMax}`);

/** Why a waveform cannot be brought to M: said, and what would mend it. */
export interface NotRadiation {
  readonly saw: string;
  readonly fix: string;
}

function scales(waveform: Waveform, order: number): { time: number; amplitude: number } | NotRadiation {
  const { unit, amplitudeUnit, ownTotalMassMsun: mass, ownDistanceMpc: distance } = waveform;
  if (unit === 'M' && amplitudeUnit === 'rh/M') return { time: 1, amplitude: 1 };
  if (unit === 's' && mass !== null) {
    const seconds = mass * MSUN_S;
    if (amplitudeUnit === 'rh/M') return { time: 1 / seconds, amplitude: 1 };
    if (amplitudeUnit === 'strain' && distance !== null) {
      return { time: 1 / seconds, amplitude: (distance / (mass * MSUN_PER_MPC)) * seconds ** order };
    }
  }
  const saw = `amplitudes in ${amplitudeUnit} against time in ${unit === 'M' ? 'M' : 'seconds'}${mass === null && unit === 's' ? ' without the total mass' : ''}`;
  return { saw, fix: 'State totalMassMsun and distanceMpc beside a strain in seconds, or give r h/M against t/M.' };
}

/**
 * Brings a mode set to M and r·h/M (or its derivatives).
 * Shape:  all modes on one axis; equal steps are taken from the ends of the record (rule 2.1).
 * Units:  t in M; amplitudes dimensionless.
 * Error:  rounding.
 * Fails:  says what it saw when the content is one line of sight, in frequency, or in units that M cannot be reached from.
 * Source: settings.md rules 2.1 and 2.6.
 */
export function radiationRecord(waveform: Waveform): RadiationRecord | NotRadiation {
  const { content, variable, axis, uniformStep } = waveform;
  if (content.kind !== 'modes') return { saw: 'strain along one line of sight', fix: 'Supply modes: what is radiated is a sum over all directions.' };
  if (waveform.domain !== 'time') return { saw: 'a waveform in the frequency domain', fix: 'Supply the modes against time.' };
  if (!isRadiation(variable)) return { saw: `the variable ${variable}`, fix: 'Supply strain, news or ψ4.' };
  const scale = scales(waveform, derivatives[variable]);
  if ('saw' in scale) return scale;
  const { time, amplitude } = scale;
  const step = uniformStep === null ? null : uniformStep * time;
  const times = step === null ? axis.map((t) => t * time) : axis.map((_, i) => axis[0]! * time + i * step);
  const scaled = (values: Float64Array): Float64Array => (amplitude === 1 ? values : values.map((x) => x * amplitude));
  return { axis: times, step, variable, modes: content.modes.map((mode) => ({ ...mode, re: scaled(mode.re), im: scaled(mode.im) })) };
}
