import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it, vi } from 'vitest';
import { hdf5Limits, readHdf5, readHdf5Within, readStructure } from '@/lib/threads/read-hdf5';
import { formatProblem } from '@/lib/kernel/problem';
import { houseLimits, openSheetThreads } from '@/lib/worker/threads/run-sheet';
import { fixture, fixturePath, inPieces, open } from '../formats/array-waves';

const hostile = inPieces({ 'h.h5': fixture('hostile.h5') });

describe('a hostile HDF5 file never hurts its reader', () => {
  it('every way out of the file is refused by name, and so is what is too large', async () => {
    const parts: readonly (readonly [string, string])[] = [
      ['/virtual', 'saw a virtual dataset, which takes its numbers from elsewhere'],
      ['/elsewhere/x', 'saw a link to another file, or numbers stored in one'],
      ['/elsewhere-data', 'saw a link to another file, or numbers stored in one'],
      ['/stored-outside', 'saw a link to another file, or numbers stored in one'],
      ['/stored-in-dice', 'saw a link to another file, or numbers stored in one'],
      ['/stored-in-itself', 'saw a link to another file, or numbers stored in one'],
      ['/round', 'saw links that lead in a circle'],
      ['/dangling', 'saw a link that leads nowhere'],
      ['/endless', 'saw 1099511627776 samples; expected at most 2097152 samples a mode. Thin the record'],
      ['/long', 'saw 2097153 samples'],
      ['/great-chunk', 'saw chunks of 3221225472 bytes'],
      ['/unknown-filter', 'saw numbers packed by a filter that is not read here (lzf, id 32000)'],
    ];
    const datasets = Object.fromEntries(parts.map(([path], i) => [`40,${i}`, path]));
    const { problems } = await open({ file: 'h.h5', datasets }, hostile, readHdf5);
    expect(problems).toHaveLength(parts.length);
    parts.forEach(([path, words], i) => expect(problems[i], path).toContain(words));
    expect(problems.join()).not.toMatch(/passwd|hostname|__w|libhdf5/);
  });

  it('circles and depths end, and what leads out is listed with its reason', async () => {
    const found = await readStructure('h.h5', 'hdf5', hostile('h.h5'));
    if (!found.ok) throw new Error(found.error.map(formatProblem).join());
    const { entries, cut } = found.value;
    expect([cut, entries.filter(({ path }) => path.startsWith('/cycle')).map(({ path }) => path)]).toEqual([true, ['/cycle', '/cycle/self']]);
    expect(entries.filter(({ path, refusal }) => /^\/(virtual|elsewhere|elsewhere-data|dangling|round|about)$/.test(path) && refusal === null)).toEqual([]);
  });

  it('what would make a long list is cut to an answer of moderate length', async () => {
    const bytes = fixture('long.h5');
    const found = await readStructure('l.h5', 'hdf5', inPieces({ 'l.h5': bytes })('l.h5'));
    if (!found.ok) throw new Error(found.error.map(formatProblem).join());
    const { entries, cut } = found.value;
    expect(cut).toBe(true);
    expect(entries.length).toBeGreaterThan(30);
    expect(Buffer.byteLength(JSON.stringify(found.value))).toBeLessThan(1.01 * 2 ** 20);
    expect(Math.max(...entries.flatMap(({ path, type, refusal }) => [path.length, type.length, refusal?.length ?? 0]))).toBeLessThan(1001);
    expect(entries.find(({ path }) => path === '/fields')?.type).toBe(`records (${'f'.repeat(60)}…, re)`);
  });

  it('a packed bomb ends at the memory that its thread may have', async () => {
    const narrow = readHdf5Within({ ...hdf5Limits, memoryBytes: 64 * 2 ** 20 });
    const { problems } = await open({ file: 'b.h5', datasets: { '2,2': '/bomb' } }, inPieces({ 'b.h5': fixture('bomb.h5') }), narrow);
    expect(problems).toEqual([expect.stringMatching(/^b\.h5:\/bomb: saw (a file that needs more memory|a part of the file that cannot be read)/)]);
  });

  it('a reader that takes too long is ended, and leaves nothing behind', async () => {
    const mine = () => readdirSync(tmpdir()).filter((name) => name.startsWith(`counterfoil-run-${process.pid}-`));
    const before = mine();
    const { problems } = await open({ file: 'h.h5', datasets: { '2,2': '/t' } }, hostile, readHdf5Within({ ...hdf5Limits, timeMs: 5 }));
    expect(problems).toEqual([expect.stringContaining('saw a file that took longer than 0.005 s to read')]);
    expect(mine()).toEqual(before);
  });

  it('a reader that is not there is a fault of the program, told as one and logged', async () => {
    const folder = vi.spyOn(process, 'cwd').mockReturnValue('/no/such/folder');
    const log = vi.spyOn(console, 'error').mockReturnValue(undefined);
    try {
      const { problems } = await open({ file: 'h.h5', datasets: { '2,2': '/t' } }, hostile, readHdf5);
      expect(problems).toEqual(['h.h5: saw no reader: the part of the program that opens such files did not start; expected a file that is read. This is a fault of the program, not of the file. Try again later, or tell the administrator.']);
      expect(log.mock.calls.map(([line]) => JSON.parse(String(line)) as unknown)).toEqual([expect.objectContaining({ level: 'error', where: 'hdf5 thread', message: expect.stringContaining('hdf5-thread-entry.mjs') })]);
    } finally {
      folder.mockRestore();
      log.mockRestore();
    }
  });

  const whole = fixture('layouts.h5');
  it.each<[string, Uint8Array, string]>([
    ['cut short', whole.subarray(0, 30_000), 'ends before its own stated end'],
    ['overwritten in its middle', Uint8Array.from(whole, (b, i) => (i > 200 && i < 45_000 ? (b * 31 + i) & 255 : b)), 'expected a whole HDF5 file'],
  ])('a file %s is refused', async (_what, bytes, words) => {
    const { problems } = await open({ file: 'x.h5', datasets: { '2,2': '/R0100/l2_m2' } }, inPieces({ 'x.h5': bytes }), readHdf5);
    expect(problems).toEqual([expect.stringContaining(words)]);
  });
});

