import type { Sight } from '@/lib/engine/contract/route';
import { chebyshevPoints, interpolationWeights, NODES, type LagPanel } from './lag-panels';
import type { SightBench } from './sight-bench';
import type { Weight } from './sight-elements';

/** Of half a cycle on either side of a hill: further away another azimuth of b does the same. */
const SCANNED = 0.5;

/** b from one direction. */
export interface Pose {
  readonly sight: Sight;
  readonly weights: readonly Weight[];
  readonly norm: number;
}

export interface Point {
  readonly x: number;
  readonly sight: Sight;
}

/** One sight of a: its products with every element of b, by panel. */
export class Seen {
  private readonly sums = new Map<LagPanel, Float64Array>();
  private readonly row = new Float64Array(NODES);
  readonly power: number;
  private readonly weights: readonly Weight[];

  constructor(
    private readonly bench: SightBench,
    private readonly poseAt: (sight: Sight) => Pose,
    sight: Sight,
  ) {
    this.weights = bench.a.map((weigh) => weigh(sight));
    this.power = bench.powerA(this.weights);
  }

  private sumsOn(panel: LagPanel): Float64Array {
    const known = this.sums.get(panel);
    if (known) return known;
    const n = 2 * NODES * this.bench.b.length;
    const sums = new Float64Array(n);
    this.weights.forEach(({ re, im }, j) => {
      for (let i = 0; i < n; i += 2) {
        const [p, q] = [panel.values[j * n + i]!, panel.values[j * n + i + 1]!];
        sums[i]! += re * p - im * q;
        sums[i + 1]! += re * q + im * p;
      }
    });
    this.sums.set(panel, sums);
    return sums;
  }

  /** Σ over the nodes with these weights, and over b's elements with the conjugates of the pose's. */
  private product(sums: Float64Array, pose: Pose, row: Float64Array): number {
    let [re, im] = [0, 0];
    pose.weights.forEach((w, k) => {
      let [p, q] = [0, 0];
      for (let n = 0, at = 2 * NODES * k; n < NODES; n++, at += 2) {
        p += row[n]! * sums[at]!;
        q += row[n]! * sums[at + 1]!;
      }
      re += w.re * p + w.im * q;
      im += w.re * q - w.im * p;
    });
    const size = this.bench.freedom.turn ? Math.hypot(re, im) : re;
    return size / (Math.sqrt(this.power) * pose.norm);
  }

  valueAt({ x, sight }: Point): number {
    const panel = this.bench.panelAt(x);
    interpolationWeights((x - panel.middle) / this.bench.half, this.row);
    const value = this.product(this.sumsOn(panel), this.poseAt(sight), this.row);
    return Number.isFinite(value) ? value : -Infinity;
  }

  /** Middles of the panels around the hills, each once. */
  private middles(): number[] {
    const { hills, half, halfCycle } = this.bench;
    const reach = Math.ceil((SCANNED * halfCycle) / (2 * half));
    return [...new Set(hills.flatMap((x) => Array.from({ length: 2 * reach + 1 }, (_, i) => this.bench.panelAt(x + 2 * (i - reach) * half).middle)))];
  }

  /** Values at every third node of the panels around the hills, for every pose, best first. */
  scan(poses: readonly Pose[]): { point: Point; value: number }[] {
    const { hills, half, freedom } = this.bench;
    const found: { point: Point; value: number }[] = [];
    const lags = freedom.time ? this.middles().flatMap((middle) => Array.from(chebyshevPoints, (y) => middle + half * y).filter((_, i) => i % 3 === 1)) : hills;
    for (const { sight } of poses) for (const x of lags) found.push({ point: { x, sight }, value: this.valueAt({ x, sight }) });
    return found.sort((p, q) => q.value - p.value);
  }

  /** The products with b's elements at one node, without the pose: re, im by element. */
  private atNode(sums: Float64Array, n: number, out: Float64Array): void {
    for (let k = 0; k < this.bench.b.length; k++) {
      out[2 * k] = sums[2 * (NODES * k + n)]!;
      out[2 * k + 1] = sums[2 * (NODES * k + n) + 1]!;
    }
  }

  /** Calls with the products at each lag that is looked at: every `stride`-th node, or where the files stand. */
  private eachLag(stride: number, look: (products: Float64Array, x: number) => void): void {
    const { bench, row } = this;
    const products = new Float64Array(2 * bench.b.length);
    if (bench.freedom.time) {
      for (const middle of this.middles()) {
        const sums = this.sumsOn(bench.panelAt(middle));
        for (let n = 1; n < NODES; n += stride) {
          this.atNode(sums, n, products);
          look(products, middle + bench.half * chebyshevPoints[n]!);
        }
      }
      return;
    }
    for (const x of bench.hills) {
      const panel = bench.panelAt(x);
      const sums = this.sumsOn(panel);
      interpolationWeights((x - panel.middle) / bench.half, row);
      products.fill(0);
      for (let k = 0; k < products.length; k++) for (let n = 0; n < NODES; n++) products[k]! += row[n]! * sums[2 * (NODES * (k >> 1) + n) + (k & 1)]!;
      look(products, x);
    }
  }

  /** No pose and no lag around the hills gives more: `sizes` holds, by inclination, each element's largest weight over the smallest norm. */
  ceiling(sizes: readonly Float64Array[]): number {
    let most = 0;
    const moduli = new Float64Array(this.bench.b.length);
    this.eachLag(1, (products) => {
      for (let k = 0; k < moduli.length; k++) moduli[k] = Math.hypot(products[2 * k]!, products[2 * k + 1]!);
      for (const size of sizes) {
        let sum = 0;
        for (let k = 0; k < moduli.length; k++) sum += moduli[k]! * size[k]!;
        if (sum > most) most = sum;
      }
    });
    return most / Math.sqrt(this.power);
  }

  /** The highest of these poses at every third node around the hills. */
  rough(poses: readonly Pose[]): { point: Point; value: number } | null {
    let best: { point: Point; value: number } | null = null;
    this.eachLag(3, (products, x) => {
      for (const { sight, weights, norm } of poses) {
        let [re, im] = [0, 0];
        for (let k = 0; k < weights.length; k++) {
          const w = weights[k]!;
          re += w.re * products[2 * k]! + w.im * products[2 * k + 1]!;
          im += w.re * products[2 * k + 1]! - w.im * products[2 * k]!;
        }
        const value = (this.bench.freedom.turn ? Math.hypot(re, im) : re) / (Math.sqrt(this.power) * norm);
        if (value > (best?.value ?? -Infinity)) best = { point: { x, sight }, value };
      }
    });
    return best;
  }
}
