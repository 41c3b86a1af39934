import { conditionWaveform } from '@/lib/engine/conditioning/condition-waveform';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { MaximiseOver } from '@/lib/engine/contract/settings';
import type { Side, TemplateRequest } from '@/lib/engine/contract/route';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';
import { MSUN_S } from '@/lib/engine/units/constants';
import { binary, curve, inMasses } from './detector-claims';

/** A binary of random ratio and spin. */
export const drawnBy = (random: () => number) => (massMsun: number): Side => {
  const spin = 1.6 * random() - 0.8;
  const c = conditionWaveform(binary('drawn', { massRatio: 1 + 2 * random(), chi1z: spin, chi2z: spin, mOmega0: 0.03, stepM: 1, modes: ['22'] }), 'all');
  return { waveform: c.used(null), taper: c.taper('auto', null).window, secondsPerUnit: massMsun * MSUN_S, strainPerUnit: 1, inclinationRad: 0, azimuthRad: 0 };
};
const rise = (x: number): number => 1 / (1 + Math.exp(-x));
/** An inspiral that swells late and rings off in three modes: what a scan reads roughly lies a per cent below its match there. */
export function threeModes(stretch: number): Side {
  const times = Float64Array.from({ length: 1401 }, (_, t) => t);
  const swept = (t: number): number => 0.05 * (1 - Math.min(t, 1150) / 1256) ** -0.375;
  const omega = (t: number): number => swept(t) + (0.55 - swept(t)) * rise((t - 1100) / 10);
  const size = (t: number): number => (0.03 + 0.07 * rise((t - 1000) / 30)) / Math.cosh(Math.max(0, t - 1100) / 11.5);
  const phases = new Float64Array(times.length);
  for (let i = 1; i < phases.length; i++) phases[i] = phases[i - 1]! + (omega(i - 1) + 4 * omega(i - 0.5) + omega(i)) / 6;
  const phase = (t: number): number => phases[t]!;
  const mode = (l: number, m: number, share: number) => ({ l, m, re: times.map((t) => share * size(t) * Math.cos((m * phase(t)) / 2)), im: times.map((t) => -share * size(t) * Math.sin((m * phase(t)) / 2)) });
  const c = conditionWaveform(inMasses('swelling', times.map((t) => stretch * t), [mode(2, 2, 1), mode(2, 1, 0.1), mode(3, 3, 0.15)], { negativeM: 'mirror' }), 'all');
  return { waveform: c.used(null), taper: c.taper('auto', null).window, secondsPerUnit: 100 * MSUN_S, strainPerUnit: 1, inclinationRad: 0, azimuthRad: 0 };
}
/** A swept burst somewhere in a long record: two of them may meet at a far lag. */
export function burstAt(place: number): Side {
  const times = Float64Array.from({ length: 2001 }, (_, t) => t);
  const size = (t: number): number => Math.exp(-(((t - place) / 60) ** 2));
  const phase = (t: number): number => 0.2 * t + 2e-4 * (t - place) ** 2;
  const mode = { l: 2, m: 2, re: times.map((t) => size(t) * Math.cos(phase(t))), im: times.map((t) => -size(t) * Math.sin(phase(t))) };
  const c = conditionWaveform(inMasses('burst', times, [mode], { negativeM: 'mirror' }), 'all');
  return { waveform: c.used(null), taper: c.taper('auto', null).window, secondsPerUnit: 100 * MSUN_S, strainPerUnit: 1, inclinationRad: 0, azimuthRad: 0 };
}
export const rescale = (side: Side, factor: number): Side => ({ ...side, secondsPerUnit: side.secondsPerUnit * factor });
export const requestOf = (templates: readonly Side[], fLowHz: number, range: readonly [number, number], noise: NoiseCurve = curve('G2')): TemplateRequest & { readonly response: 'plus' } => ({
  templates,
  band: { noise, fLowHz, fHighHz: 700 },
  response: 'plus',
  maximise: ['time', 'phase', 'templateMass'] satisfies MaximiseOver[],
  templateMassRange: range,
  rescale,
});

/** Noise as it is measured: a bowl with two narrow lines. */
export function tableCurve(): NoiseCurve {
  const f = Float64Array.from({ length: 400 }, (_, i) => 10 * 200 ** (i / 399));
  const line = (at: number, x: number): number => 40 * Math.exp(-(((x - at) / (0.01 * at)) ** 2));
  const table = tabulatedCurve({ name: 'table', f, values: f.map((x) => 1e-46 * ((x / 150) ** -6 + 1 + (x / 150) ** 2) * (1 + line(60, x) + line(180, x))), meaning: 'psd', sided: 'one' });
  if (!table.ok) throw new Error('the table is valid');
  return table.value.curve;
}
