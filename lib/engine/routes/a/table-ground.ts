import type { Band } from '@/lib/engine/contract/route';
import type { Bracket } from './anchor-certificate';
import { binWeights, type BinRange, type BinWeights } from './bin-weights';
import { chebyshevRule } from './chebyshev-rule';
import { ColumnReader } from './column-reader';
import { ColumnRoughness, EXACT_TURN_RAD } from './column-roughness';
import type { BinColumns, FourColumns, TurnBlock } from './compressed-bins';
import { FIRST_BIN } from './compressed-ground';
import type { LooseNodes, NodeBand } from './node-band';
import { FINEST, noiseBlocksOf, ORDER, WIDEST, type NoiseBlock, type NoiseBlocks } from './noise-blocks';
import type { NoiseWeigher } from './noise-weigher';
import { edgesSettled, type SweptSides } from './settled-edges';
import type { SweepGround } from './sweep-ground';
import { TableDistance, type CellMark } from './table-distance';

/** Turn of the phase over half the widest block at which heights are still good to 1e-6. */
const SEEN_TURN_RAD = 3;
/** Of ‖a‖‖b‖: what a block may leave unresolved at most. Rounding of the spectra alone shows as some 1e-14. */
const LEFT = 1e-13;
/** Of ‖a‖‖b‖, how far bins may be from the moments at an anchor: by what end weights leave at lines that the bins resolve, and at lines that they do not. */
const AGREED = 1e-11;
const AGREED_COARSE = 1e-6;
/** Bins that turn together. */
const RUN = 16;

interface Scratch {
  readonly bin: Float64Array;
  readonly weight: Float64Array;
  readonly columns: FourColumns;
}

let scratch: Scratch | null = null;
function scratchOf(n: number): Scratch {
  if (scratch !== null && scratch.bin.length >= n) return scratch;
  const one = (): Float64Array => new Float64Array(2 * n);
  return (scratch = { bin: one(), weight: one(), columns: [one(), one(), one(), one()] });
}

let lent = new Float64Array(0);
function lend(n: number): Float64Array {
  if (lent.length < n) lent = new Float64Array(2 * n);
  return lent.subarray(0, n).fill(0);
}

const runOffsets = Float64Array.from({ length: RUN }, (_, i) => i - (RUN - 1) / 2);

const none: LooseNodes = { n: 0, bin: new Float64Array(0), weight: new Float64Array(0), columns: [0, 0, 0, 0].map(() => new Float64Array(0)) as unknown as FourColumns };

interface Plan {
  readonly block: NoiseBlock;
  /** Halvings at which the pair is a polynomial over each part. */
  readonly level: number;
}

interface TableBand extends NodeBand {
  readonly doubt: BinWeights['doubt'];
  /** Do the bins below the blocks resolve the table's kinks? */
  readonly isResolved: boolean;
}

/** Moments of a table's 1/S over blocks of frequencies where an aligned pair is a polynomial over each, and bins below. */
export class TableGround implements SweepGround<CellMark> {
  readonly window: number;
  readonly sight: number;
  private readonly noise: NoiseBlocks;
  private readonly reader: ColumnReader;
  private readonly roughness: ColumnRoughness;
  private readonly distances: TableDistance;
  /** ‖a‖‖b‖ at the last mass, of the pair as it stands. */
  private norm = 1;

  constructor(private columns: BinColumns, private readonly last: number, private readonly weigher: NoiseWeigher, { fLowHz, fHighHz, noise }: Band, private readonly sides: SweptSides, private readonly kinkChange: number) {
    this.window = EXACT_TURN_RAD / (2 * Math.PI * WIDEST * last);
    this.sight = SEEN_TURN_RAD / (2 * Math.PI * WIDEST * last);
    const top = Math.min(fHighHz, noise.fHighHz);
    this.noise = noiseBlocksOf(weigher, fLowHz, top);
    this.reader = new ColumnReader(columns, last);
    this.roughness = new ColumnRoughness(this.reader);
    this.distances = new TableDistance(this.reader, weigher, fLowHz, top, sides.scales);
  }

  refill(columns: BinColumns): void {
    this.columns = columns;
  }

  /** The first level at which the pair is a polynomial over each part of a block; null where none is. */
  private levelFor({ whole, fromHz, toHz }: NoiseBlock, dfHz: number): number | null {
    const [middle, half] = [(fromHz + toHz) / (2 * dfHz), (toHz - fromHz) / (2 * dfHz)];
    const share = whole / (dfHz * this.norm);
    for (let level = 0; level <= FINEST; level++) {
      let left = 0;
      const parts = 2 ** level;
      for (let p = 0; p < parts; p++) left = Math.max(left, this.roughness.around(level, middle + ((2 * p + 1) / parts - 1) * half));
      if (left * share < LEFT) return level;
    }
    return null;
  }

