import type { DraftSheet } from '@/lib/services/submissions/submission-view';
import { burstFiles, burstSheet } from './burst-sheet';

/** Seconds in one M of a mass of 60 M☉. */
const M_S = 60 * 4.925491e-6;

/** A burst that turns at 150 Hz: the (2,2) mode of a source of 60 M☉ at 400 Mpc, in physical strain or in M, and white noise. */
export function turningBurst(unit: 's' | 'M', claim: Record<string, unknown>): { readonly sheet: DraftSheet; readonly files: Readonly<Record<string, string>> } {
  const [perSecond, top] = unit === 's' ? [1, 1e-21] : [1 / M_S, 0.1];
  const rows = Array.from({ length: 4096 }, (_, i) => {
    const t = (i - 2048) / 4096;
    const [height, turned] = [top * Math.exp(-(t ** 2) / (2 * 0.01 ** 2)), -2 * Math.PI * 150 * t];
    return `${(t * perSecond).toFixed(9)} ${(height * Math.cos(turned)).toExponential(12)} ${(height * Math.sin(turned)).toExponential(12)}`;
  });
  const A = { file: 'a.txt', domain: 'time', variable: 'strain', columns: ['t', 're', 'im'], mode: [2, 2], timeUnit: unit, amplitudeUnit: unit === 's' ? 'strain' : 'rh/M', ...(unit === 's' && { totalMassMsun: 60, distanceMpc: 400 }) };
  return { sheet: { ...burstSheet(), waveforms: { A }, claims: [claim] }, files: { ...burstFiles(), 'a.txt': `${rows.join('\n')}\n` } };
}
