import { existsSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Mode, Variable, Waveform } from '@/lib/engine/contract/waveform';
import { energyBy, measureEnergyOf, modeSet } from './energy-signals';

/** Claim sheets with data beside this project; they are read, never copied. */
const sheets = '../shared/reference/sheets';
const isThere = existsSync(sheets);
const title = (what: string): string => (isThere ? what : `${what} (skipped: ${sheets} is missing)`);

interface ExpectedFigure {
  readonly value: number;
  readonly tolerance: number;
  readonly kind: 'abs' | 'rel';
}

const expectedOf = (sheet: string, claim: string): ExpectedFigure =>
  JSON.parse(readFileSync(`${sheets}/${sheet}/expected.json`, 'utf8')).claims[claim].points[0] as ExpectedFigure;

interface SheetWaveform {
  readonly file?: string;
  readonly files?: Readonly<Record<string, string>>;
  readonly columns: readonly string[];
  readonly variable: Variable;
}

function columnsOf(path: string): Float64Array[] {
  const lines = readFileSync(path, 'utf8')
    .split('\n')
    .filter((line) => line.trim() !== '' && !line.startsWith('#'));
  const rows = lines.map((line) => line.trim().split(/\s+/).map(Number));
  return rows[0]!.map((_, c) => Float64Array.from(rows, (row) => row[c]!));
}

/** Reads a sheet's one waveform: one file a mode, or columns named re22 im22 …. */
function waveformOf(sheet: string): Waveform {
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
  return modeSet(axis, modes, w.variable);
}

type Case = readonly [sheet: string, claim: string, settings: DeclaredSettings];
const floor = { integrationFloor: 0.05 };
const cases: readonly Case[] = [
  ['run3-strain', 'energy', {}],
  ['run3-strain', 'energy-22', { modes: [[2, 2]] }],
  ['run3-strain', 'energy-l2', { lMax: 2 }],
  ['run3-news', 'energy', floor],
  ['run3-news', 'energy-22', { ...floor, modes: [[2, 2]] }],
  ['run3-psi4', 'energy', floor],
  ['run3-psi4', 'energy-l2', { ...floor, lMax: 2 }],
  ['simulation', 'energy', {}],
  [
    'simulation',
    'energy-22',
    {
      modes: [
        [2, 2],
        [2, -2],
      ],
    },
  ],
];

describe.runIf(isThere)(
  title(
    'energies of the reference sheets (required: published; closed forms, and arXiv:1904.04831 data integrated by an independent script)',
  ),
  () => {
    it.each(cases)('%s, %s, by both routes', (sheet, claim, settings) => {
      const { value, tolerance, kind } = expectedOf(sheet, claim);
      const wave = waveformOf(sheet);
      for (const route of ['A', 'B'] as const) {
        expect(energyBy(route, wave, settings)).toAgreeWith(value, kind === 'rel' ? { relative: tolerance } : { absolute: tolerance });
      }
    });

    it('find the same energy in the simulation by differences and by splines, within U', () => {
      const [point] = measureEnergyOf(waveformOf('simulation')).points;
      expect(point!.routes.B).toAgreeWith(point!.routes.A!, { absolute: point!.expandedUncertainty! });
      expect(point!.value).toAgreeWith(0.038114, 5e-7);
    });

    it('raise no burst in a record that was cut long after its start', () => {
      expect(measureEnergyOf(waveformOf('simulation')).findings).toEqual([]);
    });
  },
);
