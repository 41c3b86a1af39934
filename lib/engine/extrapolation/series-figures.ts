import type { Figure, FigureSeries } from '../contract/measurement';
import { predictedRatio, type Spacings } from './richardson';
import type { Curve, RunCurves } from './run-curves';

const MOST_POINTS = 1200;
const drawn = { axis: 'left', scale: 'linear' } as const;

export const curveUnit: Readonly<Record<Curve, string>> = { phase: 'rad', amplitude: '', complex: '' };
const curveSymbol: Readonly<Record<Curve, string>> = { phase: 'phase difference, δφ', amplitude: 'amplitude difference, δ|H|', complex: 'complex difference, |δH|' };
export const curveNoun: Readonly<Record<Curve, string>> = { phase: 'Phase difference', amplitude: 'Amplitude difference', complex: 'Size of the complex difference' };

interface Drawn {
  readonly curves: RunCurves;
  readonly curve: Curve;
  readonly spacings: Spacings;
  readonly names: readonly [string, string, string];
  readonly order: number;
  readonly claimed: number | null;
  readonly pointwise: readonly (number | null)[];
}

const spelt = (x: number): string => String(Number(x.toPrecision(3)));

/**
 * Differences of neighbouring runs over time, the finer one scaled so that both fall together when the order holds; and the order
 * at each time by itself.
 * Shape:  two figures, thinned to a screen's width.
 * Units:  those of the curve; time in M.
 * Error:  for eyes alone.
 * Fails:  never.
 * Source: Q20.
 */
export function convergenceFigures({ curves, curve, spacings, names: [c, m, f], order, claimed, pointwise }: Drawn): Figure[] {
  const stride = Math.max(1, Math.ceil(curves.t.length / MOST_POINTS));
  const picked = Array.from(curves.t.keys()).filter((i) => i % stride === 0);
  const [coarse, fine] = curves[curve];
  const [unit, quantity] = [curveUnit[curve], curveSymbol[curve]];
  const scaled = (by: number): number[] => picked.map((i) => fine[i]! * predictedRatio(by, spacings));
  const x = { label: 'Time', unit: 'M', scale: 'linear', values: picked.map((i) => curves.t[i]!) } as const;
  const asClaimed: FigureSeries[] = claimed === null || !(claimed > 0) ? [] : [{ ...drawn, label: `${m} less ${f}, × ${spelt(predictedRatio(claimed, spacings))} (order ${spelt(claimed)}, claimed)`, quantity, unit, role: 'claimed', values: scaled(claimed) }];
  const constant: FigureSeries[] = claimed === null ? [] : [{ ...drawn, label: 'Claimed order', quantity: 'order p', unit: '', role: 'claimed', values: picked.map(() => claimed) }];
  return [
    {
      kind: 'curve',
      title: `${curveNoun[curve]} between neighbouring runs, scaled to one another`,
      x,
      series: [
        { ...drawn, label: `${c} less ${m}`, quantity, unit, role: 'noise', values: picked.map((i) => coarse[i]!) },
        { ...drawn, label: `${m} less ${f}, × ${spelt(predictedRatio(order, spacings))} (order ${spelt(order)})`, quantity, unit, role: 'recomputed', values: scaled(order) },
        ...asClaimed,
      ],
    },
    { kind: 'curve', title: 'Order of convergence at each time by itself', x, series: [{ ...drawn, label: 'Order', quantity: 'order p', unit: '', role: 'recomputed', values: picked.map((i) => pointwise[i] ?? null) }, ...constant] },
  ];
}

interface Approach {
  readonly title: string;
  /** What the numbers are of. */
  readonly quantity: string;
  readonly x: { readonly label: string; readonly unit: string };
  /** Where the runs stand on the axis of the figure, and their numbers. */
  readonly places: readonly number[];
  readonly values: readonly number[];
  readonly unit: string;
  /** The law that is carried to zero. */
  readonly law: (x: number) => number;
  readonly lawName: string;
  readonly claimed: number | null;
}

const POINTS = 64;

/** Straight between neighbouring runs, nothing beyond them. */
function joined(places: readonly number[], values: readonly number[], x: number): number | null {
  const order = [...places.keys()].sort((i, j) => places[i]! - places[j]!);
  for (let k = 0; k + 1 < order.length; k++) {
    const [i, j] = [order[k]!, order[k + 1]!];
    const [a, b] = [places[i]!, places[j]!];
    if (x >= a && x <= b) return values[i]! + ((values[j]! - values[i]!) * (x - a)) / (b - a || 1);
  }
  return null;
}

/**
 * Numbers of the runs against spacing or inverse radius, and the law that carries them to zero.
 * Shape:  one figure; every run is one of its points.
 * Units:  those of the numbers.
 * Error:  for eyes alone.
 * Fails:  never.
 * Source: Q20, Q21.
 */
export function approachFigure({ title, quantity, x, places, values, unit, law, lawName, claimed }: Approach): Figure {
  const last = Math.max(...places);
  const grid = [...new Set([...Array.from({ length: POINTS + 1 }, (_, i) => (last * i) / POINTS), ...places])].sort((p, q) => p - q);
  const asClaimed: FigureSeries[] = claimed === null ? [] : [{ ...drawn, label: 'Claimed', quantity, unit, role: 'claimed', values: grid.map(() => claimed) }];
  return {
    kind: 'curve',
    title,
    x: { ...x, scale: 'linear', values: grid },
    series: [
      { ...drawn, label: 'Of each run, joined', quantity, unit, role: 'noise', values: grid.map((at) => joined(places, values, at)) },
      { ...drawn, label: lawName, quantity, unit, role: 'recomputed', values: grid.map(law) },
      ...asClaimed,
    ],
  };
}
