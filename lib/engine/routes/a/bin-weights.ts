import { edgeRule } from '@/lib/engine/series/edge-weights';
import { addKinks } from './kink-weights';
import type { NoiseWeigher } from './noise-weigher';

/** ∫ from f_l to f_h of g(f)/S(f) df = dfHz × Σ_i values[i] · g at bin first + i. */
export interface BinWeights {
  readonly first: number;
  readonly values: Float64Array;
  readonly dfHz: number;
  /** Bins around the band's edges with what two orders lower would change in their weights: how far the edges are resolved. */
  readonly doubt: readonly { readonly bin: number; readonly weight: number }[];
}

export interface BinRange {
  readonly dfHz: number;
  readonly fLowHz: number;
  readonly fHighHz: number;
  /** Bins whose spectrum is valid. */
  readonly firstBin: number;
  readonly lastBin: number;
  /** The curve's own range: a closed form is not asked outside it. */
  readonly curveLowHz: number;
  readonly curveHighHz: number;
  readonly order: number;
}

let logTable = new Float64Array(0);
/** ln k for every bin, grown once and shared: a logarithm a bin and mass would cost as much as the transform. */
function logBins(upTo: number): Float64Array {
  if (logTable.length <= upTo) {
    const grown = new Float64Array(Math.max(upTo + 1, 2 * logTable.length, 4096));
    grown.set(logTable);
    for (let k = logTable.length; k < grown.length; k++) grown[k] = Math.log(k);
    logTable = grown;
  }
  return logTable;
}

interface Builder {
  readonly range: BinRange;
  readonly weigher: NoiseWeigher;
  /** Null when only the edges' doubt is asked for. */
  readonly values: Float64Array | null;
  readonly first: number;
  readonly last: number;
  readonly logF: (bin: number) => number;
  readonly share: Float64Array;
  readonly doubt: BinShare[];
  /** The edges' own weights, where they are kept apart from those between them. */
  readonly added: BinShare[];
}

interface BinShare {
  readonly bin: number;
  readonly weight: number;
}

/** Places `order` end weights around an edge at f; direction +1 integrates upwards from it, −1 up to it. */
function addEdge(b: Builder, fHz: number, direction: 1 | -1, order: number, weigh: (bin: number) => number): void {
  const { range } = b;
  const { closedForm } = b.weigher;
  const place = fHz / range.dfHz;
  const inside = direction > 0 ? Math.ceil(place) : Math.floor(place);
  const low = closedForm ? Math.max(b.first, Math.ceil((range.curveLowHz / range.dfHz) * (1 - 1e-12))) : b.first;
  const high = closedForm ? Math.min(b.last, Math.floor((range.curveHighHz / range.dfHz) * (1 + 1e-12))) : b.last;
  const most = Math.min(order, high - low + 1);
  if (most < 1) return;
  const centred = -(most >> 1);
  // Stencil bins are inside + direction × (offset + j): keep all of them between low and high.
  const offset =
    direction > 0 ? clamp(centred, low - inside, high - inside - most + 1) : clamp(centred, inside - high, inside - low - most + 1);
  edgeRule(most, offset).weightsAt(Math.abs(inside - place), b.share);
  for (let j = 0; j < most; j++) {
    const bin = inside + direction * (offset + j);
    const added = b.share[j]! * weigh(bin);
    if (b.values !== null) b.values[bin - b.first]! += added;
    else b.added.push({ bin, weight: added });
    b.doubt.push({ bin, weight: added });
  }
  if (most < 4) return;
  const fewer = most - 2;
  edgeRule(fewer, offset + 1).weightsAt(Math.abs(inside - place), b.share);
  for (let j = 0; j < fewer; j++) {
    const bin = inside + direction * (offset + 1 + j);
    b.doubt.push({ bin, weight: -b.share[j]! * weigh(bin) });
  }
}

const clamp = (x: number, low: number, high: number): number => Math.max(low, Math.min(high, x));

/**
 * Weights that turn a plain sum over bins into the integral of g/S between exact band edges.
 * Shape:  a run of bins that covers the band and the stencils just outside it; empty when the band holds nothing. Zeros may be lent for it.
 * Units:  values 1/S in Hz; multiply the sum by dfHz.
 * Error:  order `order` (8) in the bin spacing at the edges and at every kink of a tabulated curve, spectral between.
 * Fails:  never; NaN in the curve stays NaN.
 * Source: engine design (fractional end weights). A hard mask would leave 1e-8 to 1e-5.
 */
