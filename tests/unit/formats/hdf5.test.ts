import { closeSync, fstatSync, openSync, readSync } from 'node:fs';
import { afterAll, describe, expect, it } from 'vitest';
import { readSeries } from '@/lib/formats/arrays/series';
import { modeFromName } from '@/lib/formats/arrays/mode-name';
import { listedModes } from '@/lib/formats/hdf5/attributes';
import { blocksOf } from '@/lib/formats/hdf5/blocks';
import type { ReadHdf5 } from '@/lib/formats/hdf5/hdf5-ask';
import { hdf5Source } from '@/lib/formats/hdf5/hdf5-source';
import { hdf5Structure } from '@/lib/formats/hdf5/hdf5-structure';
import { openOneFile } from '@/lib/formats/hdf5/one-file';
import { parseSelection } from '@/lib/formats/hdf5/selection';
import { parseNoise } from '@/lib/claims/noise';
import { readNoise } from '@/lib/formats/read-noise';
import { fixture, fixturePath, inPieces, modesAndErrors, open, times } from './array-waves';

// One thread reads one file; this one reads the files here one by one, so that each test costs no thread.
const descriptor = openSync(fixturePath('layouts.h5'), 'r');
afterAll(() => closeSync(descriptor));
const one = openOneFile({ size: fstatSync(descriptor).size, read: (into, at) => readSync(descriptor, into, 0, into.length, at) });
const here: ReadHdf5 = async (file, bytes, wish) => {
  for await (const chunk of bytes) void chunk;
  return readSeries(wish, hdf5Source(file, await one));
};
const layouts = (raw: Record<string, unknown>) => open({ file: 'l.h5', ...raw }, inPieces({ 'l.h5': fixture('layouts.h5') }), here);

describe('an HDF5 file is read, whatever its layout', () => {
  it.each<[string, Record<string, unknown>, readonly string[], number]>([
    ['one N×3 dataset a mode, packed with gzip, shuffle and checksums', { datasets: { '2,2': '/R0100/l2_m2', '3,3': '/R0100/l3_m3', '2,-2': 'R0100/l2_m-2' } }, ['2,-2', '2,2', '3,3'], 1e-15],
    ['N×2 with times beside it', { datasets: { '2,2': '/pairs/l2_m2', '3,3': '/pairs/l3_m3' }, time: '/t' }, ['2,2', '3,3'], 1e-15],
    ['complex vectors with times', { datasets: { '2,2': '/complex/l2_m2', '2,-2': '/complex/l2_m-2' }, time: '/t' }, ['2,-2', '2,2'], 1e-15],
    ['N×L complex, modes listed in an attribute', { datasets: { data: '/all' }, time: '/t' }, ['2,-2', '2,2', '3,3'], 1e-15],
    ['L×N complex in single precision, modes listed by name', { datasets: { data: '/all-named' }, time: '/t' }, ['2,-2', '2,2', '3,3'], 3e-8],
    ['amplitude and phase as vectors', { datasets: { amp22: '/amplitude', phase22: '/phase' }, time: '/t' }, ['2,2'], 1e-14],
    ['N×3 of times, amplitude and phase', { datasets: { '2,2': '/polar' }, columns: ['t', 'amplitude', 'phase'] }, ['2,2'], 1e-14],
    ['rows of one array, with even steps', { datasets: { re22: '/rows[0,:]', im22: '/rows[1,:]' }, time: { start: 0, step: 0.25 } }, ['2,2'], 3e-8],
    ['2×N, its rows being the columns', { datasets: { '2,2': '/rows' }, time: '/t' }, ['2,2'], 3e-8],
    ['columns of one array', { datasets: { re22: '/R0100/l2_m2[:,1]', im22: '/R0100/l2_m2[:,2]' }, time: '/R0100/l2_m2[:,0]' }, ['2,2'], 1e-15],
    ['big-endian numbers', { datasets: { '2,2': '/big-endian' } }, ['2,2'], 1e-15],
    ['big-endian complex numbers', { datasets: { '2,2': '/big-endian-complex' }, time: '/t' }, ['2,2'], 1e-15],
    ['fields of records on odd bytes', { datasets: { re22: '/table[re]', im22: '/table[im]' }, time: '/table[when]' }, ['2,2'], 3e-8],
    ['a dataset by a link inside the file', { datasets: { '2,2': '/again' } }, ['2,2'], 1e-15],
  ])('%s', async (_what, raw, modes, within) => {
    const found = modesAndErrors(await layouts(raw));
    expect(found.map(([mode]) => mode)).toEqual(modes);
    expect(Math.max(...found.map(([, far]) => far))).toBeLessThan(within);
  });

  it('half precision, to the last bit', async () => {
    const { waveform } = await layouts({ datasets: { plus: '/half' }, time: '/t' });
    expect(waveform?.content.kind === 'line-of-sight' && waveform.content.plus).toEqual(times);
    expect(waveform?.significantDigits).toBe(3);
  });

  it('a noise curve, from vectors or from columns of an array', async () => {
    const curveOf = async (datasets: Record<string, string>) => {
      const declaration = parseNoise('S', { file: 'l.h5', datasets }, [], []);
      const read = declaration?.kind === 'table' ? await readNoise(declaration, inPieces({ 'l.h5': fixture('layouts.h5') }), here) : null;
      return read?.ok ? read.value.noise : null;
    };
    const wave = await curveOf({ f: '/t', psd: '/amplitude' });
    expect([wave?.f, wave?.meaning, wave?.values.length]).toEqual([times, 'psd', 40]);
    const rows = await curveOf({ f: '/R0100/l2_m2[:,0]', asd: '/R0100/l2_m2[:,1]' });
    expect([rows?.f[4], rows?.values[0]]).toEqual([1, 0.5]);
  });

  it('whole numbers of two bytes', async () => {
    const { waveform } = await layouts({ datasets: { plus: '/whole[:,1]', cross: '/whole[:,2]' }, time: '/whole[:,0]' });
    expect(waveform?.content.kind === 'line-of-sight' && [waveform.content.plus[7], waveform.content.cross?.[7]]).toEqual([2, -7]);
  });

  it('with a value that is not finite told by dataset and row (V01)', async () => {
    expect((await layouts({ datasets: { '2,2': '/not-finite' } })).findings).toEqual(['Row 11 (counted from 0) of /not-finite in l.h5: column im is Infinity, at t = 2.75 M.']);
  });
});

