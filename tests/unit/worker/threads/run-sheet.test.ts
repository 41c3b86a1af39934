import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import type { SheetJob } from '@/lib/worker/compute';
import { houseLimits, openSheetThreads } from '@/lib/worker/threads/run-sheet';
import { Turns } from '@/lib/worker/turns';

const folder = join(process.cwd(), 'content', 'specimens', 'radiated-energy');
const sheet = JSON.parse(readFileSync(join(folder, 'claim.json'), 'utf8')) as unknown;
const job: SheetJob = { sheet, files: [{ name: 'modes.txt', path: join(folder, 'modes.txt') }], withFigures: true, explain: false };
const quiet = { onProgress: () => undefined, signal: new AbortController().signal };

const threads = openSheetThreads({ ...houseLimits, threads: 1 });
afterAll(() => threads.close());

describe('a sheet in a thread', () => {
  it('comes back with its result and figures, telling progress that never falls', async () => {
    const fractions: number[] = [];
    const run = await threads.run(job, { ...quiet, onProgress: (fraction) => fractions.push(fraction) });
    if (!run.ok) throw new Error(JSON.stringify(run.error));
    expect(run.value.result.claims[0]?.verdict).toBe('agrees');
    expect(run.value.result.files[0]?.name).toBe('modes.txt');
    expect(run.value.figures.C1?.length).toBeGreaterThan(0);
    expect(fractions.length).toBeGreaterThan(2);
    expect([...fractions].sort((a, b) => a - b)).toEqual(fractions);
  });
  it('is refused with its problems when it is not a sheet', async () => {
    const run = await threads.run({ ...job, sheet: { format: 'other' } }, quiet);
    expect(run.ok ? [] : run.error.length).toBeGreaterThan(0);
  });
  it('reads no file that was not handed over', async () => {
    const run = await threads.run({ ...job, files: [{ name: 'other.txt', path: join(folder, 'modes.txt') }] }, quiet);
    expect(run.ok ? [] : run.error.map(({ where }) => where)).toEqual([expect.stringContaining('modes.txt')]);
  });
  it('stops at once when told to, and the next one still runs', async () => {
    const stop = new AbortController();
    const run = await threads.run(job, { onProgress: () => stop.abort(), signal: stop.signal });
    expect(run.ok ? [] : run.error.map(({ code }) => code)).toEqual(['worker/cancelled']);
    expect((await threads.run(job, quiet)).ok).toBe(true);
  });
});

describe('a sheet whose turn it is not', () => {
  it('stands still until others have passed, says so, and ends as if nothing had been', async () => {
    const turns = new Turns({ slots: 2, cores: 1 });
    const [mine, others] = [turns.enter(1), turns.enter(0)];
    const told: string[] = [];
    const running = threads.run(job, { ...quiet, turn: mine, onProgress: (_, doing) => told.push(doing) });
    const elsewhere = openSheetThreads({ ...houseLimits, threads: 1 });
    const alone = await elsewhere.run(job, quiet);
    await elsewhere.close();
    const whileAside = [...told];
    others.leave();
    const there = await running;
    expect(whileAside).toEqual(['waiting while more urgent runs compute']);
    expect(there.ok && alone.ok && there.value.result).toEqual(alone.ok && alone.value.result);
  });
  it('can be ended while it stands still', async () => {
    const turns = new Turns({ slots: 2, cores: 1 });
    const [mine, stop] = [turns.enter(1), new AbortController()];
    turns.enter(0);
    const run = await threads.run(job, { ...quiet, turn: mine, signal: stop.signal, onProgress: () => setImmediate(() => stop.abort()) });
    expect(run.ok ? [] : run.error.map(({ code }) => code)).toEqual(['worker/cancelled']);
  });
});

describe('a sheet that is wanted no longer', () => {
  it('ends at once while its numbers are still to come', async () => {
    const stop = new AbortController();
    const run = await threads.run({ ...job, explain: true }, { ...quiet, stop: stop.signal, onProgress: () => stop.abort() });
    expect(run.ok ? [] : run.error.map(({ code }) => code)).toEqual(['worker/stopped']);
  });
  it('keeps its numbers when only the search for other readings was under way', async () => {
    const from = join(process.cwd(), 'content', 'specimens', 'loudness');
    const loud = JSON.parse(readFileSync(join(from, 'claim.json'), 'utf8')) as { waveforms: Record<string, { file: string }> };
    const files = Object.values(loud.waveforms).map(({ file }) => ({ name: file, path: join(from, file) }));
    const stop = new AbortController();
    const run = await threads.run({ sheet: loud, files, withFigures: false, explain: true }, { ...quiet, stop: stop.signal, onProgress: (_, doing) => doing.includes('other readings') && stop.abort() });
    if (!run.ok) throw new Error(JSON.stringify(run.error));
    const [claim] = run.value.result.claims;
    expect(claim?.points[0]?.value).toBeGreaterThan(0);
    expect(claim?.search?.sentence).toContain('The search ended early: it was stopped by the one who asked for the run.');
    expect(claim?.search?.left).toBeGreaterThan(0);
  });
});

describe('a thread with narrow limits', () => {
  it('ends a run that takes too long', async () => {
    const narrow = openSheetThreads({ ...houseLimits, timeLimitMs: 1 });
    const run = await narrow.run(job, quiet);
    await narrow.close();
    expect(run.ok ? [] : run.error.map(({ code }) => code)).toEqual(['worker/time-limit']);
  });
  it('ends a run that fills its heap, and leaves the process alive', async () => {
    // The pipeline itself does not fit: the same end as a sheet that grows too large, without growing one.
    const narrow = openSheetThreads({ ...houseLimits, heapMb: 8 });
    const run = await narrow.run(job, quiet);
    await narrow.close();
    expect(run.ok ? [] : run.error.map(({ code }) => code)).toEqual(['worker/memory']);
  });
});
