import type { Band } from '@/lib/engine/contract/route';
import { MOMENTS, type BlockMoments } from './block-moments';
import { noiseRange } from './noise-range';

/** How far, at most, a template moves as its mass grows through the grid of factors. */
export interface MassPaths {
  /** Angles from the first factor to each, rad, rising. */
  readonly of: (moments: BlockMoments) => Float64Array;
}

/** A time, a phase and a size that are taken out serve so many steps of the grid. */
const STEPS_SERVED = 16;
/** Sums over bins stand for integrals, and the band's edges lie between bins. */
const ROOM = 1.002;
/** Beyond a right angle nothing is bounded. */
const MOST = Math.PI;

/** 1/S of each step of the grid and each block, [step][block] flattened, at its largest and its smallest. */
interface Weights {
  readonly sup: Float64Array;
  readonly inf: Float64Array;
}

function weightsOf(factors: readonly number[], edges: Int32Array, dfHz: (factor: number) => number, band: Band): Weights {
  const range = noiseRange(band);
  const blocks = edges.length - 1;
  // Each bin stands for all frequencies nearer to it than to its neighbours.
  const sides = Float64Array.from(edges, (bin) => Math.log(bin - 0.5));
  const widths = factors.map((factor) => Math.log(dfHz(factor)));
  const steps = factors.length - 1;
  const [sup, inf] = [new Float64Array(steps * blocks), new Float64Array(steps * blocks)];
  for (let g = 0; g < steps; g++) {
    for (let j = 0; j < blocks; j++) {
      const [from, to] = [sides[j]! + widths[g + 1]!, sides[j + 1]! + widths[g]!];
      sup[g * blocks + j] = range.sup(from, to);
      inf[g * blocks + j] = range.inf(from, to);
    }
  }
  return { sup, inf };
}

interface Turn {
  readonly alpha: number;
  readonly beta: number;
  readonly gamma: number;
}

/** The time, phase and size whose removal leaves least under given weights; any others give a bound as well. */
function turnOf({ sums }: BlockMoments, weights: Float64Array, at: number, live: number): Turn {
  let s0 = 0;
  let s1 = 0;
  let s2 = 0;
  let rt = 0;
  let it = 0;
  let kit = 0;
  for (let j = 0, o = 0; j < live; j++, o += MOMENTS) {
    const w = weights[at + j]!;
    s0 += w * sums[o]!;
    s1 += w * sums[o + 1]!;
    s2 += w * sums[o + 2]!;
    rt += w * sums[o + 4]!;
    it += w * sums[o + 5]!;
    kit += w * sums[o + 6]!;
  }
  const determinant = s2 * s0 - s1 * s1;
  if (!(s0 > 0) || !(determinant > 1e-12 * s2 * s0)) return { alpha: 0, beta: 0, gamma: s0 > 0 ? rt / s0 : 0 };
  return { alpha: (kit * s0 - it * s1) / determinant, beta: (s2 * it - s1 * kit) / determinant, gamma: rt / s0 };
}

/** What is left in each block when they are taken out. */
function restOf({ sums }: BlockMoments, { alpha, beta, gamma }: Turn, rest: Float64Array, live: number): void {
  const [square, cross, plain] = [alpha * alpha, 2 * alpha * beta, beta * beta + gamma * gamma];
  for (let j = 0, o = 0; j < live; j++, o += MOMENTS) {
    const turned = square * sums[o + 2]! + cross * sums[o + 1]! + plain * sums[o]!;
    rest[j] = Math.max(0, sums[o + 3]! + turned - 2 * (gamma * sums[o + 4]! + beta * sums[o + 5]! + alpha * sums[o + 6]!));
  }
}

/** Σ weights × values over the live blocks of one step. */
function dot(weights: Float64Array, at: number, values: Float64Array, live: number): number {
  // Two sums at once: one alone would wait for itself at every block.
  let even = 0;
  let odd = 0;
  for (let j = 0; j + 1 < live; j += 2) {
    even += weights[at + j]! * values[j]!;
    odd += weights[at + j + 1]! * values[j + 1]!;
  }
  return live % 2 === 0 ? even + odd : even + odd + weights[at + live - 1]! * values[live - 1]!;
}

/**
 * Bounds of the angle between a template and itself at another mass.
 * Shape:  factors rising; edges of the blocks in bins; the bin width in Hz at a factor is dfHz(factor).
 * Units:  rad, of the angle whose cosine is the match.
 * Error:  on the safe side: within a block and a step the noise is taken at its worst, some ten per cent.
 * Fails:  never; where the power may vanish the angle is π, and bounds nothing.
 * Source: the length of a path bounds the distance of its ends; dB/d ln m = F dB/dF, less what a shift, a phase and a norm take up.
 */
export function massPaths(factors: readonly number[], edges: Int32Array, dfHz: (factor: number) => number, band: Band): MassPaths {
  const { sup, inf } = weightsOf(factors, edges, dfHz, band);
  const blocks = edges.length - 1;
  const steps = factors.length - 1;
  const widths = Float64Array.from({ length: steps }, (_, g) => ROOM * Math.log(factors[g + 1]! / factors[g]!));
  const [rest, power] = [new Float64Array(blocks), new Float64Array(blocks)];
  return {
    of: (moments) => {
      for (let j = 0; j < blocks; j++) power[j] = moments.sums[MOMENTS * j]!;
      let live = blocks;
      while (live > 0 && power[live - 1] === 0) live--;
      const angles = new Float64Array(factors.length);
      for (let g = 0; g < steps; g++) {
        if (g % STEPS_SERVED === 0) restOf(moments, turnOf(moments, inf, blocks * Math.min(steps - 1, g + STEPS_SERVED / 2), live), rest, live);
        const angle = widths[g]! * Math.sqrt(dot(sup, g * blocks, rest, live) / dot(inf, g * blocks, power, live));
        angles[g + 1] = angles[g]! + (angle < MOST ? angle : MOST);
      }
      return angles;
    },
  };
}
