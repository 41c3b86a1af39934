import { describe, expect, it } from 'vitest';
import { columnsFor } from '@/lib/formats/arrays/array-source';
import { elementOf } from '@/lib/formats/arrays/element-type';
import { Scatter } from '@/lib/formats/arrays/scatter';
import { seededRandom } from '../../support/seeded-random';

/** Shape, which dimension holds the samples, which the series, which re and im; Fortran's order; complex. */
const arrays = [
  [[50, 3], 0, 1, null, false, false],
  [[3, 50], 1, 0, null, false, false],
  [[50, 3], 0, 1, null, true, false],
  [[40, 4, 2], 0, 1, 2, false, false],
  [[4, 40, 2], 1, 0, 2, false, false],
  [[40, 5], 0, 1, null, false, true],
  [[30, 70], 0, 1, null, false, false],
  [[60], 0, null, null, false, true],
] as const;

describe('elements put where their series want them', () => {
  it.each(arrays)('%j, samples along %d, in whatever pieces they come', (shape, samples, series, pair, fortran, complex) => {
    const random = seededRandom(shape[0] + samples);
    const type = elementOf('f8', true, complex);
    const total = shape.reduce<number>((n, d) => n * d, 1);
    const given = Float64Array.from({ length: total * (complex ? 2 : 1) }, () => random());
    const { out, strides, toImaginary } = columnsFor({ shape, complex }, { samples, series, pair });
    const scatter = new Scatter({ shape, strides, fortran, base: 0, toImaginary }, type, out);
    for (let from = 0; from < total; ) {
      const n = Math.min(total - from, 1 + Math.floor(17 * random()));
      scatter.push(new Uint8Array(given.buffer, from * type.size, n * type.size));
      from += n;
    }
    const expected = new Float64Array(out.length);
    for (let e = 0; e < total; e++) {
      let [rest, to] = [e, 0];
      for (const d of fortran ? shape.keys() : [...shape.keys()].reverse()) {
        to += (rest % shape[d]!) * strides[d]!;
        rest = Math.floor(rest / shape[d]!);
      }
      expected[to] = given[e * (complex ? 2 : 1)]!;
      if (complex) expected[to + toImaginary] = given[2 * e + 1]!;
    }
    expect(scatter.done).toBe(total);
    expect(out).toStrictEqual(expected);
  });
});
