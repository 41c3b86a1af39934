import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';

/** An invented measured curve: a smooth floor under lines a few parts in a thousand wide, in a table of four thousand rows. */
const rows = 4000;
const [fromHz, toHz] = [15, 2100];
const lines: readonly (readonly [hz: number, height: number])[] = [
  [36.7, 90],
  [60, 400],
  [120, 60],
  [180, 40],
  [302.2, 120],
  [331.9, 70],
  [505, 200],
  [1009, 150],
];
const WIDTH = 0.003;

const floorAt = (f: number): number => 1e-46 * ((28 / f) ** 8 + 0.4 + (f / 260) ** 2);

export const measuredRows = (): { readonly f: number[]; readonly psd: number[] } => {
  const f = Array.from({ length: rows }, (_, i) => fromHz * (toHz / fromHz) ** (i / (rows - 1)));
  const lineAt = (x: number): number => lines.reduce((sum, [at, height]) => sum + height / (1 + ((x - at) / (WIDTH * at)) ** 2), 0);
  return { f, psd: f.map((x) => floorAt(x) * (1 + lineAt(x))) };
};

export function measuredCurve(): NoiseCurve {
  const { f, psd } = measuredRows();
  const made = tabulatedCurve({ name: 'invented, with lines', f, values: psd, meaning: 'psd', sided: 'one' });
  if (!made.ok) throw new Error(JSON.stringify(made.error));
  return made.value.curve;
}
