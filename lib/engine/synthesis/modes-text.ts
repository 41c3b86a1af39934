import type { Mode } from '@/lib/engine/contract/waveform';

export interface ModesText {
  /** First header line, e.g. the group and the run. */
  readonly title: string;
  /** Further header lines. */
  readonly notes: readonly string[];
  readonly t: Float64Array;
  readonly modes: readonly Mode[];
  readonly significantDigits: number;
  /** What the modes are, for the header; r h / M where nothing is said. */
  readonly of?: string;
}

/** Caution 16: the signals are stylised, and a file may travel without the page it came from. */
export const watermark = 'Stylised closed-form demonstration signal. Not a simulation: never use it as a reference waveform.';

export const modeColumns = (modes: readonly Mode[]): string[] => ['t', ...modes.flatMap(({ l, m }) => [`re${l}${m}`, `im${l}${m}`])];

/**
 * Text columns of a mode set, with a header that carries the watermark.
 * Shape:  header lines start with '#'; the last of them names the columns `t re22 im22 …`.
 * Units:  t in M, samples rh/M or what `of` says.
 * Error:  samples rounded to `significantDigits`; times as the shortest decimal of twelve digits.
 * Fails:  never.
 * Source: claim sheet, layout of text columns.
 */
export function formatModesText({ title, notes, t, modes, significantDigits, of = 'r h / M' }: ModesText): string {
  const header = [title, watermark, ...notes, `time in M, modes of ${of}`, modeColumns(modes).join(' ')].map((line) => `# ${line}`);
  const lines: string[] = [];
  for (let i = 0; i < t.length; i++) {
    const cells = [shortest(t[i]!)];
    for (const { re, im } of modes) cells.push(rounded(re[i]!, significantDigits), rounded(im[i]!, significantDigits));
    lines.push(cells.join(' '));
  }
  return [...header, ...lines, ''].join('\n');
}

const shortest = (x: number): string => String(Number(x.toPrecision(12)));
/** −0 prints as 0: the sign of a rounded zero carries nothing. */
const rounded = (x: number, digits: number): string => (x === 0 ? '0' : x.toPrecision(digits));
