import { describe, expect, it } from 'vitest';
import type { Finding } from '@/lib/engine/contract/finding';
import type { Measurement } from '@/lib/engine/contract/measurement';
import { notComputable, type MeasureRequest } from '@/lib/engine/contract/quantity';
import { sweepFigure } from '@/lib/engine/quantities/sweep-figure';
import { onlyPoints, stoppedPoints, stopsAt, withStoppedPoints } from '@/lib/pipeline/stopped-points';

const sweep = (values: readonly number[]): MeasureRequest => ({ claimId: 'C', inputs: { of: {}, noise: null }, settings: {}, over: { setting: 'startM', values }, claimed: values.map(() => 1), withFigures: false });
const late = (value: number): Finding => ({ code: 'engine/no-signal', level: 'stops-lodging', where: 'A', text: `Nothing after ${value} M.` });
const placesOf = ({ over }: MeasureRequest) => (over?.values ?? []).map((value) => ({ startM: value }));

/** Stops as the engine does: one point too late, and none of the sweep has a number. */
function stopping(after: number) {
  const asked: number[] = [];
  const measure = (request: MeasureRequest): Measurement => {
    const values = (request.over?.values ?? []) as readonly number[];
    asked.push(values.length);
    const beyond = values.filter((value) => value > after);
    if (beyond.length > 0) return notComputable(beyond.map(late), placesOf(request));
    const points = values.map((value, i) => ({ at: { startM: value }, value: 1 + value, routes: { A: 1 + value, B: request.claimed[i] ?? null }, expandedUncertainty: 1e-6 }));
    return { points, budget: [], findings: [], assumed: [], settings: [], routeBPoints: values.map((_, i) => i), figures: [] };
  };
  return { measure, asked };
}

describe('a sweep of which some points stop', () => {
  it('keeps the numbers of the others in their places, and a sentence where there is none', () => {
    const request = sweep([10, 900, 20, 30, 800]);
    const { measure } = stopping(100);
    const stopped = stoppedPoints(request, measure) ?? new Map<number, readonly Finding[]>();
    expect([...stopped.keys()].sort()).toEqual([1, 4]);
    const whole = withStoppedPoints(measure(onlyPoints(request, [0, 2, 3])), placesOf(request), stopped);
    expect(whole.points.map(({ value }) => value)).toEqual([11, null, 21, 31, null]);
    expect(whole.routeBPoints).toEqual([0, 2, 3]);
    expect(whole.findings.map(({ at, text }) => [at, text])).toEqual([[{ startM: 900 }, 'Nothing after 900 M.'], [{ startM: 800 }, 'Nothing after 800 M.']]);
    expect(placesOf(request).map((at) => stopsAt(whole.findings, at))).toEqual([false, true, false, false, true]);
    const [figure] = sweepFigure({ unit: '' }, request, whole.points);
    expect(figure?.title).toBe('Value over startM; no number at 800, 900');
  });
  it('is looked at by halves: one of a thousand is found in some twenty looks', () => {
    const { measure, asked } = stopping(998.5);
    expect([...(stoppedPoints(sweep(Array.from({ length: 1000 }, (_, i) => i)), measure)?.keys() ?? [])]).toEqual([999]);
    expect(asked.length).toBeLessThan(25);
  });
  it('stops as a whole where all points do, and where it takes too long to tell', () => {
    expect(stoppedPoints(sweep([200, 300, 400]), stopping(100).measure)).toBeNull();
    const { measure, asked } = stopping(0.5);
    expect(stoppedPoints(sweep(Array.from({ length: 2000 }, (_, i) => i)), measure)).toBeNull();
    expect(asked.length).toBeLessThanOrEqual(120);
  });
  it('and a stop that names no point is one of the whole claim', () => expect(stopsAt([late(1)], { startM: 5 })).toBe(true));
});
