/** `npm run bench`: ratios against a reference script in one run on this machine; writes content/bench.md. */
import { spawnSync } from 'node:child_process';
import { ensureDependencies } from './setup/dependencies.mjs';
import { runStep } from './setup/commands.mjs';
import { installFromDebian } from './setup/debian.mjs';
import { report } from './setup/ground.mjs';

const PYTHON = '/usr/bin/python3';
const hasScipy = () => spawnSync(PYTHON, ['-c', 'import numpy, scipy'], { stdio: 'ignore' }).status === 0;
const hasH5py = () => spawnSync(PYTHON, ['-c', 'import h5py'], { stdio: 'ignore' }).status === 0;

/** One row needs it; the others do not wait for it. */
function tryForHdf5() {
  try {
    installFromDebian(['python3-h5py'], 'h5py (for the row on HDF5)');
  } catch (error) {
    report(error);
  }
}

try {
  await ensureDependencies();
  if (!hasScipy()) installFromDebian(['python3-scipy'], 'scipy (for the reference script)');
  if (!hasH5py()) tryForHdf5();
  await runStep(process.execPath, ['--import', 'tsx', 'tests/bench/run.ts', ...process.argv.slice(2)]);
} catch (error) {
  report(error);
  process.exitCode = 1;
}