export function binWeights(weigher: NoiseWeigher, range: BinRange, lend: (n: number) => Float64Array = (n) => new Float64Array(n)): BinWeights {
  const { dfHz } = range;
  const frame = frameOf(range);
  if (frame === null) return { first: range.firstBin, values: new Float64Array(0), dfHz, doubt: [] };
  const { first, last, inLow, inHigh } = frame;
  const values = lend(last - first + 1);
  const b = builderOf(weigher, range, frame, values);
  if (inHigh >= inLow) weigher.fill(values.subarray(inLow - first, inHigh - first + 1), logBins(last), inLow, inHigh, Math.log(dfHz));
  addEdges(b);
  addKinks(values, weigher, range, first, last);
  return { first, values, dfHz, doubt: b.doubt };
}

interface Frame {
  readonly inLow: number;
  readonly inHigh: number;
  readonly first: number;
  readonly last: number;
}

function frameOf({ dfHz, fLowHz, fHighHz, firstBin, lastBin, order }: BinRange): Frame | null {
  const inLow = Math.max(firstBin, Math.ceil(fLowHz / dfHz));
  const inHigh = Math.min(lastBin, Math.floor(fHighHz / dfHz));
  const first = Math.max(firstBin, inLow - order);
  const last = Math.min(lastBin, inHigh + order);
  return fHighHz > fLowHz && last >= first ? { inLow, inHigh, first, last } : null;
}

function builderOf(weigher: NoiseWeigher, range: BinRange, { first, last }: Frame, values: Float64Array | null): Builder {
  const logs = logBins(last);
  const offset = Math.log(range.dfHz);
  return { range, weigher, values, first, last, logF: (bin) => logs[bin]! + offset, share: new Float64Array(range.order), doubt: [], added: [] };
}

function addEdges(b: Builder): void {
  const { range, weigher } = b;
  const lowKink = weigher.firstKinkAbove(range.fLowHz);
  const highKink = weigher.firstKinkAbove(range.fHighHz * (1 - 1e-15));
  addEdge(b, range.fLowHz, 1, range.order, (bin) => weigher.continuedAt(lowKink, -1, b.logF(bin)));
  addEdge(b, range.fHighHz, -1, range.order, (bin) => weigher.continuedAt(highKink, -1, b.logF(bin)));
}

/** What the band's edges add to a plain sum of 1/S over bins inLow … inHigh, for a curve without kinks. */
export interface BandEdges {
  readonly inLow: number;
  readonly inHigh: number;
  readonly added: readonly BinShare[];
  readonly doubt: BinWeights['doubt'];
}

/** The edges of `binWeights` without the weights between them; null when the band holds no bin. */
export function bandEdges(weigher: NoiseWeigher, range: BinRange): BandEdges | null {
  const frame = frameOf(range);
  if (frame === null) return null;
  const b = builderOf(weigher, range, frame, null);
  addEdges(b);
  return { inLow: frame.inLow, inHigh: frame.inHigh, added: b.added, doubt: b.doubt };
}

const GLANCE_RUN = 4;
const GLANCE_RUNS = 256;

export interface Glance {
  readonly doubt: BinWeights['doubt'];
  /** Σ V p over the band for powers p of every bin, from a thousand bins: good to a factor. What it misses makes it too small. */
  readonly sum: (power: Float64Array) => number;
}

/**
 * The doubt about the band's edges without the weights between them: enough to see that bins are too wide.
 * Shape:  null when the band holds no bin.
 * Units:  as `binWeights`.
 * Error:  the sum is a sample of the bins.
 * Fails:  never.
 * Source: as `binWeights`; filling weights for bins that are then halved or left out took two thirds of a sweep.
 */
export function glanceAtEdges(weigher: NoiseWeigher, range: BinRange): Glance | null {
  const frame = frameOf(range);
  if (frame === null) return null;
  const b = builderOf(weigher, range, frame, null);
  addEdges(b);
  const { inLow, inHigh } = frame;
  const every = Math.max(GLANCE_RUN, Math.floor((inHigh - inLow + 1) / GLANCE_RUNS));
  const starts = Array.from(
    { length: Math.max(0, Math.floor((inHigh - inLow + 1 - GLANCE_RUN) / every) + 1) },
    (_, i) => inLow + i * every,
  );
  const n = GLANCE_RUN * starts.length;
  const logs = logBins(frame.last);
  const sampled = new Float64Array(n);
  for (let i = 0; i < n; i++) sampled[i] = logs[starts[Math.floor(i / GLANCE_RUN)]! + (i % GLANCE_RUN)]!;
  const values = new Float64Array(n);
  if (n > 0) weigher.fill(values, sampled, 0, n - 1, Math.log(range.dfHz));
  const sum = (power: Float64Array): number => {
    let total = 0;
    for (let i = 0; i < starts.length; i++)
      for (let j = 0; j < GLANCE_RUN; j++) total += values[GLANCE_RUN * i + j]! * power[starts[i]! + j]!;
    return (every / GLANCE_RUN) * total;
  };
  return { doubt: b.doubt, sum };
}
