import type { Mode } from '@/lib/engine/contract/waveform';
import { formatModesText, modeColumns } from '@/lib/engine/synthesis/modes-text';
import type { SynthesisRequest, SyntheticWaveform } from '@/lib/engine/synthesis/synthesise';

/** What the sheets and files of the specimens are made of. */
export interface SpecimenFile {
  readonly path: string;
  readonly text: string;
}
export const digits = 8;
export const sheet = (content: object): SpecimenFile => ({
  path: 'claim.json',
  text: `${JSON.stringify({ format: 'counterfoil-claim/1', ...content }, null, 2)}\n`,
});

/** Only m > 0: the sheet says `negativeM: "mirror"`, and half the bytes carry the same information. */
export const positive = (modes: readonly Mode[]): Mode[] => modes.filter(({ m }) => m > 0);

export function modesFile(
  path: string,
  title: string,
  request: SynthesisRequest,
  wave: { readonly t: Float64Array; readonly modes: readonly Mode[] },
): SpecimenFile {
  const { massRatio, chi1z, chi2z, mOmega0, stepM } = request;
  const notes = [`mass ratio ${massRatio}, spins ${chi1z} and ${chi2z}; M Omega = ${mOmega0} at t = 0; step ${stepM} M`];
  return { path, text: formatModesText({ title, notes, t: wave.t, modes: positive(wave.modes), significantDigits: digits }) };
}

export const waveform = (file: string, modes: readonly Mode[], extra: object) => ({
  file,
  domain: 'time',
  variable: 'strain',
  columns: modeColumns(positive(modes)),
  timeUnit: 'M',
  amplitudeUnit: 'rh/M',
  negativeM: 'mirror',
  ...extra,
});
export const binaryFacts = ({ massRatio, chi1z, chi2z }: SynthesisRequest) => ({ massRatio, chi1z, chi2z });

/** The same record without its first `n` samples: 10 Hz at 100 solar masses is early enough, and half the bytes. */
export const withoutStart = <T extends Pick<SyntheticWaveform, 't' | 'modes'>>(wave: T, n: number): T => ({
  ...wave,
  t: wave.t.subarray(n),
  modes: wave.modes.map((mode) => ({ ...mode, re: mode.re.subarray(n), im: mode.im.subarray(n) })),
});
