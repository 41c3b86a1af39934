import type { Problem } from '@/lib/kernel/problem';
import type { Result } from '@/lib/kernel/result';
import { catalogue } from './catalogue';
import { reproduceWith, type Reproduced, type ReproduceOptions, type Source } from './reproduce-with';

/** One claim sheet from files to verdicts, with everything this version can compute. */
export const reproduce = (source: Source, options: ReproduceOptions): Promise<Result<Reproduced, Problem[]>> => reproduceWith(catalogue, source, options);
