import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { TableParser, tableLimits, type TableLimits } from '@/lib/formats/text/table-parser';
import { formatProblem } from '@/lib/kernel/problem';

const bytesOf = (text: string) => new TextEncoder().encode(text);

function parse(text: string | Uint8Array, names = ['t', 're', 'im'], limits: TableLimits = tableLimits) {
  const parser = new TableParser('a.txt', names, limits);
  parser.push(typeof text === 'string' ? bytesOf(text) : text);
  return parser.finish();
}

function columns(text: string, names?: string[]): number[][] {
  const table = parse(text, names);
  if (!table.ok) throw new Error(table.error.map(formatProblem).join('\n'));
  return table.value.columns.map((column) => Array.from(column ?? []));
}

const refusals = (text: string | Uint8Array, names?: string[], limits?: TableLimits): string[] => {
  const table = parse(text, names, limits);
  return table.ok ? [] : table.error.map(formatProblem);
};

describe('a text table is read', () => {
  it.each([
    ['blanks', '0 1 2\n1 3 4\n'],
    ['runs of blanks and tabs', '  0\t 1   2 \n\t1 3 4\n'],
    ['commas', '0,1,2\n1, 3 ,4\n'],
    ['semicolons', '0;1;2\n1; 3;4\n'],
    ['line ends of another system', '0 1 2\r\n1 3 4\r\n'],
    ['no newline at the end', '0 1 2\n1 3 4'],
    ['comments of three kinds and blank lines', '# t re im\n% x\n! y\n\n   \n0 1 2 # first\n\n1 3 4 ! second\n'],
    ['a byte order mark', '\ufeff0 1 2\n1 3 4\n'],
    ['a first line of the declared names', 't re im\n0 1 2\n1 3 4\n'],
    ['a first line of names between commas', 't, re, im\n0,1,2\n1,3,4\n'],
    ['a first line of names between quotes', '"t","re","im"\n0,1,2\n1,3,4\n'],
    ['Fortran exponents', '0.0D0 1.0d0 2D+00\n1 3 0.4D1\n'],
  ])('with %s', (_, text) => {
    expect(columns(text)).toEqual([[0, 1], [1, 3], [2, 4]]);
  });

  it('and a skipped column may hold words', () => {
    expect(columns('0 yes 2\n1 no 4\n', ['t', '_', 'im'])).toEqual([[0, 1], [], [2, 4]]);
  });

  it('the same in whatever pieces its bytes arrive', () => {
    const text = '\ufeff# head\n0 1.25e-21 -2\r\n\n1 3 4e5 # tail\n2 5 6';
    const whole = columns(text);
    fc.assert(fc.property(fc.array(fc.integer({ min: 1, max: 7 }), { minLength: 1 }), (sizes) => {
      const parser = new TableParser('a.txt', ['t', 're', 'im']);
      const bytes = bytesOf(text);
      for (let at = 0, k = 0; at < bytes.length; k++) {
        const size = sizes[k % sizes.length] ?? 1;
        parser.push(bytes.subarray(at, at + size));
        at += size;
      }
      const table = parser.finish();
      expect(table.ok && table.value.columns.map((column) => Array.from(column ?? []))).toEqual(whole);
    }), { seed: 3, numRuns: 200 });
  });

  it('with the line of each row, across comments', () => {
    const table = parse('# a\n0 1 2\n1 1 2\n\n# b\n2 1 2\n3 1 2\n');
    expect(table.ok && [0, 1, 2, 3].map(table.value.lineOfRow)).toEqual([2, 3, 6, 7]);
  });

  it('with the digits each column was printed with', () => {
    const table = parse('0 1.250 0.00\n1 -0.33333 0\n');
    expect(table.ok && table.value.significantDigits).toEqual([1, 5, 0]);
  });

  it('with NaN and infinity kept as findings, not as numbers', () => {
    const table = parse('0 1 nan\n1 -Inf 4\n2 3 Infinity\n');
    expect(table.ok && table.value.notFinite.map(({ line, column, printed }) => [line, column, printed])).toEqual([[1, 2, 'nan'], [2, 1, '-Inf'], [3, 2, 'Infinity']]);
  });
});

