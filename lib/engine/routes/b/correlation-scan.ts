import { ORDER, REACH, cardinals, chebyshev } from './block-fourier';

/** Σ over nodes of q e^{2πifσ}: what one channel adds to the correlation. */
export interface Product {
  readonly turn: 1 | -1;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export interface ShiftGrid {
  readonly first: number;
  readonly step: number;
  readonly n: number;
}

export interface Correlation {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** Nodes that together carry all but 1e-4 of Σ|q|: a scan only has to find the hills. */
export function significantNodes(products: readonly Product[]): Int32Array {
  const n = products[0]?.re.length ?? 0;
  const size = new Float64Array(n);
  for (const { re, im } of products) for (let i = 0; i < n; i++) size[i] = size[i]! + Math.hypot(re[i]!, im[i]!);
  const floor = (1e-4 * size.reduce((a, b) => a + b, 0)) / Math.max(n, 1);
  const kept: number[] = [];
  for (let i = 0; i < n; i++) if (size[i]! > floor) kept.push(i);
  return Int32Array.from(kept);
}

interface Panel {
  readonly middle: number;
  readonly from: number;
  readonly to: number;
}

function panelsOf(f: Float64Array, kept: Int32Array, halfWidth: number): Panel[] {
  const panels: Panel[] = [];
  for (let from = 0; from < kept.length; ) {
    const middle = f[kept[from]!]! + halfWidth;
    let to = from;
    while (to < kept.length && f[kept[to]!]! <= middle + halfWidth) to++;
    panels.push({ middle, from, to });
    from = to;
  }
  return panels;
}

/** Carries each node's q to the Chebyshev frequencies of its panel, as seen about the shift `centre`. */
function compress(product: Product, f: Float64Array, kept: Int32Array, cardinal: Float64Array, panels: readonly Panel[], centre: number, out: Float64Array): void {
  out.fill(0);
  const order = ORDER;
  for (let c = 0; c < panels.length; c++) {
    const { from, to } = panels[c]!;
    for (let j = from; j < to; j++) {
      const i = kept[j]!;
      const angle = 2 * Math.PI * f[i]! * centre;
      const [co, si] = [Math.cos(angle), Math.sin(angle)];
      const re = product.re[i]! * co - product.im[i]! * si;
      const im = product.re[i]! * si + product.im[i]! * co;
      for (let k = 0; k < order; k++) {
        const l = cardinal[j * order + k]!;
        const at = 2 * (c * order + k);
        out[at] = out[at]! + l * re;
        out[at + 1] = out[at + 1]! + l * im;
      }
    }
  }
}

/** Adds q e^{2πifs} on a block of shifts about its centre, by a phase recurrence restarted in the middle. */
function spread(qRe: number, qIm: number, turnPerStep: number, sign: 1 | -1, from: number, to: number, out: Correlation): void {
  const [sc, ss] = [Math.cos(turnPerStep), Math.sin(turnPerStep)];
  const centre = (from + to - 1) / 2;
  const startAngle = turnPerStep * (from - centre);
  let re = qRe * Math.cos(startAngle) - qIm * Math.sin(startAngle);
  let im = qRe * Math.sin(startAngle) + qIm * Math.cos(startAngle);
  for (let i = from; i < to; i++) {
    out.re[i] = out.re[i]! + re;
    out.im[i] = out.im[i]! + sign * im;
    const next = re * sc - im * ss;
    im = re * ss + im * sc;
    re = next;
  }
}

/**
 * The correlation Z(σ) = Σ over channels of Σ q e^{2πifσ} (its conjugate for channels that turn
 * backwards) on a grid of shifts, by direct sums blocked in both variables.
 * Shape:  products share the nodes f (ascending); returns arrays of grid.n.
 * Units:  f in Hz, shifts in s.
 * Error:  1e-4 of Σ|q| (small nodes are left out; the peak is refined on all of them).
 * Fails:  never.
 * Source: our derivation; no fast transform is involved.
 */
export function correlate(products: readonly Product[], f: Float64Array, grid: ShiftGrid): Correlation {
  const out = { re: new Float64Array(grid.n), im: new Float64Array(grid.n) };
  const kept = significantNodes(products);
  if (kept.length === 0) return out;
  const bandwidth = f[kept[kept.length - 1]!]! - f[kept[0]!]!;
  const range = grid.n * grid.step;
  const blocks = Math.max(1, Math.min(Math.ceil(Math.sqrt((bandwidth * range * grid.n) / (4 * kept.length))), Math.ceil(grid.n / 16)));
  const length = Math.ceil(grid.n / blocks);
  const halfWidth = REACH / (Math.PI * length * grid.step);
  const panels = panelsOf(f, kept, halfWidth);
  const cardinal = new Float64Array(kept.length * ORDER);
  const row = new Float64Array(ORDER);
  for (const { middle, from, to } of panels) {
    for (let j = from; j < to; j++) {
      cardinals((f[kept[j]!]! - middle) / halfWidth, row);
      cardinal.set(row, j * ORDER);
    }
  }
  // Names imported from another module may be getters: out of the inner loops with them.
  const [order, nodes] = [ORDER, chebyshev];
  const q = new Float64Array(2 * panels.length * order);
  for (let from = 0; from < grid.n; from += length) {
    const to = Math.min(from + length, grid.n);
    const centre = grid.first + ((from + to - 1) / 2) * grid.step;
    for (const product of products) {
      compress(product, f, kept, cardinal, panels, centre, q);
      for (let c = 0; c < panels.length; c++) {
        for (let k = 0; k < order; k++) {
          const at = 2 * (c * order + k);
          const node = panels[c]!.middle + halfWidth * nodes[k]!;
          spread(q[at]!, q[at + 1]!, 2 * Math.PI * node * grid.step, product.turn, from, to, out);
        }
      }
    }
  }
  return out;
}
