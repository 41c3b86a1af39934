import { createHash } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { runStep, withoutNpmVariables } from './commands.mjs';
import { ROOT, say } from './ground.mjs';
import { holdLock } from './lock.mjs';

const MODULES = path.join(ROOT, 'node_modules');
const STAMP = path.join(MODULES, '.lock-sha256');

/** Installs exactly what the lock names, when the lock or the binary interface of Node changed. */
export async function ensureDependencies() {
  const lock = createHash('sha256')
    .update(fs.readFileSync(path.join(ROOT, 'package-lock.json')))
    .digest('hex');
  const wanted = `${lock} ${process.versions.modules}`;
  const isThere = () => fs.existsSync(STAMP) && fs.readFileSync(STAMP, 'utf8') === wanted;
  if (isThere()) return;
  // Two commands begun together must not both empty the folder; the later one finds the work done.
  const release = await holdLock(path.join(ROOT, '.data', 'dependencies.lock'));
  try {
    if (!isThere()) await install(wanted);
  } finally {
    release();
  }
}

async function install(wanted) {
  say('installing the pinned packages (npm ci)');
  await runStep('npm', ['ci', '--no-audit', '--no-fund', '--include=dev'], { env: withoutNpmVariables(process.env) });
  fs.writeFileSync(STAMP, wanted);
}
