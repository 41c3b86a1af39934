import { BlobWriter, Uint8ArrayReader, ZipWriter } from '@zip.js/zip.js';
import { describe, expect, it } from 'vitest';
import { formatProblem, type Problem } from '@/lib/kernel/problem';
import { npyStructure, npzStructure, type Jumping } from '@/lib/formats/npy/npy-structure';
import { openNpz } from '@/lib/formats/npy/npz-source';
import { readerOf } from '@/lib/formats/arrays/element-type';
import { readNoise } from '@/lib/formats/read-noise';
import { parseNoise } from '@/lib/claims/noise';
import { fixture, inPieces, modesAndErrors, open, refusals } from './array-waves';

const file = (name: string, raw: Record<string, unknown> = {}) => open({ file: name, ...raw }, inPieces({ [name]: fixture(name) }));
const bytesAs = (name: string, bytes: Uint8Array, raw: Record<string, unknown> = {}) => open({ file: name, ...raw }, inPieces({ [name]: bytes }));

describe('an .npy is read as numpy wrote it', () => {
  it.each(['three', 'three-fortran', 'three-big-endian', 'three-v2', 'three-v3'])('%s.npy, to the last bit', async (name) => {
    expect(modesAndErrors(await file(`${name}.npy`))).toEqual([['2,2', expect.toSatisfy((x: number) => x < 1e-15)]]);
  });

  it('in single precision, which the budget is told as seven digits; doubles have no end of digits', async () => {
    const single = await file('three-single.npy', { columns: ['t', 're22', 'im22'] });
    expect(modesAndErrors(single)[0]?.[1]).toBeLessThan(3e-8);
    expect(single.waveform?.significantDigits).toBe(7);
    expect((await file('three.npy')).waveform?.significantDigits).toBeNull();
  });

  it('in half precision, value by value as it is stored, which the budget is told as three digits', async () => {
    const half = await file('half.npy', { columns: ['t', 're22', 'im22'] });
    const [mode] = half.waveform?.content.kind === 'modes' ? half.waveform.content.modes : [];
    // numpy prints these as 0.4604, 0.1947 and 0.3484: in binary16 they are whole numbers of 2⁻¹², 2⁻¹³ and 2⁻¹².
    expect([...(half.waveform?.axis.subarray(0, 3) ?? [])]).toEqual([0, 0.25, 0.5]);
    expect([mode?.re[1], mode?.im[1], mode?.re[2]]).toEqual([1886 / 4096, 1595 / 8192, 1427 / 4096]);
    expect(half.waveform?.significantDigits).toBe(3);
  });

  it.each([['zero below nothing', 0x8000, -0], ['the least', 0x0001, 2 ** -24], ['the largest below the normal ones', 0x03ff, 1023 / 2 ** 24], ['the least normal', 0x0400, 2 ** -14], ['the largest', 0x7bff, 65504], ['minus two', 0xc000, -2], ['without end', 0xfc00, -Infinity], ['no number', 0x7e00, Number.NaN]] as const)('half precision: %s', (_, bits, value) => {
    for (const littleEndian of [true, false]) {
      const view = new DataView(new ArrayBuffer(2));
      view.setUint16(0, bits, littleEndian);
      expect(readerOf({ base: 'f2', littleEndian, size: 2, firstAt: 0, secondAt: null })(view, 0)).toBe(value);
    }
  });

  it.each([['complex.npy', 1e-15], ['complex-single.npy', 3e-8]])('%s, a complex vector with even steps that the sheet gives', async (name, within) => {
    const [mode] = modesAndErrors(await file(name, { time: { start: 0, step: 0.25 }, mode: [2, 2] }));
    expect(mode).toEqual(['2,2', expect.toSatisfy((x: number) => x < within)]);
  });

  it('complex numbers as re and im, in whichever order the sheet names them', async () => {
    const [vector] = modesAndErrors(await file('complex.npy', { columns: ['t', 'im', 're'], time: { start: 0, step: 0.25 }, mode: [2, 2] }));
    expect(vector).toEqual(['2,2', expect.toSatisfy((x: number) => x < 1e-15)]);
    const all = modesAndErrors(await file('modes.npz', { columns: ['t', 'im', 're'] }));
    expect(all.map(([mode, far]) => [mode, far < 1e-15])).toEqual([['2,-2', true], ['2,2', true], ['3,3', true]]);
    expect((await file('modes.npz', { columns: ['t', 'amplitude', 'phase'] })).problems).toEqual([expect.stringContaining('modes.npz:data: saw 3×40 complex; expected real columns, since "columns" says amplitude, phase.')]);
  });

  it.each(['whole-i4.npy', 'whole-i8.npy'])('%s, whole numbers', async (name) => {
    const { waveform } = await file(name, { columns: ['t', 'plus', 'cross'] });
    expect(waveform?.content.kind === 'line-of-sight' && [waveform.content.plus[7], waveform.content.cross?.[7]]).toEqual([2, -7]);
  });

  it('one file a mode', async () => {
    const files = { 'a.npy': fixture('three.npy'), 'b.npy': fixture('three-big-endian.npy') };
    const { waveform } = await open({ files: { '2,2': 'a.npy', '3,3': 'b.npy' } }, inPieces(files));
    expect(waveform?.content.kind === 'modes' && waveform.content.modes.map(({ l, m }) => [l, m])).toEqual([[2, 2], [3, 3]]);
  });

  it('as a noise curve', async () => {
    const declaration = parseNoise('S', { file: 'three.npy', columns: ['f', 'asd', '_'] }, [], []);
    if (declaration?.kind !== 'table') throw new Error('no table');
    const read = await readNoise(declaration, inPieces({ 'three.npy': fixture('three.npy') }));
    expect(read.ok && [read.value.noise?.f[4], read.value.noise?.values[0], read.value.noise?.whereRow(4)]).toEqual([1, 0.5, 'three.npy[4]']);
  });

  it('as a noise curve of an .npz, whose arrays are named as the columns or where the sheet says', async () => {
    const declaration = parseNoise('S', { file: 'named.npz', columns: ['f', 'asd'], datasets: { f: 'time', asd: 'plus' } }, [], []);
    if (declaration?.kind !== 'table') throw new Error('no table');
    const read = await readNoise(declaration, inPieces({ 'named.npz': fixture('named.npz') }));
    const plain = await open({ file: 'named.npz', datasets: { plus: 'plus' }, time: 'time' }, inPieces({ 'named.npz': fixture('named.npz') }));
    expect(read.ok && [read.value.noise?.f, read.value.noise?.values, read.value.noise?.meaning]).toEqual([plain.waveform?.axis, plain.waveform?.content.kind === 'line-of-sight' && plain.waveform.content.plus, 'asd']);
    const bare = parseNoise('S', { file: 'named.npz', columns: ['f', 'psd'] }, [], []);
    const missing = bare?.kind === 'table' ? await readNoise(bare, inPieces({ 'named.npz': fixture('named.npz') })) : null;
    expect(missing && !missing.ok && missing.error.map(formatProblem)).toEqual([expect.stringContaining('saw no array "f"; expected one of')]);
  });

  it('and says what of a noise curve is wrongly named', () => {
    const told = (raw: object): string[] => {
      const problems: Problem[] = [];
      parseNoise('S', raw, [], problems);
      return problems.map(formatProblem);
    };
    expect(told({ file: 'a.npz', columns: ['f', 'asd'], datasets: { f: 'f', psd: 'p' } })).toEqual(['/noise/S/datasets/psd: saw "psd"; expected one of the columns f, asd.']);
    expect(told({ file: 'a.npy', columns: ['f', 'asd'], datasets: { f: 'f' } })).toEqual([expect.stringContaining('expected no dataset paths for an .npy, which is one array')]);
    expect(told({ file: 'a.txt', columns: ['f', 'asd'], datasets: { f: 'f' } })).toEqual([expect.stringContaining('expected no dataset paths for text')]);
    expect(told({ file: 'a.h5' })).toEqual([expect.stringContaining('/noise/S/columns: saw nothing; expected the columns of the file')]);
  });
});

