import type { Mode } from '../contract/waveform';
import { antiderivativeOf, derivativeOf, evaluateSplines, fitSpline, splineBasis, type Spline, type SplineBasis } from '../routes/b/banded-spline';
import { gaussRule } from '../routes/b/gauss-legendre';
import { ENERGY_FACTOR, type ModeEnergy } from './energy-on-samples';
import { floorOfMode } from './integration-floor';
import type { RadiationRecord } from './radiation-record';
import { largestTurns } from './sampling';

/** A panel spans eight sample intervals, or as many more as turn the fastest phase by less than half a radian. */
const LEAST_INTERVALS = 8;
const RADIANS_A_PANEL = 0.5;
const NODES_A_PANEL = 12;

interface PanelNodes {
  readonly t: Float64Array;
  readonly w: Float64Array;
  /** Nodes from here on lie after the start. */
  readonly firstCounted: number;
}

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

interface ComplexValues {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

const valuesOf = (re: Spline, im: Spline, t: Float64Array): ComplexValues => {
  const [a, b] = evaluateSplines([re, im], t);
  return { re: a!, im: b! };
};

/** Cosines and sines of k times a base angle at every node, k = 0, 1, 2 …, by the addition theorem. */
class Harmonics {
  readonly cos: Float64Array;
  readonly sin: Float64Array;
  private readonly cos1: Float64Array;
  private readonly sin1: Float64Array;

  constructor(angles: Float64Array) {
    this.cos1 = angles.map(Math.cos);
    this.sin1 = angles.map(Math.sin);
    this.cos = new Float64Array(angles.length).fill(1);
    this.sin = new Float64Array(angles.length);
  }

  next(): void {
    const { cos, sin, cos1, sin1 } = this;
    for (let i = 0; i < cos.length; i++) {
      const c = cos[i]! * cos1[i]! - sin[i]! * sin1[i]!;
      sin[i] = sin[i]! * cos1[i]! + cos[i]! * sin1[i]!;
      cos[i] = c;
    }
  }
}

/** Σ w·g·ψ for a real weight function g at the nodes. */
function moment(psi: ComplexValues, w: Float64Array, g: Float64Array): readonly [re: number, im: number] {
  let [re, im] = [0, 0];
  for (let i = 0; i < w.length; i++) {
    const weight = w[i]! * g[i]!;
    re += weight * psi.re[i]!;
    im += weight * psi.im[i]!;
  }
  return [re, im];
}

/**
 * Division by i·sign(ω)·max(|ω|, ω₀) on a record padded to twice its length T, written in time. With
 * period P = 2T its kernel is (½ − t/P) on (0, P) plus a finite sum of sines below ω₀, so the news is
 * the running integral, a straight line, and a few slow waves: no transform.
 */
function newsOnNodes(mode: Mode, basis: SplineBasis, axis: Float64Array, nodes: PanelNodes, floor: number): ComplexValues {
  const [sre, sim] = [fitSpline(basis, mode.re), fitSpline(basis, mode.im)];
  const psi = valuesOf(sre, sim, nodes.t);
  const news = valuesOf(antiderivativeOf(sre), antiderivativeOf(sim), nodes.t);
  const t0 = axis[0]!;
  const period = 2 * (axis[axis.length - 1]! - t0);
  const times = nodes.t.map((t) => t - t0);
  const harmonics = new Harmonics(times.map((t) => (2 * Math.PI * t) / period));
  const [wholeRe, wholeIm] = moment(psi, nodes.w, harmonics.cos);
  const [firstRe, firstIm] = moment(psi, nodes.w, times);
  for (let i = 0; i < times.length; i++) {
    // The frequency ω = 0 itself is divided by +iω₀.
    news.re[i] = news.re[i]! - wholeRe / 2 - (times[i]! * wholeRe - firstRe) / period + wholeIm / (period * floor);
    news.im[i] = news.im[i]! - wholeIm / 2 - (times[i]! * wholeIm - firstIm) / period - wholeRe / (period * floor);
  }
  for (let k = 1; (2 * Math.PI * k) / period < floor; k++) {
    harmonics.next();
    const { cos, sin } = harmonics;
    const size = (2 / period) * (1 / floor - period / (2 * Math.PI * k));
    const [cr, ci] = moment(psi, nodes.w, cos);
    const [sr, si] = moment(psi, nodes.w, sin);
    for (let i = 0; i < times.length; i++) {
      news.re[i] = news.re[i]! + size * (sin[i]! * cr - cos[i]! * sr);
      news.im[i] = news.im[i]! + size * (sin[i]! * ci - cos[i]! * si);
    }
  }
  return news;
}

function newsOf(mode: Mode, record: RadiationRecord, basis: SplineBasis, nodes: PanelNodes, floor: number): ComplexValues {
  if (record.variable === 'psi4') return newsOnNodes(mode, basis, record.axis, nodes, floorOfMode(floor, mode.m));
  const [re, im] = [fitSpline(basis, mode.re), fitSpline(basis, mode.im)];
  return record.variable === 'news' ? valuesOf(re, im, nodes.t) : valuesOf(derivativeOf(re), derivativeOf(im), nodes.t);
}

/**
 * Route B: energy of each mode from startM to the last sample, by splines of degree 7 on the samples
 * and Gauss panels between them.
 * Shape:  one entry a mode.
 * Units:  startM in M, floor in rad/M for |m| = 2; energies as fractions of M.
 * Error:  spline derivative 1e-7 of the slope at ten samples a cycle; quadrature below rounding.
 * Fails:  never; a start after the record gives zero.
 * Source: Q12; rule 2.9; the kernel is our derivation from Σ sin kx/k = (π − x)/2.
 */
export function energyOnPanels(record: RadiationRecord, startM: number, floor: number): ModeEnergy[] {
  const intervals = Math.max(LEAST_INTERVALS, Math.floor(RADIANS_A_PANEL / Math.max(largestTurns(record).aStep, 1e-3)));
  const nodes = panelNodes(record.axis, startM, intervals);
  const basis = splineBasis(record.axis);
  return record.modes.map((mode) => {
    const { re, im } = newsOf(mode, record, basis, nodes, floor);
    let sum = 0;
    for (let i = nodes.firstCounted; i < nodes.t.length; i++) sum += nodes.w[i]! * (re[i]! * re[i]! + im[i]! * im[i]!);
    return { l: mode.l, m: mode.m, energy: ENERGY_FACTOR * sum };
  });
}
