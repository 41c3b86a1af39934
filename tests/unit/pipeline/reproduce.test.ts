import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { resultSchema } from '@/lib/claims/result-schema';
import type { Measurement } from '@/lib/engine/contract/measurement';
import { Cancelled, type MeasureRequest } from '@/lib/engine/contract/quantity';
import { formatProblem } from '@/lib/kernel/problem';
import { formatProblems, formatResult } from '@/lib/pipeline/format-result';
import { reproduceWith, type ReproduceOptions } from '@/lib/pipeline/reproduce-with';
import type { ResultClaim } from '@/lib/pipeline/result';
import { smallCatalogue, type Measure } from '../../support/small-catalogue';

type Files = Readonly<Record<string, string>>;
const files: Files = { 'a.txt': '0 1 2\n1 3 4\n', 'b.txt': '0 1 2\n1 3 5\n', 'noise.txt': '10 2e-23\n1000 2e-23\n' };

const claim = (more: object = {}) => ({ id: 'C1', quantity: 'match', of: { a: 'A', b: 'B' }, noise: 'S', settings: { totalMassMsun: 60 }, claimed: '0.90', tolerance: 0.1, ...more });
const sheet = (claims: object[] = [claim()], more: object = {}) => ({
  format: 'counterfoil-claim/1',
  title: 'A title',
  waveforms: { A: { file: 'a.txt', columns: ['t', 're22', 'im22'] }, B: { file: 'b.txt', columns: ['t', 're22', 'im22'] } },
  noise: { S: { file: 'noise.txt', columns: ['f', 'asd'] } },
  claims,
  ...more,
});

/** A measurement that gives every point the same value. */
const measured = (request: MeasureRequest, more: Partial<Measurement> = {}): Measurement => ({
  points: (request.over?.values ?? [null]).map((value) => ({ at: value === null || !request.over ? {} : { [request.over.setting]: value }, value: 0.95, routes: { A: 0.95, B: 0.95 }, expandedUncertainty: 1e-6 })),
  budget: [{ component: 'quadrature', id: 'E01', group: 'computation', u: 5e-7, note: '' }, { component: 'resolution', id: 'E05', group: 'coverage', u: null, note: '' }],
  findings: [],
  assumed: ['massFrame'],
  settings: [{ name: 'totalMassMsun', value: 60, standing: 'declared', unit: 'M☉' }],
  routeBPoints: (request.over?.values ?? [null]).map((_, i) => i),
  figures: [{ kind: 'sweep', title: 'x', x: { label: 'M', unit: 'M☉', scale: 'linear', values: [1] }, series: [] }],
  ...more,
});

const plain: Measure = (request) => measured(request);

function run(json: unknown, measure: Measure = plain, given: Files = files, options: Partial<ReproduceOptions> = {}) {
  const openFile = async function* open(name: string) {
    const content = given[name];
    if (content === undefined) throw Object.assign(new Error('ENOENT'), { code: 'ENOENT' });
    yield new TextEncoder().encode(content);
  };
  const digest = () => {
    const hash = createHash('sha256');
    return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
  };
  return reproduceWith(smallCatalogue(measure), { sheetJson: json, openFile }, { withFigures: false, onProgress: () => undefined, cancelled: () => false, digest, ...options });
}

async function reproduced(...args: Parameters<typeof run>) {
  const outcome = await run(...args);
  if (!outcome.ok) throw new Error(outcome.error.map(formatProblem).join('\n'));
  return outcome.value;
}
async function onlyClaim(...args: Parameters<typeof run>): Promise<ResultClaim> {
  const [first] = (await reproduced(...args)).result.claims;
  if (!first) throw new Error('no claim');
  return first;
}
async function refusals(...args: Parameters<typeof run>): Promise<string[]> {
  const outcome = await run(...args);
  return outcome.ok ? [] : outcome.error.map(formatProblem);
}

