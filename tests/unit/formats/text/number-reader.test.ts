import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { NumberReader } from '@/lib/formats/text/number-reader';

/** Reads one token that must be used up whole; null when it is refused. */
function readWhole(text: string): number | null {
  const bytes = new TextEncoder().encode(`${text}\n`);
  const reader = new NumberReader();
  return reader.read(bytes, 0, bytes.length) === bytes.length - 1 ? (reader.value[0] ?? null) : null;
}

const anyDouble = fc.double({ noNaN: true, noDefaultInfinity: true });

describe('a printed decimal becomes the nearest double, bit for bit', () => {
  it.each([
    ['in its shortest form', (x: number) => (Object.is(x, -0) ? '-0' : String(x))],
    ['with 17 digits', (x: number) => x.toExponential(16)],
    ['with 19 digits', (x: number) => x.toExponential(18)],
    ['with 40 digits', (x: number) => x.toExponential(40)],
    ['with 10 digits', (x: number) => x.toExponential(9)],
    ['with a Fortran exponent', (x: number) => x.toExponential(16).replace('e', 'D')],
  ])('%s', (_, print) => {
    fc.assert(fc.property(anyDouble, (x) => Object.is(readWhole(print(x)), Number(print(x).replace('D', 'e')))), { numRuns: 20_000, seed: 1 });
  });

  it('for digits of any length before and after the point', () => {
    const digits = fc.stringMatching(/^[0-9]{1,40}$/);
    const token = fc.tuple(fc.constantFrom('', '-', '+'), digits, digits, fc.integer({ min: -340, max: 320 })).map(([sign, a, b, e]) => `${sign}${a}.${b}e${e}`);
    fc.assert(fc.property(token, (text) => Object.is(readWhole(text), Number(text))), { numRuns: 20_000, seed: 2 });
  });

  it('halfway between two doubles, where one digit far behind decides', () => {
    const halfway = '9007199254740993';
    for (const text of [halfway, `${halfway}.0000000000000000000001`, `${halfway}e-20`, `${halfway}0000000000000001e-16`, '2.2250738585072011e-308', '1.00000000000000011102230246251565404236316680908203125'])
      expect(readWhole(text)).toBe(Number(text));
  });

  it.each([['-0', -0], ['5e-324', 5e-324], ['4.9E-324', 5e-324], ['1.7976931348623157e308', Number.MAX_VALUE], ['1e-400', 0], ['.5', 0.5], ['5.', 5], ['+1D+02', 100]])('reads %s', (text, value) => {
    expect(Object.is(readWhole(text), value)).toBe(true);
  });

  it.each(['', '-', '.', 'e5', '1e', '1e+', '0x10', '--1', '1.2.3', '1_000', 'NaN', '−1'])('does not take %j for a number', (text) => {
    expect(readWhole(text)).toBeNull();
  });

  it('counts significant digits without leading zeros', () => {
    const reader = new NumberReader();
    const bytes = new TextEncoder().encode('-0.001250e-3\n');
    reader.read(bytes, 0, bytes.length);
    expect(reader.significant).toBe(4);
  });
});
