import { bracketOf, type Bracket } from './anchor-certificate';
import type { LagAnchor } from './lag-anchor';

/** Anchors in a doubling of the mass: coarse brackets, and how often one may be halved where it certifies nothing. */
const COARSE = 2;
const FINEST = 8;
/** A coarse bracket that failed so often is left to the bins. */
const MOST_MISSES = 5;
const MOST_KEPT = 8;

interface CoarseBracket {
  density: number;
  misses: number;
}

export interface HeldBracket {
  readonly bracket: Bracket;
  /** Where between its anchors the mass stands, from 0 to 1. */
  readonly share: number;
}

function keep<T>(map: Map<number, T>, key: number, value: T): T {
  if (map.size >= MOST_KEPT) map.delete([...map.keys()][0]!);
  map.set(key, value);
  return value;
}

/** Anchors at fixed masses, whatever is asked for, and the brackets between them; denser where the bound over a bracket is too wide. */
export class AnchorLattice {
  private readonly anchors = new Map<number, LagAnchor | null>();
  private readonly brackets = new Map<string, Bracket | null>();
  private readonly coarse = new Map<number, CoarseBracket>();
  /** Density that served last. */
  private served = COARSE;

  /** `anchorAt` takes log₂ of the mass in seconds a unit. */
  constructor(private readonly anchorAt: (place: number) => LagAnchor | null) {}

  private coarseAt(place: number): CoarseBracket {
    const index = Math.floor(place * COARSE);
    return this.coarse.get(index) ?? keep(this.coarse, index, { density: this.served, misses: 0 });
  }

  private anchor(fine: number): LagAnchor | null {
    const known = this.anchors.get(fine);
    return known !== undefined ? known : keep(this.anchors, fine, this.anchorAt(fine / FINEST));
  }

  /** Null where anchors are not to be had, or were of no use. */
  around(place: number): HeldBracket | null {
    const { density, misses } = this.coarseAt(place);
    if (misses >= MOST_MISSES) return null;
    const index = Math.floor(place * density);
    const key = `${density},${index}`;
    let bracket = this.brackets.get(key);
    if (bracket === undefined) {
      const [low, high] = [this.anchor((index * FINEST) / density), this.anchor(((index + 1) * FINEST) / density)];
      bracket = low === null || high === null ? null : bracketOf(low, high);
      if (this.brackets.size >= MOST_KEPT) this.brackets.delete([...this.brackets.keys()][0]!);
      this.brackets.set(key, bracket);
    }
    return bracket === null ? null : { bracket, share: place * density - index };
  }

  /** What the last bracket at a place was good for. */
  note(place: number, certified: boolean): void {
    const coarse = this.coarseAt(place);
    if (certified) this.served = coarse.density;
    else {
      coarse.misses++;
      coarse.density = Math.min(FINEST, 2 * coarse.density);
    }
  }
}
