import type { MeasureRequest, QuantityInputs } from '@/lib/engine/contract/quantity';
import type { MeasuredPoint } from '@/lib/engine/contract/measurement';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { BinaryFacts, Waveform } from '@/lib/engine/contract/waveform';
import { Workshop } from '@/lib/engine/contract/workshop';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { quantities } from '@/lib/engine/quantities/registry';
import { synthesise, type SynthesisRequest } from '@/lib/engine/synthesis/synthesise';
import type { InputEdit } from '@/lib/explain/flip';
import { EditedInputs } from '@/lib/pipeline/explain/edit-inputs';
import { modeSet } from './energy-signals';

/** The signals on which the effects of the catalogue of conventions were measured (domain reference, section 7), made when first asked for. */
const level: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.012, stepM: 0.5, modes: ['22'] };
const fluxes: SynthesisRequest = { ...level, mOmega0: 0.02, modes: ['22', '44', '32'] };

function lazily<T>(make: () => T): () => T {
  let made: T | undefined;
  return () => (made ??= make());
}

const waveformOf = (request: SynthesisRequest, facts: BinaryFacts = {}): Waveform => {
  const { t, modes } = synthesise(request);
  return modeSet(t, modes, 'strain', { massRatio: request.massRatio, chi1z: request.chi1z, chi2z: request.chi2z, ...facts });
};

export const noSpin = lazily(() => waveformOf(level));
export const spin02 = lazily(() => waveformOf({ ...level, chi1z: 0.2, chi2z: 0.2 }));
export const equalRun = lazily(() => synthesise(fluxes));
/** Energy before the record and remnant as the notes of the generator have them. */
export const equalEnergy = lazily(() => waveformOf(fluxes, { admEnergy: 1 - 0.00855, remnantMass: 0.952 }));
export const twoToOne = lazily(() => waveformOf({ ...fluxes, massRatio: 2, modes: ['22', '21', '33', '44', '32'] }, { remnantMass: 0.96123928 }));
/** The numerical part of a hybrid. */
export const lateRun = lazily(() => waveformOf({ ...level, mOmega0: 0.02 }));
/** Of 20 solar masses from below 20 Hz on. */
export const longRun = lazily(() => waveformOf({ ...level, mOmega0: 0.006 }));

export const design: NoiseCurve = builtInCurve('G2')!;
export const curveOf = (psd: NoiseCurve['psd']): NoiseCurve => ({ ...design, builtIn: null, psd });

/** Central differences of neighbours, of second order, so many times. */
export function differentiated(waveform: Waveform, times: number): Waveform {
  const { content, uniformStep } = waveform;
  if (times === 0 || content.kind !== 'modes') return waveform;
  const slope = (y: Float64Array): Float64Array => y.map((_, i) => (i === 0 || i === y.length - 1 ? 0 : (y[i + 1]! - y[i - 1]!) / (2 * uniformStep!)));
  return differentiated({ ...waveform, content: { kind: 'modes', modes: content.modes.map((mode) => ({ ...mode, re: slope(mode.re), im: slope(mode.im) })) } }, times - 1);
}

/** The (2,2) mode taken for the strain on the line of sight. */
export function bareMode(waveform: Waveform): Waveform {
  const mode = waveform.content.kind === 'modes' ? waveform.content.modes.find(({ l, m }) => l === 2 && m === 2) : undefined;
  if (mode === undefined) throw new Error('no (2,2) mode');
  return { ...waveform, negativeM: null, content: { kind: 'line-of-sight', plus: mode.re, cross: mode.im.map((x) => -x) } };
}

const edits = new EditedInputs();
const workshop = new Workshop();

export interface Asked {
  readonly settings?: DeclaredSettings;
  readonly edits?: readonly InputEdit[];
  readonly noise?: NoiseCurve;
  /** The whole measurement, with what stands beside the number. */
  readonly bothRoutes?: boolean;
}

/** Route A of a quantity, as the search asks it. */
export function pointOf(id: string, of: QuantityInputs['of'], { settings = {}, edits: asked = [], noise = design, bothRoutes = false }: Asked = {}): MeasuredPoint {
  const quantity = quantities.get(id)!;
  const inputs = edits.apply({ of, noise: quantity.needsNoise ? noise : null }, asked);
  const request: MeasureRequest = { claimId: 'E', inputs: inputs!, settings, over: null, claimed: [null], withFigures: false, ...(bothRoutes ? {} : { routeAOnly: true, workshop }) };
  const { points, findings } = quantity.measure(request, { onProgress: () => undefined, cancelled: () => false });
  const [point] = points;
  if (point?.value == null) throw new Error(findings.map(({ text }) => text).join(' '));
  return point;
}

export const numberOf = (...asked: Parameters<typeof pointOf>): number => pointOf(...asked).value!;
