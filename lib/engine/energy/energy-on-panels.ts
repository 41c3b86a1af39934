import type { Mode } from '../contract/waveform';
import { antiderivativeOf, derivativeOf, evaluateSplines, fitSpline, splineBasis, type Spline, type SplineBasis } from '../routes/b/banded-spline';
import { gaussRule } from '../routes/b/gauss-legendre';
import { ENERGY_FACTOR, type ModeEnergy } from './energy-on-samples';
import { floorOfMode } from './integration-floor';
import type { RadiationRecord } from './radiation-record';

const INTERVALS_A_PANEL = 8;
const NODES_A_PANEL = 12;

interface PanelNodes {
  readonly t: Float64Array;
  readonly w: Float64Array;
  /** Nodes from here on lie after the start. */
  readonly firstCounted: number;
}

/** Gauss panels over eight sample intervals each, with an edge at the start of the integral. */
function panelNodes(axis: Float64Array, startM: number): PanelNodes {
  const last = axis.length - 1;
  const start = Math.max(startM, axis[0]!);
  const edges: number[] = [];
  for (let i = 0; i < last; i += INTERVALS_A_PANEL) edges.push(axis[i]!);
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

/** ∫ψ e^{−iωt}, split as cosine and sine moments of both parts, over the whole record. */
function moments(psi: ComplexValues, nodes: PanelNodes, omega: number, t0: number) {
  let [cr, ci, sr, si] = [0, 0, 0, 0];
  for (let i = 0; i < nodes.t.length; i++) {
    const c = Math.cos(omega * (nodes.t[i]! - t0)) * nodes.w[i]!;
    const s = Math.sin(omega * (nodes.t[i]! - t0)) * nodes.w[i]!;
    cr += c * psi.re[i]!;
    ci += c * psi.im[i]!;
    sr += s * psi.re[i]!;
    si += s * psi.im[i]!;
  }
  return { cr, ci, sr, si };
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
  const all = moments(psi, nodes, 0, t0);
  let [firstRe, firstIm] = [0, 0];
  for (let i = 0; i < nodes.t.length; i++) {
    firstRe += nodes.w[i]! * (nodes.t[i]! - t0) * psi.re[i]!;
    firstIm += nodes.w[i]! * (nodes.t[i]! - t0) * psi.im[i]!;
  }
  for (let i = 0; i < nodes.t.length; i++) {
    const t = nodes.t[i]! - t0;
    // The frequency ω = 0 itself is divided by +iω₀.
    news.re[i] = news.re[i]! - all.cr / 2 - (t * all.cr - firstRe) / period + all.ci / (period * floor);
    news.im[i] = news.im[i]! - all.ci / 2 - (t * all.ci - firstIm) / period - all.cr / (period * floor);
  }
  for (let k = 1; (2 * Math.PI * k) / period < floor; k++) {
    const omega = (2 * Math.PI * k) / period;
    const size = (2 / period) * (1 / floor - 1 / omega);
    const { cr, ci, sr, si } = moments(psi, nodes, omega, t0);
    for (let i = 0; i < nodes.t.length; i++) {
      const c = size * Math.cos(omega * (nodes.t[i]! - t0));
      const s = size * Math.sin(omega * (nodes.t[i]! - t0));
      news.re[i] = news.re[i]! + s * cr - c * sr;
      news.im[i] = news.im[i]! + s * ci - c * si;
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
  const nodes = panelNodes(record.axis, startM);
  const basis = splineBasis(record.axis);
  return record.modes.map((mode) => {
    const { re, im } = newsOf(mode, record, basis, nodes, floor);
    let sum = 0;
    for (let i = nodes.firstCounted; i < nodes.t.length; i++) sum += nodes.w[i]! * (re[i]! * re[i]! + im[i]! * im[i]!);
    return { l: mode.l, m: mode.m, energy: ENERGY_FACTOR * sum };
  });
}
