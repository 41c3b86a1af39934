/**
 * HDF5 is read by a large library in a compiled language, from files of strangers: each file in a
 * thread of its own, which ends with it, takes no longer and no more than its limits, and is given
 * no environment. Bytes go through a private copy, so that what is hashed is what is read.
 */
import { mkdtemp, open, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { Worker } from 'node:worker_threads';
import type { ArrayStructure } from '@/lib/formats/arrays/structure';
import type { Series } from '@/lib/formats/arrays/series';
import type { ReadHdf5 } from '@/lib/formats/hdf5/hdf5-ask';
import { unreadable } from '@/lib/formats/open-file';
import type { Problem } from '@/lib/kernel/problem';
import { err, type Result } from '@/lib/kernel/result';
import { begins, type Hdf5Answer, type Hdf5Message, type Hdf5Task } from './hdf5-task';

export interface Hdf5Limits {
  readonly timeMs: number;
  /** Of the library; its answer lies outside. */
  readonly memoryBytes: number;
}

export const hdf5Limits: Hdf5Limits = { timeMs: 60_000, memoryBytes: 512 * 2 ** 20 };

export const readHdf5: ReadHdf5 = (file, bytes, wish) => readHdf5Within(hdf5Limits)(file, bytes, wish);

export const readHdf5Within = (limits: Hdf5Limits): ReadHdf5 => (file, bytes, wish) =>
  askThread(file, bytes, { kind: 'series', wish }, limits) as Promise<Result<Series, Problem[]>>;

/** What an array file of any format holds; none of its numbers is read. */
export const readStructure = (file: string, format: ArrayStructure['format'], bytes: AsyncIterable<Uint8Array>, limits: Hdf5Limits = hdf5Limits): Promise<Result<ArrayStructure, Problem[]>> =>
  askThread(file, bytes, { kind: 'structure', format }, limits) as Promise<Result<ArrayStructure, Problem[]>>;

async function askThread(file: string, bytes: AsyncIterable<Uint8Array>, ask: Hdf5Task['ask'], limits: Hdf5Limits): Promise<Hdf5Answer> {
  const folder = await mkdtemp(path.join(tmpdir(), `counterfoil-run-${process.pid}-`));
  try {
    const copy = path.join(folder, 'file.h5');
    try {
      await spool(bytes, copy);
    } catch (thrown) {
      return err([unreadable(file, thrown)]);
    }
    return await runThread({ path: copy, file, ask, memoryBytes: limits.memoryBytes }, limits);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

async function spool(bytes: AsyncIterable<Uint8Array>, to: string): Promise<void> {
  const handle = await open(to, 'wx', 0o600);
  try {
    for await (const chunk of bytes) await handle.writeFile(chunk);
  } finally {
    await handle.close();
  }
}

/**
 * A line that loads the thread's first file, from the folder that everything is started in. Bundled into
 * the web process this module stands elsewhere, and a bundler that saw the file's name here would bundle
 * the compiler behind it.
 */
const firstLine = (): string => `import(${JSON.stringify(pathToFileURL([process.cwd(), 'lib/threads', `hdf5-thread-entry.mjs`].join('/')).href)})`;

function runThread(task: Hdf5Task, { timeMs }: Hdf5Limits): Promise<Hdf5Answer> {
  const thread = new Worker(firstLine(), {
    eval: true,
    workerData: task,
    env: { TMPDIR: tmpdir() },
    execArgv: [],
    stdout: true,
    stderr: true,
    resourceLimits: { maxOldGenerationSizeMb: 256, maxYoungGenerationSizeMb: 32 },
  });
  return new Promise<Hdf5Answer>((resolve) => {
    let found: Hdf5Answer = err([neverBegan(task.file)]);
    let begun = false;
    const limit = setTimeout(() => {
      found = err([tooSlow(task.file, timeMs)]);
      void thread.terminate();
    }, timeMs);
    thread.on('message', (message: Hdf5Message) => {
      begun = true;
      found = message === begins ? err([broke(task.file)]) : message;
      if (message !== begins) void thread.terminate();
    });
    thread.once('error', (thrown) => {
      if (!begun) report(thrown);
    });
    thread.once('exit', () => {
      clearTimeout(limit);
      resolve(found);
    });
  });
}

/** Whoever runs the program must hear of it: no file of anybody's is at fault. */
function report(thrown: unknown): void {
  const message = thrown instanceof Error ? thrown.message : String(thrown);
  console.error(JSON.stringify({ level: 'error', at: new Date().toISOString(), where: 'hdf5 thread', message }));
}

const neverBegan = (where: string): Problem => ({ code: 'formats/reader-missing', where, saw: 'no reader: the part of the program that opens such files did not start', expected: 'a file that is read', hint: 'This is a fault of the program, not of the file. Try again later, or tell the administrator.' });
const tooSlow = (where: string, timeMs: number): Problem => ({ code: 'formats/hdf5-time', where, saw: `a file that took longer than ${timeMs / 1000} s to read`, expected: 'a file that is read within that time', hint: 'Keep only the datasets that the claims use, in chunks of some thousand samples.' });
const broke = (where: string): Problem => ({ code: 'formats/hdf5-damaged', where, saw: 'a file at which its reader stopped', expected: 'a whole HDF5 file', hint: 'Write the file again, for example with h5repack, and attach that.' });
