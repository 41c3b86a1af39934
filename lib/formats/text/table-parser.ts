import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import { diagnoseLine, quote, type Separator } from './diagnose-line';
import { NumberReader } from './number-reader';
import { endOfLine, isComment, join, newline, skipBlanks, skipField } from './scan-bytes';
import { LineNumbers, type CommentLine, type NotFinite, type NumberTable } from './table';

export interface TableLimits {
  readonly bytes: number;
  readonly rows: number;
  readonly cells: number;
  readonly lineBytes: number;
}

/** 2^21 samples a mode; the cells bound memory to a quarter of a gibibyte while columns grow. */
export const tableLimits: TableLimits = { bytes: 512 * 2 ** 20, rows: 2 ** 21, cells: 2 ** 25, lineBytes: 2 ** 18 };

const reportedProblems = 10;
const reportedNotFinite = 5;
const keptComments = 200;
const keptCommentBytes = 500;
const blank = 0;
const comma = 1;
const semicolon = 2;
const separatorWords: readonly Separator[] = ['blanks', 'commas', 'semicolons'];

/**
 * A streaming parser of number tables: bytes in, growing columns out. Synchronous and free of
 * platform calls, so it serves the worker's thread and the browser's alike. No string is made
 * of a line unless the line is refused.
 */
export class TableParser {
  private readonly reader = new NumberReader();
  private readonly lines = new LineNumbers();
  private readonly problems: Problem[] = [];
  private readonly notFinite: NotFinite[] = [];
  private readonly comments: CommentLine[] = [];
  private readonly columns: (Float64Array | null)[];
  private readonly digits: Int32Array;
  private readonly kept: number;
  private carry: Uint8Array = new Uint8Array(0);
  private capacity = 1024;
  private rows = 0;
  private line = 0;
  private bytes = 0;
  private separator = -1;
  private notFiniteCount = 0;
  private started = false;
  private stopped = false;

  constructor(
    private readonly file: string,
    private readonly names: readonly string[],
    private readonly limits: TableLimits = tableLimits,
  ) {
    this.columns = names.map((name) => (name === '_' ? null : new Float64Array(this.capacity)));
    this.digits = new Int32Array(names.length);
    this.kept = Math.max(1, this.columns.filter((column) => column !== null).length);
  }

  /** False when nothing more can change the outcome: too many problems, or a limit was passed. */
  push(chunk: Uint8Array): boolean {
    if (this.stopped || chunk.length === 0) return !this.stopped;
    this.bytes += chunk.length;
    if (this.bytes > this.limits.bytes) return this.stop('formats/file-too-large', `more than ${this.limits.bytes / 2 ** 20} MiB`, `at most ${this.limits.bytes / 2 ** 20} MiB of text`, 'Thin the record, cut it before the part that the claims use, or give one file a mode.');
    const data = this.started ? chunk : this.start(chunk);
    const end = data.lastIndexOf(newline) + 1;
    if (end === 0) return this.keep(data);
    if (this.carry.length === 0) this.parse(data, 0, end);
    else {
      const first = data.indexOf(newline) + 1;
      const whole = join(this.carry, data.subarray(0, first));
      this.carry = new Uint8Array(0);
      this.parse(whole, 0, whole.length);
      this.parse(data, first, end);
    }
    return this.stopped ? false : this.keep(data.subarray(end));
  }

  finish(): Result<NumberTable, Problem[]> {
    if (!this.stopped && this.carry.length > 0) this.parse(join(this.carry, Uint8Array.of(newline)), 0, this.carry.length + 1);
    if (this.problems.length > 0) return err(this.problems);
    if (this.rows < 2)
      return err([{ code: 'formats/too-few-rows', where: this.file, saw: `${this.rows} row${this.rows === 1 ? '' : 's'} of numbers`, expected: 'at least two rows' }]);
    return ok({
      file: this.file,
      rows: this.rows,
      columns: this.columns.map((column) => column && (column.length === this.rows ? column : column.slice(0, this.rows))),
      significantDigits: Array.from(this.digits),
      notFinite: this.notFinite,
      notFiniteCount: this.notFiniteCount,
      lineOfRow: (row) => this.lines.lineOf(row),
      comments: this.comments,
    });
  }

  private start(chunk: Uint8Array): Uint8Array {
    const data = this.carry.length === 0 ? chunk : join(this.carry, chunk);
    this.carry = new Uint8Array(0);
    if (data.length < 3 && data[0] === 0xef) return data;
    this.started = true;
    const utf8Mark = data[0] === 0xef && data[1] === 0xbb && data[2] === 0xbf;
    return utf8Mark ? data.subarray(3) : data;
  }

  private keep(rest: Uint8Array): boolean {
    this.carry = this.carry.length === 0 ? rest.slice() : join(this.carry, rest);
    if (this.carry.length <= this.limits.lineBytes) return true;
    return this.stop('formats/line-too-long', `a line of more than ${this.limits.lineBytes} bytes`, 'rows of numbers, one a line', 'The file may be binary, or all on one line.', this.line + 1);
  }

  private stop(code: string, saw: string, expected: string, hint: string, line?: number): false {
    this.problems.push({ code, where: line === undefined ? this.file : `${this.file}:${line}`, saw, expected, hint });
    this.stopped = true;
    return false;
  }

