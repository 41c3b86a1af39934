import { createHash } from 'node:crypto';
import { formatProblem, type Problem } from '@/lib/kernel/problem';
import { formatProblems, formatResult } from '@/lib/pipeline/format-result';
import type { StreamingDigest } from '@/lib/pipeline/hashed-files';
import { reproduce } from '@/lib/pipeline/reproduce';
import { readHdf5 } from '@/lib/threads/read-hdf5';
import { searchLimit } from '@/lib/threads/search-limit';
import { openSource } from './open-source';
import { printResult } from './print-result';

/** Where the command writes; injected, so that tests read what a person would. */
export interface Screen {
  readonly out: (text: string) => void;
  readonly err: (text: string) => void;
  /** Progress is drawn over itself only on a terminal. */
  readonly isTerminal: boolean;
}

interface Wishes {
  readonly path: string;
  readonly json: boolean;
  readonly explain: boolean;
}

const usage = 'reproduce PATH [--json] [--explain], PATH being a folder with claim.json, a claim.json, or a .zip';

/** Runs one sheet. 0: every claim agrees; 1: some claim does not; 2: the sheet or a file cannot be read. */
export async function runReproduce(args: readonly string[], screen: Screen): Promise<0 | 1 | 2> {
  const wishes = parseArguments(args);
  if (!('path' in wishes)) return refuse([wishes], args.includes('--json'), screen);
  const source = await openSource(wishes.path);
  if (!source.ok) return refuse(source.error, wishes.json, screen);
  try {
    const { sheetJson, openFile } = source.value;
    const progress = progressOn(screen);
    const run = await reproduce({ sheetJson, openFile, readHdf5 }, { withFigures: false, onProgress: progress.step, cancelled: () => false, digest: sha256, ...(wishes.explain ? { explain: searchLimit() } : {}) });
    progress.end();
    if (!run.ok) return refuse(run.error, wishes.json, screen);
    screen.out(wishes.json ? formatResult(run.value.result) : printResult(run.value.result));
    return run.value.result.claims.every((claim) => claim.verdict === 'agrees') ? 0 : 1;
  } finally {
    await source.value.close();
  }
}

function parseArguments(args: readonly string[]): Wishes | Problem {
  const flags = args.filter((arg) => arg.startsWith('--'));
  const paths = args.filter((arg) => !arg.startsWith('--'));
  const unknown = flags.find((flag) => flag !== '--json' && flag !== '--explain');
  if (unknown !== undefined) return { code: 'tools/usage', where: 'command line', saw: `the unknown option ${JSON.stringify(unknown)}`, expected: usage };
  const [path] = paths;
  if (path === undefined || paths.length > 1) return { code: 'tools/usage', where: 'command line', saw: paths.length === 0 ? 'no path' : `${paths.length} paths`, expected: usage };
  return { path, json: flags.includes('--json'), explain: flags.includes('--explain') };
}

function refuse(problems: readonly Problem[], json: boolean, screen: Screen): 2 {
  if (json) screen.out(formatProblems(problems));
  else {
    screen.err(`${problems.length === 1 ? 'One thing has' : `${problems.length} things have`} to be mended before this can run:\n`);
    for (const problem of problems) screen.err(`  ${formatProblem({ ...problem, where: problem.where === '' ? 'claim.json' : problem.where })} [${problem.code}]\n`);
  }
  return 2;
}

function sha256(): StreamingDigest {
  const hash = createHash('sha256');
  return { update: (bytes) => void hash.update(bytes), hex: () => hash.digest('hex') };
}

/** On a terminal one line that overwrites itself; elsewhere one line for each new thing that is done. */
function progressOn(screen: Screen): { step: (fraction: number, doing: string) => void; end: () => void } {
  let last = '';
  const step = (fraction: number, doing: string) => {
    const line = screen.isTerminal ? `${String(Math.round(100 * fraction)).padStart(3)} %  ${doing}` : doing;
    if (line === last) return;
    last = line;
    screen.err(screen.isTerminal ? `\r\u001b[2K${line.slice(0, 78)}` : `${line}\n`);
  };
  return { step, end: () => screen.isTerminal && screen.err('\r\u001b[2K') };
}
