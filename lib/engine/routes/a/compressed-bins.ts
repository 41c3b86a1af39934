import { blockOrdinal, blockSize, LEAST_BLOCK, nodeOffsets, spreadOf } from './chebyshev-blocks';

export type FourColumns = readonly [Float64Array, Float64Array, Float64Array, Float64Array];

/** Columns of bins that a sum over a band is linear in, from bin `first` on. */
export interface BinColumns {
  readonly first: number;
  readonly columns: FourColumns;
}

/** What stands for a run of bins: places (in bins, between them too), their logarithms, and the columns gathered there. */
export interface NodeRun {
  readonly bin: Float64Array;
  readonly logBin: Float64Array;
  readonly columns: FourColumns;
}

/** Nodes that turn together: their places about a middle, and how far the next block's middle lies from it, in bins. */
export interface TurnBlock {
  readonly middle: number;
  readonly width: number;
  /** One array for all blocks whose nodes lie alike. */
  readonly offsets: Float64Array;
  /** Its place in the nodes of all blocks. */
  readonly offset: number;
  readonly nodes: number;
}

export interface Block extends TurnBlock {
  readonly first: number;
  readonly size: number;
}

function gatherNodes(order: number, from: number, size: number, { first, columns }: BinColumns, at: number, into: NodeRun): void {
  const middle = from + (size - 1) / 2;
  const offsets = nodeOffsets(size, order);
  for (let j = 0; j < offsets.length; j++) {
    into.bin[at + j] = middle + offsets[j]!;
    into.logBin[at + j] = Math.log(middle + offsets[j]!);
  }
  const bins = Math.max(0, Math.min(size, columns[0].length - (from - first)));
  if (size < LEAST_BLOCK) columns.forEach((column, c) => into.columns[c]!.set(column.subarray(from - first, from - first + bins), at));
  else spreadBins(columns, from - first, bins, spreadOf(size, order), into.columns, at, order);
}

/** Four columns at once: each cardinal value is read once. */
function spreadBins(columns: FourColumns, from: number, bins: number, spread: Float64Array, into: FourColumns, at: number, order: number): void {
  const [p, q, r, s] = columns;
  const [u, v, w, x] = into;
  for (let i = 0; i < bins; i++) {
    const a = p[from + i]!;
    const b = q[from + i]!;
    const c = r[from + i]!;
    const d = s[from + i]!;
    const row = order * i;
    for (let j = 0; j < order; j++) {
      const share = spread[row + j]!;
      u[at + j]! += a * share;
      v[at + j]! += b * share;
      w[at + j]! += c * share;
      x[at + j]! += d * share;
    }
  }
}

function emptyRun(nodes: number): NodeRun {
  const one = (): Float64Array => new Float64Array(nodes);
  return { bin: one(), logBin: one(), columns: [one(), one(), one(), one()] };
}

/**
 * Tens of thousands of bins as some hundred nodes: eight blocks an octave, each with as many Chebyshev nodes as the factor asks for.
 * Shape:  bins from `from` to `to`; blocks begin at multiples of their size, so that any range is some blocks and a few halves of blocks at its ends.
 * Units:  those of the columns.
 * Error:  that of interpolating the factor over a block (see `node-order`).
 * Fails:  never; bins past the columns' end count as zero.
 * Source: engine design (compressed nodes).
 */
export class CompressedBins {
  readonly blocks: readonly Block[];
  readonly run: NodeRun;
  private readonly pieces = new Map<number, NodeRun>();
  private readonly zeroth: number;

  constructor(
    public bins: BinColumns,
    from: number,
    to: number,
    readonly order: number,
  ) {
    const blocks: Block[] = [];
    let nodes = 0;
    for (let first = from - (from % blockSize(from)); first <= to; first += blockSize(first)) {
      const size = blockSize(first);
      const own = size < LEAST_BLOCK ? size : order;
      blocks.push({ first, size, middle: first + (size - 1) / 2, width: size, offsets: nodeOffsets(size, order), offset: nodes, nodes: own });
      nodes += own;
    }
    this.blocks = blocks;
    this.zeroth = blockOrdinal(blocks[0]!.first);
    this.run = emptyRun(nodes);
    for (const { first, size, offset } of blocks) gatherNodes(order, first, size, bins, offset, this.run);
  }

  /** First bin of the first block, and last of the last. */
  get ends(): readonly [number, number] {
    const last = this.blocks[this.blocks.length - 1]!;
    return [this.blocks[0]!.first, last.first + last.size - 1];
  }

  blockOf(bin: number): number {
    return blockOrdinal(bin) - this.zeroth;
  }

  /** Part of a block, from its first bin or to its last: halves, quarters, … of it, each gathered once. */
  partOf(from: number, to: number): NodeRun[] {
    const found: NodeRun[] = [];
    for (let k = from; k <= to; ) {
      let size = k & -k;
      while (k + size - 1 > to) size >>= 1;
      found.push(this.piece(k, size));
      k += size;
    }
    return found;
  }

  private piece(from: number, size: number): NodeRun {
    const key = from * 64 + Math.clz32(size);
    const known = this.pieces.get(key);
    if (known) return known;
    const made = emptyRun(size < LEAST_BLOCK ? size : this.order);
    gatherNodes(this.order, from, size, this.bins, 0, made);
    this.pieces.set(key, made);
    return made;
  }
}
