import { edgeRule } from '@/lib/engine/series/edge-weights';
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

const MOST_KINK_ORDER = 8;
/** A kink whose end weights would move the sum by less than this fraction of one bin is left to the plain sum. */
const LEAST_KINK = 1e-16;

interface Builder {
  readonly range: BinRange;
  readonly weigher: NoiseWeigher;
  readonly values: Float64Array;
  readonly first: number;
  readonly last: number;
  readonly logF: (bin: number) => number;
  readonly share: Float64Array;
  readonly doubt: { bin: number; weight: number }[];
}

/** Places `order` end weights around an edge at f; direction +1 integrates upwards from it, −1 up to it. */
function addEdge(b: Builder, fHz: number, direction: 1 | -1, order: number, weigh: (bin: number) => number, isKink = false): void {
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
  const offset = direction > 0 ? clamp(centred, low - inside, high - inside - most + 1) : clamp(centred, inside - high, inside - low - most + 1);
  edgeRule(most, offset).weightsAt(Math.abs(inside - place), b.share);
  const doubtful = !isKink;
  for (let j = 0; j < most; j++) {
    const bin = inside + direction * (offset + j);
    const added = b.share[j]! * weigh(bin);
    b.values[bin - b.first]! += added;
    if (doubtful) b.doubt.push({ bin, weight: added });
  }
  if (!doubtful || most < 4) return;
  const fewer = most - 2;
  edgeRule(fewer, offset + 1).weightsAt(Math.abs(inside - place), b.share);
  for (let j = 0; j < fewer; j++) {
    const bin = inside + direction * (offset + 1 + j);
    b.doubt.push({ bin, weight: -b.share[j]! * weigh(bin) });
  }
}

const clamp = (x: number, low: number, high: number): number => Math.max(low, Math.min(high, x));

/** Steep lines on coarse bins are continued over fewer of them: a power law of hundreds is no polynomial over eight bins. */
function kinkOrder(change: number, order: number): number {
  if (change * 4 < 2) return Math.min(order, MOST_KINK_ORDER);
  return change * 2 < 2 ? 4 : 2;
}

function addKinks(b: Builder): void {
  const { range, weigher } = b;
  const { kinksHz } = weigher;
  for (let i = weigher.firstKinkAbove(range.fLowHz); i < kinksHz.length && kinksHz[i]! < range.fHighHz; i++) {
    const f = kinksHz[i]!;
    if (f <= range.fLowHz) continue;
    const step = range.dfHz / f;
    const lnF = Math.log(f);
    const ratio = (side: 1 | -1): number => Math.abs(Math.log(weigher.continuedAt(i, side, lnF + step) / weigher.continuedAt(i, side, lnF)));
    const [above, below] = [ratio(1), ratio(-1)];
    if ((above + below) * step < LEAST_KINK || above + below === 0) continue;
    const order = kinkOrder(Math.max(above, below), range.order);
    addEdge(b, f, 1, order, (bin) => weigher.continuedAt(i, 1, b.logF(bin)) - weigher.continuedAt(i, -1, b.logF(bin)), true);
  }
}

/**
 * Weights that turn a plain sum over bins into the integral of g/S between exact band edges.
 * Shape:  a run of bins that covers the band and the stencils just outside it; empty when the band holds nothing.
 * Units:  values 1/S in Hz; multiply the sum by dfHz.
 * Error:  order `order` (8) in the bin spacing at the edges and at every kink of a tabulated curve, spectral between.
 * Fails:  never; NaN in the curve stays NaN.
 * Source: engine design (fractional end weights). A hard mask would leave 1e-8 to 1e-5.
 */
export function binWeights(weigher: NoiseWeigher, range: BinRange): BinWeights {
  const { dfHz, fLowHz, fHighHz } = range;
  const inLow = Math.max(range.firstBin, Math.ceil(fLowHz / dfHz));
  const inHigh = Math.min(range.lastBin, Math.floor(fHighHz / dfHz));
  const first = Math.max(range.firstBin, inLow - range.order);
  const last = Math.min(range.lastBin, inHigh + range.order);
  if (!(fHighHz > fLowHz) || last < first) return { first: range.firstBin, values: new Float64Array(0), dfHz, doubt: [] };
  const logs = logBins(last);
  const offset = Math.log(dfHz);
  const values = new Float64Array(last - first + 1);
  if (inHigh >= inLow) weigher.fill(values.subarray(inLow - first, inHigh - first + 1), logs, inLow, inHigh, offset);
  const b: Builder = { range, weigher, values, first, last, logF: (bin) => logs[bin]! + offset, share: new Float64Array(range.order), doubt: [] };
  const lowKink = weigher.firstKinkAbove(fLowHz);
  const highKink = weigher.firstKinkAbove(fHighHz * (1 - 1e-15));
  addEdge(b, fLowHz, 1, range.order, (bin) => weigher.continuedAt(lowKink, -1, b.logF(bin)));
  addEdge(b, fHighHz, -1, range.order, (bin) => weigher.continuedAt(highKink, -1, b.logF(bin)));
  addKinks(b);
  return { first, values, dfHz, doubt: b.doubt };
}
