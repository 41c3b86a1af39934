import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { axisScale } from '@/app/_ui/charts/axis-scale';
import { readPlaces, readRanges, writePlaces, writeRanges } from '@/app/_ui/charts/view-address';
import { followed, shownRange, zoomedBy, type Range } from '@/app/_ui/charts/zoom';

const linear = { scale: axisScale('linear', [0, 10]), whole: [0, 10] as Range };
const log = { scale: axisScale('log', [10, 1000]), whole: [10, 1000] as Range };
const close = (range: Range | null, expected: Range) => {
  expect(range?.[0]).toBeCloseTo(expected[0], 9);
  expect(range?.[1]).toBeCloseTo(expected[1], 9);
};

describe('a view of an axis', () => {
  it('halves about the cursor, which stays where it is', () => {
    close(zoomedBy(0.5, 5, null, linear), [2.5, 7.5]);
    close(zoomedBy(0.5, 0, null, linear), [0, 5]);
    close(zoomedBy(0.5, 2.5, [0, 5], linear), [1.25, 3.75]);
  });
  it('halves by powers on a log axis', () => close(zoomedBy(0.5, 100, null, log), [10 ** 1.5, 10 ** 2.5]));
  it('is the whole axis again when it has become that wide, and never wider', () => {
    expect(zoomedBy(2, 5, [2.5, 7.5], linear)).toBeNull();
    expect(zoomedBy(2, 5, null, linear)).toBeNull();
    close(zoomedBy(2, 1, [1, 3], linear), [1, 5]);
  });
  it('moves along with a cursor that leaves it', () => {
    close(followed(8, [2, 4], linear), [6, 8]);
    close(followed(1, [2, 4], linear), [1, 3]);
    expect(followed(3, [2, 4], linear)).toEqual([2, 4]);
  });
  it('from an address is brought inside the axis, or is none', () => {
    close(shownRange([-5, 5], linear), [0, 5]);
    expect(shownRange([20, 30], linear)).toBeNull();
    expect(shownRange([5, 5], linear)).toBeNull();
    expect(shownRange([-1, 11], linear)).toBeNull();
    expect(shownRange([-3, -1], log)).toBeNull();
  });
  it('always rises and stays inside, however often it is zoomed and wherever', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(fc.constantFrom(0.5, 2), fc.double({ min: 0, max: 10, noNaN: true })), { maxLength: 60 }), (steps) => {
        let range: Range | null = null;
        for (const [factor, about] of steps) {
          range = zoomedBy(factor, about, range, linear);
          if (range) expect(range[0] >= -1e-9 && range[1] <= 10 + 1e-9 && range[1] > range[0]).toBe(true);
        }
      }),
    );
  });
});

describe('a view in the address', () => {
  it('is read back as it was written, to six digits', () => {
    const ranges = { 'C1.time.s': [-0.1, 0.05] as const, 'C1.frequency.Hz': [20, 400.25] as const };
    expect(writeRanges(ranges)).toBe('C1.time.s:-0.1,0.05;C1.frequency.Hz:20,400.25');
    expect(readRanges(writeRanges(ranges))).toEqual(ranges);
    expect(readPlaces(writePlaces({ 'C2.Time.M': -1.23456789e-7 }))).toEqual({ 'C2.Time.M': -1.23457e-7 });
  });
  it('lets go of what cannot be read and keeps the rest', () => {
    expect(readRanges('C1.time.s:5,1;C1.time.s:1,2,3;C2.x.:a,b;<script>:1,2;C3.f.Hz:1,2')).toEqual({ 'C3.f.Hz': [1, 2] });
    expect(readPlaces('C1.time.s:1e999;C1.time.s:')).toBeNull();
    expect(readRanges('')).toBeNull();
  });
  it('never throws and never gives what is not a rising pair of numbers', () => {
    fc.assert(
      fc.property(fc.string(), (text) => {
        for (const [low, high] of Object.values(readRanges(text) ?? {})) expect(Number.isFinite(low) && Number.isFinite(high) && low < high).toBe(true);
      }),
    );
  });
});
