import fs from 'node:fs';
import path from 'node:path';
import { say } from './ground.mjs';

/** Waits until no living process holds the file, then holds it; gives the release. */
export async function holdLock(file) {
  fs.mkdirSync(path.dirname(file), { recursive: true });
  for (let told = false; !take(file); told = true) {
    if (!told) say(`waiting for process ${holderOf(file)}, which holds ${file}`);
    await new Promise((resolve) => setTimeout(resolve, 300));
  }
  return () => fs.rmSync(file, { force: true });
}

/** The process id in the file, when that process is alive. */
export function holderOf(file) {
  const pid = fs.existsSync(file) ? Number(fs.readFileSync(file, 'utf8')) : 0;
  return pid > 0 && isAlive(pid) ? pid : undefined;
}

/** False when a living process holds it; what a dead one left behind is taken over. */
export function take(file) {
  if (holderOf(file) !== undefined) return false;
  fs.rmSync(file, { force: true });
  try {
    fs.writeFileSync(file, String(process.pid), { flag: 'wx' });
    return true;
  } catch (error) {
    if (error.code === 'EEXIST') return false;
    throw error;
  }
}

/** A process id may have been given to another program since: ours are all node. */
function isAlive(pid) {
  try {
    return fs.readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('node');
  } catch {
    return false;
  }
}
