import type { Bracket } from './anchor-certificate';
import type { BinRange } from './bin-weights';
import { blockSize } from './chebyshev-blocks';
import { CompressedBins, type BinColumns } from './compressed-bins';
import { nodeBand, type CutBand } from './node-band';
import { blockPowers, distanceBound, type BlockPowers, type NodeBracket, type NodeMark } from './node-distance';
import { MOST_TURN_RAD } from './node-order';
import type { NoiseWeigher } from './noise-weigher';
import { edgesSettled, type SweptSides } from './settled-edges';
import type { SweepGround } from './sweep-ground';

export const FIRST_BIN = 16;
/** Of ‖a‖‖b‖, by how much sums over nodes may differ from those over bins. */
const AGREED = 1e-13;

/** Bins gathered on nodes between which a smooth noise curve is a polynomial. */
export class CompressedGround implements SweepGround<NodeMark> {
  readonly window: number;
  readonly sight: number;
  private readonly bins: CompressedBins;
  private readonly powers: BlockPowers;

  constructor(columns: BinColumns, last: number, order: number, private readonly weigher: NoiseWeigher, private readonly sides: SweptSides) {
    this.bins = new CompressedBins(columns, FIRST_BIN, last, order);
    // Half the shifts over which the widest block turns by what its nodes carry.
    this.window = this.sight = MOST_TURN_RAD / (Math.PI * blockSize(last));
    const { a, b } = blockPowers(this.bins);
    const [sa, sb] = sides.scales;
    this.powers = { a: a.map((x) => x / (sa * sa)), b: b.map((x) => x / (sb * sb)) };
  }

  refill(columns: BinColumns): void {
    this.bins.bins = columns;
  }

  weigh(range: BinRange): CutBand | null {
    return nodeBand(this.bins, this.weigher, range);
  }

  isSettled({ edges }: CutBand, norms: readonly [number, number]): boolean {
    return edgesSettled(edges.doubt, this.sides, norms);
  }

  agreement(): number {
    return AGREED;
  }

  mark({ from, to, touchedFrom, touchedTo, weight }: CutBand, _range: BinRange, norm: number): NodeMark {
    return { weight: weight.slice(0, this.bins.run.bin.length).map((w) => w / norm), band: { from, to, touchedFrom, touchedTo } };
  }

  distance(band: CutBand, _range: BinRange, norm: number, { low, high }: Bracket<NodeMark>, share: number): number {
    const marks: NodeBracket = { low: low.mark, high: high.mark };
    return distanceBound(this.bins, this.powers, band, norm, marks, share);
  }
}
