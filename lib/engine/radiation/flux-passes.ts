import type { ModeProduct } from './mode-products';

/** One left factor X_a with up to three partners Y_b, read once for the rates they go to. */
export interface Pass {
  readonly a: number;
  /** One that is not there is the first, of which nothing is taken. */
  readonly partners: readonly [number, number, number];
  /** What the rates take of ℜ and of ℑ X_a Y_b*. */
  readonly real: Float64Array;
  readonly imaginary: Float64Array;
  /** Places in the list of rates; null where that half of the products is not wanted. */
  readonly toReal: number | null;
  readonly toImaginary: number | null;
}

type Half = 're' | 'im';

/**
 * How much of ℜ or ℑ of X_a Y_b* a rate takes, by left factor and partner. Where both factors are the same series,
 * X_b X_a* is the conjugate of X_a X_b*, so that a pair met both ways is read once.
 */
function takenOf(products: readonly ModeProduct[], half: Half, alike: boolean): Map<number, Map<number, number>> {
  const taken = new Map<number, Map<number, number>>();
  const mirror = half === 're' ? 1 : -1;
  for (const { a, b, re, im } of products) {
    const c = half === 're' ? re : -im;
    if (c === 0) continue;
    const met = alike && a !== b ? taken.get(b)?.get(a) : undefined;
    if (met !== undefined) taken.get(b)!.set(a, met + mirror * c);
    else {
      const partners = taken.get(a) ?? new Map<number, number>();
      taken.set(a, partners.set(b, (partners.get(b) ?? 0) + c));
    }
  }
  return taken;
}

/** One rate's half of the products of one left factor. */
interface HalfPass {
  readonly a: number;
  readonly half: Half;
  readonly place: number;
  readonly taken: ReadonlyMap<number, number>;
}

const halvesOf = (components: readonly (readonly ModeProduct[])[], alike: boolean): HalfPass[] =>
  components.flatMap((products, place) => (['re', 'im'] as const).flatMap((half) => [...takenOf(products, half, alike)].map(([a, taken]) => ({ a, half, place, taken }))));

const samePartners = (p: ReadonlyMap<number, number>, q: ReadonlyMap<number, number>): boolean => p.size === q.size && [...p.keys()].every((b) => q.has(b));

/**
 * How several rates are read off a set of modes: in few passes, each over one left factor.
 * Shape:  a real and an imaginary half with the same factors are one pass; three partners a pass for two rates, two for one.
 * Units:  those of the coefficients.
 * Error:  rounding.
 * Fails:  never; a list without products needs no pass.
 * Source: definition of a product; Σ_b c_b X_a Y_b* = X_a (Σ_b c_b* Y_b)*.
 */
export function passesOf(components: readonly (readonly ModeProduct[])[], alike: boolean): Pass[] {
  const open = halvesOf(components, alike);
  const passes: Pass[] = [];
  for (let one = open.shift(); one !== undefined; one = open.shift()) {
    const { a, half, taken } = one;
    const at = open.findIndex((other) => other.a === a && other.half !== half && samePartners(taken, other.taken));
    const two = at < 0 ? null : open.splice(at, 1)[0]!;
    const [real, imaginary] = half === 're' ? [one, two] : [two, one];
    const most = two === null ? 2 : 3;
    const all = [...taken.keys()];
    for (let k = 0; k < all.length; k += most) {
      const some = all.slice(k, k + most);
      const takenBy = (part: HalfPass | null): Float64Array => Float64Array.from({ length: 3 }, (_, i) => part?.taken.get(some[i] ?? -1) ?? 0);
      const partners = [some[0]!, some[1] ?? some[0]!, some[2] ?? some[0]!] as const;
      passes.push({ a, partners, real: takenBy(real), imaginary: takenBy(imaginary), toReal: real?.place ?? null, toImaginary: imaginary?.place ?? null });
    }
  }
  return passes;
}
