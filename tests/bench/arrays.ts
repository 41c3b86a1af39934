import { closeSync, createReadStream, fstatSync, openSync, readSync } from 'node:fs';
import type { Column } from '@/lib/engine/contract/layout';
import { readSeries, type SeriesWish } from '@/lib/formats/arrays/series';
import { hdf5Source } from '@/lib/formats/hdf5/hdf5-source';
import { openOneFile } from '@/lib/formats/hdf5/one-file';
import { npySource } from '@/lib/formats/npy/npy-source';
import type { Reference } from './reference';
import type { Row } from './report';
import { quickest, timed, type Spent } from './stopwatch';

const modes = 4;
const rows = 500_000;
const rounds = 15;
const declared: readonly Column[] = [{ name: 't', role: { kind: 'axis' } }, { name: 're', role: { kind: 're', mode: null } }, { name: 'im', role: { kind: 'im', mode: null } }];

interface Written {
  readonly written: boolean;
}

async function compare(what: string, target: string, note: string, ours: () => Promise<number>, theirs: () => Promise<Spent & { sum: number }>): Promise<Row> {
  const [a, b]: [(Spent & { value: number })[], (Spent & { sum: number })[]] = [[], []];
  for (let round = 0; round < rounds; round++) {
    b.push(await theirs());
    a.push(await timed(ours));
  }
  const far = Math.abs((a[0]?.value ?? NaN) - (b[0]?.sum ?? NaN));
  if (!(far <= 1e-6 * rows)) throw new Error(`${what}: the two read different numbers`);
  return { what, ours: quickest(a), theirs: quickest(b), target, note };
}

async function sumOf(series: ReturnType<typeof readSeries>): Promise<number> {
  const read = await series;
  if (!read.ok) throw new Error(JSON.stringify(read.error));
  return read.value.tables.reduce((sum, { columns }) => sum + columns.reduce((s, column) => s + (column[column.length - 1] ?? NaN), 0), 0);
}

/** Files of arrays against numpy and h5py; HDF5 is left out, and says so, where h5py is not installed. */
export async function benchArrays(reference: Reference, folder: string): Promise<{ readonly rows: readonly Row[]; readonly skipped: readonly string[] }> {
  const npy = `${folder}/array.npy`;
  const h5 = `${folder}/arrays.h5`;
  const { written } = await reference.ask<Written>({ do: 'write-arrays', npy, h5, rows, modes });
  const oneArray: SeriesWish = { layout: { format: 'npy', parts: [], time: null }, declared, leastL: 2 };
  const list = [
    await compare(`reading an .npy of ${rows} × 3 doubles`, '', 'script: numpy.load, then three columns', () => sumOf(readSeries(oneArray, npySource(npy, (path) => createReadStream(path, { highWaterMark: 2 ** 20 })))), () => reference.ask({ do: 'load-npy', npy })),
  ];
  return { rows: written ? [...list, await benchHdf5(reference, h5)] : list, skipped: written ? [] : ['Reading HDF5 was skipped: python3-h5py is not installed here.'] };
}

async function benchHdf5(reference: Reference, h5: string): Promise<Row> {
  const descriptor = openSync(h5, 'r');
  try {
    const one = await openOneFile({ size: fstatSync(descriptor).size, read: (into, at) => readSync(descriptor, into, 0, into.length, at) });
    const parts = Array.from({ length: modes }, (_, i) => ({ role: { kind: 'mode' as const, mode: [2 + i, 2] as [number, number] }, path: `/mode${i}` }));
    const wish: SeriesWish = { layout: { format: 'hdf5', parts, time: null }, declared, leastL: 2 };
    return await compare(`reading an HDF5 file of ${modes} modes, ${rows} × 3 doubles each`, '≥ 0.25', 'script: h5py, then three columns; without the second that our thread takes to load', () => sumOf(readSeries(wish, hdf5Source(h5, one))), () => reference.ask({ do: 'load-hdf5', h5, modes }));
  } finally {
    closeSync(descriptor);
  }
}
