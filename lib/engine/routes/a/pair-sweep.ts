import type { Band, MatchRequest } from '@/lib/engine/contract/route';
import type { Response } from '@/lib/engine/contract/settings';
import { powerOfTwoFrom } from '@/lib/engine/fourier/transform';
import { alignedColumns, standingOf, type Standing } from './aligned-columns';
import { xOfShift, type Alignment, type Freedom, type Pair } from './alignment';
import { riseBetween, rivals, type Bracket } from './anchor-certificate';
import { AnchorLattice, type HeldBracket } from './anchor-lattice';
import { lastLiveBin, survey, TOP_PART } from './band-power';
import { blockSize } from './chebyshev-blocks';
import type { BinColumns, FourColumns } from './compressed-bins';
import { CompressedGround, FIRST_BIN } from './compressed-ground';
import { lagAnchor, nodeNorms, type LagAnchor, type LagGrid } from './lag-anchor';
import type { NodeBand } from './node-band';
import { HEIGHT_ROOM } from './node-heights';
import { NodeLag } from './node-lag';
import { nodeResidual } from './node-residual';
import type { NoiseWeigher } from './noise-weigher';
import type { BinRange } from './bin-weights';
import type { Numerics } from './numerics';
import { rangeFor } from './prepare';
import type { SweepGround } from './sweep-ground';
import { TableGround } from './table-ground';

/** A match found on bins, from which its neighbours in mass are reached. */
export interface Found {
  readonly pair: Pair;
  readonly alignment: Alignment;
  readonly band: Band;
}

export interface SweepKind {
  readonly response: Exclude<Response, 'complex'>;
  readonly freedom: Freedom;
  readonly weigher: NoiseWeigher;
  /** Nodes of a block of bins for a smooth curve; null for a table, whose own moments are taken. */
  readonly order: number | null;
  readonly numerics: Numerics;
}

const LEAD = 8;
const MOST_BINS = 1 << 19;
/** Power that the end of the nodes may leave out, by what is seen at the first mass. */
const UNSEEN_SHARE = 1e-3;
const MOST_STEPS = 12;
/** Of the window of shifts within which nodes are exact. */
const USED_WINDOW = 0.7;

/** Last bin that a sweep can see, at the end of a block; null where content goes on to the end of a grid that stops early. */
function lastBinOf({ pair, alignment, band }: Found, weigher: NoiseWeigher): number | null {
  const all = UNSEEN_SHARE * Math.min(...alignment.norms);
  const live = Math.max(...[pair.a, pair.b].map((s) => lastLiveBin(s, all, weigher.ceiling)));
  const size = blockSize(live);
  const end = Math.min(pair.a.lastBin, pair.b.lastBin, live - (live % size) + size - 1);
  const full = [pair.a, pair.b].some((s) => s.endsEarly && end > (TOP_PART * s.fLast) / s.dF);
  return full || !(band.fLowHz > 0) || end < 4 * FIRST_BIN || end > MOST_BINS ? null : end;
}

interface Peak {
  readonly delta: number;
  readonly re: number;
  readonly im: number;
}

let columns: FourColumns = [new Float64Array(0), new Float64Array(0), new Float64Array(0), new Float64Array(0)];
let columnsOwner: PairSweep | null = null;
const ownColumns = (owner: typeof columnsOwner): void => void (columnsOwner = owner);

export interface SweptAlignment extends Alignment {
  readonly mismatch: number;
  readonly pair: Pair;
}

/** One pair of waveforms at any mass, from nodes; what it cannot vouch for it leaves to the bins. */
export class PairSweep {
  private standing: Standing;
  private ground: SweepGround;
  private readonly lattice = new AnchorLattice((place) => this.anchorAt(place));
  private readonly grid: LagGrid;
  /** Masses (in seconds a unit) and shifts of the last two points. */
  private seen: (readonly [number, number])[] = [];
  /** Power of both polarisations by that of the response, of a and of b. */
  private readonly shares: readonly number[];

  private constructor(
    private readonly found: Found,
    private readonly kind: SweepKind,
    private readonly last: number,
  ) {
    this.standing = standingOf(found.alignment);
    const stride = found.pair.lagStride;
    this.grid = { stride, size: powerOfTwoFrom((2 * last) / stride) };
    const { pair, alignment } = found;
    this.shares = [pair.a, pair.b].map((s, i) => survey(s, pair.weights).all / alignment.norms[i]!);
    this.ground = this.broken();
    this.seen.push([found.pair.secondsPerUnit[0]!, this.standing.x]);
  }

