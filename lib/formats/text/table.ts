/** A table of numbers as read from text: only the columns asked for, and where each row stood. */
export interface NumberTable {
  readonly file: string;
  readonly rows: number;
  /** Parallel to the columns asked for; null where a column was skipped. */
  readonly columns: readonly (Float64Array | null)[];
  /** Most significant digits printed in each column, 0 when all its values are zero. */
  readonly significantDigits: readonly number[];
  /** The first few; `notFiniteCount` says how many there are. */
  readonly notFinite: readonly NotFinite[];
  readonly notFiniteCount: number;
  readonly lineOfRow: (row: number) => number;
  /** Comment lines of text, the first of them and shortened: what a file says about itself. */
  readonly comments?: readonly CommentLine[];
}

export interface CommentLine {
  readonly line: number;
  /** Without the comment sign. */
  readonly text: string;
}

export interface NotFinite {
  readonly line: number;
  /** Index of the column. */
  readonly column: number;
  /** As printed, e.g. `-inf`. */
  readonly printed: string;
  readonly row: number;
}

/**
 * Line numbers of rows, kept only where they stop running in step: a table without comments
 * costs one entry, not two million.
 */
export class LineNumbers {
  private rows: number[] = [];
  private offsets: number[] = [];

  note(row: number, line: number): void {
    const offset = line - row;
    const last = this.offsets.length - 1;
    if (last >= 0 && this.offsets[last] === offset) return;
    this.rows.push(row);
    this.offsets.push(offset);
  }

  lineOf(row: number): number {
    let low = 0;
    let high = this.rows.length;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if ((this.rows[middle] ?? Infinity) <= row) low = middle;
      else high = middle;
    }
    return row + (this.offsets[low] ?? 1);
  }
}
