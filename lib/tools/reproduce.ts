/**
 * `npm run reproduce -- PATH [--json] [--explain]`: one claim sheet from files to verdicts on this
 * machine alone. No database, no network, no server: proof that the core is free of the shell.
 */
import { writeSync } from 'node:fs';
import { formatProblems } from '@/lib/pipeline/format-result';
import { runReproduce } from './reproduce/run';

/** Whole, even into a slow pipe: process.exit would cut what an asynchronous write still holds. */
function writeAll(descriptor: 1 | 2, text: string): void {
  const bytes = Buffer.from(text);
  for (let at = 0; at < bytes.length; ) {
    try {
      at += writeSync(descriptor, bytes, at);
    } catch (thrown) {
      if (!(thrown instanceof Error && 'code' in thrown && thrown.code === 'EAGAIN')) return;
      Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 5);
    }
  }
}

const args = process.argv.slice(2);
const screen = { out: (text: string) => writeAll(1, text), err: (text: string) => writeAll(2, text), isTerminal: process.stderr.isTTY === true };

try {
  process.exitCode = await runReproduce(args, screen);
} catch (thrown) {
  const reason = thrown instanceof Error ? thrown.message : String(thrown);
  screen.err(`The run stopped on a condition the program does not foresee: ${reason}\n`);
  if (args.includes('--json')) screen.out(formatProblems([{ code: 'tools/defect', where: '', saw: 'a condition the program does not foresee', expected: 'a run that ends in a result or a refusal', hint: 'Please report it with the sheet.' }]));
  process.exitCode = 2;
}
