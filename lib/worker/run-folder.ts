import { mkdtemp, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';

/** The process id is in the name, so that what a killed worker left can be told from what a live one uses. */
const PREFIX = 'counterfoil-run-';

export const makeRunFolder = (): Promise<string> => mkdtemp(path.join(tmpdir(), `${PREFIX}${process.pid}-`));

/** Removes the inputs that killed workers of this machine left on its disk. */
export async function sweepRunFolders(folder: string = tmpdir()): Promise<number> {
  let swept = 0;
  for (const name of await readdir(folder)) {
    const pid = name.startsWith(PREFIX) ? Number(/^(\d+)-/.exec(name.slice(PREFIX.length))?.[1]) : NaN;
    if (!Number.isInteger(pid) || pid === process.pid || isAlive(pid)) continue;
    await rm(path.join(folder, name), { recursive: true, force: true });
    swept++;
  }
  return swept;
}

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}
