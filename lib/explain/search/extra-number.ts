import type { ExtraNumber } from '../candidate';
import { extraNumberSentence } from '../words/extra-number-sentence';
import type { JudgedClaim } from './node';
import { onScale, widthOnScale } from './scaled-claim';

/** One reading along the free parameter; null where it gives nothing. */
export interface ReadingOnGrid {
  /** The candidate's id; null for the declared settings. */
  readonly candidate: string | null;
  /** Its clause; empty for the declared settings. */
  readonly clause: string;
  readonly values: readonly (number | null)[];
  /** U of each value, in its own unit. */
  readonly expandedUncertainties: readonly (number | null)[];
}

export interface ClaimOnGrid {
  /** Title of the quantity: `Match`. */
  readonly title: string;
  /** Unit of the number; empty for a pure one. */
  readonly unit: string;
  readonly scale: JudgedClaim['scale'];
  /** T of a number printed as finely as the claim's, on the scale: what nobody would call apart. */
  readonly tolerance: number;
  /** The free parameter, its unit and the values looked at. */
  readonly setting: string;
  readonly settingUnit: string;
  readonly grid: readonly number[];
  /** Values of the parameter at which the claim states a number already. */
  readonly stated: readonly number[];
  /** The declared settings first, then the leading candidates in their order. */
  readonly readings: readonly ReadingOnGrid[];
}

/** Below this the number could fall so that it fits both. */
const LEAST_APART = 2;

type Pair = readonly [ReadingOnGrid, ReadingOnGrid];

/** Distance of two readings in units of what they and the claim cannot tell; null where one gives nothing. */
function apartAt({ scale, tolerance }: ClaimOnGrid, [p, q]: Pair, k: number): number | null {
  const [a, b] = [p, q].map(({ values, expandedUncertainties }) => {
    const value = values[k] ?? null;
    return value === null ? null : { y: onScale(scale, value), u: widthOnScale(scale, expandedUncertainties[k] ?? 0, value) };
  });
  if (!a || !b || !Number.isFinite(a.y) || !Number.isFinite(b.y)) return null;
  const unit = tolerance + Math.hypot(a.u, b.u);
  return unit > 0 ? Math.abs(a.y - b.y) / unit : null;
}

const pairsAmong = (readings: readonly ReadingOnGrid[]): Pair[] => readings.flatMap((p, i) => readings.slice(i + 1).map((q): Pair => [p, q]));

/** The place where the least distance among the readings is largest; of places alike the first. */
function bestPlace(claim: ClaimOnGrid, readings: readonly ReadingOnGrid[]): { readonly k: number; readonly apart: number } | null {
  const places = claim.grid.flatMap((at, k) => {
    if (claim.stated.some((given) => Math.abs(given - at) <= 1e-9 * Math.abs(at))) return [];
    const distances = pairsAmong(readings).map((pair) => apartAt(claim, pair, k));
    return distances.length === 0 || distances.includes(null) ? [] : [{ k, apart: Math.min(...(distances as number[])) }];
  });
  return places.reduce<{ k: number; apart: number } | null>((best, place) => (best === null || place.apart > best.apart ? place : best), null);
}

/**
 * The one further number that would tell the leading candidates apart: all of them and the declared settings where one
 * place does that, else the candidates alone, else the first two. Null where no place does.
 */
export function extraNumber(claim: ClaimOnGrid): ExtraNumber | null {
  const [declared, ...candidates] = claim.readings;
  if (!declared || candidates.length === 0) return null;
  const wanted = [claim.readings, candidates, candidates.slice(0, 2), [declared, candidates[0]!]].filter(({ length }) => length > 1);
  for (const readings of wanted) {
    const place = bestPlace(claim, readings);
    if (place !== null && place.apart >= LEAST_APART) return numberAt(claim, place.k, place.apart);
  }
  return null;
}

function numberAt(claim: ClaimOnGrid, k: number, apart: number): ExtraNumber {
  const predictions = claim.readings.flatMap(({ candidate, clause, values, expandedUncertainties }) => {
    const value = values[k] ?? null;
    return value === null ? [] : [{ candidate, clause, value, expandedUncertainty: expandedUncertainties[k] ?? null }];
  });
  return {
    setting: claim.setting,
    at: claim.grid[k]!,
    unit: claim.settingUnit,
    predictions: predictions.map(({ clause: _, ...prediction }) => prediction),
    apart: Number(apart.toPrecision(3)),
    sentence: extraNumberSentence(claim, claim.grid[k]!, predictions),
  };
}
