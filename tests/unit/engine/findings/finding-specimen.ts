import type { Finding, FindingLevel } from '@/lib/engine/contract/finding';
import type { QuantityInputs } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { quantities } from '@/lib/engine/quantities/registry';
import { synthesise, type SynthesisRequest, type SyntheticWaveform } from '@/lib/engine/synthesis/synthesise';

/** One rule with data that break it and data that do not. Every family of quantities has a table of these. */
export interface FindingSpecimen {
  /** V01 … V30. */
  readonly number: string;
  readonly code: string;
  readonly level: FindingLevel;
  readonly when: string;
  readonly raises: () => readonly Finding[] | Promise<readonly Finding[]>;
  /** Numbers and place that the sentence must hold. */
  readonly says: readonly (string | RegExp)[];
  readonly silent: () => readonly Finding[] | Promise<readonly Finding[]>;
}

const watch = { onProgress: () => undefined, cancelled: () => false };
const alone = { negativeM: 'given', ownTotalMassMsun: null, ownDistanceMpc: null, junkEndM: null, significantDigits: null } as const;

type Parts = Pick<SyntheticWaveform, 't' | 'modes'>;

/** A mode set in M, called A. */
export function inM({ t, modes }: Parts, more: Partial<Waveform> = {}): Waveform {
  const steps = t.length - 1;
  const uniformStep = (t[steps]! - t[0]!) / steps;
  return { ...alone, name: 'A', domain: 'time', unit: 'M', amplitudeUnit: 'rh/M', variable: 'strain', axis: t, uniformStep, content: { kind: 'modes', modes }, binary: {}, ...more };
}

const made = new Map<string, SyntheticWaveform>();

/** About 1 000 M of a binary, (2,2) alone unless more is asked for; each is made once. */
export function binaryOf(request: Partial<SynthesisRequest> = {}): SyntheticWaveform {
  const whole: SynthesisRequest = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.026, stepM: 0.5, modes: ['22'], ...request };
  const key = JSON.stringify(whole);
  const found = made.get(key) ?? synthesise(whole);
  made.set(key, found);
  return found;
}

export interface Look {
  readonly of: QuantityInputs['of'];
  readonly settings?: DeclaredSettings;
  /** Detectors use G2. */
  readonly inDetector?: boolean;
}

/** Findings of one claim as its quantity tells them; route A alone, since no finding waits for route B. */
export function findingsOf(quantity: string, { of, settings = {}, inDetector = false }: Look): readonly Finding[] {
  const found = quantities.get(quantity);
  if (found === undefined) throw new Error(`there is no quantity ${quantity}`);
  const inputs = { of, noise: inDetector ? (builtInCurve('G2') ?? null) : null };
  return found.measure({ claimId: 'C1', inputs, settings, over: null, claimed: [null], withFigures: false, routeAOnly: true }, watch).findings;
}

/** The same modes with one of them changed sample by sample. */
export const changed = ({ t, modes }: Parts, l: number, m: number, by: (re: number, im: number, tM: number) => readonly [number, number]): Parts => ({
  t,
  modes: modes.map((mode): Mode => {
    if (mode.l !== l || mode.m !== m) return mode;
    const pairs = Array.from(mode.re, (x, i) => by(x, mode.im[i]!, t[i]!));
    return { ...mode, re: Float64Array.from(pairs, ([x]) => x), im: Float64Array.from(pairs, ([, y]) => y) };
  }),
});

/** Samples from one time to another. */
export function cut({ t, modes }: Parts, from: number, to: number): Parts {
  const [i, j] = [t.findIndex((x) => x >= from), t.findIndex((x) => x > to)];
  const part = (values: Float64Array): Float64Array => values.slice(i, j < 0 ? undefined : j);
  return { t: part(t), modes: modes.map((mode) => ({ ...mode, re: part(mode.re), im: part(mode.im) })) };
}
