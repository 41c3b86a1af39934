import type { Figure } from '@/lib/engine/contract/measurement';
import type { BuiltInCurve } from '@/lib/engine/noise/built-in-curves';

const perOctave = 24;

/** The curve over the whole of its range, evaluated as the engine evaluates it. */
export function curveFigure({ id, title, fLowHz, fHighHz, psd }: BuiltInCurve): Figure {
  const n = Math.ceil(perOctave * Math.log2(fHighHz / fLowHz)) + 1;
  const hz = Array.from({ length: n }, (_, i) => (i === n - 1 ? fHighHz : fLowHz * (fHighHz / fLowHz) ** (i / (n - 1))));
  return {
    kind: 'curve',
    title: `${id}: ${title.charAt(0).toLowerCase()}${title.slice(1)}`,
    x: { label: 'Frequency', unit: 'Hz', scale: 'log', values: hz },
    series: [{ label: 'Amplitude spectral density', unit: 'Hz^-1/2', role: 'recomputed', axis: 'left', scale: 'log', values: hz.map((f) => Math.sqrt(psd(f))) }],
  };
}