  /** Whole lines only: bytes[to − 1] is a newline. */
  private parse(bytes: Uint8Array, from: number, to: number): void {
    let i = from;
    while (i < to && !this.stopped) {
      this.line++;
      const first = skipBlanks(bytes, i);
      const c = bytes[first]!;
      if (c === newline) i = first + 1;
      else if (isComment(c)) i = this.keepComment(bytes, first);
      else if (c === 13 && bytes[first + 1] === newline) i = first + 2;
      else i = this.parseRow(bytes, first, to);
    }
  }

  /** Position of the next line. */
  private keepComment(bytes: Uint8Array, first: number): number {
    const next = bytes.indexOf(newline, first) + 1;
    if (this.comments.length < keptComments) {
      const text = new TextDecoder().decode(bytes.subarray(first + 1, Math.min(next - 1, first + 1 + keptCommentBytes))).trim();
      if (text !== '') this.comments.push({ line: this.line, text });
    }
    return next;
  }

  private parseRow(bytes: Uint8Array, start: number, to: number): number {
    if (this.rows === this.capacity && !this.grow()) return to;
    const { reader, columns, digits, rows } = this;
    const n = columns.length;
    let i = start;
    for (let k = 0; k < n; k++) {
      if (k > 0) {
        i = this.skipSeparator(bytes, i);
        if (i < 0) return this.refuse(bytes, start);
      }
      const column = columns[k]!;
      if (column === null) {
        const after = skipField(bytes, i);
        if (after === i) return this.refuse(bytes, start);
        i = after;
        continue;
      }
      const next = reader.read(bytes, i, to);
      if (next < 0) {
        i = this.readNotFinite(bytes, i, k);
        if (i < 0) return this.refuse(bytes, start);
        continue;
      }
      i = next;
      const value = reader.value[0]!;
      column[rows] = value;
      if (reader.significant > digits[k]!) digits[k] = reader.significant;
      if (value - value !== 0) return this.refuseOverflow(bytes, start, k);
    }
    const end = endOfLine(bytes, i);
    if (end < 0) return this.refuse(bytes, start);
    this.lines.note(rows, this.line);
    this.rows = rows + 1;
    return end;
  }

  /** Position of the next field, or -1 when there is no separator or not the file's own. */
  private skipSeparator(bytes: Uint8Array, from: number): number {
    let i = skipBlanks(bytes, from);
    let kind = blank;
    const c = bytes[i]!;
    if (c === 44 || c === 59) {
      kind = c === 44 ? comma : semicolon;
      i = skipBlanks(bytes, i + 1);
    } else if (i === from) return -1;
    if (this.separator !== kind) {
      if (this.separator >= 0) return -1;
      this.separator = kind;
    }
    return i;
  }

  private readNotFinite(bytes: Uint8Array, start: number, column: number): number {
    const end = skipField(bytes, start);
    if (end === start || end - start > 9) return -1;
    const printed = String.fromCharCode(...bytes.subarray(start, end));
    if (!/^[+-]?(nan|inf|infinity)$/i.test(printed)) return -1;
    this.notFiniteCount++;
    if (this.notFinite.length < reportedNotFinite) this.notFinite.push({ line: this.line, column, printed, row: this.rows });
    this.columns[column]![this.rows] = Number.NaN;
    return end;
  }

  private grow(): boolean {
    const most = Math.min(this.limits.rows, Math.floor(this.limits.cells / this.kept));
    if (this.rows >= most)
      return this.stop('formats/too-many-rows', `more than ${most} rows`, `at most ${most} rows of ${this.kept} column${this.kept === 1 ? '' : 's'}`, 'Thin the record to the steps that its highest frequency needs, cut it before the part that the claims use, or give one file a mode.', this.line);
    this.capacity = Math.min(most, this.capacity * 2);
    for (let k = 0; k < this.columns.length; k++) {
      const old = this.columns[k];
      if (!old) continue;
      const next = new Float64Array(this.capacity);
      next.set(old);
      this.columns[k] = next;
    }
    return true;
  }

  private refuse(bytes: Uint8Array, start: number): number {
    const end = bytes.indexOf(newline, start) + 1;
    const line = bytes.subarray(start, end - 1);
    const text = new TextDecoder().decode(line.subarray(0, 4000)).trim();
    if (this.rows === 0 && this.problems.length === 0 && this.isHeader(text)) {
      this.separator = -1;
      return end;
    }
    this.report(diagnoseLine({ file: this.file, line: this.line, bytes: line, names: this.names, separator: this.rows > 0 ? (separatorWords[this.separator] ?? null) : null }));
    if (this.rows === 0) this.separator = -1;
    return end;
  }

  /** A first line of names is let through when it says what the sheet says. */
  private isHeader(text: string): boolean {
    const words = text.split(/[\s,;]+/).map((word) => word.replace(/^(["'])(.*)\1$/, '$2'));
    return words.length === this.names.length && this.names.every((name, k) => name === '_' || name === words[k]);
  }

  private refuseOverflow(bytes: Uint8Array, start: number, column: number): number {
    const end = bytes.indexOf(newline, start) + 1;
    const field = new TextDecoder().decode(bytes.subarray(start, end)).split(/[\s,;]+/)[column] ?? '';
    this.report({ code: 'formats/number-out-of-range', where: `${this.file}:${this.line}`, saw: `${quote(field)} in column ${this.names[column]}`, expected: 'a number below 1.8e308, the largest a double can hold' });
    return end;
  }

  private report(problem: Problem): void {
    this.problems.push(problem);
    if (this.problems.length >= reportedProblems) this.stopped = true;
  }
}
