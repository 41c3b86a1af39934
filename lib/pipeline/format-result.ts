import type { Problem } from '@/lib/kernel/problem';
import type { ResultDocument } from './result';

/** The bytes of a result: fields in their fixed order, two blanks a level, one newline at the end. */
export const formatResult = (result: ResultDocument): string => `${JSON.stringify(result, null, 2)}\n`;

export const problemsFormat = 'counterfoil-problems/1';

/** A refused sheet as one JSON document. */
export const formatProblems = (problems: readonly Problem[]): string =>
  `${JSON.stringify({ format: problemsFormat, problems: problems.map(({ code, where, saw, expected, hint }) => ({ code, where, saw, expected, ...(hint === undefined ? {} : { hint }) })) }, null, 2)}\n`;
