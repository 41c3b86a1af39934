import type { ReadAgainst } from '@/app/_ui/math/format-uncertainty';
import { samePlace, type Place } from '@/lib/kernel/place';
import type { ResultClaim, ResultPoint } from '@/lib/pipeline/result';
import type { VariationChanges } from '@/lib/services/variations/variation-view';
import { toleranceInUnit } from './varied-number';

/** One place of a claim: the official number, the varied one, and how far they are apart. */
export interface ComparedPoint {
  readonly at: Place;
  readonly official: Pick<ResultPoint, 'value' | 'expandedUncertainty'> | null;
  readonly varied: Pick<ResultPoint, 'value' | 'expandedUncertainty'> | null;
  /** Varied − official, or the logarithm of their ratio on that scale; null where either is missing. */
  readonly apart: number | null;
  /** T of the official number in its own unit, and the distance in it: the digits both are read to. */
  readonly against: ReadAgainst;
  /** The same in units of the official T; null where there is none. */
  readonly inTolerances: number | null;
}

/** Where a swept setting was given one value, that value is the place. */
function placeOf(point: ResultPoint, official: ResultClaim, changes: VariationChanges): Place {
  if (Object.keys(point.at).length > 0) return point.at;
  const [name] = Object.keys(official.points[0]?.at ?? {});
  const given = name === undefined ? undefined : changes.settings?.[name];
  const value = typeof given === 'object' && given !== null ? Object.values(given)[0] : given;
  return name !== undefined && (typeof value === 'number' || typeof value === 'string') ? { [name]: value } : point.at;
}

const difference = (varied: number, official: number, scale: 'absolute' | 'ln'): number => (scale === 'ln' ? Math.log(varied / official) : varied - official);

function compared(at: Place, official: ResultPoint | undefined, varied: ResultPoint | undefined, scale: 'absolute' | 'ln'): ComparedPoint {
  const raw = official && varied && official.value !== null && varied.value !== null ? difference(varied.value, official.value, scale) : null;
  const apart = raw !== null && Number.isFinite(raw) ? raw : null;
  const tolerance = official?.tolerance ?? null;
  const against = { tolerance: toleranceInUnit(tolerance ?? varied?.tolerance ?? null, scale, official?.value ?? varied?.value ?? null), apart: official?.value != null && varied?.value != null ? varied.value - official.value : null };
  return { at, official: official ?? null, varied: varied ?? null, apart, against, inTolerances: apart !== null && tolerance !== null && tolerance > 0 ? apart / tolerance : null };
}

/** Every place of either, those of the variation first to last, then what only the official run has. */
export function comparePoints(official: ResultClaim, varied: ResultClaim | null, changes: VariationChanges, scale: 'absolute' | 'ln'): readonly ComparedPoint[] {
  const both = (varied?.points ?? []).map((point) => {
    const at = placeOf(point, official, changes);
    return compared(at, official.points.find((p) => samePlace(p.at, at)), point, scale);
  });
  const met = (at: Place): boolean => both.some((point) => samePlace(point.at, at));
  const oneOfMany = varied !== null && varied.points.length < official.points.length;
  return [...both, ...(oneOfMany && both.some((p) => p.official) ? [] : official.points.filter((p) => !met(p.at)).map((p) => compared(p.at, p, undefined, scale)))];
}