  /** Blocks from the highest down, as far as the pair is smooth. */
  private plans(dfHz: number): { readonly plans: Plan[]; readonly fromHz: number } {
    const plans: Plan[] = [];
    let fromHz = Infinity;
    for (const block of this.noise.blocks.filter((b) => b.fromHz / dfHz < this.last).reverse()) {
      const level = this.levelFor(block, dfHz);
      if (level === null) break;
      plans.push({ block, level });
      ({ fromHz } = block);
    }
    return { plans: plans.reverse(), fromHz };
  }

  weigh(range: BinRange): TableBand | null {
    const { dfHz, fLowHz } = range;
    if (fLowHz / dfHz < FIRST_BIN) return null;
    const { plans, fromHz } = this.plans(dfHz);
    const below = fromHz > fLowHz ? binWeights(this.weigher, { ...range, fHighHz: Math.min(fromHz, range.fHighHz) }, lend) : null;
    if (below !== null && below.first < this.columns.first) return null;
    const bins = below?.values.length ?? 0;
    const made = scratchOf(bins + RUN + plans.reduce((sum, { level }) => sum + ORDER * 2 ** level, 0));
    const blocks: TurnBlock[] = [];
    if (below !== null) this.addBins(made, blocks, below);
    this.addMoments(made, blocks, plans, dfHz);
    return { nodes: { blocks, run: made }, from: 0, to: blocks.length - 1, weight: made.weight, loose: none, doubt: below?.doubt ?? [], isResolved: this.resolves(dfHz, fromHz) };
  }

  /** Do these bins resolve the table's kinks below a frequency? */
  private resolves(dfHz: number, belowHz: number): boolean {
    return this.noise.blocks.every((b) => b.fromHz >= belowHz || dfHz <= this.kinkChange * b.resolvedHz * (1 + 1e-9));
  }

  private addBins({ bin, weight, columns }: Scratch, blocks: TurnBlock[], { first, values }: BinWeights): void {
    const n = values.length;
    const whole = Math.ceil(n / RUN) * RUN;
    weight.set(values);
    weight.fill(0, n, whole);
    for (let i = 0; i < whole; i++) bin[i] = first + i;
    const from = first - this.columns.first;
    for (let c = 0; c < 4; c++) columns[c]!.set(this.columns.columns[c]!.subarray(from, from + whole));
    for (let at = 0; at < n; at += RUN) blocks.push({ middle: first + at + (RUN - 1) / 2, width: RUN, offsets: runOffsets, offset: at, nodes: RUN });
  }

  private addMoments(made: Scratch, blocks: TurnBlock[], plans: readonly Plan[], dfHz: number): void {
    const { points } = chebyshevRule(ORDER);
    let offset = blocks.length * RUN;
    let width = Number.NaN;
    let offsets = new Float64Array(0);
    for (const { block, level } of plans) {
      const weights = this.noise.weights(block, level);
      const parts = 2 ** level;
      const own = (block.toHz - block.fromHz) / (parts * dfHz);
      if (!(Math.abs(own / width - 1) < 1e-12)) {
        width = own;
        offsets = points.map((x) => (x * own) / 2);
      }
      for (let p = 0; p < parts; p++) {
        const middle = block.fromHz / dfHz + (p + 0.5) * own;
        blocks.push({ middle, width, offsets, offset, nodes: ORDER });
        for (let j = 0; j < ORDER; j++, offset++) {
          made.bin[offset] = middle + offsets[j]!;
          made.weight[offset] = weights[ORDER * p + j]! / dfHz;
          this.reader.read(made.bin[offset]!, made.columns, offset);
        }
      }
    }
  }

  isSettled({ doubt, isResolved }: TableBand, norms: readonly [number, number]): boolean {
    this.norm = Math.sqrt(norms[0] * norms[1]);
    return isResolved && edgesSettled(doubt, this.sides, norms);
  }

  agreement({ dfHz }: BinRange): number {
    return this.resolves(dfHz, Infinity) ? AGREED : AGREED_COARSE;
  }

  mark(_band: NodeBand, { dfHz }: BinRange, norm: number): CellMark {
    return this.distances.mark(dfHz, norm);
  }

  distance(_band: NodeBand, { dfHz }: BinRange, norm: number, bracket: Bracket<CellMark>, share: number): number {
    return this.distances.bound(this.distances.mark(dfHz, norm), bracket.low.mark, bracket.high.mark, share);
  }
}
