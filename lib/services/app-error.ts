import type { Problem } from '@/lib/kernel/problem';
import { err, type Result } from '@/lib/kernel/result';

/**
 * The ways a verb can end without doing what was asked. Returned as a value for what people can
 * cause; thrown (`AppFailure`) only inside a transaction, so that it rolls back.
 */
export type AppErrorCode = 'not-found' | 'denied' | 'signed-out' | 'conflict' | 'invalid' | 'limit' | 'precondition' | 'defect';

export interface AppError {
  readonly code: AppErrorCode;
  /** One sentence: what was seen, what was expected, what to do next. */
  readonly sentence: string;
  readonly problems?: readonly Problem[];
  /** For `limit`. */
  readonly retryAfterS?: number;
}

export type Outcome<T> = Result<T, AppError>;

export const fail = (code: AppErrorCode, sentence: string, problems?: readonly Problem[]): { readonly ok: false; readonly error: AppError } =>
  err(problems === undefined ? { code, sentence } : { code, sentence, problems }) as { ok: false; error: AppError };

/** Carries an AppError through a transaction so that everything in it is undone. */
export class AppFailure extends Error {
  constructor(readonly error: AppError) {
    super(error.sentence);
  }
}

export const NOT_FOUND: AppError = { code: 'not-found', sentence: 'There is nothing at this address, or nothing you may see.' };
