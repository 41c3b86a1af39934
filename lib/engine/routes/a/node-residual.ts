import type { CompressedBins } from './compressed-bins';
import type { NodeBand } from './node-band';
import { nodeOffsets } from './chebyshev-blocks';
import { BB, DD, IM, RE } from './node-lag';

export interface Turned {
  /** 1/‖a‖, 1/‖b‖ and their difference, which is known better than they are. */
  readonly scaleA: number;
  readonly scaleB: number;
  readonly gap: number;
  readonly delta: number;
  readonly turnRad: number;
}

const cos = new Float64Array(16);
const sin = new Float64Array(16);

/** One node's |r_a a − r_b b e^{iφ}|² from D = a − b: half the angle, so that small angles keep their digits. */
function term(dd: number, er: number, ei: number, bb: number, c: number, s: number, { scaleA, scaleB, gap }: Turned): number {
  const across = 2 * scaleB * s * c;
  const along = gap + 2 * scaleB * s * s;
  return scaleA * scaleA * dd + 2 * scaleA * (er * along - ei * across) + bb * (gap * gap + 4 * scaleA * scaleB * s * s);
}

/**
 * Σ V |a/‖a‖ − b e^{i(turn − 2πkδ)}/‖b‖|² of an aligned pair, which is small wherever the pair is alike: no cancellation.
 * Shape:  one number.
 * Units:  none.
 * Error:  relative, as the nodes'.
 * Fails:  never.
 * Source: 1 − ⟨â|b̂⟩ = ½‖â − b̂‖².
 */
export function nodeResidual(bins: CompressedBins, band: NodeBand, turned: Turned): number {
  const { weight, loose } = band;
  const [dd, er, ei, bb] = bins.run.columns;
  const { delta, turnRad } = turned;
  let sum = 0;
  let size = 0;
  for (let b = band.from; b <= band.to; b++) {
    const block = bins.blocks[b]!;
    if (block.size !== size) {
      size = block.size;
      const offsets = nodeOffsets(size, bins.order);
      for (let j = 0; j < offsets.length; j++) {
        cos[j] = Math.cos(Math.PI * offsets[j]! * delta);
        sin[j] = Math.sin(Math.PI * offsets[j]! * delta);
      }
    }
    const half = turnRad / 2 - Math.PI * (block.first + (size - 1) / 2) * delta;
    const c = Math.cos(half);
    const s = Math.sin(half);
    for (let j = 0; j < block.nodes; j++) {
      const i = block.offset + j;
      sum += weight[i]! * term(dd[i]!, er[i]!, ei[i]!, bb[i]!, c * cos[j]! + s * sin[j]!, s * cos[j]! - c * sin[j]!, turned);
    }
  }
  for (let i = 0; i < loose.n; i++) {
    const half = turnRad / 2 - Math.PI * loose.bin[i]! * delta;
    sum += loose.weight[i]! * term(loose.columns[DD]![i]!, loose.columns[RE]![i]!, loose.columns[IM]![i]!, loose.columns[BB]![i]!, Math.cos(half), Math.sin(half), turned);
  }
  return sum;
}