describe('an .npy is refused with its reason', () => {
  it('when it holds objects: a pickle is never opened', async () => {
    expect((await file('pickled.npy')).problems).toEqual([expect.stringMatching(/^pickled\.npy: saw an array of Python objects, stored as a pickle; expected .* never opened/)]);
  });
  it.each([
    ['records.npy', 'an array of records'],
  ])('%s: %s', async (name, saw) => {
    expect((await file(name)).problems).toEqual([expect.stringContaining(`saw ${saw}`)]);
  });

  const three = fixture('three.npy');
  it.each([
    ['cut inside its header', three.subarray(0, 60), 'inside its header'],
    ['cut inside its numbers', three.subarray(0, 500), 'saw 372 bytes of numbers; expected 960, as the header says'],
    ['of a wrong beginning', Uint8Array.from(three, (b, i) => (i === 1 ? 0x58 : b)), 'does not begin as an .npy file does'],
    ['of a later version', Uint8Array.from(three, (b, i) => (i === 6 ? 9 : b)), 'version 9'],
    ['of no bytes', new Uint8Array(0), 'ends after 0 bytes'],
    ['that claims a huge shape', withShape('(2097152, 9000000)', three), 'expected N×3'],
    ['that claims too many samples', withShape('(2097153, 3)', three), 'saw 2097153 samples; expected at most 2097152 samples a mode. Thin the record'],
    ['of four dimensions', withShape('(2, 2, 2, 2)', three), 'the shape (2, 2, 2, 2)'],
    ['whose header is code', withShape("__import__('os')", three), 'expected a header with descr, fortran_order and shape'],
  ])('%s', async (_what, bytes, words) => {
    expect((await bytesAs('a.npy', bytes)).problems).toEqual([expect.stringContaining(words)]);
  });

  it.each([
    ['a (0, 3) array', withShape('(0, 3)', three).subarray(0, 128), {}, 'saw no samples; expected at least two samples.'],
    ['a (1, 3) array', withShape('(1, 3)', three).subarray(0, 152), {}, 'saw 1 sample; expected at least two samples.'],
    ['an empty vector', withShape('(0,)', fixture('complex.npy')).subarray(0, 128), { columns: ['t', 'plus'], time: { start: 0, step: 1 } }, 'saw 0'],
  ])('when it is %s', async (_what, bytes, raw, words) => {
    expect((await bytesAs('a.npy', bytes, raw)).problems).toEqual([expect.stringContaining(words)]);
  });

  it.each<[readonly string[], string]>([
    [['t', 'plus', 'cross'], 'plus, cross'],
    [['t', 'amplitude', 'phase'], 'amplitude, phase'],
    [['t', 're22', 'im22', 're33', 'im33'], 're22, im22, re33, im33'],
  ])('when it is complex and the sheet says %j', async (columns, named) => {
    expect((await file('complex.npy', { columns, time: { start: 0, step: 0.25 } })).problems).toEqual([`complex.npy: saw 40 complex; expected real columns, since "columns" says ${named}. Complex numbers are re and im of one mode: say so under "columns", or leave "columns" out.`]);
  });

  it('when it has other columns than the sheet says', async () => {
    expect((await file('three.npy', { columns: ['t', 're22', 'im22', 're33', 'im33'] })).problems).toEqual(['three.npy: saw 40×3; expected N×5 (t, re22, im22, re33, im33), N×4 with "time", or one complex vector with "time". Pick a part of it, such as [0,:].']);
  });
});

