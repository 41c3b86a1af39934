import type { Finding } from '@/lib/engine/contract/finding';
import type { Measurement, MeasuredPoint } from '@/lib/engine/contract/measurement';
import type { MeasureRequest } from '@/lib/engine/contract/quantity';
import { samePlace, type Place } from '@/lib/kernel/place';

/** Looks that the search for the points that stop may take; a sweep with more of them is stopped as a whole. */
const MOST_LOOKS = 120;

const isStop = ({ level }: Finding): boolean => level === 'stops-lodging';

/** Does something stop this point: all of the claim, or just here? */
export const stopsAt = (findings: readonly Finding[], at: Place): boolean => findings.some((finding) => isStop(finding) && (finding.at === undefined || samePlace(finding.at, at)));

export const isStopped = ({ findings }: Measurement): boolean => findings.some(isStop);

/** Some points of a sweep, as a claim of their own. */
export function onlyPoints(request: MeasureRequest, indices: readonly number[]): MeasureRequest {
  const { over, claimed } = request;
  if (over === null) return request;
  return { ...request, over: { ...over, values: indices.flatMap((i) => over.values[i] ?? []) }, claimed: indices.map((i) => claimed[i] ?? null) };
}

/**
 * Which points of a stopped sweep stop by themselves, by halves: whoever is not stopped together need not be asked alone.
 * Shape:  what stops each such point, by its index.
 * Units:  none.
 * Error:  none: looks of route A alone decide.
 * Fails:  null where every point stops, or where it takes too many looks to tell: the sweep is then stopped as a whole.
 * Source: ours: unknown at one point says nothing of the others.
 */
export function stoppedPoints(request: MeasureRequest, look: (request: MeasureRequest) => Measurement): ReadonlyMap<number, readonly Finding[]> | null {
  const stopped = new Map<number, readonly Finding[]>();
  const n = request.over?.values.length ?? 1;
  const middle = n >> 1;
  const waiting = n < 2 ? [] : [range(0, middle), range(middle, n)];
  let looks = 0;
  // What is cut in half joins the end of the list that is walked.
  for (const indices of waiting) {
    if (looks++ === MOST_LOOKS) return null;
    const found = look({ ...onlyPoints(request, indices), withFigures: false, routeAOnly: true });
    if (!isStopped(found)) continue;
    const [only, ...others] = indices;
    if (only !== undefined && others.length === 0) stopped.set(only, found.findings.filter(isStop));
    else waiting.push(indices.slice(0, indices.length >> 1), indices.slice(indices.length >> 1));
  }
  return stopped.size === 0 || stopped.size === n ? null : stopped;
}

const range = (from: number, to: number): number[] => Array.from({ length: to - from }, (_, k) => from + k);

const noPoint = (at: Place): MeasuredPoint => ({ at, value: null, routes: { A: null, B: null }, expandedUncertainty: null });

/**
 * A sweep from the points that could be measured and those that stop, each in its place with its sentence.
 * Shape:  as many points as places.
 * Units:  those of the measurement.
 * Error:  that of the measurement.
 * Fails:  never; a stopped point is null.
 * Source: ours.
 */
export function withStoppedPoints(rest: Measurement, places: readonly Place[], stopped: ReadonlyMap<number, readonly Finding[]>): Measurement {
  const measured = range(0, places.length).filter((i) => !stopped.has(i));
  const sentences = places.flatMap((at, i) => (stopped.get(i) ?? []).map((finding): Finding => ({ ...finding, at })));
  return {
    ...rest,
    points: places.map((at, i) => (stopped.has(i) ? noPoint(at) : (rest.points[measured.indexOf(i)] ?? noPoint(at)))),
    routeBPoints: rest.routeBPoints.flatMap((k) => measured[k] ?? []),
    findings: [...sentences, ...rest.findings],
  };
}
