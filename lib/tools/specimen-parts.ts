import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import type { Mode } from '@/lib/engine/contract/waveform';
import { formatModesText, modeColumns } from '@/lib/engine/synthesis/modes-text';
import type { SynthesisRequest, SyntheticWaveform } from '@/lib/engine/synthesis/synthesise';

/** What the sheets and files of the specimens are made of. */
export interface SpecimenFile {
  readonly path: string;
  readonly text: string;
}
export const digits = 8;
/** Where the numbers stay well inside their tolerance, and the folder shall be small. */
export const fewDigits = 6;
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
  significantDigits = digits,
): SpecimenFile {
  const { massRatio, chi1z, chi2z, mOmega0, stepM } = request;
  const notes = [`mass ratio ${massRatio}, spins ${chi1z} and ${chi2z}; M Omega = ${mOmega0} at t = 0; step ${stepM} M`];
  return { path, text: formatModesText({ title, notes, t: wave.t, modes: positive(wave.modes), significantDigits }) };
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

/** The second-generation design curve as an amplitude density, as it is or with something added to its power density (1/Hz). */
export function designCurveFile(path: string, points: number, added: (fHz: number) => number = () => 0): SpecimenFile {
  const curve = builtInCurve('G2');
  if (!curve) throw new Error('the design curve G2 is not built in');
  const rows = Array.from({ length: points }, (_, i) => {
    const f =
      i === points - 1 ? curve.fHighHz : Number((curve.fLowHz * (curve.fHighHz / curve.fLowHz) ** (i / (points - 1))).toPrecision(9));
    return `${f} ${Math.sqrt(curve.psd(f) + added(f)).toPrecision(digits)}`;
  });
  return {
    path,
    text: [`# second-generation design (G2), ${points} points`, '# f (Hz)  ASD (Hz^-1/2), one-sided', ...rows, ''].join('\n'),
  };
}