function withShape(shape: string, npy: Uint8Array): Uint8Array {
  const header = `{'descr': '<f8', 'fortran_order': False, 'shape': ${shape}, }`.padEnd(117) + '\n';
  return Uint8Array.of(...npy.subarray(0, 8), 118, 0, ...new TextEncoder().encode(header), ...npy.subarray(128));
}

describe('an .npz is read', () => {
  it.each([['modes.npz', 'L×N complex'], ['modes-pairs.npz', 'L×N×2 in Fortran order, packed']])('%s: %s', async (name) => {
    const found = modesAndErrors(await file(name));
    expect(found.map(([mode]) => mode)).toEqual(['2,-2', '2,2', '3,3']);
    expect(Math.max(...found.map(([, far]) => far))).toBeLessThan(1e-15);
  });
  it('by names that the sheet gives', async () => {
    const found = modesAndErrors(await file('named.npz', { datasets: { '2,2': 'h22', '3,3': 'h33' }, time: 'time' }));
    expect(found.every(([, far]) => far < 1e-15) && found.length).toBe(2);
    const sight = await file('named.npz', { datasets: { plus: 'plus' }, time: 'time' });
    expect(sight.waveform?.content).toMatchObject({ kind: 'line-of-sight', cross: null });
  });
  it('with a value that is not finite told by array and row (V01)', async () => {
    const { waveform, findings } = await file('not-finite.npz');
    expect([waveform, findings]).toEqual([null, ['Row 7 (counted from 0) of data in not-finite.npz: column im is NaN, at t = 1.75 M.']]);
  });
});

