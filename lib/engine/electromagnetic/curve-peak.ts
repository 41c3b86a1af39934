import { evaluateSplines, fitSpline, splineBasis } from '../routes/b/banded-spline';
import { interpolatePair } from '../series/local-interpolation';

/** A real curve against time. */
export interface Curve {
  readonly axis: Float64Array;
  readonly values: Float64Array;
}

export interface CurvePeak {
  /** On the curve's own axis. */
  readonly t: number;
  readonly value: number;
  /** Largest where the record begins or ends: beyond it may be more. */
  readonly atEdge: 'start' | 'end' | null;
}

/** A curve that varies less than this of its height has no peak; its end is taken (rule 2.10). */
const FLAT = 1e-6;
/** Samples kept on either side of the highest one. */
const MARGIN = 20;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

interface Highest {
  readonly at: number;
  readonly isFlat: boolean;
}

function highest(values: Float64Array): Highest {
  let [at, low] = [0, Infinity];
  for (let i = 0; i < values.length; i++) {
    if (values[i]! > values[at]!) at = i;
    if (values[i]! < low) low = values[i]!;
  }
  return { at, isFlat: values[at]! - low <= FLAT * Math.abs(values[at]!) };
}

/** The peak where it lies at an end or nowhere; null where it lies between samples. */
function atAnEnd({ axis, values }: Curve, { at, isFlat }: Highest): CurvePeak | null {
  const last = axis.length - 1;
  if (isFlat) return { t: axis[last]!, value: values[last]!, atEdge: null };
  if (at === 0) return { t: axis[0]!, value: values[0]!, atEdge: 'start' };
  return at === last ? { t: axis[last]!, value: values[last]!, atEdge: 'end' } : null;
}

const around = ({ axis, values }: Curve, i: number): Curve => {
  const [from, to] = [Math.max(0, i - MARGIN), Math.min(axis.length, i + MARGIN + 1)];
  return { axis: axis.subarray(from, to), values: values.subarray(from, to) };
};

/**
 * Route A: the largest value of a curve, on the local polynomial around its highest sample, by golden section.
 * Shape:  one peak; of a flat curve the end.
 * Units:  those of the curve.
 * Error:  of the stated order in the step.
 * Fails:  never for two samples or more.
 * Source: settings.md rule 2.10.
 */
export function curvePeakOnSamples(curve: Curve, order: 4 | 6 = 6): CurvePeak {
  const top = highest(curve.values);
  const edge = atAnEnd(curve, top);
  if (edge !== null) return edge;
  const near = around(curve, top.at);
  const at = (t: number): number => interpolatePair({ axis: near.axis, first: near.values, second: near.values }, { t0: t, dt: 1, n: 1 }, order)[0][0]!;
  let [low, high] = [curve.axis[top.at - 1]!, curve.axis[top.at + 1]!];
  for (let pass = 0; pass < 60; pass++) {
    const [p, q] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
    if (at(p) < at(q)) low = p;
    else high = q;
  }
  const t = (low + high) / 2;
  return { t, value: at(t), atEdge: null };
}

/** Eight parts of the interval, then two of them, and again. */
const PARTS = 8;
const PASSES = 18;

/**
 * Route B: the same on a spline of degree 7, read ever more closely around its highest point.
 * Shape:  one peak; of a flat curve the end.
 * Units:  those of the curve.
 * Error:  order 8 in the step.
 * Fails:  never for two samples or more.
 * Source: settings.md rule 2.10.
 */
export function curvePeakOnSplines(curve: Curve): CurvePeak {
  const top = highest(curve.values);
  const edge = atAnEnd(curve, top);
  if (edge !== null) return edge;
  const near = around(curve, top.at);
  const spline = fitSpline(splineBasis(near.axis), near.values);
  let [from, to] = [curve.axis[top.at - 1]!, curve.axis[top.at + 1]!];
  let found = { t: curve.axis[top.at]!, value: curve.values[top.at]! };
  for (let pass = 0; pass < PASSES; pass++) {
    const times = Float64Array.from({ length: PARTS + 1 }, (_, k) => from + ((to - from) * k) / PARTS);
    const [values] = evaluateSplines([spline], times);
    const { at } = highest(values!);
    found = { t: times[at]!, value: values![at]! };
    [from, to] = [times[Math.max(0, at - 1)]!, times[Math.min(PARTS, at + 1)]!];
  }
  return { ...found, atEdge: null };
}
