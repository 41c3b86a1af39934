import type { Bracket } from './anchor-certificate';
import type { BinRange } from './bin-weights';
import type { BinColumns } from './compressed-bins';
import type { NodeBand } from './node-band';

/** What the points of a sweep are read from, for one standing of the pair. `Mark` is what it wants to know of an anchor later. */
export interface SweepGround<Mark = unknown> {
  /** Shifts to either side, in cycles per bin: where sums are exact, and where heights are good enough to be compared. */
  readonly window: number;
  readonly sight: number;
  /** Columns of the same bins again, after another sweep had their arrays. */
  refill(columns: BinColumns): void;
  /** The band at one mass; null where it cannot be read. Valid until the next one. */
  weigh(range: BinRange): NodeBand | null;
  /** Are norms so weighed as good as those of a point alone? */
  isSettled(band: NodeBand, norms: readonly [number, number]): boolean;
  /** Of ‖a‖‖b‖, by how much its sums may differ from those over bins at an anchor. */
  agreement(range: BinRange): number;
  /** `norm` is ‖a‖‖b‖ of the spectra as they are. */
  mark(band: NodeBand, range: BinRange, norm: number): Mark;
  /** How far the normalised product can lie, at any lag, from the mean of those at two anchors. */
  distance(band: NodeBand, range: BinRange, norm: number, bracket: Bracket<Mark>, share: number): number;
}
