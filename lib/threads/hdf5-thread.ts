import { closeSync, fstatSync, openSync, readSync } from 'node:fs';
import { parentPort, workerData } from 'node:worker_threads';
import { readSeries, type Series } from '@/lib/formats/arrays/series';
import { npyStructure, npzStructure } from '@/lib/formats/npy/npy-structure';
import { hdf5Source } from '@/lib/formats/hdf5/hdf5-source';
import { hdf5Structure } from '@/lib/formats/hdf5/hdf5-structure';
import { faultOf } from '@/lib/formats/hdf5/hdf5-faults';
import { identityMarks } from '@/lib/formats/hdf5/identity-marks';
import { capMemory, libraryIsHere, openOneFile, type RandomAccess } from '@/lib/formats/hdf5/one-file';
import { err, ok } from '@/lib/kernel/result';
import { begins, type Hdf5Answer, type Hdf5Task } from './hdf5-task';

/** Runs inside a thread that lives for one file and one question. */
export async function answer(): Promise<void> {
  const task = workerData as Hdf5Task;
  await libraryIsHere();
  parentPort?.postMessage(begins);
  const descriptor = openSync(task.path, 'r');
  try {
    const found = await inspect(task, accessTo(descriptor));
    parentPort?.postMessage(found, found.ok && 'tables' in found.value ? buffersOf(found.value) : []);
  } finally {
    closeSync(descriptor);
  }
}

async function inspect({ file, ask, memoryBytes }: Hdf5Task, bytes: RandomAccess): Promise<Hdf5Answer> {
  if (ask.kind === 'structure' && ask.format !== 'hdf5') return ask.format === 'npy' ? npyStructure(file, bytes) : npzStructure(file, bytes);
  capMemory(memoryBytes);
  try {
    const one = await openOneFile(bytes);
    if (ask.kind === 'structure') return ok(hdf5Structure(one));
    const series = await readSeries(ask.wish, hdf5Source(file, one));
    return series.ok ? ok({ ...series.value, marks: identityMarks(one) }) : series;
  } catch (thrown) {
    return err([faultOf(thrown, file, [])]);
  }
}

function accessTo(descriptor: number): RandomAccess {
  const { size } = fstatSync(descriptor);
  return { size, read: (into, at) => readSync(descriptor, into, 0, into.length, at) };
}

/** Columns of one dataset share a buffer, and modes may share their times. */
const buffersOf = ({ tables }: Series): ArrayBuffer[] => [...new Set(tables.flatMap(({ columns }) => columns.map(({ buffer }) => buffer as ArrayBuffer)))];
