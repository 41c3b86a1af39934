import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { Side } from '@/lib/engine/contract/route';
import { transformOfSize } from '@/lib/engine/fourier/transform';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';
import { readHdf5 } from '@/lib/threads/read-hdf5';
import { columns } from '../support/detector-claims';
import { inPieces, open } from '../unit/formats/array-waves';

/** Open strain around the first event, 32 s at 4096 Hz, and the template beside it; read, never copied. */
const folder = join('..', 'shared', 'reference', 'data', 'detector');
export const isThere = existsSync(folder);
export const title = (what: string): string => (isThere ? what : `${what} (skipped: ${folder} is missing)`);

export const RATE_HZ = 4096;
export const times = Float64Array.from({ length: 32 * RATE_HZ }, (_, i) => i / RATE_HZ);

/** Named parts of an HDF5 file as columns over the same 32 s. */
async function parts(name: string, datasets: Readonly<Record<string, string>>) {
  const files = inPieces({ [name]: new Uint8Array(readFileSync(join(folder, name))) });
  const { waveform, problems } = await open({ file: name, datasets, time: { start: 0, step: 1 / RATE_HZ }, timeUnit: 's', amplitudeUnit: 'strain' }, files, readHdf5);
  if (waveform?.content.kind !== 'line-of-sight') throw new Error(problems.join());
  return waveform.content;
}
export const strainOf = async (site: 'H' | 'L'): Promise<Float64Array> => (await parts(`${site}-${site}1_LOSC_4_V2-1126259446-32.hdf5`, { plus: '/strain/Strain' })).plus;
export const template = () => parts('GW150914_4_template.hdf5', { plus: '/template[0,:]', cross: '/template[1,:]' });

/** Flat but for cosine ramps over an eighth of the length, half at each end. */
export const ramped = (x: Float64Array): Float64Array => x.map((value, i) => value * Math.sin((Math.PI / 2) * Math.min(1, (16 * Math.min(i, x.length - 1 - i)) / (x.length - 1))) ** 2);

export const hann = (u: number): number => 0.5 - 0.5 * Math.cos(2 * Math.PI * u);
export const blackman = (u: number): number => 0.42 - 0.5 * Math.cos(2 * Math.PI * u) + 0.08 * Math.cos(4 * Math.PI * u);

const SEGMENT = 4 * RATE_HZ;
/** What the segments of an estimate of noise have in common: half of each with the next, or nothing. */
export type Segments = 'half-overlapping' | 'side-by-side';

/** Welch: the mean over segments of 4 s, no detrending; one-sided, on multiples of a quarter of a hertz. */
function welch(x: Float64Array, window: (u: number) => number, segments: Segments): Float64Array {
  const weights = Float64Array.from({ length: SEGMENT }, (_, i) => window(i / SEGMENT));
  const power = weights.reduce((sum, w) => sum + w * w, 0);
  const density = new Float64Array(SEGMENT / 2 + 1);
  const stride = segments === 'side-by-side' ? SEGMENT : SEGMENT / 2;
  const starts = Array.from({ length: (x.length - SEGMENT) / stride + 1 }, (_, k) => k * stride);
  const [data, out] = [new Float64Array(2 * SEGMENT), new Float64Array(2 * SEGMENT)];
  for (const start of starts) {
    weights.forEach((w, i) => (data[2 * i] = w * x[start + i]!));
    transformOfSize(SEGMENT).forward(out, data);
    density.forEach((_, k) => (density[k]! += (2 * (out[2 * k]! ** 2 + out[2 * k + 1]! ** 2)) / (RATE_HZ * power * starts.length)));
  }
  return density;
}

/** Between two of Welch's points the published recipes take S, or sum over the points, which takes 1/S, along a straight line. */
export type Between = 'density' | 'inverse';

/** The noise of a strain record from 10 to 2000 Hz, with seven points more between two of Welch's: the engine's own rule then has little left to choose. */
export function measuredNoise(x: Float64Array, window: (u: number) => number, between: Between, segments: Segments): NoiseCurve {
  const density = welch(x, window, segments);
  const f = Float64Array.from({ length: 1990 * 4 * 8 + 1 }, (_, i) => 10 + i / 32);
  const values = f.map((hz) => {
    const [k, part] = [Math.floor(4 * hz), (4 * hz) % 1];
    const [here, next] = [density[k]!, density[k + 1]!];
    return between === 'density' ? (1 - part) * here + part * next : 1 / ((1 - part) / here + part / next);
  });
  const curve = tabulatedCurve({ name: 'measured', f, values, meaning: 'psd', sided: 'one' });
  if (!curve.ok) throw new Error('the measured noise');
  return curve.value.curve;
}

/** A record of 32 s, ramped, as route A takes it; moved later by so many samples. */
export const recordOf = (name: string, plus: Float64Array, cross: Float64Array, later = 0): Side => ({
  waveform: columns(name, times.map((t) => t + later / RATE_HZ), ramped(plus), ramped(cross)), taper: { start: null, end: null }, secondsPerUnit: 1, strainPerUnit: 1, inclinationRad: 0, azimuthRad: 0,
});
