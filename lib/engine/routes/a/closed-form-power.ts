import type { Band } from '@/lib/engine/contract/route';

/** Romberg stops when two columns differ by less than this part of the sum, or after so many halvings. */
const SETTLED = 1e-13;
const MOST_HALVINGS = 14;

/** ∫ g du over one piece where g is smooth: trapezoids of halved steps, extrapolated. */
function romberg(g: (u: number) => number, from: number, to: number): number {
  let step = to - from;
  let row = [(step * (g(from) + g(to))) / 2];
  for (let halving = 1, points = 1; halving <= MOST_HALVINGS; halving++, points *= 2, step /= 2) {
    let between = 0;
    for (let i = 0; i < points; i++) between += g(from + (i + 0.5) * step);
    const next = [(row[0]! + step * between) / 2];
    for (let k = 0, four = 4; k < row.length; k++, four *= 4) next.push(next[k]! + (next[k]! - row[k]!) / (four - 1));
    const [now, before] = [next[next.length - 1]!, row[row.length - 1]!];
    if (halving > 3 && Math.abs(now - before) <= SETTLED * Math.abs(now)) return now;
    row = next;
  }
  return row[row.length - 1]!;
}

/** Pieces of ln f between which neither the curve nor the band has an edge, an octave long at most. */
function pieces({ noise, fLowHz, fHighHz }: Band): [number, number][] {
  const inner = noise.points === null ? [] : Array.from(noise.points).filter((f) => f > fLowHz * (1 + 1e-12) && f < fHighHz * (1 - 1e-12));
  const edges = [fLowHz, ...inner, fHighHz].map(Math.log);
  return edges.slice(1).flatMap((to, i) => {
    const from = edges[i]!;
    const n = Math.max(1, Math.ceil((to - from) / Math.LN2));
    return Array.from({ length: n }, (_, k): [number, number] => [from + ((to - from) * k) / n, from + ((to - from) * (k + 1)) / n]);
  });
}

/**
 * 4∫A²/S df of an amplitude in closed form, by route A: Romberg in ln f.
 * Shape:  scalar; 0 for an empty band.
 * Units:  A in 1/Hz.
 * Error:  1e-13 of the sum for smooth amplitudes.
 * Fails:  never.
 * Source: settings.md rule 2.5; Romberg's rule (from memory).
 */
export function closedFormPower(amplitude: (fHz: number) => number, band: Band): number {
  if (!(band.fHighHz > band.fLowHz)) return 0;
  const { noise } = band;
  const g = (u: number): number => {
    const f = Math.exp(u);
    return (amplitude(f) ** 2 * f) / noise.psd(Math.min(Math.max(f, noise.fLowHz), noise.fHighHz));
  };
  return 4 * pieces(band).reduce((sum, [from, to]) => sum + romberg(g, from, to), 0);
}
