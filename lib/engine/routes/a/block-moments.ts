import type { PackedSide, Slopes } from './packed-side';

/**
 * What a bound needs of a template: sums over blocks of bins, as wide in ln f as a step of the mass grid. With T = F dB/dF they give
 * ‖T − (iαk + iβ + γ)B‖² in any block for any α, β and γ.
 */
export interface BlockMoments {
  /** [block][moment], flattened: |B|², k|B|², k²|B|², |T|², Re B*T, Im B*T, k Im B*T. */
  readonly sums: Float64Array;
}

export const MOMENTS = 7;

/** First bin of each block, and one past the last. */
export function blockEdges(first: number, last: number, width: number): Int32Array {
  const edges = [first];
  for (let at = first; at <= last; ) {
    at = Math.max(at + 1, Math.ceil(at * Math.exp(width)));
    edges.push(Math.min(at, last + 1));
  }
  return Int32Array.from(edges);
}

/**
 * Sums of one template over every `stride`-th of its bins, which are all that the words bin and k mean here.
 * Shape:  slopes S (T = i k S) of those bins; bins beyond them count as empty.
 * Units:  those of the spectrum, squared; k in bins.
 * Error:  rounding.
 * Fails:  never.
 * Source: expansion of the square.
 */
export function blockMoments(side: PackedSide, slopes: Slopes, stride: number, edges: Int32Array): BlockMoments {
  const { re, im } = side;
  const { re: slopeRe, im: slopeIm, first } = slopes;
  const blocks = edges.length - 1;
  const sums = new Float64Array(MOMENTS * blocks);
  const end = first + slopeRe.length;
  for (let j = 0; j < blocks && edges[j]! < end; j++) {
    const to = Math.min(edges[j + 1]!, end);
    let p = 0;
    let kp = 0;
    let kkp = 0;
    let tt = 0;
    let rt = 0;
    let it = 0;
    let kit = 0;
    for (let k = edges[j]!, i = k * stride - side.first; k < to; k++, i += stride) {
      const x = re[i]!;
      const y = im[i]!;
      const u = -k * slopeIm[k - first]!;
      const v = k * slopeRe[k - first]!;
      const power = x * x + y * y;
      const turn = x * v - y * u;
      p += power;
      kp += k * power;
      kkp += k * k * power;
      tt += u * u + v * v;
      rt += x * u + y * v;
      it += turn;
      kit += k * turn;
    }
    const o = MOMENTS * j;
    sums[o] = p;
    sums[o + 1] = kp;
    sums[o + 2] = kkp;
    sums[o + 3] = tt;
    sums[o + 4] = rt;
    sums[o + 5] = it;
    sums[o + 6] = kit;
  }
  return { sums };
}
