import { existsSync, readFileSync } from 'node:fs';
import type { BinaryFacts, Mode, Variable, Waveform } from '@/lib/engine/contract/waveform';
import { modeSet } from './energy-signals';

/** Claim sheets with data beside this project; they are read, never copied. */
export const sheets = '../shared/reference/sheets';
export const isThere = existsSync(sheets);
export const title = (what: string): string => (isThere ? what : `${what} (skipped: ${sheets} is missing)`);

export interface ExpectedFigure {
  readonly value: number;
  readonly tolerance: number;
  readonly kind: 'abs' | 'rel';
}

interface ExpectedClaim {
  readonly points: readonly [ExpectedFigure];
  readonly components?: Readonly<Record<string, ExpectedFigure>>;
}

export const expectedClaim = (sheet: string, claim: string): ExpectedClaim =>
  (JSON.parse(readFileSync(`${sheets}/${sheet}/expected.json`, 'utf8')) as { claims: Readonly<Record<string, ExpectedClaim>> }).claims[claim]!;

export const toleranceOf = ({ kind, tolerance }: ExpectedFigure): { relative: number } | { absolute: number } => (kind === 'rel' ? { relative: tolerance } : { absolute: tolerance });

interface SheetWaveform {
  readonly file?: string;
  readonly files?: Readonly<Record<string, string>>;
  readonly columns: readonly string[];
  readonly variable: Variable;
  readonly negativeM?: 'mirror' | 'given' | 'none';
  readonly binary?: BinaryFacts;
}

function columnsOf(path: string): Float64Array[] {
  const lines = readFileSync(path, 'utf8')
    .split('\n')
    .filter((line) => line.trim() !== '' && !line.startsWith('#'));
  const rows = lines.map((line) => line.trim().split(/\s+/).map(Number));
  return rows[0]!.map((_, c) => Float64Array.from(rows, (row) => row[c]!));
}

/** Reads a sheet's one waveform: one file a mode, or columns named re22 im22 …. */
export function waveformOf(sheet: string): Waveform {
  const claim = JSON.parse(readFileSync(`${sheets}/${sheet}/claim.json`, 'utf8')) as { waveforms: Record<string, SheetWaveform> };
  const w = Object.values(claim.waveforms)[0]!;
  const modes: Mode[] = [];
  let axis = new Float64Array(0);
  for (const [key, file] of Object.entries(w.files ?? {})) {
    const [t, re, im] = columnsOf(`${sheets}/${sheet}/${file}`);
    const [l, m] = key.split(',').map(Number);
    axis = t as Float64Array<ArrayBuffer>;
    modes.push({ l: l!, m: m!, re: re!, im: im! });
  }
  if (w.file !== undefined) {
    const table = columnsOf(`${sheets}/${sheet}/${w.file}`);
    axis = table[0]! as Float64Array<ArrayBuffer>;
    w.columns.forEach((name, c) => {
      const found = /^re(\d)(-?\d)$/.exec(name);
      if (found)
        modes.push({ l: Number(found[1]), m: Number(found[2]), re: table[c]!, im: table[w.columns.indexOf(`im${found[1]}${found[2]}`)]! });
    });
  }
  return { ...modeSet(axis, modes, w.variable, w.binary), negativeM: w.negativeM ?? null };
}
