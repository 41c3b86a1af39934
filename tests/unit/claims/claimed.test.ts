import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { formatClaimed, halfLastDigit, parseClaimed, type Claimed } from '@/lib/claims/claimed';

const value = (raw: unknown): Extract<Claimed, { kind: 'value' }> => {
  const parsed = parseClaimed(raw);
  if (!parsed.ok || parsed.value.kind !== 'value') throw new Error(parsed.ok ? 'a bound' : parsed.error.saw);
  return parsed.value;
};

describe('a claimed value', () => {
  it('is exact as a JSON number and adds nothing to the tolerance', () => {
    expect(value(0.9984)).toEqual({ kind: 'value', value: 0.9984, uncertainty: null, digits: null, printed: '0.9984' });
    expect(halfLastDigit(value(0.9984))).toBe(0);
  });

  it.each([
    ['0.9984', 0.9984, null, 4, 0.00005],
    ['0.9984(3)', 0.9984, 0.0003, 4, 0.00005],
    ['36.3(2)', 36.3, 0.2, 1, 0.05],
    ['36.30(12)', 36.3, 0.12, 2, 0.005],
    ['3996', 3996, null, 0, 0.5],
    ['3996.', 3996, null, 0, 0.5],
    ['1.2e3', 1200, null, -2, 50],
    ['1.25e-21', 1.25e-21, null, 23, 5e-24],
    ['1.25(4)e-21', 1.25e-21, 4e-23, 23, 5e-24],
    ['1.25e-21(4)', 1.25e-21, 4e-23, 23, 5e-24],
    ['-0.20', -0.2, null, 2, 0.005],
    [' 0.5 ', 0.5, null, 1, 0.05],
    ['0.9984 ± 0.0003', 0.9984, 0.0003, 4, 0.00005],
    ['0.9984+/-0.0003', 0.9984, 0.0003, 4, 0.00005],
  ])('%s carries its digits and its uncertainty', (text, x, uncertainty, digits, half) => {
    const parsed = value(text);
    expect([parsed.value, parsed.uncertainty, parsed.digits]).toEqual([x, uncertainty, digits]);
    expect(halfLastDigit(parsed)).toBe(half);
    expect(parsed.printed).toBe(text.trim());
  });

  it('may stand as a pair, whose value may be a string with digits', () => {
    expect(value({ value: 0.998, uncertainty: 0.001 })).toMatchObject({ value: 0.998, uncertainty: 0.001, digits: null });
    expect(value({ value: '0.998', uncertainty: '0.001' })).toMatchObject({ value: 0.998, uncertainty: 0.001, digits: 3, printed: '0.998 ± 0.001' });
    expect(value({ value: '0.998' })).toMatchObject({ uncertainty: null, digits: 3 });
  });

  it('may be a bound', () => {
    expect(parseClaimed({ above: 0.999 })).toEqual({ ok: true, value: { kind: 'above', bound: 0.999, printed: '> 0.999' } });
    expect(parseClaimed({ below: '1.50' })).toEqual({ ok: true, value: { kind: 'below', bound: 1.5, printed: '< 1.50' } });
  });
});

describe('a claimed value is refused', () => {
  it.each<[unknown, string]>([
    ['0,9984', '"0,9984" with a comma'],
    ['1,234.5', '"1,234.5" with a comma'],
    ['\u22120.5', 'typographic minus sign'],
    ['> 0.999', '"> 0.999"'],
    ['65.5 %', '"65.5 %" in per cent'],
    ['0x1p3', 'the hexadecimal "0x1p3"'],
    ['NaN', '"NaN", which is not a finite number'],
    ['-Infinity', '"-Infinity", which is not a finite number'],
    ['1e309', '"1e309", outside the range of double precision'],
    ['1.5 × 10^3', '"1.5 × 10^3"'],
    ['140 km/s', '"140 km/s"'],
    ['0.9984(0)', '"0.9984(0)" with an uncertainty of zero'],
    ['0.99(1)e-3(2)', '"0.99(1)e-3(2)"'],
    ['', '""'],
    [null, 'null'],
    [true, 'true'],
    [{ above: 1, below: 2 }, '{"above":1,"below":2}'],
    [{ value: 1, error: 2 }, '{"value":1,"error":2}'],
    [{ value: 1, uncertainty: -2 }, 'an uncertainty of -2'],
    [{ above: '0,5' }, '"0,5" with a comma'],
    [Number.POSITIVE_INFINITY, 'a number outside the range of double precision'],
  ])('%j', (raw, saw) => {
    const parsed = parseClaimed(raw);
    expect(parsed.ok).toBe(false);
    if (!parsed.ok) expect(parsed.error.saw).toContain(saw);
  });
});

describe('parsing and formatting', () => {
  const digits = fc.stringMatching(/^-?(0|[1-9]\d{0,5})(\.\d{0,8})?$/);
  const exponent = fc.option(fc.integer({ min: -30, max: 30 }), { nil: undefined });
  const printed = fc.tuple(digits, fc.option(fc.integer({ min: 1, max: 99 }), { nil: undefined }), exponent).map(([x, u, e]) => `${x}${u === undefined ? '' : `(${u})`}${e === undefined ? '' : `e${e}`}`);
  const number = fc.double({ noNaN: true, noDefaultInfinity: true });
  const entry = fc.oneof(printed, number, number.map((above) => ({ above })), digits.map((below) => ({ below })), fc.tuple(number, fc.double({ min: 1e-300, max: 1e300, noNaN: true })).map(([x, uncertainty]) => ({ value: x, uncertainty })));

  it('are inverse: what is formatted parses to the same claim', () => {
    fc.assert(fc.property(entry, (raw) => {
      const first = parseClaimed(raw);
      if (!first.ok) throw new Error(JSON.stringify(first.error));
      const again = parseClaimed(JSON.parse(JSON.stringify(formatClaimed(first.value))));
      expect(again).toEqual(first);
    }), { seed: 6, numRuns: 3000 });
  });

  it('never throw, whatever is claimed', () => {
    fc.assert(fc.property(fc.anything(), (raw) => {
      const parsed = parseClaimed(raw);
      expect(typeof parsed.ok).toBe('boolean');
    }), { seed: 7, numRuns: 5000 });
  });
});
