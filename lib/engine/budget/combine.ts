import { coverageFactor } from './student';

/** One contribution to an uncertainty: c·u, signed where a cause in common may lift one number and lower another. */
export interface Term {
  readonly u: number;
  /** How well u itself is known; absent where it is taken as exact. */
  readonly degreesOfFreedom?: number | undefined;
}

export interface Combined {
  readonly u: number;
  /** Welch–Satterthwaite; infinite where every term's own are. */
  readonly degreesOfFreedom: number;
  readonly coverageFactor: number;
  /** k·u. */
  readonly expanded: number;
  /** Parts of the variance, adding up to one; all zero where nothing is uncertain. Correlated terms of opposite sign may have a negative part. */
  readonly shares: readonly number[];
}

export type Correlation = (i: number, j: number) => number;

const independent: Correlation = () => 0;

/** Terms that hang together through correlations count as one in the degrees of freedom, with the fewest among them. */
function clusters(n: number, correlation: Correlation): number[] {
  const cluster = Array.from({ length: n }, (_, i) => i);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) {
      if (correlation(i, j) === 0 || cluster[i] === cluster[j]) continue;
      const [from, to] = [cluster[i]!, cluster[j]!];
      cluster.forEach((c, k) => c === from && (cluster[k] = to));
    }
  }
  return cluster;
}

function effectiveFreedom(terms: readonly Term[], shares: readonly number[], correlation: Correlation): number {
  const groups = new Map<number, { share: number; freedom: number }>();
  clusters(terms.length, correlation).forEach((cluster, i) => {
    const group = groups.get(cluster) ?? { share: 0, freedom: Infinity };
    groups.set(cluster, { share: group.share + shares[i]!, freedom: Math.min(group.freedom, terms[i]!.degreesOfFreedom ?? Infinity) });
  });
  return 1 / [...groups.values()].reduce((sum, { share, freedom }) => sum + share ** 2 / freedom, 0);
}

/**
 * The law of propagation: u² = Σ uᵢ² + 2 Σ rᵢⱼ uᵢ uⱼ, with effective degrees of freedom and the factor they ask for.
 * Shape:  any number of terms; a correlation is asked for every pair of different ones.
 * Units:  those of the terms.
 * Error:  none; a variance below zero by rounding is zero.
 * Fails:  never; a term that is not finite makes the whole not finite.
 * Source: JCGM 100:2008, equations 16 and G.2b.
 */
export function combine(terms: readonly Term[], correlation: Correlation = independent): Combined {
  const parts = terms.map((term, i) => terms.reduce((sum, other, j) => sum + (i === j ? 1 : correlation(i, j)) * term.u * other.u, 0));
  const variance = parts.reduce((sum, part) => sum + part, 0);
  if (!(variance > 0)) {
    const u = Number.isNaN(variance) ? Number.NaN : 0;
    return { u, degreesOfFreedom: Infinity, coverageFactor: 2, expanded: u, shares: terms.map(() => 0) };
  }
  const shares = parts.map((part) => part / variance);
  const degreesOfFreedom = effectiveFreedom(terms, shares, correlation);
  const k = coverageFactor(degreesOfFreedom);
  const u = Math.sqrt(variance);
  return { u, degreesOfFreedom, coverageFactor: k, expanded: k * u, shares };
}

/** Of what a contribution speaks: its component and the curve or run that it comes from. */
export interface Origin {
  /** Component, e.g. `E05`. */
  readonly id: string;
  /** Name of the curve (E01–E04) or of the simulation (E05–E08). */
  readonly from: string;
}

/** Components whose error is one and the same wherever a curve or a simulation is used again. */
const SHARED = new Set(['E01', 'E02', 'E03', 'E04', 'E05', 'E06', 'E07', 'E08']);

/** 1 for the same component of the same curve or simulation, else 0 (domain reference 5.2). */
export const sharedCorrelation = (origins: readonly Origin[]): Correlation => (i, j) => {
  const [p, q] = [origins[i]!, origins[j]!];
  return p.id === q.id && p.from === q.from && SHARED.has(p.id) ? 1 : 0;
};
