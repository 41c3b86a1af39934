import { noiseMoments } from './noise-moments';
import type { NoiseWeigher } from './noise-weigher';

/** Blocks in an octave of frequencies, from the band's lower edge on: an edge then never cuts one. */
const BLOCKS_AN_OCTAVE = 8;
export const ORDER = 12;
/** Half the widest block by its middle. */
export const WIDEST = 1 / (2 * BLOCKS_AN_OCTAVE + 1);
/** A block may be halved so often. */
export const FINEST = 2;

export interface NoiseBlock {
  readonly fromHz: number;
  readonly toHz: number;
  /** Spacing of bins that resolves the table's kinks in it, for a change of 1 in ln S from bin to bin. */
  readonly resolvedHz: number;
  /** ∫ df/S over it. */
  readonly whole: number;
  /** Weights of the nodes of 2^level equal parts, [part][node]; made when first asked for. */
  readonly levels: (Float64Array | undefined)[];
}

/** A table's band in blocks, with the moments of 1/S over each: they do not depend on the mass. */
export class NoiseBlocks {
  readonly blocks: readonly NoiseBlock[];

  constructor(
    private readonly weigher: NoiseWeigher,
    fLowHz: number,
    fHighHz: number,
  ) {
    const edges = [fLowHz];
    for (let i = 1; edges[i - 1]! < fHighHz; i++) {
      const octave = 2 ** Math.floor(i / BLOCKS_AN_OCTAVE);
      edges.push(Math.min(fHighHz, fLowHz * octave * (1 + (i % BLOCKS_AN_OCTAVE) / BLOCKS_AN_OCTAVE)));
    }
    this.blocks = edges.slice(1).map((toHz, i) => {
      const first = noiseMoments(weigher, edges[i]!, toHz, ORDER);
      return { fromHz: edges[i]!, toHz, resolvedHz: weigher.kinkResolutionHz(edges[i]!, toHz, 1), whole: first.reduce((sum, w) => sum + w, 0), levels: [first] };
    });
  }

  weights({ fromHz, toHz, levels }: NoiseBlock, level: number): Float64Array {
    const known = levels[level];
    if (known) return known;
    const parts = 2 ** level;
    const made = new Float64Array(ORDER * parts);
    const edge = (i: number): number => (i === parts ? toHz : fromHz + ((toHz - fromHz) * i) / parts);
    for (let p = 0; p < parts; p++) made.set(noiseMoments(this.weigher, edge(p), edge(p + 1), ORDER), ORDER * p);
    levels[level] = made;
    return made;
  }
}

const kept = new WeakMap<NoiseWeigher, Map<string, NoiseBlocks>>();
const MOST_BANDS = 4;

/** Once for a curve and band: every pair and every mass shares them. */
export function noiseBlocksOf(weigher: NoiseWeigher, fLowHz: number, fHighHz: number): NoiseBlocks {
  const byBand = kept.get(weigher) ?? new Map<string, NoiseBlocks>();
  kept.set(weigher, byBand);
  const key = `${fLowHz},${fHighHz}`;
  const made = byBand.get(key) ?? new NoiseBlocks(weigher, fLowHz, fHighHz);
  if (byBand.size >= MOST_BANDS && !byBand.has(key)) byBand.delete([...byBand.keys()][0]!);
  byBand.set(key, made);
  return made;
}
