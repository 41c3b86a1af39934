import type { Response } from '@/lib/engine/contract/settings';
import { transformOfSize } from '@/lib/engine/fourier/transform';
import { binWeights, type BinRange } from './bin-weights';
import type { Standing } from './aligned-columns';
import { crossSpectrum, type CrossSpectrum } from './cross-spectrum';
import { evaluateAt } from './lag-search';
import { nodeSum, type NodeBand } from './node-band';
import { BB, DD, NodeLag, RE } from './node-lag';
import type { NoiseWeigher } from './noise-weigher';
import type { Spectrum } from './spectrum';
import type { SweepGround } from './sweep-ground';

/** All lags at one mass, from every bin, and what the certificate asks of it. */
export interface LagAnchor<Mark = unknown> {
  /** Places of the grid of lags where |ẑ| (1 for equal signals) is high, and how high; nowhere else is it above `rest`. */
  readonly heights: ReadonlyMap<number, number>;
  readonly rest: number;
  /** What the bound of the masses between asks for. */
  readonly mark: Mark;
  /** Square of how far, in bins, the band's power lies from its middle. */
  readonly spread: number;
}

export interface AnchorRequest {
  readonly a: Spectrum;
  readonly b: Spectrum;
  readonly response: Exclude<Response, 'complex'>;
  readonly ground: SweepGround;
  readonly standing: Standing;
  readonly weigher: NoiseWeigher;
  readonly range: BinRange;
  readonly grid: LagGrid;
  /** A shift at which bins and nodes are compared. */
  readonly delta: number;
}

export interface LagGrid {
  readonly size: number;
  /** Every so-manieth bin alone still tells all lags apart. */
  readonly stride: number;
}

interface Scratch {
  readonly data: Float64Array;
  readonly out: Float64Array;
}

let scratch: Scratch | null = null;
let lent = new Float64Array(0);
function lend(n: number): Float64Array {
  if (lent.length < n) lent = new Float64Array(Math.ceil(1.25 * n));
  return lent.subarray(0, n).fill(0);
}

const MOST_PLACES = 512;
/** Shares of the top from which lags are listed, the first that leaves few enough. */
const LISTED = [0.5, 0.7, 0.85, 0.95];

function heightsOf(c: CrossSpectrum, { size, stride }: LagGrid, norm: number): Pick<LagAnchor, 'heights' | 'rest'> {
  if (scratch?.data.length !== 2 * size) scratch = { data: new Float64Array(2 * size), out: new Float64Array(2 * size) };
  const { data, out } = scratch;
  const { plusRe, plusIm, first, n } = c;
  let at = 0;
  for (let j = Math.ceil(first / stride) * stride - first; j < n; j += stride) {
    data[at++] = plusRe[j]!;
    data[at++] = plusIm[j]!;
  }
  data.fill(0, at);
  transformOfSize(size).inverse(out, data);
  let top = 0;
  for (let i = 0; i < size; i++) {
    data[i] = out[2 * i]! * out[2 * i]! + out[2 * i + 1]! * out[2 * i + 1]!;
    if (data[i]! > top) top = data[i]!;
  }
  const scale = (size * stride) / norm;
  for (const share of LISTED) {
    const least = share * share * top;
    const heights = new Map<number, number>();
    for (let i = 0; i < size && heights.size <= MOST_PLACES; i++) if (data[i]! >= least) heights.set(i, scale * Math.sqrt(data[i]!));
    if (heights.size <= MOST_PLACES) return { heights, rest: share * scale * Math.sqrt(top) };
  }
  return { heights: new Map(), rest: Infinity };
}

/** ‖a‖² of an aligned pair over a band, and ‖b‖². */
export const nodeNorms = (band: NodeBand): readonly [normA: number, normB: number, gap: number] => {
  const gap = nodeSum(band, DD) + 2 * nodeSum(band, RE);
  const normB = nodeSum(band, BB);
  return [normB + gap, normB, gap];
};

/** Variance of the place of the band's power, in bins², of both sides taken together. */
function spreadOf(band: NodeBand): number {
  const { blocks, run } = band.nodes;
  const { bin, columns } = run;
  let [n, sum, square] = [0, 0, 0];
  for (let b = band.from; b <= band.to; b++) {
    const block = blocks[b]!;
    for (let i = block.offset; i < block.offset + block.nodes; i++) {
      const p = band.weight[i]! * (columns[DD]![i]! + 2 * columns[RE]![i]! + 2 * columns[BB]![i]!);
      n += p;
      sum += p * bin[i]!;
      square += p * bin[i]! * bin[i]!;
    }
  }
  return n > 0 ? square / n - (sum / n) ** 2 : Infinity;
}

function agrees(c: CrossSpectrum, band: NodeBand, norms: readonly [number, number, number], { ground, range, standing, delta }: AnchorRequest): boolean {
  const [sa, sb] = standing.scales;
  const agreed = ground.agreement(range);
  const near = (x: number, y: number): boolean => Math.abs(x / y - 1) < agreed;
  if (!near(norms[0], c.normA * sa * sa) || !near(norms[1], c.normB * sb * sb)) return false;
  const [fine, node] = [evaluateAt(c, standing.x + delta), new NodeLag(band).at(delta)];
  const [cos, sin] = [Math.cos(standing.turnRad) * sa * sb, Math.sin(standing.turnRad) * sa * sb];
  const far = Math.hypot(fine.re * cos + fine.im * sin - node.re, fine.im * cos - fine.re * sin - node.im);
  return far < agreed * Math.sqrt(norms[0] * norms[1]);
}

/**
 * All lags at one mass, and whether nodes say there what bins say.
 * Shape:  null where the band holds nothing, or nodes and bins differ: a noise curve that nodes do not resolve.
 * Units:  heights are normalised products.
 * Error:  heights as those of every stride-th bin.
 * Fails:  never.
 * Source: engine design: choose by comparing both at the anchors.
 */
export function lagAnchor(request: AnchorRequest): LagAnchor | null {
  const { a, b, response, ground, weigher, range, grid } = request;
  const band = ground.weigh(range);
  if (band === null) return null;
  const norms = nodeNorms(band);
  const c = crossSpectrum(a, b, response, binWeights(weigher, range, lend));
  if (!(norms[0] > 0 && norms[1] > 0) || !agrees(c, band, norms, request)) return null;
  const norm = Math.sqrt(c.normA * c.normB);
  return { ...heightsOf(c, grid, norm), mark: ground.mark(band, range, norm), spread: spreadOf(band) };
}
