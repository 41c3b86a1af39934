import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { parseWaveform } from '@/lib/claims/waveform';
import type { WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { Waveform } from '@/lib/engine/contract/waveform';
import type { ReadHdf5 } from '@/lib/formats/hdf5/hdf5-ask';
import type { OpenFile } from '@/lib/formats/open-file';
import { readWaveform } from '@/lib/formats/read-waveform';
import { formatProblem, type Problem } from '@/lib/kernel/problem';

/** The files of `fixtures/make_arrays.py`, written by numpy and h5py, and the closed form that is in them. */
export const fixturePath = (name: string): string => join(process.cwd(), 'tests', 'unit', 'formats', 'fixtures', name);
export const fixture = (name: string): Uint8Array => new Uint8Array(readFileSync(fixturePath(name)));

export const times = Float64Array.from({ length: 40 }, (_, i) => i / 4);
export function wave(l: number, m: number): { readonly re: number[]; readonly im: number[] } {
  const phase = (t: number): number => (0.3 * l + 0.5 * m) * t;
  return { re: Array.from(times, (t) => Math.cos(phase(t)) / l), im: Array.from(times, (t) => Math.sin(phase(t)) / l) };
}

/** Files by name, in pieces of a length that fits no element. */
export const inPieces = (files: Readonly<Record<string, Uint8Array>>): OpenFile =>
  async function* open(name) {
    const bytes = files[name];
    if (!bytes) throw Object.assign(new Error('ENOENT'), { code: 'ENOENT' });
    for (let at = 0; at < bytes.length; at += 997) yield bytes.subarray(at, at + 997);
  };

export function declare(raw: Record<string, unknown>): WaveformDeclaration {
  const problems: Problem[] = [];
  const declaration = parseWaveform('A', raw, problems);
  if (!declaration) throw new Error(problems.map(formatProblem).join('\n'));
  return declaration;
}

export function refusals(raw: Record<string, unknown>): string[] {
  const problems: Problem[] = [];
  parseWaveform('A', raw, problems);
  return problems.map(formatProblem);
}

export interface Opened {
  readonly waveform: Waveform | null;
  readonly problems: readonly string[];
  readonly findings: readonly string[];
}

export async function open(raw: Record<string, unknown>, openFile: OpenFile, readHdf5: ReadHdf5 | null = null): Promise<Opened> {
  const read = await readWaveform(declare(raw), openFile, readHdf5);
  if (!read.ok) return { waveform: null, problems: read.error.map(formatProblem), findings: [] };
  return { waveform: read.value.waveform, problems: [], findings: read.value.findings.map(({ text }) => text) };
}

/** Modes with their largest distance from the closed form, and how far the times are off. */
export function modesAndErrors({ waveform, problems }: Opened): (readonly [string, number])[] {
  if (!waveform || waveform.content.kind !== 'modes') throw new Error(problems.join('\n') || 'no modes');
  const far = (a: ArrayLike<number>, b: ArrayLike<number>): number => (a.length === b.length ? Math.max(...Array.from(a, (x, i) => Math.abs(x - (b[i] ?? NaN)))) : Infinity);
  const times0 = far(waveform.axis, times);
  return waveform.content.modes.map(({ l, m, re, im }) => [`${l},${m}`, Math.max(times0, far(re, wave(l, m).re), far(im, wave(l, m).im))] as const);
}
