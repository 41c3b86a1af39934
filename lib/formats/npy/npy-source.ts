import { ok } from '@/lib/kernel/result';
import type { ArraySource } from '../arrays/array-source';
import { readNpy, readNpyFacts } from './npy-stream';

/** One array, opened anew for its header and for its numbers; only the second time is it read to the end. */
export function npySource(file: string, open: (file: string) => AsyncIterable<Uint8Array>): ArraySource {
  return {
    file,
    facts: () => readNpyFacts(file, open(file)),
    read: async (_path, reading) => columnsOf(await readNpy(file, open(file), () => ok(reading))),
    listedModes: async () => null,
  };
}

export const columnsOf = (read: Awaited<ReturnType<typeof readNpy>>) => (read.ok ? ok(read.value.columns) : read);
