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

  // Decimals nearest to a midpoint of two doubles: Paxson 1991, "A program for testing IEEE decimal–binary conversion" (from memory).
  it.each(['5e125', '69e267', '999e-26', '7861e-34', '75569e-254', '928609e-261', '9210917e80', '84863171e114', '653777767e273', '5232604057e-298', '27235667517e-109', '653532977297e-123', '3142213164987e-294', '46202199371337e-72', '231010996856685e-73', '9324754620109615e212', '78459735791271921e49', '272104041512242479e200', '6802601037806061975e198', '20505426358836677347e-221', '836168422905420598437e-234', '4891559871276714924261e222', '9e-265', '85e-37', '623e100', '3571e263', '81661e153', '920657e-23', '4603285e-24', '87575437e-309', '245540327e122', '6138508175e120', '83356057653e193', '619534293513e124', '2335141086879e218', '36167929443327e-159', '609610927149051e-255', '3743626360493413e-165', '94080055902682397e-242', '899810892172646163e283', '7120190517612959703e120', '25188282901709339043e-252', '308984926168550152811e-52', '6372891218502368041059e64'])('in the hard case %s', (text) => {
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
