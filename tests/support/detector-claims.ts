import type { Measurement } from '@/lib/engine/contract/measurement';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { DeclaredSettings, SettingName } from '@/lib/engine/contract/settings';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { quantities } from '@/lib/engine/quantities/registry';
import { synthesise, type SynthesisRequest } from '@/lib/engine/synthesis/synthesise';

const stepOf = (axis: Float64Array): number => (axis[1] ?? Number.NaN) - (axis[0] ?? Number.NaN);

const nothingKnown = { ownTotalMassMsun: null, ownDistanceMpc: null, junkEndM: null, binary: {}, significantDigits: null } as const;

/** A mode set in M, as the hall hands it over. */
export const inMasses = (name: string, axis: Float64Array, modes: readonly Mode[], more: Partial<Waveform> = {}): Waveform => ({
  name,
  domain: 'time',
  unit: 'M',
  amplitudeUnit: 'rh/M',
  variable: 'strain',
  axis,
  uniformStep: null,
  content: { kind: 'modes', modes },
  negativeM: 'given',
  ...nothingKnown,
  ...more,
});

/** A stylised binary of about 3 000 M, every mode with its mirror. */
export function binary(name: string, more: Partial<SynthesisRequest> = {}): Waveform {
  const { t, modes } = synthesise({ massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.02, stepM: 0.5, modes: ['22', '21', '33'], ...more });
  return inMasses(name, t, modes, { uniformStep: stepOf(t) });
}

/** Physical strain along one line of sight, in seconds. */
export const columns = (
  name: string,
  axis: Float64Array,
  plus: Float64Array,
  cross: Float64Array | null,
  more: Partial<Waveform> = {},
): Waveform => ({
  name,
  domain: 'time',
  unit: 's',
  amplitudeUnit: 'strain',
  variable: 'strain',
  axis,
  uniformStep: stepOf(axis),
  content: { kind: 'line-of-sight', plus, cross },
  negativeM: null,
  ...nothingKnown,
  ...more,
});

function known<T>(found: T | undefined, what: string): T {
  if (found === undefined) throw new Error(`there is no ${what}`);
  return found;
}

export const curve = (id: string): NoiseCurve => known(builtInCurve(id), `curve ${id}`);

export interface Claim {
  readonly quantity: string;
  readonly a: Waveform;
  readonly b?: Waveform;
  readonly noise?: NoiseCurve;
  readonly settings?: DeclaredSettings;
  readonly over?: { readonly setting: SettingName; readonly values: readonly (number | string)[] };
  readonly claimed?: readonly (number | null)[];
  readonly withFigures?: boolean;
}

const quiet = { onProgress: () => undefined, cancelled: () => false };

export function measured(claim: Claim): Measurement {
  const { quantity, a, b, noise = curve('G2'), settings = {}, over = null, claimed = [], withFigures = false } = claim;
  const of = b === undefined ? { a } : { a, b };
  return known(quantities.get(quantity), quantity).measure(
    { claimId: 'C1', inputs: { of, noise }, settings, over, claimed, withFigures },
    quiet,
  );
}

export const valueOf = (claim: Claim): number => measured(claim).points[0]?.value ?? Number.NaN;