describe('a text table is refused with file, line, what was seen and what to do', () => {
  it.each([
    ['a decimal comma beside blanks', '0,5 1,2 3,1\n', 'a.txt:1: saw "0,5" with a decimal comma; expected a decimal point. Write 0.5 instead of 0,5; a comma separates columns.'],
    ['a decimal comma beside semicolons', '0 ;1;2\n1,5;2;3\n', 'a.txt:2: saw "1,5" with a decimal comma; expected a decimal point.'],
    ['a typographic minus', '0 1 2\n1 \u22123 4\n', 'a.txt:2: saw "\u22123" with a typographic minus sign; expected the plain minus sign "-".'],
    ['a hexadecimal number', '0 0x1F 2\n', 'a.txt:1: saw the hexadecimal number "0x1F"; expected a decimal number.'],
    ['an overflowing number', '0 1 2\n1 1e309 4\n', 'a.txt:2: saw "1e309" in column re; expected a number below 1.8e308'],
    ['a lost exponent letter', '0 1.5-123 2\n', 'a.txt:1: saw "1.5-123", an exponent without its letter; expected an exponent with E, such as 1.5E-123.'],
    ['an overflowed print field', '0 ****** 2\n', 'a.txt:1: saw "******", a number too wide for its print field'],
    ['a short row', '0 1 2\n1 3\n', 'a.txt:2: saw 2 fields; expected 3 numbers (t, re, im). The row may have been cut short'],
    ['a long row', '0 1 2 3\n', 'a.txt:1: saw 4 fields; expected 3 numbers (t, re, im). Name every column of the file in "columns"'],
    ['an empty field', '0,,2\n', 'a.txt:1: saw an empty field in column 2 (re)'],
    ['a trailing comma', '0,1,2,\n', 'a.txt:1: saw an empty field in column 4'],
    ['two separators in one row', '0, 1 2\n', 'a.txt:1: saw columns parted by blanks and commas'],
    ['a change of separator', '0 1 2\n1,3,4\n', 'a.txt:2: saw columns parted by blanks and commas in "1,3,4"; expected one separator throughout the file (here blanks).'],
    ['a word', '0 1 2\n1 about3 4\n', 'a.txt:2: saw "about3" in column re; expected a decimal number such as -1.25e-21.'],
    ['a quoted number', '0 "1" 2\n', 'a.txt:1: saw "\\"1\\"" in column re'],
    ['names other than the declared ones', 't re22 im22\n0 1 2\n', 'a.txt:1: saw a line of names, "t re22 im22"; expected numbers, or the names that the sheet gives (t, re, im). See that the columns are in the order of "columns", then begin the line with "#" or remove it.'],
    ['a lone carriage return', '0 1 2\r1 3 4\r', 'a.txt:1: saw'],
    ['zero bytes', '0 1 \u00002\n', 'a.txt:1: saw bytes that are not text'],
  ])('for %s', (_, text, sentence) => {
    expect(refusals(text)[0]).toContain(sentence);
  });

  it('with every bad line, up to ten', () => {
    expect(refusals('0 1 2\n1 x 4\n2 3 4\n3 y 4\n').map((line) => line.slice(0, 7))).toEqual(['a.txt:2', 'a.txt:4']);
    expect(refusals('x y z\n'.repeat(50))).toHaveLength(10);
  });

  it('when it holds fewer than two rows', () => {
    expect(refusals('# nothing\n')).toEqual(['a.txt: saw 0 rows of numbers; expected at least two rows.']);
    expect(refusals('0 1 2\n')).toEqual(['a.txt: saw 1 row of numbers; expected at least two rows.']);
  });

  it('when it is larger than the limits', () => {
    const small = { bytes: 100, rows: 4096, cells: 9000, lineBytes: 50 };
    expect(refusals('0 1 2\n'.repeat(50), undefined, small)[0]).toContain('expected at most');
    expect(refusals('1'.repeat(60), undefined, { ...small, bytes: 1000 })[0]).toContain('a.txt:1: saw a line of more than 50 bytes');
    expect(refusals('0 1 2\n'.repeat(5000), undefined, { ...small, bytes: 1e6 })[0]).toContain('a.txt:3001: saw more than 3000 rows; expected at most 3000 rows of 3 columns. Thin the record');
  });

  it('and the sentence stays short and printable whatever the bytes', () => {
    const [sentence] = refusals(`0 ${'\u202e'.repeat(500)} 2\n`);
    expect(sentence?.length).toBeLessThan(900);
    expect(sentence).not.toMatch(/[\u202e\u0000]/);
  });
});

describe('hostile bytes', () => {
  it('never crash the parser and always end in a table or a refusal', () => {
    fc.assert(fc.property(fc.uint8Array({ maxLength: 400 }), fc.integer({ min: 1, max: 400 }), (bytes, cut) => {
      const parser = new TableParser('a.txt', ['t', '_', 're']);
      parser.push(bytes.subarray(0, cut));
      parser.push(bytes.subarray(cut));
      const table = parser.finish();
      expect(table.ok || table.error.length > 0).toBe(true);
    }), { numRuns: 5000, seed: 4 });
  });

  it('made of the parser’s own alphabet neither', () => {
    const text = fc.string({ unit: fc.constantFrom('0', '1', '9', '.', '-', '+', 'e', 'D', ' ', '\t', ',', ';', '\n', '\r', '#', 'n', 'a', 'i', 'f', 'x', '*'), maxLength: 200 });
    fc.assert(fc.property(text, (raw) => {
      const table = parse(raw, ['t', 're']);
      if (!table.ok) expect(table.error.length).toBeGreaterThan(0);
      else for (const column of table.value.columns) expect(column?.length).toBe(table.value.rows);
    }), { numRuns: 20_000, seed: 5 });
  });
});
