export interface PanelNodes {
  readonly t: Float64Array;
  readonly w: Float64Array;
  /** Nodes from here on lie after the start. */
  readonly firstCounted: number;
}

interface Values {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** Cosines and sines of k times a base angle at every point, k = 0, 1, 2 …, by the addition theorem. */
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

type Moment = readonly [re: number, im: number];

/** ∫g·ψ for a real function g at the nodes. */
function moment(psi: Values, w: Float64Array, g: Float64Array): Moment {
  let [re, im] = [0, 0];
  for (let i = 0; i < w.length; i++) {
    const weight = w[i]! * g[i]!;
    re += weight * psi.re[i]!;
    im += weight * psi.im[i]!;
  }
  return [re, im];
}

/** Everything the kernel asks of ψ once, before any point is looked at. */
interface Moments {
  readonly t0: number;
  readonly period: number;
  readonly floor: number;
  readonly whole: Moment;
  readonly first: Moment;
  readonly second: Moment;
  /** ∫cos and ∫sin of each wave below the floor, from k = 1. */
  readonly cos: readonly Moment[];
  readonly sin: readonly Moment[];
}

function momentsOf(psi: Values, nodes: PanelNodes, axis: Float64Array, floor: number): Moments {
  const t0 = axis[0]!;
  const period = 2 * (axis[axis.length - 1]! - t0);
  const times = nodes.t.map((t) => t - t0);
  const harmonics = new Harmonics(times.map((t) => (2 * Math.PI * t) / period));
  const whole = moment(psi, nodes.w, harmonics.cos);
  const cos: Moment[] = [];
  const sin: Moment[] = [];
  for (let k = 1; (2 * Math.PI * k) / period < floor; k++) {
    harmonics.next();
    cos.push(moment(psi, nodes.w, harmonics.cos));
    sin.push(moment(psi, nodes.w, harmonics.sin));
  }
  return { t0, period, floor, whole, first: moment(psi, nodes.w, times), second: moment(psi, nodes.w, times.map((t) => t * t)), cos, sin };
}

/** Adds Σ_k size(k)·∫wave_k(t − t′)ψ dt′ over the waves below the floor. */
function addWaves(out: Values, times: Float64Array, moments: Moments, kind: 'sine' | 'cosine', size: (k: number) => number): void {
  const { period, cos, sin } = moments;
  const harmonics = new Harmonics(times.map((t) => (2 * Math.PI * t) / period));
  cos.forEach(([cr, ci], at) => {
    const [sr, si] = sin[at]!;
    harmonics.next();
    const { cos: c, sin: s } = harmonics;
    const by = size(at + 1);
    const odd = kind === 'sine';
    for (let i = 0; i < times.length; i++) {
      out.re[i] = out.re[i]! + by * (odd ? s[i]! * cr - c[i]! * sr : c[i]! * cr + s[i]! * sr);
      out.im[i] = out.im[i]! + by * (odd ? s[i]! * ci - c[i]! * si : c[i]! * ci + s[i]! * si);
    }
  });
}

function dividedOnce(running: Values, times: Float64Array, moments: Moments): Values {
  const { period, floor, whole, first } = moments;
  for (let i = 0; i < times.length; i++) {
    // The frequency ω = 0 itself is divided by +iω₀.
    running.re[i] = running.re[i]! - whole[0] / 2 - (times[i]! * whole[0] - first[0]) / period + whole[1] / (period * floor);
    running.im[i] = running.im[i]! - whole[1] / 2 - (times[i]! * whole[1] - first[1]) / period - whole[0] / (period * floor);
  }
  addWaves(running, times, moments, 'sine', (k) => (2 / period) * (1 / floor - period / (2 * Math.PI * k)));
  return running;
}

function dividedTwice(twice: Values, times: Float64Array, moments: Moments): Values {
  const { period, floor, whole, first, second } = moments;
  const constant = 1 / (period * floor * floor) + period / 12;
  const part = (double: number, t: number, c: 0 | 1): number =>
    double - (t * whole[c] - first[c]) / 2 - (t * t * whole[c] - 2 * t * first[c] + second[c]) / (2 * period) - constant * whole[c];
  for (let i = 0; i < times.length; i++) {
    twice.re[i] = part(twice.re[i]!, times[i]!, 0);
    twice.im[i] = part(twice.im[i]!, times[i]!, 1);
  }
  addWaves(twice, times, moments, 'cosine', (k) => (-2 / period) * (1 / (floor * floor) - (period / (2 * Math.PI * k)) ** 2));
  return twice;
}

/** What turns the running integrals of ψ into its quotients. */
export interface SlowWaves {
  /** From ∫ψ up to each point. */
  readonly once: (running: Values, t: Float64Array) => Values;
  /** From ∫∫ψ up to each point. */
  readonly twice: (twice: Values, t: Float64Array) => Values;
}

/**
 * Division by i·sign(ω)·max(|ω|, ω₀), once or twice, on a record padded to twice its length T, written
 * in time. With period P = 2T the kernel of one division is (½ − t/P) on (0, P) plus a finite sum of
 * sines below ω₀; that of two is −(P/12 − |t|/2 + t²/2P + 1/(Pω₀²)) less a finite sum of cosines. So the
 * quotient is a running integral, a polynomial, and a few slow waves: no transform.
 * Shape:  ψ at all nodes of the record; the functions that come back change the running integrals they are given.
 * Units:  t and axis in M, floor in rad/M.
 * Error:  rounding, and that of the integrals of ψ over the record.
 * Fails:  never.
 * Source: rule 2.9; our derivation from Σ sin kx/k = (π − x)/2 and Σ cos kx/k² = π²/6 − πx/2 + x²/4.
 */
export function slowWaves(psi: Values, nodes: PanelNodes, axis: Float64Array, floor: number): SlowWaves {
  const moments = momentsOf(psi, nodes, axis, floor);
  const times = (t: Float64Array): Float64Array => t.map((x) => x - moments.t0);
  return { once: (running, t) => dividedOnce(running, times(t), moments), twice: (twice, t) => dividedTwice(twice, times(t), moments) };
}
