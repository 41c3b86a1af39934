import type { Band } from '@/lib/engine/contract/route';

/** Largest and smallest 1/S of a band in any range of ln f; outside the band it counts as zero. */
export interface NoiseRange {
  readonly sup: (from: number, to: number) => number;
  readonly inf: (from: number, to: number) => number;
}

/** Cells of the table; a formula may rise between the points at which a cell was asked by less than the room left for it. */
const CELL = 0.004;
const ROOM = 1e-3;
const MOST_CELLS = 1 << 14;
const ASKED = 3;
const EDGE = 1e-9;

interface Cells {
  readonly low: number;
  readonly high: number;
  readonly step: number;
  readonly most: Float64Array;
  readonly least: Float64Array;
}

function cellsOf({ noise, fLowHz, fHighHz }: Band): Cells {
  const [low, high] = [Math.log(fLowHz), Math.log(fHighHz)];
  const cells = Math.max(1, Math.min(MOST_CELLS, Math.ceil((high - low) / CELL)));
  const step = (high - low) / cells;
  const [most, least] = [new Float64Array(cells), new Float64Array(cells).fill(Infinity)];
  const look = (cell: number, fHz: number): void => {
    const v = 1 / noise.psd(fHz);
    if (!(v <= most[cell]!)) most[cell] = v;
    if (!(v >= least[cell]!)) least[cell] = v;
  };
  for (let i = 0; i < cells; i++) for (let a = 0; a < ASKED; a++) look(i, Math.min(fHighHz, Math.max(fLowHz, Math.exp(low + (i + a / (ASKED - 1)) * step))));
  for (const f of noise.points ?? []) if (f >= fLowHz && f <= fHighHz) look(Math.min(cells - 1, Math.floor((Math.log(f) - low) / step)), f);
  return { low, high, step, most, least };
}

/**
 * A table of extremes of 1/S.
 * Shape:  the band must lie within the curve.
 * Units:  ln of Hz in, 1/S in Hz out.
 * Error:  on the safe side: up to one cell (0.4 %) wider than asked, and a thousandth for a formula. A tabulated curve is a power law between its points, so its ends tell.
 * Fails:  never; what is not finite stays so, and bounds nothing.
 * Source: our rule.
 */
export function noiseRange(band: Band): NoiseRange {
  const { low, high, step, most, least } = cellsOf(band);
  const { points } = band.noise;
  const room = points === null || points.length < 2 ? ROOM : EDGE;
  const cellAt = (place: number, shift: number): number => Math.max(0, Math.min(most.length - 1, Math.floor((place - low) / step + shift)));
  const sup = (from: number, to: number): number => {
    if (to < low || from > high) return 0;
    let found = 0;
    for (let i = cellAt(from, -EDGE), last = cellAt(to, EDGE); i <= last; i++) if (!(most[i]! <= found)) found = most[i]!;
    return found * (1 + room);
  };
  const inf = (from: number, to: number): number => {
    if (from < low || to > high) return 0;
    let found = Infinity;
    for (let i = cellAt(from, -EDGE), last = cellAt(to, EDGE); i <= last; i++) if (!(least[i]! >= found)) found = least[i]!;
    return found * (1 - room);
  };
  return { sup, inf };
}