describe('an HDF5 dataset is refused with its reason', () => {
  it.each<[Record<string, unknown>, string]>([
    [{ datasets: { '2,2': '/R0100/l4_m4' } }, 'l.h5: saw no "l4_m4" in "/R0100"; expected one of "l2_m-2", "l2_m2", "l3_m3".'],
    [{ datasets: { '2,2': '/R0100' } }, 'l.h5:/R0100: saw a group; expected a dataset.'],
    [{ datasets: { '2,2': '/t/x' } }, 'l.h5:/t: saw a dataset; expected a group.'],
    [{ datasets: { '2,2': '/pairs/l2_m2' } }, 'saw 40 samples without times; expected a dataset with their times. Name it under "time"'],
    [{ datasets: { '2,2': '/R0100/l2_m2' }, time: '/t' }, 'saw 40×3, with times of its own beside "time"; expected either its own times or "time".'],
    [{ datasets: { '2,2': '/all' }, time: '/t' }, 'saw 40×3 complex; expected N×3 (t, re, im), N×2 with "time", or one complex vector with "time". For all modes in one array, name it "data"'],
    [{ datasets: { '2,2': '/amplitude' }, time: '/t' }, 'Give its real and imaginary parts as datasets of their own'],
    [{ datasets: { data: '/complex/l2_m2' }, time: '/t' }, 'saw 40 complex; expected L×N complex numbers, or L×N×2 real ones.'],
    [{ datasets: { plus: '/words' }, time: '/t' }, 'saw text; expected'],
    [{ datasets: { plus: '/nothing' }, time: '/t' }, 'saw a dataset without numbers'],
    [{ datasets: { plus: '/one' }, time: '/t' }, 'saw a single number; expected one real vector'],
    [{ datasets: { plus: '/rows' }, time: '/t' }, 'saw 2×40; expected one real vector. Pick one column or row of it'],
    [{ datasets: { plus: '/rows[2,:]' }, time: '/t' }, 'a selection with an index or ":" for each dimension'],
    [{ datasets: { plus: '/table[nothing]' }, time: '/t' }, 'saw records without a field of that name (when, flag, re, im)'],
    [{ datasets: { plus: '/table' }, time: '/t' }, 'Pick a field, such as [re].'],
  ])('%j', async (raw, words) => {
    expect((await layouts(raw)).problems.join('\n')).toContain(words);
  });

  it('in a browser, where no thread reads it', async () => {
    expect((await open({ file: 'l.h5', datasets: { '2,2': '/t' } }, inPieces({ 'l.h5': fixture('layouts.h5') }))).problems).toEqual(['l.h5: saw an HDF5 file; expected text, .npy or .npz for a first look in the browser. Attach it and run the check: the server reads it.']);
  });
});