describe('a sheet walks from the hall to the weighing room', () => {
  it('and comes out as a result whose fields stand in their order', async () => {
    const { result } = await reproduced(sheet());
    expect(Object.keys(result)).toEqual(['format', 'engine', 'title', 'files', 'claims', 'guesses']);
    expect(Object.keys(result.claims[0] ?? {})).toEqual(['id', 'quantity', 'unit', 'verdict', 'remarks', 'coverage', 'points', 'budget', 'uncertainty', 'metricBound', 'assumed', 'settings', 'routeB', 'findings', 'candidates']);
    expect(Object.keys(result.claims[0]?.points[0] ?? {})).toEqual(['at', 'claimed', 'printed', 'tolerance', 'value', 'expandedUncertainty', 'routes', 'apart', 'verdict']);
    expect(resultSchema.safeParse(result).error).toBeUndefined();
  });

  it('with verdict, tolerance, coverage and what was assumed', async () => {
    const only = await onlyClaim(sheet());
    expect(only).toMatchObject({ id: 'C1', verdict: 'agrees', coverage: { state: 'unknown', missing: ['Simulation truncation error', 'Extraction radius'] }, assumed: ['massFrame'], routeB: [0] });
    expect(only.points[0]).toMatchObject({ claimed: 0.9, printed: '0.90', tolerance: 0.1 + 0.005, value: 0.95 });
  });

  it('with the remark that there is no single order, where the measurement found none', async () => {
    const finding = { code: 'engine/no-single-order', level: 'worth-a-look', where: 'A', text: 'no single order describes the record' } as const;
    expect((await onlyClaim(sheet(), (request) => measured(request, { findings: [finding] }))).remarks).toEqual(['no single order']);
    expect((await onlyClaim(sheet())).remarks).toEqual([]);
  });

  it('with name, size and digest of each file it read, in the order in which they were needed', async () => {
    const { result } = await reproduced(sheet());
    expect(result.files.map(({ name, bytes }) => [name, bytes])).toEqual([['a.txt', 12], ['b.txt', 12], ['noise.txt', 20]]);
    expect(result.files[0]?.sha256).toBe(createHash('sha256').update(files['a.txt'] ?? '').digest('hex'));
  });

  it('point by point for a sweep', async () => {
    const swept = claim({ settings: {}, over: { totalMassMsun: [60, 100] }, claimed: ['0.90', { below: 0.5 }] });
    const only = await onlyClaim(sheet([swept]));
    expect(only.points.map(({ at, claimed: entry, verdict }) => [at, entry, verdict])).toEqual([[{ totalMassMsun: 60 }, 0.9, 'agrees'], [{ totalMassMsun: 100 }, { below: 0.5 }, 'differs']]);
    expect(only.verdict).toBe('differs');
    expect(only.remarks).toEqual(['narrower scope: holds at 1 of 2 points (totalMassMsun 60)']);
  });

  it('with figures only when they are asked for, and never in the result', async () => {
    expect((await reproduced(sheet(), plain, files, { withFigures: true })).figures['C1']).toHaveLength(1);
    expect((await reproduced(sheet())).figures).toEqual({});
  });

  it('to the same bytes on every run', async () => {
    const [first, second] = [await reproduced(sheet()), await reproduced(sheet())];
    expect(formatResult(first.result)).toBe(formatResult(second.result));
    expect(JSON.parse(formatResult(first.result))).toEqual(JSON.parse(JSON.stringify(first.result)));
  });

  it('telling its progress, never backwards, from nothing to all', async () => {
    const told: number[] = [];
    const measure: Measure = (request, watch) => {
      watch.onProgress(0.5, 'half way');
      watch.onProgress(7, 'too far');
      return measured(request);
    };
    await reproduced(sheet([claim(), claim({ id: 'C2' })]), measure, files, { onProgress: (fraction) => told.push(fraction) });
    expect(told).toEqual([...told].sort((a, b) => a - b));
    expect([told[0], told.at(-1)]).toEqual([0, 1]);
  });
});

