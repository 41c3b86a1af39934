import type { Finding } from './finding';
import type { MetricBound } from './metric-bound';
import type { Sensitivity } from './sensitivity';
import type { Place } from '@/lib/kernel/place';

/** One line of the error budget. `u` is null when the component cannot be estimated: unknown is never zero. */
export interface BudgetLine {
  readonly component: string;
  /** Domain id, e.g. `E01`. */
  readonly id: string;
  /** Does it make U (numerical), or is it chosen / not known from the files (decides coverage only)? */
  readonly group: 'computation' | 'coverage';
  /** Standard uncertainty in the quantity's unit, at the worst claimed point. */
  readonly u: number | null;
  readonly note: string;
  /** How well u is known; absent where it is taken as exact. */
  readonly degreesOfFreedom?: number;
  /** How it is spread, where that differs from what is usual for its id: a bound is a rectangle whatever it bounds. */
  readonly shape?: 'rectangular' | 'normal';
  /** The number itself with each of the line's knobs turned; for what is made of several such numbers, never printed. */
  readonly turned?: { readonly values: readonly number[]; /** Where those are other knobs than the ones that make u. */ readonly note?: string };
  /** Part of the variance of all that is known; null where u is. */
  readonly share?: number | null;
}

export interface MeasuredPoint {
  /** The swept setting at this point, e.g. `{ totalMassMsun: 60 }`; empty for a single value. */
  readonly at: Place;
  /** The reported value (route A), or null when not computable. */
  readonly value: number | null;
  readonly routes: { readonly A: number | null; readonly B: number | null };
  /** U = 2 u_c of the computation alone (E01, E02, E17, rounding of the input). */
  readonly expandedUncertainty: number | null;
  readonly components?: Readonly<Record<string, number | null>>;
  /** Settings that nobody swept and that still took another value here than at other points, such as the upper edge at this mass. */
  readonly settings?: Readonly<Record<string, unknown>>;
  /** Lower bound only, and the like: qualifiers the verdict prints. */
  readonly remarks?: readonly string[];
}

/** A curve to draw: plain numbers with units, thinned for the screen, never used for a verdict. */
export interface Figure {
  readonly kind: 'waveforms' | 'integrand' | 'sweep' | 'flux' | 'curve' | 'plane';
  readonly title: string;
  /** The point that is drawn, of a sweep; absent where the figure is of all points. */
  readonly at?: Place;
  /** Where the axis goes over words, they stand at the places 0, 1, 2, … and nothing lies between them. */
  readonly x: { readonly label: string; readonly unit: string; readonly scale: 'linear' | 'log'; readonly values: readonly number[]; readonly words?: readonly string[] };
  readonly series: readonly FigureSeries[];
  /** Of a map: its second axis and the level over both; the series are places on it. */
  readonly plane?: FigurePlane;
}
/** Levels over the horizontal axis and a second one, row by row from the lowest. */
export interface FigurePlane {
  readonly y: { readonly label: string; readonly unit: string; readonly values: readonly number[] };
  readonly level: { readonly label: string; readonly unit: string; readonly values: readonly (number | null)[] };
  /** Drawn as a contour. */
  readonly threshold: number;
}
export interface FigureSeries {
  readonly label: string;
  /** What its axis is of, where the label names the trace rather than the quantity. */
  readonly quantity?: string;
  readonly unit: string;
  /** Claimed traces are solid orange, recomputed dashed blue; bands are drawn filled. `varied` is drawn over them, and no run makes it. */
  readonly role: 'claimed' | 'recomputed' | 'varied' | 'residual' | 'noise' | 'band-low' | 'band-high';
  readonly axis: 'left' | 'right';
  readonly scale: 'linear' | 'log';
  readonly values: readonly (number | null)[];
  /** Values that stand alone: nothing joins them. */
  readonly points?: true;
}

/** A setting with the value that was used and how it came to be. */
export interface UsedSetting {
  readonly name: string;
  readonly value: unknown;
  readonly standing: 'declared' | 'assumed' | 'swept';
  readonly unit?: string;
}

export interface Measurement {
  readonly points: readonly MeasuredPoint[];
  readonly budget: readonly BudgetLine[];
  readonly findings: readonly Finding[];
  /** Names of settings that took a house default and could change this value. */
  readonly assumed: readonly string[];
  readonly settings: readonly UsedSetting[];
  /** Indices of the points at which route B ran (all up to ten; else ends, worst and eight spread). */
  readonly routeBPoints: readonly number[];
  readonly figures: readonly Figure[];
  /** Of match-like claims. */
  readonly metricBound?: MetricBound;
  /** Only where they were asked for, with the figures. */
  readonly sensitivities?: readonly Sensitivity[];
}