  static from(found: Found, kind: SweepKind): PairSweep | null {
    const { norms } = found.alignment;
    if (!(norms[0] > 0 && norms[1] > 0)) return null;
    const last = lastBinOf(found, kind.weigher);
    return last === null ? null : new PairSweep(found, kind, last);
  }

  /** Bins in the first file's own unit: a finer pair asks for a new sweep. */
  get dF(): number {
    return this.found.pair.a.dF;
  }

  /** New ground for where the pair stands. */
  private broken(): SweepGround {
    ownColumns(this);
    const { weigher, order, numerics } = this.kind;
    const { pair, band } = this.found;
    const sides = { spectra: [pair.a, pair.b], shares: this.shares, scales: this.standing.scales };
    if (order === null) return new TableGround(this.columns(), this.last, weigher, band, sides, numerics.kinkChange);
    return new CompressedGround(this.columns(), this.last, order, weigher, sides);
  }

  private columns(): BinColumns {
    const { pair } = this.found;
    const end = Math.min(pair.a.lastBin, pair.b.lastBin, this.last + LEAD);
    const n = end - LEAD + 1;
    if (columns[0].length < n) columns = [0, 0, 0, 0].map(() => new Float64Array(Math.ceil(1.1 * n))) as unknown as FourColumns;
    return alignedColumns(pair.a, pair.b, this.kind.response, this.standing, LEAD, end, columns);
  }

  /** Columns of bins stand in arrays that sweeps share: the one that comes back fills them anew. */
  private own(): void {
    if (columnsOwner !== this) this.ground.refill(this.columns());
    ownColumns(this);
  }

  private rangeAt(secondsPerUnit: number, band: Band): ReturnType<typeof rangeFor> {
    const { a, b, secondsPerUnit: own } = this.found.pair;
    const scale = secondsPerUnit / own[0]!;
    return rangeFor([a, b], own.map((s) => ({ secondsPerUnit: s * scale })), band, a.dF / secondsPerUnit, this.kind.numerics, this.last);
  }

  private anchorAt(place: number): LagAnchor | null {
    const { pair, band } = this.found;
    const { response, weigher } = this.kind;
    this.own();
    const range = this.rangeAt(2 ** place, band);
    const delta = this.expected(2 ** place) - this.standing.x;
    return lagAnchor({ a: pair.a, b: pair.b, response, ground: this.ground, standing: this.standing, weigher, range, grid: this.grid, delta });
  }

  /** Where the peak is likely to stand: on the line through the last two. */
  private expected(secondsPerUnit: number): number {
    const [p, q] = this.seen.slice(-2);
    if (p === undefined) return this.standing.x;
    if (q === undefined || q[0] === p[0]) return p[1];
    const line = q[1] + ((q[1] - p[1]) * (secondsPerUnit - q[0])) / (q[0] - p[0]);
    return Math.abs(line - q[1]) < USED_WINDOW * this.ground.window ? line : q[1];
  }

  /** Newton steps on |ẑ|²; the last is taken by the sums it came from, whose third order it leaves out (1e-9 of a thousandth of a cell's step). */
  private climb(lag: NodeLag, start: number): Peak | null {
    const cell = 1 / (this.grid.size * this.grid.stride);
    let delta = start;
    for (let step = 0; step < MOST_STEPS && Math.abs(delta) < this.ground.sight; step++) {
      const d = lag.at(delta);
      const slope = d.re * d.re1 + d.im * d.im1;
      const bend = d.re1 * d.re1 + d.im1 * d.im1 + d.re * d.re2 + d.im * d.im2;
      if (!(bend < 0)) return null;
      const turn = -slope / bend;
      const by = turn / (2 * Math.PI);
      if (Math.abs(by) > 8 * cell) return null;
      delta += by;
      if (Math.abs(by) < 1e-3 * cell)
        return { delta, re: d.re + turn * (d.re1 + 0.5 * turn * d.re2), im: d.im + turn * (d.im1 + 0.5 * turn * d.im2) };
    }
    return null;
  }

  /** The highest hill, if it can be told from the others; null where only the bins can tell. */
  private highest(lag: NodeLag, band: NodeBand, range: BinRange, { bracket, share }: HeldBracket, seconds: number, scale: number): Peak | null {
    const peak = this.climb(lag, this.expected(seconds) - this.standing.x);
    const [sa, sb] = this.standing.scales;
    const certified = peak === null ? null : this.certified(peak, lag, scale, bracket, this.ground.distance(band, range, scale / (sa * sb), bracket, share));
    this.lattice.note(Math.log2(seconds), certified !== null);
    return certified;
  }

