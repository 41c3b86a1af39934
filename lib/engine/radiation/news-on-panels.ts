import type { Mode } from '../contract/waveform';
import { antiderivativeOf, derivativeOf, evaluateSplines, fitSpline, splineBasis, type Spline, type SplineBasis } from '../routes/b/banded-spline';
import { gaussRule } from '../routes/b/gauss-legendre';
import { floorOfMode } from './integration-floor';
import { divisionsTo, type RadiationRecord } from './radiation-record';
import { largestTurns } from './sampling';
import { slowWaves, type PanelNodes } from './slow-waves';

/** A panel spans eight sample intervals, or as many more as turn the fastest phase by less than half a radian. */
const LEAST_INTERVALS = 8;
const RADIANS_A_PANEL = 0.5;
const NODES_A_PANEL = 12;

/** Gauss panels over some sample intervals each, with an edge at the start of the integral. */
function panelNodes(axis: Float64Array, startM: number, intervals: number): PanelNodes {
  const last = axis.length - 1;
  const start = Math.max(startM, axis[0]!);
  const edges: number[] = [];
  for (let i = 0; i < last; i += intervals) edges.push(axis[i]!);
  edges.push(axis[last]!);
  if (start < axis[last]! && !edges.includes(start)) edges.push(start);
  edges.sort((a, b) => a - b);
  const rule = gaussRule(NODES_A_PANEL);
  const t = new Float64Array((edges.length - 1) * NODES_A_PANEL);
  const w = new Float64Array(t.length);
  for (let p = 0; p + 1 < edges.length; p++) {
    const half = (edges[p + 1]! - edges[p]!) / 2;
    for (let i = 0; i < NODES_A_PANEL; i++) {
      t[p * NODES_A_PANEL + i] = edges[p]! + half * (1 + rule.x[i]!);
      w[p * NODES_A_PANEL + i] = half * rule.w[i]!;
    }
  }
  const counted = t.findIndex((x) => x >= start);
  return { t, w, firstCounted: counted < 0 ? t.length : counted };
}

export interface ComplexValues {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** A complex function of time, at ascending points of the record. */
export type Series = (t: Float64Array) => ComplexValues;

const ofSplines =
  (re: Spline, im: Spline): Series =>
  (t) => {
    const [a, b] = evaluateSplines([re, im], t);
    return { re: a!, im: b! };
  };

/** One mode between the samples. */
export interface ContinuousMode {
  readonly l: number;
  readonly m: number;
  readonly news: Series;
  /** Null when only Ḣ was asked for. */
  readonly strain: Series | null;
}

export interface ContinuousRadiation {
  readonly nodes: PanelNodes;
  readonly modes: readonly ContinuousMode[];
}

function continuous(mode: Mode, record: RadiationRecord, basis: SplineBasis, nodes: PanelNodes, floor: number, withStrain: boolean): ContinuousMode {
  const { l, m } = mode;
  const [re, im] = [fitSpline(basis, mode.re), fitSpline(basis, mode.im)];
  const itself = ofSplines(re, im);
  const { variable } = record;
  if (variable === 'strain') return { l, m, news: ofSplines(derivativeOf(re), derivativeOf(im)), strain: withStrain ? itself : null };
  if (divisionsTo(variable, withStrain) === 0) return { l, m, news: itself, strain: null };
  const waves = slowWaves(itself(nodes.t), nodes, record.axis, floorOfMode(floor, m));
  const [running, runningIm] = [antiderivativeOf(re), antiderivativeOf(im)];
  const once: Series = (t) => waves.once(ofSplines(running, runningIm)(t), t);
  if (variable === 'news') return { l, m, news: itself, strain: once };
  if (!withStrain) return { l, m, news: once, strain: null };
  const twice = ofSplines(antiderivativeOf(running), antiderivativeOf(runningIm));
  return { l, m, news: once, strain: (t) => waves.twice(twice(t), t) };
}

/**
 * Route B: Ḣ of every mode, and H where asked for, as functions of time, by splines of degree 7 on the
 * samples; with the Gauss panels on which they are integrated. No transform.
 * Shape:  one function a mode; the nodes are ascending.
 * Units:  startM in M, floor in rad/M for |m| = 2; Ḣ dimensionless, H in r·h/M.
 * Error:  spline derivative 1e-7 of the slope at ten samples a cycle; quadrature below rounding.
 * Fails:  never; a start after the record counts no node.
 * Source: rule 2.9; the kernel is that of slowWaves.
 */
export function radiationOnPanels(record: RadiationRecord, startM: number, floor: number, withStrain: boolean): ContinuousRadiation {
  const intervals = Math.max(LEAST_INTERVALS, Math.floor(RADIANS_A_PANEL / Math.max(largestTurns(record).aStep, 1e-3)));
  const nodes = panelNodes(record.axis, startM, intervals);
  const basis = splineBasis(record.axis);
  return { nodes, modes: record.modes.map((mode) => continuous(mode, record, basis, nodes, floor, withStrain)) };
}

/**
 * The nodes that count, with their weights.
 * Shape:  views of the panels' arrays from the start of the integral on.
 * Units:  M.
 * Error:  none.
 * Fails:  never; both are empty for a start after the record.
 * Source: definition.
 */
export const countedNodes = ({ t, w, firstCounted }: PanelNodes): { readonly t: Float64Array; readonly w: Float64Array } => ({ t: t.subarray(firstCounted), w: w.subarray(firstCounted) });