describe('an .npz is refused with its reason', () => {
  it('when an array in it is a pickle', async () => {
    expect((await file('pickled.npz')).problems).toEqual([expect.stringMatching(/^pickled\.npz:data: saw an array of Python objects/)]);
  });
  it('when a name is not in it', async () => {
    expect((await file('named.npz')).problems).toEqual(['named.npz: saw no array "t"; expected one of "time", "h22", "h33", "plus". Correct its name under "datasets" in the sheet.']);
  });
  it('when it was cut, or is something else', async () => {
    const whole = fixture('modes.npz');
    expect((await bytesAs('a.npz', whole.subarray(800))).problems).toEqual([expect.stringContaining('a damaged file in the archive')]);
    for (const bytes of [whole.subarray(0, 900), fixture('three.npy'), new Uint8Array(0)])
      expect((await bytesAs('a.npz', bytes)).problems).toEqual([expect.stringContaining('cannot be read as a zip archive')]);
  });
  it('when it would unpack to more than a file may hold, before a byte is unpacked', async () => {
    const bomb = await packed({ 'data.npy': new Uint8Array(3 * 2 ** 20) });
    const read = await openNpz('b.npz', inPieces({ 'b.npz': bomb })('b.npz'), { entries: 10, fileBytes: 2 ** 20, totalBytes: 2 ** 21, ratio: 1100 });
    expect(read.ok ? [] : read.error.map(formatProblem)).toEqual([expect.stringContaining('when unpacked'), expect.stringContaining('when unpacked')]);
  });
  it('when an array is longer than its header says: what is left over is never held', async () => {
    const long = await packed({ 't.npy': joined(fixture('three.npy'), new Uint8Array(2 ** 20)) });
    expect((await bytesAs('l.npz', long, { datasets: { '2,2': 't' } })).problems).toEqual([expect.stringContaining(`saw ${960 + 2 ** 20} bytes of numbers; expected 960`)]);
  });
});

async function packed(files: Readonly<Record<string, Uint8Array>>): Promise<Uint8Array> {
  const writer = new ZipWriter(new BlobWriter());
  for (const [name, bytes] of Object.entries(files)) await writer.add(name, new Uint8ArrayReader(bytes), { useWebWorkers: false });
  const blob = await writer.close();
  return new Uint8Array(await blob.arrayBuffer());
}

function joined(a: Uint8Array, b: Uint8Array): Uint8Array {
  const both = new Uint8Array(a.length + b.length);
  both.set(a);
  both.set(b, a.length);
  return both;
}

describe('what an array file holds is listed from its headers', () => {
  const jumping = (name: string): Jumping => {
    const bytes = fixture(name);
    return { size: bytes.length, read: (into, at) => (into.set(bytes.subarray(at, at + into.length)), Math.min(into.length, bytes.length - at)) };
  };
  it('of an .npz each array, with the reason beside what cannot be read', async () => {
    const found = await npzStructure('p.npz', jumping('pickled.npz'));
    expect(found.ok && found.value.entries.map(({ path, shape, complex, refusal }) => [path, shape, complex, refusal?.slice(0, 33) ?? null])).toEqual([['t', [40], false, null], ['modes', [3, 2], false, null], ['data', null, false, 'saw an array of Python objects, s'], ['allow_pickle', null, false, 'saw numbers of the type "|b1"; ex']]);
  });
  it('of an .npy its one array', async () => {
    expect(await npyStructure('c.npy', jumping('complex.npy'))).toMatchObject({ ok: true, value: { entries: [{ path: '', shape: [40], complex: true, refusal: null }] } });
  });
});

describe('the sheet is held to the format', () => {
  it.each([
    [{ file: 'a.h5' }, 'expected the datasets of the file, such as {"2,2": "/l2_m2"}'],
    [{ file: 'a.txt', columns: ['t', 're', 'im'], datasets: { '2,2': '/a' } }, 'no dataset paths for a text file'],
    [{ file: 'a.h5', datasets: { '2,2': '/a', plus: '/b' } }, 'datasets of one kind'],
    [{ file: 'a.h5', datasets: { '2,7': '/a' } }, 'l from 2 to 40 and |m| ≤ l'],
    [{ file: 'a.h5', datasets: { '2,2': '/a', ' 2, 2': '/b' } }, 'the mode 2,2 twice'],
    [{ file: 'a.h5', datasets: { re22: '/a' } }, '"re" with "im"'],
    [{ file: 'a.h5', datasets: { modes: '/a' } }, '"data" beside "modes"'],
    [{ file: 'a.h5', datasets: { '2,2': '/a' }, time: { start: 0, step: 0 } }, 'expected a step above zero'],
    [{ file: 'a.npy', time: '/t' }, 'times in a column of the array'],
    [{ files: { '2,2': 'a.npy', '3,3': 'b.txt' }, columns: ['t', 're', 'im'] }, 'files of one format'],
  ])('%j', (raw, words) => {
    expect(refusals(raw).join('\n')).toContain(words);
  });
});
