import type { LagSums } from './lag-sums';
import type { NodeBand } from './node-band';
import { NodeHeights } from './node-heights';

const TURN = 2 * Math.PI;
const MOST_NODES = 16;

/** Columns of an aligned pair: D = a − b. */
export const DD = 0;
export const RE = 1;
export const IM = 2;
export const BB = 3;

type F = Float64Array;
/** Weighted columns of the pair in use: of blocks, and of loose nodes. One pair is looked at at a time. */
let [wr, wi, lr, li]: [F, F, F, F] = [new Float64Array(0), new Float64Array(0), new Float64Array(0), new Float64Array(0)];
const cos = new Float64Array(MOST_NODES);
const sin = new Float64Array(MOST_NODES);

/** The product of an aligned pair over a band at one mass, as a function of a further shift of b; good until the next is made. */
export class NodeLag {
  constructor(private readonly band: NodeBand) {
    const { weight, loose, nodes } = band;
    const { blocks, run } = nodes;
    const { columns } = run;
    const [er, ei, bb] = [columns[RE], columns[IM], columns[BB]];
    const start = band.to >= band.from ? blocks[band.from]!.offset : 0;
    const end = band.to >= band.from ? blocks[band.to]!.offset + blocks[band.to]!.nodes : 0;
    if (wr.length < Math.max(end, loose.n)) [wr, wi, lr, li] = [0, 0, 0, 0].map(() => new Float64Array(2 * Math.max(end, loose.n))) as [F, F, F, F];
    for (let i = start; i < end; i++) {
      wr[i] = weight[i]! * (er[i]! + bb[i]!);
      wi[i] = weight[i]! * ei[i]!;
    }
    for (let i = 0; i < loose.n; i++) {
      lr[i] = loose.weight[i]! * (loose.columns[RE][i]! + loose.columns[BB][i]!);
      li[i] = loose.weight[i]! * loose.columns[IM][i]!;
    }
  }

  /** Rotors of a block's nodes about its middle; the points are symmetric. */
  private turnNodes(offsets: Float64Array, delta: number): void {
    const n = offsets.length;
    for (let j = 0; j < (n + 1) >> 1; j++) {
      const angle = TURN * offsets[j]! * delta;
      cos[j] = cos[n - 1 - j] = Math.cos(angle);
      sin[j] = Math.sin(angle);
      sin[n - 1 - j] = -sin[j]!;
    }
  }

  at(delta: number): LagSums {
    const sums = { re: 0, im: 0, re1: 0, im1: 0, re2: 0, im2: 0 };
    const { blocks } = this.band.nodes;
    for (let b = this.band.from; b <= this.band.to;) {
      let end = b;
      while (end < this.band.to && blocks[end + 1]!.offsets === blocks[b]!.offsets) end++;
      this.addOctave(sums, b, end, delta);
      b = end + 1;
    }
    this.addLoose(sums, delta);
    return sums;
  }

  /** Heights alone, at shifts of up to `sight`. */
  heights(sight: number): NodeHeights {
    const { nodes, from, to, loose } = this.band;
    return new NodeHeights({ blocks: nodes.blocks.slice(from, to + 1), re: wr, im: wi, loose: { n: loose.n, bin: loose.bin, re: lr, im: li } }, sight);
  }

  /** Blocks of one width: their nodes turn alike about their middles, and the middles by even steps. */
  private addOctave(sums: LagSums, from: number, to: number, delta: number): void {
    const { blocks } = this.band.nodes;
    const [xs, ys, cosines, sines] = [wr, wi, cos, sin];
    const { width, offsets, nodes } = blocks[from]!;
    this.turnNodes(offsets, delta);
    const [stepC, stepS] = [Math.cos(TURN * width * delta), Math.sin(TURN * width * delta)];
    let middle = blocks[from]!.middle;
    let c = Math.cos(TURN * middle * delta);
    let s = Math.sin(TURN * middle * delta);
    for (let b = from; b <= to; b++) {
      const at = blocks[b]!.offset;
      let r0 = 0;
      let i0 = 0;
      let r1 = 0;
      let i1 = 0;
      let r2 = 0;
      let i2 = 0;
      for (let j = 0; j < nodes; j++) {
        const x = xs[at + j]!;
        const y = ys[at + j]!;
        const k = offsets[j]!;
        const u = x * cosines[j]! - y * sines[j]!;
        const v = x * sines[j]! + y * cosines[j]!;
        r0 += u;
        i0 += v;
        r1 += k * u;
        i1 += k * v;
        r2 += k * k * u;
        i2 += k * k * v;
      }
      const m1r = middle * r0 + r1;
      const m1i = middle * i0 + i1;
      const m2r = middle * (m1r + r1) + r2;
      const m2i = middle * (m1i + i1) + i2;
      sums.re += c * r0 - s * i0;
      sums.im += c * i0 + s * r0;
      // d/d(2πδ) of e^{2πikδ} is ik e^{2πikδ}.
      sums.re1 -= c * m1i + s * m1r;
      sums.im1 += c * m1r - s * m1i;
      sums.re2 -= c * m2r - s * m2i;
      sums.im2 -= c * m2i + s * m2r;
      const next = c * stepC - s * stepS;
      s = c * stepS + s * stepC;
      c = next;
      middle += width;
    }
  }

  private addLoose(sums: LagSums, delta: number): void {
    const { n, bin } = this.band.loose;
    for (let i = 0; i < n; i++) {
      const k = bin[i]!;
      const c = Math.cos(TURN * k * delta);
      const s = Math.sin(TURN * k * delta);
      const u = lr[i]! * c - li[i]! * s;
      const v = lr[i]! * s + li[i]! * c;
      sums.re += u;
      sums.im += v;
      sums.re1 -= k * v;
      sums.im1 += k * u;
      sums.re2 -= k * k * u;
      sums.im2 -= k * k * v;
    }
  }
}
