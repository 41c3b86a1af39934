import type { Problem } from '@/lib/kernel/problem';
import type { Result } from '@/lib/kernel/result';
import type { Series, SeriesWish } from '../arrays/series';

/** Reads the series of one HDF5 file; injected, because it takes a thread of its own to do so. */
export type ReadHdf5 = (file: string, bytes: AsyncIterable<Uint8Array>, wish: SeriesWish) => Promise<Result<Series, Problem[]>>;
