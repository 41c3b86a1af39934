import type { NodeBand } from './node-band';

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

/**
 * Σ V |a/‖a‖ − b e^{i(turn − 2πkδ)}/‖b‖|² of an aligned pair, which is small wherever the pair is alike: no cancellation.
 * Shape:  one number.
 * Units:  none.
 * Error:  relative, as the nodes'.
 * Fails:  never.
 * Source: 1 − ⟨â|b̂⟩ = ½‖â − b̂‖².
 */
export function nodeResidual(band: NodeBand, turned: Turned): number {
  return overBlocks(band, turned) + overLoose(band, turned);
}

/** |r_a a − r_b b e^{iφ}|² of every node from D = a − b: half the angle, so that small angles keep their digits. */
function overBlocks({ nodes, from, to, weight }: NodeBand, { scaleA, scaleB, gap, delta, turnRad }: Turned): number {
  const [dd, er, ei, bb] = nodes.run.columns;
  const [twoA, twoB, product] = [2 * scaleA, 2 * scaleB, 4 * scaleA * scaleB];
  let sum = 0;
  let own: Float64Array | null = null;
  for (let b = from; b <= to; b++) {
    const { offsets, middle, offset, nodes: n } = nodes.blocks[b]!;
    if (offsets !== own) {
      own = offsets;
      for (let j = 0; j < n; j++) {
        cos[j] = Math.cos(Math.PI * offsets[j]! * delta);
        sin[j] = Math.sin(Math.PI * offsets[j]! * delta);
      }
    }
    const half = turnRad / 2 - Math.PI * middle * delta;
    const c = Math.cos(half);
    const s = Math.sin(half);
    for (let j = 0; j < n; j++) {
      const i = offset + j;
      const x = c * cos[j]! + s * sin[j]!;
      const y = s * cos[j]! - c * sin[j]!;
      const along = gap + twoB * y * y;
      const across = twoB * y * x;
      sum += weight[i]! * (scaleA * scaleA * dd[i]! + twoA * (er[i]! * along - ei[i]! * across) + bb[i]! * (gap * gap + product * y * y));
    }
  }
  return sum;
}

function overLoose({ loose }: NodeBand, { scaleA, scaleB, gap, delta, turnRad }: Turned): number {
  const [dd, er, ei, bb] = loose.columns;
  let sum = 0;
  for (let i = 0; i < loose.n; i++) {
    const half = turnRad / 2 - Math.PI * loose.bin[i]! * delta;
    const [x, y] = [Math.cos(half), Math.sin(half)];
    const along = gap + 2 * scaleB * y * y;
    const across = 2 * scaleB * y * x;
    sum += loose.weight[i]! * (scaleA * scaleA * dd[i]! + 2 * scaleA * (er[i]! * along - ei[i]! * across) + bb[i]! * (gap * gap + 4 * scaleA * scaleB * y * y));
  }
  return sum;
}