describe('a claim is not computable, and the others go on', () => {
  const two = sheet([claim(), claim({ id: 'C2', quantity: 'snr', of: { a: 'A' }, settings: { totalMassMsun: 60, distanceMpc: 100 } })]);

  it('when a value of its file is not finite', async () => {
    const { result } = await reproduced(two, plain, { ...files, 'b.txt': '0 1 2\n1 nan 5\n' });
    expect(result.claims.map((c) => c.verdict)).toEqual(['not-computable', 'agrees']);
    expect(result.claims[0]).toMatchObject({ findings: [{ code: 'formats/not-finite' }], coverage: { state: 'unknown' } });
    expect(result.claims[0]?.points[0]).toMatchObject({ value: null, expandedUncertainty: null, routes: { A: null, B: null }, tolerance: 0.1 + 0.005, apart: null, verdict: 'not-computable' });
  });

  it('when the noise curve is not positive', async () => {
    const only = await onlyClaim(sheet(), plain, { ...files, 'noise.txt': '10 2e-23\n20 0\n' });
    expect(only).toMatchObject({ verdict: 'not-computable', findings: [{ code: 'engine/curve-invalid', where: 'noise.txt:2' }] });
  });

  it('when two waveforms are the same file under two names', async () => {
    const only = await onlyClaim(sheet(), plain, { ...files, 'b.txt': files['a.txt'] ?? '' });
    expect(only).toMatchObject({ verdict: 'not-computable', findings: [{ code: 'formats/duplicate-files', level: 'stops-lodging' }] });
    expect(only.findings[0]?.text).toContain('The files a.txt and b.txt are identical byte for byte');
  });

  it('when two modes of one waveform are the same bytes', async () => {
    const waveforms = { A: { files: { '2,2': 'a.txt', '2,-2': 'c.txt' }, columns: ['t', 're', 'im'] }, B: { file: 'b.txt', columns: ['t', 're22', 'im22'] } };
    const only = await onlyClaim(sheet([claim()], { waveforms }), plain, { ...files, 'c.txt': files['a.txt'] ?? '' });
    expect(only).toMatchObject({ verdict: 'not-computable', findings: [{ code: 'formats/duplicate-files', where: 'A' }] });
  });

  it('but not when the sheet names one file in both places', async () => {
    const twice = { A: { file: 'a.txt', columns: ['t', 're22', 'im22'] }, B: { file: 'a.txt', columns: ['t', 're22', 'im22'] } };
    expect((await onlyClaim(sheet([claim()], { waveforms: twice }))).findings).toEqual([]);
  });

  it('when a spin is above one', async () => {
    const only = await onlyClaim(sheet([claim()], { waveforms: { A: { file: 'a.txt', columns: ['t', 're22', 'im22'], binary: { chi1z: 1.44 } }, B: { file: 'b.txt', columns: ['t', 're22', 'im22'] } } }));
    expect(only).toMatchObject({ verdict: 'not-computable', findings: [{ code: 'claims/spin-above-one', text: 'chi1z is 1.44. A dimensionless spin lies between −1 and 1.' }] });
  });

  it('when the measurement stops, gives too few points, or throws', async () => {
    const stop: Measure = (request) => measured(request, { findings: [{ code: 'engine/no-signal', level: 'stops-lodging', text: 'x', where: 'A' }] });
    expect((await onlyClaim(sheet(), stop)).verdict).toBe('not-computable');
    expect((await onlyClaim(sheet(), (request) => measured(request, { points: [] }))).findings[0]?.code).toBe('engine/defect');
    const thrown = await onlyClaim(sheet(), () => {
      throw new Error('grid does not fit');
    });
    expect(thrown).toMatchObject({ verdict: 'not-computable', findings: [{ code: 'engine/defect', level: 'stops-lodging' }] });
    expect(thrown.findings[0]?.text).toContain('grid does not fit');
  });

  it('and a number that is not finite is null in the result, never zero', async () => {
    const nan: Measure = (request) => measured(request, { points: [{ at: {}, value: Number.NaN, routes: { A: Number.NaN, B: 1 }, expandedUncertainty: Number.POSITIVE_INFINITY, components: { timeShiftS: Number.NaN } }] });
    const only = await onlyClaim(sheet(), nan);
    expect(only.points[0]).toMatchObject({ value: null, expandedUncertainty: null, routes: { A: null, B: 1 }, components: { timeShiftS: null }, verdict: 'not-computable' });
  });
});

