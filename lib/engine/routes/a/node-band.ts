import { bandEdges, type BinRange, type BandEdges } from './bin-weights';
import type { CompressedBins, FourColumns, NodeRun, TurnBlock } from './compressed-bins';
import type { NoiseWeigher } from './noise-weigher';

/** Places that are no whole block: parts of the blocks that an edge cuts, and the bins of the edges' own weights. */
export interface LooseNodes {
  readonly n: number;
  readonly bin: Float64Array;
  readonly weight: Float64Array;
  readonly columns: FourColumns;
}

/** Blocks of nodes with what is read at them. */
export interface NodeBlocks {
  readonly blocks: readonly TurnBlock[];
  readonly run: Pick<NodeRun, 'bin' | 'columns'>;
}

/** A band at one mass as a sum over nodes: blocks `from` … `to`, and single places. */
export interface NodeBand {
  readonly nodes: NodeBlocks;
  readonly from: number;
  readonly to: number;
  /** What each node counts, by place in the run of all. */
  readonly weight: Float64Array;
  readonly loose: LooseNodes;
}

/** The same on compressed bins: 1/S at the nodes of its blocks, and what lies between them and its edges. */
export interface CutBand extends NodeBand {
  /** Blocks touched, around those wholly inside; of a cut block's nodes outside the band, the weight is 1/S at the edge. */
  readonly touchedFrom: number;
  readonly touchedTo: number;
  readonly edges: BandEdges;
}

interface Scratch {
  readonly bin: Float64Array;
  readonly logBin: Float64Array;
  readonly weight: Float64Array;
  readonly columns: FourColumns;
}

/** A sweep weighs one band at a time: fresh arrays for each would cost more than the sums. */
let scratch: Scratch | null = null;
function scratchOf(n: number): Scratch {
  if (scratch !== null && scratch.bin.length >= n) return scratch;
  const one = (): Float64Array => new Float64Array(Math.ceil(1.5 * n));
  return (scratch = { bin: one(), logBin: one(), weight: one(), columns: [one(), one(), one(), one()] });
}

let blockWeights = new Float64Array(0);
function blockWeightsOf(n: number): Float64Array {
  if (blockWeights.length < n) blockWeights = new Float64Array(Math.ceil(1.5 * n));
  return blockWeights;
}

function looseNodes(runs: readonly NodeRun[], edges: BandEdges, bins: CompressedBins, weigher: NoiseWeigher, offset: number): LooseNodes {
  const made = scratchOf(runs.reduce((sum, { bin }) => sum + bin.length, edges.added.length));
  let at = 0;
  for (const run of runs) {
    made.bin.set(run.bin, at);
    made.logBin.set(run.logBin, at);
    for (let c = 0; c < 4; c++) made.columns[c]!.set(run.columns[c]!, at);
    at += run.bin.length;
  }
  if (at > 0) weigher.fill(made.weight, made.logBin, 0, at - 1, offset);
  const { first, columns } = bins.bins;
  for (const { bin, weight } of edges.added) {
    made.bin[at] = bin;
    made.weight[at] = weight;
    for (let c = 0; c < 4; c++) made.columns[c]![at] = columns[c]![bin - first] ?? 0;
    at++;
  }
  return { n: at, bin: made.bin, weight: made.weight, columns: made.columns };
}

/** Runs that stand for the parts of touched blocks which are no whole block. */
function cutParts(bins: CompressedBins, inLow: number, inHigh: number): { runs: NodeRun[]; from: number; to: number } {
  const [low, high] = [bins.blockOf(inLow), bins.blockOf(inHigh)];
  const [first, last] = [bins.blocks[low]!, bins.blocks[high]!];
  const lastEnd = last.first + last.size - 1;
  const cutLow = first.first < inLow;
  const cutHigh = lastEnd > inHigh;
  if (low === high && (cutLow || cutHigh)) return { runs: bins.partOf(inLow, inHigh), from: low + 1, to: low };
  const runs = [
    ...(cutLow ? bins.partOf(inLow, first.first + first.size - 1) : []),
    ...(cutHigh ? bins.partOf(last.first, inHigh) : []),
  ];
  return { runs, from: cutLow ? low + 1 : low, to: cutHigh ? high - 1 : high };
}

/**
 * Weighs compressed bins for a band at one mass.
 * Shape:  null when the band holds no bin of theirs; arrays are valid until the next call.
 * Units:  as `binWeights`.
 * Error:  none beyond that of the nodes; edges by the same end weights as on bins.
 * Fails:  never.
 * Source: engine design (compressed nodes).
 */
export function nodeBand(bins: CompressedBins, weigher: NoiseWeigher, range: BinRange): CutBand | null {
  const edges = bandEdges(weigher, range);
  const [firstBin, lastBin] = bins.ends;
  if (edges === null || edges.inLow < firstBin || edges.inHigh > lastBin || edges.inHigh < edges.inLow) return null;
  if (edges.added.some(({ bin }) => bin < bins.bins.first)) return null;
  const { inLow, inHigh } = edges;
  const { runs, from, to } = cutParts(bins, inLow, inHigh);
  const [touchedFrom, touchedTo] = [bins.blockOf(inLow), bins.blockOf(inHigh)];
  const [low, high] = [bins.blocks[touchedFrom]!, bins.blocks[touchedTo]!];
  const weight = blockWeightsOf(bins.run.bin.length);
  const offset = Math.log(range.dfHz);
  const end = high.offset + high.nodes;
  weigher.fill(weight.subarray(low.offset), bins.run.logBin, low.offset, end - 1, offset);
  const { bin, logBin } = bins.run;
  const atEdge = (i: number, fHz: number): void => {
    weight[i] = weigher.continuedAt(weigher.firstKinkAbove(fHz), -1, Math.log(fHz));
  };
  for (let i = low.offset; i < end && bin[i]! < inLow; i++) atEdge(i, Math.max(range.fLowHz, Math.exp(logBin[i]! + offset)));
  for (let i = end - 1; i >= low.offset && bin[i]! > inHigh; i--) atEdge(i, Math.min(range.fHighHz, Math.exp(logBin[i]! + offset)));
  return { nodes: bins, from, to, touchedFrom, touchedTo, weight, loose: looseNodes(runs, edges, bins, weigher, offset), edges };
}

/** Σ of 1/S times a column over the band. */
export function nodeSum(band: NodeBand, column: number): number {
  const { weight, loose, nodes } = band;
  const { blocks, run } = nodes;
  const values = run.columns[column]!;
  let sum = 0;
  if (band.to >= band.from) {
    const last = blocks[band.to]!;
    for (let i = blocks[band.from]!.offset; i < last.offset + last.nodes; i++) sum += weight[i]! * values[i]!;
  }
  const own = loose.columns[column]!;
  for (let i = 0; i < loose.n; i++) sum += loose.weight[i]! * own[i]!;
  return sum;
}