describe('a sheet with an HDF5 file', () => {
  it('is read in the worker’s thread, and hashed as it is read', async () => {
    const threads = openSheetThreads({ ...houseLimits, threads: 1 });
    const sheet = { format: 'counterfoil-claim/1', waveforms: { A: { file: 'l.h5', datasets: { '2,2': '/R0100/l2_m2' }, negativeM: 'mirror' } }, claims: [{ id: 'E', quantity: 'radiated-energy', of: { a: 'A' }, claimed: '0' }] };
    const run = await threads.run({ sheet, files: [{ name: 'l.h5', path: fixturePath('layouts.h5') }], withFigures: false, explain: false }, { onProgress: () => undefined, signal: new AbortController().signal });
    await threads.close();
    if (!run.ok) throw new Error(run.error.map(formatProblem).join('\n'));
    expect(run.value.result.files).toEqual([{ name: 'l.h5', bytes: fixture('layouts.h5').length, sha256: expect.stringMatching(/^[0-9a-f]{64}$/) }]);
    expect(run.value.result.claims[0]?.points[0]?.value).toBeGreaterThan(0);
  });
});

const event = join(process.cwd(), '..', 'shared', 'reference', 'data', 'detector');
describe.skipIf(!existsSync(event))('the open data of the first event (skipped where the reference data is not)', () => {
  const files = (name: string) => inPieces({ [name]: new Uint8Array(readFileSync(join(event, name))) });

  it('the template is read by its rows, and is what the text of it says', async () => {
    const name = 'GW150914_4_template.hdf5';
    const { waveform, problems } = await open({ file: name, datasets: { plus: '/template[0,:]', cross: '/template[1,:]' }, time: { start: -16, step: 1 / 4096 }, timeUnit: 's', amplitudeUnit: 'strain', totalMassMsun: 70.98, distanceMpc: 1 }, files(name), readHdf5);
    if (waveform?.content.kind !== 'line-of-sight') throw new Error(problems.join());
    const { plus, cross } = waveform.content;
    expect([plus.length, waveform.uniformStep, waveform.significantDigits]).toEqual([131072, 1 / 4096, 7]);
    const rows = readFileSync(join(event, '..', '..', 'sheets', 'event', 'template.txt'), 'utf8').split('\n').filter((line) => line.trim() !== '' && !line.startsWith('#')).map((line) => line.trim().split(/\s+/).map(Number));
    const peak = plus.reduce((most, x) => Math.max(most, Math.abs(x)), 0);
    const textPeak = rows.reduce((most, row) => Math.max(most, Math.abs(row[1] ?? NaN)), 0);
    expect(textPeak / peak).toBeCloseTo(1, 5);
    expect(cross?.length).toBe(131072);
  });

  it('a detector’s strain, packed, with the even steps that its attributes name', async () => {
    const name = 'H-H1_LOSC_4_V2-1126259446-32.hdf5';
    const found = await readStructure(name, 'hdf5', files(name)(name));
    expect(found.ok && found.value.entries.find(({ path }) => path === '/strain/Strain')).toMatchObject({ shape: [131072], attributes: expect.arrayContaining([{ name: 'Xspacing', value: '0.000244140625' }]) });
    const { waveform } = await open({ file: name, datasets: { plus: '/strain/Strain' }, time: { start: 0, step: 0.000244140625 }, timeUnit: 's', amplitudeUnit: 'strain' }, files(name), readHdf5);
    expect(waveform?.axis.length).toBe(131072);
  });
});
