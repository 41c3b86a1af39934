import { expect, it } from 'vitest';
import { KnownStructures } from '@/lib/services/files/known-structures';
import type { StructureView } from '@/lib/services/files/structure-schema';

const view = (length: number): StructureView => ({ format: 'hdf5', entries: [], cut: false, trouble: ['x'.repeat(length)] });

it('what files hold is kept in bounded memory: the oldest makes room, and what is too long is not kept', () => {
  const known = new KnownStructures(1000);
  known.keep('a', view(300));
  known.keep('b', view(300));
  known.keep('long', view(1000));
  expect(['a', 'b', 'long'].map((key) => known.get(key) !== undefined)).toEqual([true, true, false]);
  known.keep('b', view(310));
  known.keep('c', view(300));
  expect(['a', 'b', 'c'].map((key) => known.get(key) !== undefined)).toEqual([false, true, true]);
});
