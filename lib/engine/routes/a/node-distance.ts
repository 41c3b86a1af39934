import type { CompressedBins } from './compressed-bins';
import type { CutBand } from './node-band';
import { BB, DD, RE } from './node-lag';

/** Σ|a|² and Σ|b|² of each block of an aligned pair. */
export interface BlockPowers {
  readonly a: Float64Array;
  readonly b: Float64Array;
}

/** Sums over bins are sums over nodes: a constant is a polynomial. */
export function blockPowers({ blocks, run }: CompressedBins): BlockPowers {
  const a = new Float64Array(blocks.length);
  const b = new Float64Array(blocks.length);
  blocks.forEach(({ offset, nodes }, i) => {
    for (let j = offset; j < offset + nodes; j++) {
      a[i]! += run.columns[DD]![j]! + 2 * run.columns[RE]![j]! + run.columns[BB]![j]!;
      b[i]! += run.columns[BB]![j]!;
    }
  });
  return { a, b };
}

type Reach = Pick<CutBand, 'from' | 'to' | 'touchedFrom' | 'touchedTo'>;
const holds = ({ from, to }: Reach, block: number): boolean => block >= from && block <= to;
const touches = ({ touchedFrom, touchedTo }: Reach, block: number): boolean => block >= touchedFrom - 1 && block <= touchedTo + 1;

/** What is kept of an anchor. */
export interface NodeMark {
  /** 1/S at the nodes over ‖a‖‖b‖ of the spectra as they are. */
  readonly weight: Float64Array;
  readonly band: Reach;
}

export interface NodeBracket {
  readonly low: NodeMark;
  readonly high: NodeMark;
}

const CUT_ROOM = 1.5;

/**
 * How far the normalised product at a mass can lie, at any lag, from the mean of those at two anchors.
 * Shape:  `share` of the upper anchor in the mean; scale = ‖a‖‖b‖ of the spectra as they are, at the mass; powers likewise.
 * Units:  of a normalised product.
 * Error:  an upper bound, but for how a smooth curve bends between neighbouring nodes, which is allowed for by their largest step.
 * Fails:  never.
 * Source: |Σ a b* ΔV e^{iωτ}|² ≤ Σ|a|²|ΔV| · Σ|b|²|ΔV| (Cauchy and Schwarz).
 */
export function distanceBound(bins: CompressedBins, powers: BlockPowers, band: CutBand, scale: number, { low, high }: NodeBracket, share: number): number {
  const { weight } = band;
  const first = Math.min(band.touchedFrom, low.band.touchedFrom, high.band.touchedFrom);
  const last = Math.max(band.touchedTo, low.band.touchedTo, high.band.touchedTo);
  let a = 0;
  let b = 0;
  for (let i = Math.max(0, first - 1); i <= Math.min(bins.blocks.length - 1, last + 1); i++) {
    const { offset, nodes } = bins.blocks[i]!;
    const whole = holds(band, i) && holds(low.band, i) && holds(high.band, i);
    let most = 0;
    if (whole) {
      let step = 0;
      let before = 0;
      for (let j = offset; j < offset + nodes; j++) {
        const d = weight[j]! / scale - (1 - share) * low.weight[j]! - share * high.weight[j]!;
        most = Math.max(most, Math.abs(d));
        if (j > offset) step = Math.max(step, Math.abs(d - before));
        before = d;
      }
      most += step;
    } else {
      const [own, lower, upper] = [touches(band, i) ? 1 : 0, touches(low.band, i) ? 1 - share : 0, touches(high.band, i) ? share : 0];
      for (let j = offset; j < offset + nodes; j++)
        most = Math.max(most, (own * Math.abs(weight[j]!)) / scale, lower * Math.abs(low.weight[j]!) + upper * Math.abs(high.weight[j]!));
      most *= CUT_ROOM;
    }
    a += most * Math.max(0, powers.a[i]!);
    b += most * Math.max(0, powers.b[i]!);
  }
  return Math.sqrt(a * b);
}
