import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import { decimalsFor, formatNumber, numberParts } from '@/app/_ui/math/format-number';
import { decimalsForReading, formatWithUncertainty, printedDecimals, roundUpUncertainty } from '@/app/_ui/math/format-uncertainty';

describe('a printed number', () => {
  it('has a true minus and never a hyphen', () => {
    expect(formatNumber(-0.05675, { decimals: 5 })).toBe('−0.05675');
    expect(formatNumber(-2.5e-7)).toBe('−2.5 × 10⁻⁷');
  });
  it('is m × 10ⁿ below a thousandth and from ten million on', () => {
    expect(formatNumber(2e-7, { significant: 2 })).toBe('2.0 × 10⁻⁷');
    expect(formatNumber(0.00055)).toBe('5.5 × 10⁻⁴');
    expect(formatNumber(0.001)).toBe('0.001');
    expect(formatNumber(1.9885e30, { significant: 3 })).toBe('1.99 × 10³⁰');
  });
  it('stays plain in a column that asks for it', () => {
    expect(formatNumber(0.00055, { decimals: 5, plain: true })).toBe('0.00055');
    expect(formatNumber(-0.00002, { decimals: 5, plain: true, signed: true })).toBe('−0.00002');
  });
  it('says unknown, never zero, where there is no number', () => {
    expect(formatNumber(null)).toBe('unknown');
    expect(formatNumber(Number.NaN)).toBe('unknown');
    expect(numberParts(Number.POSITIVE_INFINITY)).toBeNull();
  });
  it('prints no sign on a zero, whichever side it came from', () => {
    expect(formatNumber(-0, { decimals: 3, signed: true })).toBe('0.000');
    expect(formatNumber(-0.0001, { decimals: 2, plain: true, signed: true })).toBe('0.00');
  });
  it('groups thousands and signs differences', () => {
    expect(formatNumber(20006)).toBe('20,006');
    expect(formatNumber(0.00054, { decimals: 5, plain: true, signed: true })).toBe('+0.00054');
  });
  it('is never cut short: without a style it reads back as the same double', () => {
    const back = (text: string) => {
      const [mantissa = '', power] = text.replaceAll(',', '').replace('−', '-').split(' × 10');
      const digits = '⁰¹²³⁴⁵⁶⁷⁸⁹';
      const exponent = power ? [...power].map((c) => (c === '⁻' ? '-' : String(digits.indexOf(c)))).join('') : '0';
      return Number(`${mantissa}e${exponent}`);
    };
    fc.assert(fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (x) => back(formatNumber(x)) === (Object.is(x, -0) ? 0 : x)), { numRuns: 2000 });
  });
});

describe('a number read against a tolerance', () => {
  it('has no more digits than U or the tolerance warrants, and enough that a difference is seen', () => {
    expect(formatWithUncertainty(0.99323483694, 5.8e-10, '', { tolerance: 0.00055 })).toBe('0.99323 ± 5.8 × 10⁻¹⁰');
    expect(formatWithUncertainty(0.99323483694, 5.8e-10, '', { tolerance: 0.00055, apart: 1e-7 })).toBe('0.9932348 ± 5.8 × 10⁻¹⁰');
    expect(formatWithUncertainty(36.2971, 0.011, 'Mpc', { tolerance: 1e-6 })).toBe('36.297 ± 0.011 Mpc');
    expect(formatWithUncertainty(9.75123456e-5, 2e-12, '', { tolerance: 1e-6 })).toBe('9.75 × 10⁻⁵ ± 2.0 × 10⁻¹²');
    expect(formatWithUncertainty(0.5, 0.0012, '', { tolerance: null })).toBe('0.5000 ± 0.0012');
  });
});

describe('an uncertainty', () => {
  it('is rounded up to two digits, so that no bar is printed too short', () => {
    expect(roundUpUncertainty(0.0002)).toBe(0.0002);
    expect(roundUpUncertainty(0.000201)).toBe(0.00021);
    fc.assert(fc.property(fc.double({ min: 1e-12, max: 1e6, noNaN: true }), (u) => roundUpUncertainty(u) >= u * (1 - 1e-9)), { numRuns: 1000 });
  });
  it('stands beside its value at matching digits, with the unit', () => {
    expect(formatWithUncertainty(36.2973, 0.0108, 'Mpc')).toBe('36.297 ± 0.011 Mpc');
    expect(formatWithUncertainty(0.91854503, 2e-7)).toBe('0.91854503 ± 2.0 × 10⁻⁷');
    expect(formatWithUncertainty(9.75e-5, 2e-6)).toBe('(9.75 ± 0.20) × 10⁻⁵');
    expect(formatWithUncertainty(60, null, 'Msun')).toBe('60 M⊙ ± unknown');
    expect(formatWithUncertainty(null, 0.1)).toBe('not computable');
  });
  it('decides how many decimals are read: two digits of the tolerance, one more than is claimed, none finer than the bar', () => {
    expect(decimalsForReading(0.00055, 4, 2e-7)).toBe(5);
    expect(decimalsForReading(0.35, 1, 4e-5)).toBe(2);
    expect(decimalsForReading(0.08, 1, 0.02)).toBe(3);
    expect(decimalsForReading(null, 3, 1e-9)).toBe(4);
    expect(decimalsFor(0.00055, 2)).toBe(5);
  });
  it('reads the decimals of a number as its author printed it', () => {
    expect([printedDecimals('0.9753'), printedDecimals('36.3(2)'), printedDecimals('140'), printedDecimals('−0.20'), printedDecimals('1.5e-3')]).toEqual([4, 1, 0, 2, 4]);
  });
});
