import type { BestTemplate, MatchOutcome, MatchRequest, Side, TemplateRequest } from '../../contract/route';

/** A pair searched over a few masses, and from one mass uphill; both by this route's own means. */
export interface PairSearch {
  /** The match at each factor, to a few parts in ten thousand. */
  readonly look: (pair: MatchRequest, factors: readonly number[]) => readonly number[];
  /** The outcome at the top of the hill between two factors. */
  readonly climb: (pair: MatchRequest, low: number, high: number) => MatchOutcome;
  /** Everything free, as `match`. */
  readonly whole: (pair: MatchRequest) => MatchOutcome;
}

/** Steps in ln of the factor: a hill is about as wide as one part in the cycles that the band holds. */
const [FINEST, COARSEST, IN_CYCLES] = [0.02, 0.08, 2];
/** What a look may be off by. */
const LOOK = 1e-3;
/** Starting points that a search from several starts would take; more only where they could matter. */
const MOST_STARTS = 3;

interface Start {
  readonly index: number;
  readonly low: number;
  readonly high: number;
  /** Not surpassed inside the two neighbouring steps. */
  readonly ceiling: number;
}

function factorsFor(pair: MatchRequest): number[] {
  const { b, band, templateMassRange: [low, high] } = pair;
  const { axis } = b.waveform;
  const cycles = (axis[axis.length - 1]! - axis[0]!) * b.secondsPerUnit * band.fLowHz;
  const step = Math.min(COARSEST, Math.max(FINEST, IN_CYCLES / cycles));
  const n = Math.max(2, Math.ceil(Math.log(high / low) / step));
  return Array.from({ length: n + 1 }, (_, i) => (i === 0 ? low : i === n ? high : low * (high / low) ** (i / n)));
}

function startsOf(index: number, factors: readonly number[], values: readonly number[]): Start[] {
  return values
    .map((value, i): Start & { readonly value: number } => {
      const [before, after] = [values[i - 1] ?? value, values[i + 1] ?? value];
      const low = factors[Math.max(0, i - 1)]!;
      const high = factors[Math.min(factors.length - 1, i + 1)]!;
      return { index, low, high, value: value >= before && value >= after ? value : -1, ceiling: value + (value - Math.min(before, after)) + LOOK };
    })
    .filter(({ value }) => value >= 0)
    .sort((p, q) => q.value - p.value)
    .slice(0, MOST_STARTS);
}

function bestByClimbing(a: Side, request: TemplateRequest, search: PairSearch, onStep: (share: number) => void): BestTemplate {
  const { templates, onStep: _, ...shared } = request;
  const pairs = templates.map((b): MatchRequest => ({ ...shared, a, b }));
  const starts = pairs.flatMap((pair, index) => {
    onStep(index / pairs.length);
    const factors = factorsFor(pair);
    return startsOf(index, factors, search.look(pair, factors));
  });
  let best: BestTemplate | null = null;
  for (const { index, low, high, ceiling } of starts.sort((p, q) => q.ceiling - p.ceiling)) {
    if (best !== null && !(ceiling > best.outcome.match)) break;
    const outcome = search.climb(pairs[index]!, low, high);
    if (best === null || outcome.match > best.outcome.match) best = { index, outcome };
  }
  return best ?? { index: 0, outcome: search.whole(pairs[0]!) };
}

/**
 * The best template of each signal: pair by pair, and where a mass is free by climbing from the best of a few masses.
 * Shape:  one answer a signal.
 * Units:  as `match`.
 * Error:  as `match`; a hill narrower than the steps can be missed, which then shows as a difference of the routes.
 * Fails:  never.
 * Source: domain reference, Q04, route B.
 */
export function bestTemplatesByClimbing(signals: readonly Side[], request: TemplateRequest, search: PairSearch): BestTemplate[] {
  const { maximise } = request;
  const massAlone = maximise.includes('templateMass') && !maximise.includes('inclination') && request.response !== 'complex';
  const told = (s: number) => (share: number): void => request.onStep?.((s + share) / signals.length);
  return signals.map((a, s) => {
    if (massAlone) return bestByClimbing(a, request, search, told(s));
    const { templates, onStep: _, ...shared } = request;
    const outcomes = templates.map((b, i) => {
      told(s)(i / templates.length);
      return search.whole({ ...shared, a, b });
    });
    const index = outcomes.reduce((top, { match }, i) => (match > outcomes[top]!.match || Number.isNaN(outcomes[top]!.match) ? i : top), 0);
    return { index, outcome: outcomes[index]! };
  });
}
