import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import type { WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { parseWaveform } from '@/lib/claims/waveform';
import { FileRefused, type OpenFile } from '@/lib/formats/open-file';
import { readTable } from '@/lib/formats/read-table';
import { tableLimits } from '@/lib/formats/text/table-parser';
import { readWaveform } from '@/lib/formats/read-waveform';
import { formatProblem, type Problem } from '@/lib/kernel/problem';

type Files = Readonly<Record<string, string | Uint8Array>>;

const filesOf = (files: Files): OpenFile =>
  async function* open(name) {
    const content = files[name];
    if (content === undefined) throw Object.assign(new Error(`ENOENT /srv/secret/${name}`), { code: 'ENOENT' });
    yield typeof content === 'string' ? new TextEncoder().encode(content) : content;
  };

function declare(raw: Record<string, unknown>): WaveformDeclaration {
  const problems: Problem[] = [];
  const declaration = parseWaveform('A', raw, problems);
  if (!declaration) throw new Error(problems.map(formatProblem).join('\n'));
  return declaration;
}

async function read(raw: Record<string, unknown>, files: Files) {
  const result = await readWaveform(declare(raw), filesOf(files));
  if (!result.ok) throw new Error(result.error.map(formatProblem).join('\n'));
  return result.value;
}

async function waveform(raw: Record<string, unknown>, files: Files): Promise<Waveform> {
  const { waveform: found } = await read(raw, files);
  if (!found) throw new Error('stopped by a finding');
  return found;
}

const modesOf = (w: Waveform) => (w.content.kind === 'modes' ? w.content.modes.map(({ l, m, re, im }) => [l, m, [...re], [...im]]) : null);

describe('a waveform is read', () => {
  it('from complex columns of many modes, in order of l and m', async () => {
    const w = await waveform({ file: 'a.txt', columns: ['t', 're33', 'im33', 're2-1', 'im2-1'] }, { 'a.txt': '0 1 2 3 4\n1 5 6 7 8\n' });
    expect(modesOf(w)).toEqual([[2, -1, [3, 7], [4, 8]], [3, 3, [1, 5], [2, 6]]]);
    expect([w.domain, w.unit, w.amplitudeUnit, w.variable, w.uniformStep, w.negativeM]).toEqual(['time', 'M', 'rh/M', 'strain', 1, null]);
  });

  it('from a single complex pair as the (2,2) mode, or the mode the sheet names', async () => {
    const files = { 'a.txt': '0 1 2\n1 3 4\n' };
    expect(modesOf(await waveform({ file: 'a.txt', columns: ['t', 're', 'im'] }, files))?.[0]?.slice(0, 2)).toEqual([2, 2]);
    expect(modesOf(await waveform({ file: 'a.txt', columns: ['t', 're', 'im'], mode: [3, -2] }, files))?.[0]?.slice(0, 2)).toEqual([3, -2]);
  });

  it('from amplitude and phase as A·e^{i·phase}', async () => {
    const w = await waveform({ file: 'a.txt', columns: ['t', 'amp22', 'phase22'] }, { 'a.txt': '0 2 0\n1 2 1.5707963267948966\n' });
    const [mode] = w.content.kind === 'modes' ? w.content.modes : [];
    expect(mode?.re[0]).toBe(2);
    expect(mode?.im[1]).toBeCloseTo(2, 15);
  });

  it('from plus and cross along a line of sight, and from plus alone', async () => {
    const both = await waveform({ file: 'a.txt', columns: ['t', 'plus', 'cross'], timeUnit: 's', amplitudeUnit: 'strain' }, { 'a.txt': '0 1 2\n1 3 4\n' });
    expect(both.content).toEqual({ kind: 'line-of-sight', plus: Float64Array.of(1, 3), cross: Float64Array.of(2, 4) });
    const alone = await waveform({ file: 'a.txt', columns: ['t', 'plus'] }, { 'a.txt': '0 1\n1 3\n' });
    expect(alone.content).toEqual({ kind: 'line-of-sight', plus: Float64Array.of(1, 3), cross: null });
  });

  it('from one file a mode, when their times agree', async () => {
    const raw = { files: { '2,2': 'p.txt', '2,-2': 'm.txt' }, columns: ['t', 're', 'im'] };
    const w = await waveform(raw, { 'p.txt': '0 1 2\n1 3 4\n', 'm.txt': '0 5 6\n1 7 8\n' });
    expect(modesOf(w)).toEqual([[2, -2, [5, 7], [6, 8]], [2, 2, [1, 3], [2, 4]]]);
    const apart = await readWaveform(declare(raw), filesOf({ 'p.txt': '0 1 2\n1 3 4\n', 'm.txt': '0 5 6\n1.5 7 8\n' }));
    expect(!apart.ok && apart.error.map(formatProblem)).toEqual(['m.txt:2: saw 1.5 against 1; expected the times of p.txt: all modes of a waveform share one axis.']);
  });

  it('with skipped columns, in any order of columns', async () => {
    const w = await waveform({ file: 'a.txt', columns: ['_', 'im', 't', 're'] }, { 'a.txt': 'x 2 0 1\ny 4 1 3\n' });
    expect(modesOf(w)).toEqual([[2, 2, [1, 3], [2, 4]]]);
  });

  it('with the other sign of polarisation conjugated, and the other ψ₄ factor divided away', async () => {
    const file = { 'a.txt': '0 1 2\n1 3 4\n' };
    const modes = await waveform({ file: 'a.txt', columns: ['t', 're', 'im'], polarisation: 'plus-plus-i-cross', variable: 'psi4', psi4Factor: 2 }, file);
    expect(modesOf(modes)).toEqual([[2, 2, [0.5, 1.5], [-1, -2]]]);
    const sight = await waveform({ file: 'a.txt', columns: ['t', 'plus', 'cross'], polarisation: 'plus-plus-i-cross' }, file);
    expect(sight.content.kind === 'line-of-sight' && [...(sight.content.cross ?? [])]).toEqual([-2, -4]);
  });

  it('in frequency: a named mode as a mode, a bare pair in Hz as strain along a line of sight', async () => {
    const file = { 'a.txt': '10 1 2\n20 3 4\n' };
    const mode = await waveform({ file: 'a.txt', domain: 'frequency', columns: ['f', 're22', 'im22'], timeUnit: '1/M' }, file);
    expect([mode.domain, mode.unit, mode.content.kind]).toEqual(['frequency', 'M', 'modes']);
    const sight = await waveform({ file: 'a.txt', domain: 'frequency', columns: ['f', 're', 'im'], timeUnit: 'Hz', amplitudeUnit: 'strain' }, file);
    expect(sight.content).toEqual({ kind: 'line-of-sight', plus: Float64Array.of(1, 3), plusIm: Float64Array.of(2, 4), cross: null, crossIm: null });
  });

  it('from gzip, by its first bytes', async () => {
    const w = await waveform({ file: 'a.txt.gz', columns: ['t', 're', 'im'] }, { 'a.txt.gz': gzipSync('0 1 2\n1 3 4\n') });
    expect(modesOf(w)).toEqual([[2, 2, [1, 3], [2, 4]]]);
  });

  it('with the step of rounded times taken from the ends, and none where steps differ', async () => {
    const rounded = Array.from({ length: 50 }, (_, i) => `${(i / 2048).toFixed(9)} 1 2`).join('\n');
    const even = await waveform({ file: 'a.txt', columns: ['t', 're', 'im'] }, { 'a.txt': rounded });
    expect(even.uniformStep).toBeCloseTo(1 / 2048, 10);
    const uneven = await waveform({ file: 'a.txt', columns: ['t', 're', 'im'] }, { 'a.txt': '0 1 2\n1 1 2\n2.0001 1 2\n' });
    expect(uneven.uniformStep).toBeNull();
  });

  it('with the printed digits of the columns that carry the amplitude', async () => {
    const fixed = await waveform({ file: 'a.txt', columns: ['t', 're22', 'im22', 're21', 'im21'] }, { 'a.txt': '0 0.4012 0.0001 0.0003 0\n1 0.3999 0.3500 0.0002 0\n' });
    expect(fixed.significantDigits).toBe(4);
    const phase = await waveform({ file: 'a.txt', columns: ['t', 'amplitude', 'phase'] }, { 'a.txt': '0 1.00000000 1234.56\n1 1.00000000 1235.56\n' });
    expect(phase.significantDigits).toBe(2);
  });
});

describe('a waveform is stopped by its data', () => {
  const stopped = async (text: string, columns = ['t', 're', 'im']) => {
    const { waveform: found, findings } = await read({ file: 'a.txt', columns }, { 'a.txt': text });
    expect(found).toBeNull();
    return findings;
  };

  it('V01: a value that is not finite, with line, column, value and time', async () => {
    const findings = await stopped('# x\n0 1 2\n0.5 3 NaN\n');
    expect(findings).toMatchObject([{ code: 'formats/not-finite', level: 'stops-lodging', where: 'a.txt:3', text: 'Line 3 of a.txt: column im is NaN, at t = 0.5 M.' }]);
  });

  it('V01: of many such values the first five are named and the rest counted', async () => {
    const findings = await stopped('0 nan 1\n'.repeat(1) + Array.from({ length: 9 }, (_, i) => `${i + 1} inf 1`).join('\n'));
    expect(findings).toHaveLength(5);
    expect(findings[0]?.text).toContain('5 more such values follow in the file.');
  });

  it('V02: time that goes backwards, with both lines and both times', async () => {
    const findings = await stopped('0 1 2\n412 1 2\n411.5 1 2\n413 1 2\n');
    expect(findings).toMatchObject([{ code: 'formats/time-not-monotone', level: 'stops-lodging', where: 'a.txt:3', text: 'Time goes backwards at line 3 of a.txt (line 2: t = 412 M; line 3: t = 411.5 M).' }]);
  });

  it('V02: time that stands still', async () => {
    expect((await stopped('0 1 2\n1 1 2\n1 1 2\n'))[0]?.text).toBe('Time stands still at line 3 of a.txt (line 2: t = 1 M; line 3: t = 1 M).');
  });
});

describe('V03: a gap is told in the record’s unit and in cycles', () => {
  const wave = (cyclesAcross: number) => {
    const omega = (2 * Math.PI * cyclesAcross) / 4;
    const times = [...Array.from({ length: 20 }, (_, i) => i), ...Array.from({ length: 20 }, (_, i) => i + 23)];
    return times.map((t) => `${t} ${Math.cos(omega * t)} ${-Math.sin(omega * t)}`).join('\n');
  };

  it.each([
    [0.05, 'worth-a-look', 'i.e. 0.05 of a wave cycle'],
    [0.4, 'needs-answer', 'i.e. 0.4 of a wave cycle'],
  ])('%s of a cycle is %s', async (cycles, level, words) => {
    const { waveform: found, findings } = await read({ file: 'a.txt', columns: ['t', 're', 'im'] }, { 'a.txt': wave(cycles) });
    expect(found).not.toBeNull();
    expect(findings).toMatchObject([{ code: 'formats/gap', level, where: 'a.txt:21' }]);
    expect(findings[0]?.text).toContain('There is a gap of 4 M at t = 19 M');
    expect(findings[0]?.text).toContain(words);
  });

  it('in a lone real column by its zero crossings', async () => {
    const times = [...Array.from({ length: 200 }, (_, i) => i / 100), ...Array.from({ length: 200 }, (_, i) => 2.5 + i / 100)];
    const text = times.map((t) => `${t} ${Math.sin(2 * Math.PI * t + 0.1)}`).join('\n');
    const { findings } = await read({ file: 'a.txt', columns: ['t', 'plus'], timeUnit: 's', amplitudeUnit: 'strain' }, { 'a.txt': text });
    expect(findings).toMatchObject([{ code: 'formats/gap', level: 'needs-answer' }]);
    expect(findings[0]?.text).toContain('0.51 s');
    expect(findings[0]?.text).toContain('0.51 of a wave cycle');
  });
});

describe('a file that cannot be read is told without the host’s paths', () => {
  const problemOf = async (file: string, openFile: OpenFile) => {
    const result = await readWaveform(declare({ file, columns: ['t', 're', 'im'] }), openFile);
    return result.ok ? '' : result.error.map(formatProblem).join('\n');
  };

  it('when it is missing', async () => {
    const sentence = await problemOf('b.txt', filesOf({}));
    expect(sentence).toBe('b.txt: saw no file of this name; expected the file beside the claim sheet. Add the file, or correct its name in the sheet.');
  });

  it('when its owner refuses it with a sentence of its own', async () => {
    const refusing: OpenFile = async function* refusing() {
      yield new Uint8Array(0);
      throw new FileRefused('a link that leads out of the folder', 'a file inside the claim’s folder');
    };
    expect(await problemOf('b.txt', refusing)).toBe('b.txt: saw a link that leads out of the folder; expected a file inside the claim’s folder.');
  });

  it('when its gzip is cut short or spoilt', async () => {
    const packed = new Uint8Array(gzipSync('0 1 2\n1 3 4\n'.repeat(1000)));
    expect(await problemOf('a.gz', filesOf({ 'a.gz': packed.subarray(0, packed.length - 10) }))).toContain('saw a damaged or unfinished gzip stream');
    const spoilt = packed.slice();
    spoilt[20] = (spoilt[20] ?? 0) ^ 0xff;
    expect(await problemOf('a.gz', filesOf({ 'a.gz': spoilt }))).not.toBe('');
  });

  it('when gzip unpacks to more than the limit, without unpacking it all', async () => {
    const bomb = new Uint8Array(gzipSync(Buffer.alloc(2 ** 20, '\n')));
    let given = 0;
    const counting: OpenFile = async function* counting() {
      for (let i = 0; i < 100; i++) {
        given++;
        yield bomb;
      }
    };
    const columns = [{ name: 't', role: { kind: 'axis' } }] as const;
    const table = await readTable('a.gz', columns, counting, { ...tableLimits, bytes: 2 ** 22 });
    expect(table.ok ? '' : table.error.map(formatProblem).join()).toContain('saw more than 4 MiB');
    expect(given).toBeLessThan(20);
  });
});
