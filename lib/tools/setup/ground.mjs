/**
 * Set-up: everything `npm start` and `npm test` do before the application can run.
 * These files use only Node built-ins, because they run before node_modules exists.
 */
import path from 'node:path';
import { fileURLToPath } from 'node:url';

export const ROOT = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../../..');
export const DATA = path.resolve(process.env.DATA_DIR ?? path.join(ROOT, '.data'));

export const isRoot = process.getuid?.() === 0;

/** A failure that a person can mend; its message is printed without a stack. */
export class SetupError extends Error {}

export const say = (/** @type {unknown[]} */ ...words) => console.log('[counterfoil]', ...words);

/** Ends the process with the sentence of a SetupError, or with the whole trace of a defect. */
export function report(error) {
  console.error(error instanceof SetupError ? `[counterfoil] ${error.message}` : error);
}