describe('what a file holds is listed', () => {
  it('with shapes, types and attributes, and the reason beside what cannot be used', async () => {
    const { entries, cut } = hdf5Structure(await one);
    const at = (path: string) => entries.find((entry) => entry.path === path);
    expect(cut).toBe(false);
    expect(at('/R0100')).toMatchObject({ kind: 'group', attributes: [{ name: 'radius', value: '100' }] });
    expect(at('/R0100/l3_m3')).toMatchObject({ shape: [40, 3], type: 'real numbers of 8 bytes', attributes: [{ name: 'l', value: '3' }, { name: 'm', value: '3' }], refusal: null });
    expect(at('/all')).toMatchObject({ complex: true, attributes: [{ name: 'modes', value: '2, 2, 2, -2, 3, 3' }] });
    expect(at('/table')).toMatchObject({ type: 'records (when, flag, re, im)', refusal: null });
    expect(at('/words')?.refusal).toContain('saw text');
  });
});

describe('an attribute lists modes', () => {
  const flat = (name: string, values: (number | string)[], shape = [values.length]) => ({ name, shape, values });
  it.each<[string, Parameters<typeof listedModes>[0][number], string | null]>([
    ['when it is called so', flat('modes', [2, 2, 2, -2], [2, 2]), '2,2,2,-2'],
    ['when it is called so, with names', flat('Columns', ['h22', 'h2-1']), '2,2,2,-1'],
    ['when its values have the full form', flat('labels', ['l2_m2', 'l3_m-3']), '2,2,3,-3'],
    ['when its values are pairs', flat('labels', ['2,2', '(3, -3)']), '2,2,3,-3'],
    ['never as a version', flat('version', ['v21']), null],
    ['never as a size', flat('size', [2, 1], [1, 2]), null],
    ['never as a longer text', flat('source', ['run l2_m2.dat']), null],
  ])('%s', (_what, attribute, modes) => {
    expect(listedModes([attribute])?.flat().join(',') ?? null).toBe(modes);
  });
});

describe('small pieces', () => {
  it.each([['l2_m2', '2,2'], ['Y_l2_m-1.dat', '2,-1'], ['l=3, m=-3', '3,-3'], ['2,-2', '2,-2'], ['(4, 4)', '4,4'], ['h22', '2,2'], ['psi4_33', '3,3'], ['re2-1', '2,-1'], ['t', 'null'], ['h29', 'null'], ['time', 'null']])('the name %s says the mode %s', (name, mode) => {
    expect(String(modeFromName(name))).toBe(mode);
  });
  it.each([['/a/b', '/a/b', null, null], ['a', '/a', null, null], ['/a[0,:]', '/a', [0, null], null], ['/a[re]', '/a', null, 're']])('%s is a selection', (text, path, indices, field) => {
    expect(parseSelection(text)).toEqual({ path, indices, field });
  });
  it.each<[number[], number[] | null, number]>([[[1000, 3], null, 8], [[2_000_000, 3], [1024, 3], 8], [[5, 70_001], [2, 1000], 16], [[1, 50_000], [3, 999], 16], [[7], null, 8]])('blocks of %j in chunks of %j cover each element once, a chunk never twice', (counts, chunks, size) => {
    const { blocks, largest } = blocksOf(counts, chunks, size);
    let covered = 0;
    for (const { offset, count } of blocks()) {
      const n = count.reduce((a, b) => a * b, 1);
      covered += n;
      expect(n).toBeLessThanOrEqual(largest);
      expect(offset.every((o, d) => counts[d] === 1 || o % (chunks?.[d] ?? 1) === 0)).toBe(true);
    }
    expect(covered).toBe(counts.reduce((a, b) => a * b, 1));
    expect(largest * size).toBeLessThanOrEqual(2 ** 23);
  });
});
