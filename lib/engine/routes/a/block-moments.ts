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
 * Sums of one template.
 * Shape:  spectrum B and slope series S (T = i k S) from bin `first` on, interleaved; bins beyond them count as empty.
 * Units:  those of the spectrum, squared; k in bins.
 * Error:  rounding.
 * Fails:  never.
 * Source: expansion of the square.
 */
export function blockMoments(first: number, re: Float64Array, im: Float64Array, slopeRe: Float64Array, slopeIm: Float64Array, edges: Int32Array): BlockMoments {
  const blocks = edges.length - 1;
  const sums = new Float64Array(MOMENTS * blocks);
  for (let j = 0; j < blocks; j++) {
    const to = Math.min(edges[j + 1]!, first + re.length);
    let p = 0;
    let kp = 0;
    let kkp = 0;
    let tt = 0;
    let rt = 0;
    let it = 0;
    let kit = 0;
    for (let k = edges[j]!; k < to; k++) {
      const x = re[k - first]!;
      const y = im[k - first]!;
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
    sums[MOMENTS * j] = p;
    sums[MOMENTS * j + 1] = kp;
    sums[MOMENTS * j + 2] = kkp;
    sums[MOMENTS * j + 3] = tt;
    sums[MOMENTS * j + 4] = rt;
    sums[MOMENTS * j + 5] = it;
    sums[MOMENTS * j + 6] = kit;
  }
  return { sums };
}