  private certified(peak: Peak, lag: NodeLag, scale: number, bracket: Bracket, distance: number): Peak | null {
    const rise = riseBetween(bracket, this.grid);
    const heightOf = ({ re, im }: { readonly re: number; readonly im: number }): number => Math.hypot(re, im) / scale;
    let best = peak;
    const others = rivals(bracket, this.grid, heightOf(peak), distance + rise, this.standing.x + peak.delta);
    if (others === null) return null;
    const heights = others.length > 0 ? lag.heights(Math.max(...others.map((other) => Math.abs(peak.delta + other)))) : null;
    for (const other of others) {
      const delta = peak.delta + other;
      if (Math.abs(delta) > this.ground.sight) return null;
      if (heights!.at(delta) / scale < heightOf(peak) - rise - HEIGHT_ROOM) continue;
      const top = this.climb(lag, delta);
      if (top === null) return null;
      if (heightOf(top) > heightOf(best)) best = top;
    }
    return best;
  }

  /**
   * The match at one mass from nodes.
   * Shape:  one outcome; null where the bins must decide.
   * Units:  as the outcome's.
   * Error:  1e-13 of a match, of a mismatch's own size where the two are alike.
   * Fails:  null: edges that these bins do not resolve, a hill that may not be the highest, no power.
   * Source: engine design (compressed nodes, certificate of the global maximum).
   */
  outcomeAt(request: MatchRequest): SweptAlignment | null {
    const { freedom } = this.kind;
    const seconds = request.a.secondsPerUnit;
    const range = this.rangeAt(seconds, request.band);
    // Anchors are made before the band of the mass itself: both are weighed in the same arrays.
    const held = freedom.time ? this.lattice.around(Math.log2(seconds)) : null;
    if (freedom.time && held === null) return null;
    this.own();
    const band = this.ground.weigh(range);
    if (band === null) return null;
    const [normA, normB, gapOfNorms] = nodeNorms(band);
    if (!(normA > 0 && normB > 0) || !this.ground.isSettled(band, [normA, normB])) return null;
    const pair: Pair = { ...this.found.pair, secondsPerUnit: [seconds, request.b.secondsPerUnit], weights: { ...this.found.pair.weights, dfHz: range.dfHz } };
    const lag = new NodeLag(band);
    const [rootA, rootB] = [Math.sqrt(normA), Math.sqrt(normB)];
    const peak = held === null ? this.unmoved(lag, pair) : this.highest(lag, band, range, held, seconds, rootA * rootB);
    if (peak === null || Math.abs(peak.delta) > this.ground.window) return null;
    const turnRad = freedom.turn ? Math.atan2(peak.im, peak.re) : 0;
    const gap = -gapOfNorms / (rootA * rootB * (rootA + rootB));
    const mismatch = nodeResidual(band, { scaleA: 1 / rootA, scaleB: 1 / rootB, gap, delta: peak.delta, turnRad }) / 2;
    const x = this.standing.x + peak.delta;
    const turn = this.standing.turnRad + turnRad;
    const [sa, sb] = this.standing.scales;
    const norms = [normA / (sa * sa), normB / (sb * sb)] as const;
    this.seen = [...this.seen.slice(-1), [seconds, x]];
    if (Math.abs(peak.delta) > USED_WINDOW * this.ground.window) this.stand({ x, turnRad: turn, scales: [1 / Math.sqrt(norms[0]), 1 / Math.sqrt(norms[1])] });
    return { value: 1 - mismatch, mismatch, x, turnRad: freedom.turn ? Math.atan2(Math.sin(turn), Math.cos(turn)) : 0, norms, pair };
  }

  private unmoved(lag: NodeLag, pair: Pair): Peak | null {
    const delta = xOfShift(pair, 0) - this.standing.x;
    if (Math.abs(delta) > this.ground.window) return null;
    const { re, im } = lag.at(delta);
    return { delta, re, im };
  }

  /** A point that the bins found on these bins: where to look next, on another hill if it was another. */
  saw({ pair, alignment }: Found): void {
    if (pair.a.dF !== this.dF) return;
    this.seen = [...this.seen.slice(-1), [pair.secondsPerUnit[0]!, alignment.x]];
    if (Math.abs(alignment.x - this.standing.x) < USED_WINDOW * this.ground.window || !(alignment.norms[0] > 0 && alignment.norms[1] > 0)) return;
    this.seen = this.seen.slice(-1);
    this.stand(standingOf(alignment));
  }

  /** Makes the pair alike anew where the peak has moved far. */
  private stand(standing: Standing): void {
    this.standing = standing;
    this.ground = this.broken();
  }
}
