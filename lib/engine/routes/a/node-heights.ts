import type { TurnBlock } from './compressed-bins';

const TURN = 2 * Math.PI;
/** A block that turns by less from its middle to its end at any shift in sight is seen well enough through three nodes: 6e-5 of its sum. */
const LITTLE_RAD = 0.1;
export const HEIGHT_ROOM = 1e-4;
const MOST_NODES = 16;

/** A weighted product by blocks and single places. */
export interface WeightedNodes {
  readonly blocks: readonly TurnBlock[];
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly loose: { readonly n: number; readonly bin: Float64Array; readonly re: Float64Array; readonly im: Float64Array };
}

const cos = new Float64Array(MOST_NODES);
const sin = new Float64Array(MOST_NODES);
let [hr, hi] = [new Float64Array(0), new Float64Array(0)];

/** Sums of q, q·y and q·y² over a block, y from −1 to 1, as three nodes at −1, 0 and 1. */
function gather({ offset, nodes, offsets }: TurnBlock, { re, im }: WeightedNodes, at: number): void {
  const half = offsets[nodes - 1]!;
  let [r0, r1, r2, i0, i1, i2] = [0, 0, 0, 0, 0, 0];
  for (let j = 0; j < nodes; j++) {
    const y = offsets[j]! / half;
    const r = re[offset + j]!;
    const i = im[offset + j]!;
    r0 += r;
    r1 += r * y;
    r2 += r * y * y;
    i0 += i;
    i1 += i * y;
    i2 += i * y * y;
  }
  [hr[at], hr[at + 1], hr[at + 2]] = [(r2 - r1) / 2, r0 - r2, (r2 + r1) / 2];
  [hi[at], hi[at + 1], hi[at + 2]] = [(i2 - i1) / 2, i0 - i2, (i2 + i1) / 2];
}

/** |Σ q e^{2πikδ}| at many shifts, to HEIGHT_ROOM of the norms: enough to tell which hills need a closer look. Good until the next is made. */
export class NodeHeights {
  private readonly blocks: TurnBlock[] = [];

  constructor(
    private readonly nodes: WeightedNodes,
    sight: number,
  ) {
    let threes: Float64Array | null = null;
    let of: Float64Array | null = null;
    let at = 0;
    const most = nodes.blocks.reduce((sum, block) => sum + Math.max(3, block.nodes), 0);
    if (hr.length < most) [hr, hi] = [new Float64Array(2 * most), new Float64Array(2 * most)];
    for (const block of nodes.blocks) {
      const half = block.offsets[block.nodes - 1]!;
      if (block.nodes > 3 && TURN * half * sight < LITTLE_RAD) {
        if (block.offsets !== of) [of, threes] = [block.offsets, Float64Array.of(-half, 0, half)];
        gather(block, nodes, at);
        this.blocks.push({ ...block, offsets: threes!, offset: at, nodes: 3 });
        at += 3;
      } else {
        for (let j = 0; j < block.nodes; j++) [hr[at + j], hi[at + j]] = [nodes.re[block.offset + j]!, nodes.im[block.offset + j]!];
        this.blocks.push({ ...block, offset: at });
        at += block.nodes;
      }
    }
  }

  at(delta: number): number {
    const [xs, ys, cosines, sines] = [hr, hi, cos, sin];
    let re = 0;
    let im = 0;
    let [c, s, stepC, stepS] = [1, 0, 1, 0];
    let turned: Float64Array | null = null;
    for (const { middle, width, offsets, offset, nodes } of this.blocks) {
      if (offsets !== turned) {
        turned = offsets;
        for (let j = 0; j < nodes; j++) {
          cosines[j] = Math.cos(TURN * offsets[j]! * delta);
          sines[j] = Math.sin(TURN * offsets[j]! * delta);
        }
        [c, s] = [Math.cos(TURN * middle * delta), Math.sin(TURN * middle * delta)];
        [stepC, stepS] = [Math.cos(TURN * width * delta), Math.sin(TURN * width * delta)];
      }
      let x = 0;
      let y = 0;
      for (let j = 0; j < nodes; j++) {
        const p = xs[offset + j]!;
        const q = ys[offset + j]!;
        x += p * cosines[j]! - q * sines[j]!;
        y += p * sines[j]! + q * cosines[j]!;
      }
      re += c * x - s * y;
      im += c * y + s * x;
      const next = c * stepC - s * stepS;
      s = c * stepS + s * stepC;
      c = next;
    }
    const { n, bin, re: lr, im: li } = this.nodes.loose;
    for (let i = 0; i < n; i++) {
      const [u, v] = [Math.cos(TURN * bin[i]! * delta), Math.sin(TURN * bin[i]! * delta)];
      re += lr[i]! * u - li[i]! * v;
      im += lr[i]! * v + li[i]! * u;
    }
    return Math.hypot(re, im);
  }
}
