import type { Column, WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { LineOfSight, Mode, ModeSet } from '@/lib/engine/contract/waveform';
import type { ModeIndex } from '@/lib/engine/contract/settings';
import type { NumberTable } from './text/table';

/** A table with the mode its file stands for, when the sheet gives one file a mode. */
export interface ModeTable {
  readonly table: NumberTable;
  readonly mode: ModeIndex | null;
}

/** Columns to content in the house convention (settings.md rule 2.1): h = plus − i·cross, ψ₄ by its factor. */
export function contentOf(declaration: WaveformDeclaration, tables: readonly ModeTable[]): ModeSet | LineOfSight {
  const luminosity = declaration.columns.findIndex((column) => column.role.kind === 'luminosity');
  if (luminosity >= 0) return { kind: 'line-of-sight', plus: tables[0]!.table.columns[luminosity]!, cross: null };
  const plus = declaration.columns.findIndex((column) => column.role.kind === 'plus');
  if (plus >= 0) return polarisations(declaration, tables[0]!.table, plus);
  const modes = tables.flatMap(({ table, mode }) => modesOf(declaration, table, mode));
  modes.sort((p, q) => p.l - q.l || p.m - q.m);
  const [only] = modes;
  if (declaration.domain === 'frequency' && declaration.modeAssumed && declaration.timeUnit === 'Hz' && only)
    return { kind: 'line-of-sight', plus: only.re, plusIm: only.im, cross: null, crossIm: null };
  return { kind: 'modes', modes };
}

function polarisations(declaration: WaveformDeclaration, table: NumberTable, plusAt: number): LineOfSight {
  const crossAt = declaration.columns.findIndex((column) => column.role.kind === 'cross');
  const factor = 1 / factorOf(declaration);
  const plus = scaled(table.columns[plusAt]!, factor);
  const flip = declaration.polarisation === 'plus-plus-i-cross' ? -1 : 1;
  const cross = crossAt < 0 ? null : scaled(table.columns[crossAt]!, flip * factor);
  return { kind: 'line-of-sight', plus, cross };
}

const factorOf = (declaration: WaveformDeclaration): number => (declaration.variable === 'psi4' ? declaration.psi4Factor : 1);

function modesOf(declaration: WaveformDeclaration, table: NumberTable, fileMode: ModeIndex | null): Mode[] {
  const found: Mode[] = [];
  declaration.columns.forEach((column, k) => {
    if (column.role.kind !== 're' && column.role.kind !== 'amplitude') return;
    const partner = partnerOf(declaration.columns, column);
    const first = table.columns[k]!;
    const second = table.columns[partner]!;
    const [l, m] = column.role.mode ?? fileMode ?? declaration.mode;
    found.push({ l, m, ...rectangular(column.role.kind === 'amplitude', first, second, declaration) });
  });
  return found;
}

function partnerOf(columns: readonly Column[], column: Column): number {
  const wanted = column.role.kind === 're' ? 'im' : 'phase';
  const mode = 'mode' in column.role ? column.role.mode : null;
  return columns.findIndex(({ role }) => role.kind === wanted && String(role.mode) === String(mode));
}

function rectangular(polar: boolean, first: Float64Array, second: Float64Array, declaration: WaveformDeclaration): Pick<Mode, 're' | 'im'> {
  const factor = 1 / factorOf(declaration);
  const conjugate = declaration.polarisation === 'plus-plus-i-cross' ? -1 : 1;
  const re = new Float64Array(first.length);
  const im = new Float64Array(first.length);
  for (let i = 0; i < re.length; i++) {
    const x = polar ? first[i]! * Math.cos(second[i]!) : first[i]!;
    const y = polar ? first[i]! * Math.sin(second[i]!) : second[i]!;
    re[i] = x * factor;
    im[i] = y * factor * conjugate;
  }
  return { re, im };
}

function scaled(samples: Float64Array, factor: number): Float64Array {
  return factor === 1 ? samples : samples.map((x) => x * factor);
}
