/** `npm run bench`: ratios against a reference script in one run on this machine; writes content/bench.md. */
import { spawnSync } from 'node:child_process';
import { ensureDependencies } from './setup/dependencies.mjs';
import { runStep } from './setup/commands.mjs';
import { installFromDebian } from './setup/debian.mjs';
import { report } from './setup/ground.mjs';

const PYTHON = '/usr/bin/python3';
const hasScipy = () => spawnSync(PYTHON, ['-c', 'import numpy, scipy'], { stdio: 'ignore' }).status === 0;

try {
  await ensureDependencies();
  if (!hasScipy()) installFromDebian(['python3-scipy'], 'scipy (for the reference script)');
  await runStep(process.execPath, ['--import', 'tsx', 'tests/bench/run.ts', ...process.argv.slice(2)]);
} catch (error) {
  report(error);
  process.exitCode = 1;
}
