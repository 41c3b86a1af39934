import fs from 'node:fs';
import path from 'node:path';
import { userName } from './commands.mjs';
import { DATA, ROOT, SetupError } from './ground.mjs';

/** Folders that an earlier start under another user left behind are named at once, not met half-way. */
export function ensureWritable() {
  for (const place of [ROOT, DATA, path.join(ROOT, 'node_modules'), path.join(ROOT, '.next')]) {
    if (!fs.existsSync(place) || isWritable(place)) continue;
    const [owner, me] = [fs.statSync(place).uid, process.getuid()].map(userName);
    throw new SetupError(`${place} belongs to ${owner} and ${me} may not write it: start as ${owner}, or use a checkout of your own.`);
  }
  fs.mkdirSync(DATA, { recursive: true });
}

function isWritable(place) {
  try {
    fs.accessSync(place, fs.constants.W_OK);
    return true;
  } catch {
    return false;
  }
}
