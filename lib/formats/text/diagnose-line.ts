import type { Problem } from '@/lib/kernel/problem';

/** A line that the grammar refused, and what the table expected of it. */
export interface RefusedLine {
  readonly file: string;
  readonly line: number;
  readonly bytes: Uint8Array;
  readonly names: readonly string[];
  readonly separator: Separator | null;
}

export type Separator = 'blanks' | 'commas' | 'semicolons';

const shown = 60;

/** Printable, on one line, and short: a refusal must not carry a megabyte of hostile bytes. */
export function quote(text: string): string {
  const cut = text.length > shown ? `${text.slice(0, shown)}…` : text;
  return JSON.stringify(cut).replace(/[\u007f-\u009f\u200b-\u200f\u2028-\u202e\u2066-\u2069]/g, (c) => `\\u${c.charCodeAt(0).toString(16).padStart(4, '0')}`);
}

/** The slow path, taken only for a line that stays out: names the cause in words. */
export function diagnoseLine(refused: RefusedLine): Problem {
  const text = new TextDecoder('utf-8').decode(refused.bytes.subarray(0, 4000)).replace(/\r?\n?$/, '');
  const cause = causes.map((find) => find(text, refused)).find((found) => found !== null) ?? malformed(text, refused);
  return { where: `${refused.file}:${refused.line}`, ...cause };
}

type Cause = Omit<Problem, 'where'>;
const expectedRow = (r: RefusedLine) => `${r.names.length} numbers (${r.names.slice(0, 8).join(', ')}${r.names.length > 8 ? ', …' : ''})`;

const binary = (text: string, r: RefusedLine): Cause | null =>
  text.includes('\u0000') || text.includes('\ufffd')
    ? { code: 'formats/not-text', saw: 'bytes that are not text', expected: expectedRow(r), hint: 'Export the file as plain text (UTF-8) and try again.' }
    : null;

const typographicMinus = (text: string): Cause | null => {
  const found = /[^\s,;]*[\u2212\u2013\u2014\u2010\u2011][^\s,;]*/.exec(text);
  if (!found) return null;
  return { code: 'formats/not-a-number', saw: `${quote(found[0])} with a typographic minus sign`, expected: 'the plain minus sign "-"', hint: 'Replace the typographic minus (U+2212 or a dash) by "-".' };
};

const decimalComma = (text: string, r: RefusedLine): Cause | null => {
  const found = /(^|[\s;])[+-]?\d+,\d+([eEdD][+-]?\d+)?(?=[\s;]|$)/.exec(text);
  if (!found) return null;
  const declaredPair = r.separator === 'commas' && !/[;\t]|\d\s+[+-]?\d/.test(text);
  if (declaredPair) return null;
  return { code: 'formats/decimal-comma', saw: `${quote(found[0].trim())} with a decimal comma`, expected: 'a decimal point', hint: 'Write 0.5 instead of 0,5; a comma separates columns.' };
};

const hexadecimal = (text: string): Cause | null => {
  const found = /[+-]?0[xX][0-9a-fA-F.pP+-]*/.exec(text);
  return found ? { code: 'formats/not-a-number', saw: `the hexadecimal number ${quote(found[0])}`, expected: 'a decimal number' } : null;
};

const lostExponent = (text: string): Cause | null => {
  const found = /(?<![\w.])[+-]?(?:\d+\.\d*|\.\d+)[+-]\d{2,3}(?![\d.])/.exec(text);
  if (!found) return null;
  return { code: 'formats/not-a-number', saw: `${quote(found[0])}, an exponent without its letter`, expected: 'an exponent with E, such as 1.5E-123', hint: 'Fortran drops the letter when the exponent has three digits: print with a wider exponent field (E24.16E3).' };
};

const stars = (text: string): Cause | null => {
  const found = /\*{2,}/.exec(text);
  return found ? { code: 'formats/not-a-number', saw: `${quote(found[0])}, a number too wide for its print field`, expected: 'a number', hint: 'Print the file again with a wider field.' } : null;
};

const mixedSeparators = (text: string, r: RefusedLine): Cause | null => {
  const kinds = new Set<Separator>();
  for (const gap of text.trim().match(/(?<=[^\s,;])[\s]*[,;]?[\s]*(?=[^\s,;])/g) ?? [])
    if (gap !== '') kinds.add(gap.includes(',') ? 'commas' : gap.includes(';') ? 'semicolons' : 'blanks');
  if (r.separator) kinds.add(r.separator);
  if (kinds.size < 2 || /[,;]\s*[,;]/.test(text)) return null;
  return { code: 'formats/mixed-separators', saw: `columns parted by ${[...kinds].sort().join(' and ')} in ${quote(text.trim())}`, expected: `one separator throughout the file${r.separator ? ` (here ${r.separator})` : ''}` };
};

const fieldsOf = (text: string): string[] => {
  const body = text.replace(/\s[#%!].*$/, '').trim();
  if (body === '') return [];
  return /[,;]/.test(body) ? body.split(/[,;]/).map((field) => field.trim()) : body.split(/\s+/);
};

/** Words where the first numbers should stand: a heading whose names are not the sheet's. */
const otherHeading = (text: string, r: RefusedLine): Cause | null => {
  const fields = fieldsOf(text);
  if (r.separator !== null || fields.length !== r.names.length || fields.some((field) => !/^["']?[a-z_]/i.test(field))) return null;
  return { code: 'formats/not-a-number', saw: `a line of names, ${quote(fields.join(' '))}`, expected: `numbers, or the names that the sheet gives (${r.names.slice(0, 8).join(', ')}${r.names.length > 8 ? ', …' : ''})`, hint: 'See that the columns are in the order of "columns", then begin the line with "#" or remove it.' };
};

const emptyField = (text: string, r: RefusedLine): Cause | null => {
  const at = fieldsOf(text).indexOf('');
  if (at < 0) return null;
  return { code: 'formats/empty-field', saw: `an empty field in column ${at + 1}${r.names[at] ? ` (${r.names[at]})` : ''}`, expected: expectedRow(r), hint: 'Remove the doubled or trailing separator, or supply the missing number.' };
};

const ragged = (text: string, r: RefusedLine): Cause | null => {
  const n = fieldsOf(text).length;
  if (n === r.names.length) return null;
  return { code: 'formats/ragged-row', saw: `${n} field${n === 1 ? '' : 's'}`, expected: expectedRow(r), hint: n > r.names.length ? 'Name every column of the file in "columns" ("_" skips one).' : 'The row may have been cut short: supply the whole row or remove it.' };
};

const malformed = (text: string, r: RefusedLine): Cause => {
  const fields = fieldsOf(text);
  const at = fields.findIndex((field, i) => r.names[i] !== '_' && !/^[+-]?(\d+\.?\d*|\.\d+)([eEdD][+-]?\d+)?$/.test(field));
  const field = at >= 0 ? (fields[at] ?? '') : text;
  return { code: 'formats/not-a-number', saw: `${quote(field)}${at >= 0 && r.names[at] ? ` in column ${r.names[at]}` : ''}`, expected: 'a decimal number such as -1.25e-21' };
};

const causes = [binary, typographicMinus, hexadecimal, stars, lostExponent, decimalComma, mixedSeparators, otherHeading, emptyField, ragged];