describe('facts of the sheet that do not fit are asked about, and the number is computed all the same', () => {
  it.each([
    [{ massRatio: 0.5 }, 'massRatio is 0.5; the house order is heavier over lighter, q ≥ 1.'],
    [{ admEnergy: 60 }, 'admEnergy is 60 in units of the total mass; it should lie just below 1.'],
    [{ remnantMass: 1.05 }, 'remnantMass is 1.05, more than the total mass, 1.'],
    [{ admEnergy: 0.95, remnantMass: 0.97 }, 'remnantMass is 0.97, more than the initial energy, 0.95.'],
  ])('%j', async (binary, text) => {
    const only = await onlyClaim(sheet([claim()], { waveforms: { A: { file: 'a.txt', columns: ['t', 're22', 'im22'], binary }, B: { file: 'b.txt', columns: ['t', 're22', 'im22'] } } }));
    expect(only).toMatchObject({ verdict: 'agrees', findings: [{ code: 'claims/mass-sums', level: 'needs-answer', text }] });
  });
});

describe('a sheet is refused as a whole', () => {
  it('with the faults of all its files, each once', async () => {
    const shared = sheet([claim()], { waveforms: { A: { file: 'a.txt', columns: ['t', 're22', 'im22'] }, B: { file: 'a.txt', columns: ['t', 're22', 'im22'] } } });
    expect(await refusals(shared, plain, { 'a.txt': '0 1 2\n1 x 4\n' })).toEqual([
      'a.txt:2: saw "x" in column re22; expected a decimal number such as -1.25e-21.',
      '/noise/S/file: saw no file "noise.txt"; expected the file beside the claim sheet. Add the file, or correct its name in the sheet.',
    ]);
  });

  it('with the files that are not there beside what is wrong with the sheet itself', async () => {
    const waveforms = { A: { file: 'a.txt', columns: ['t', 're22', 'im22'] }, B: { files: { '2,2': 'b22.txt', '2,1': 'b21.txt' }, columns: ['t', 're', 'im'] } };
    expect(await refusals(sheet([claim({ claimed: 'much' })], { waveforms }), plain, { 'a.txt': '0 1 2\n1 3 4\n', 'b21.txt': '0 1 2\n' })).toEqual([
      expect.stringMatching(/^\/claims\/0\/claimed: saw "much"/),
      '/waveforms/B/files/2,2: saw no file "b22.txt"; expected the file beside the claim sheet. Add the file, or correct its name in the sheet.',
      '/noise/S/file: saw no file "noise.txt"; expected the file beside the claim sheet. Add the file, or correct its name in the sheet.',
    ]);
  });

  it('when it is to stop, whether before or within a measurement', async () => {
    const stopped = ['saw a request to stop; expected the run to be let finish.'];
    expect((await refusals(sheet(), plain, files, { cancelled: () => true })).map((line) => line.replace(/^: /, ''))).toEqual(stopped);
    const within: Measure = () => {
      throw new Cancelled();
    };
    expect((await refusals(sheet(), within)).map((line) => line.replace(/^: /, ''))).toEqual(stopped);
  });

  it('as one JSON document', async () => {
    const outcome = await run({ format: 'x' });
    if (outcome.ok) throw new Error('accepted');
    const told = JSON.parse(formatProblems(outcome.error)) as { format: string; problems: object[] };
    expect(told.format).toBe('counterfoil-problems/1');
    expect(told.problems[0]).toEqual({ code: 'claims/not-allowed', where: '/format', saw: '"x"', expected: '"counterfoil-claim/1"' });
  });
});
