/** `npm run check`: types, lint, architecture, units and golden numbers. No database, no browser; a path after `--` takes that part of the tests. */
import { ensureDependencies } from './setup/dependencies.mjs';
import { runStep } from './setup/commands.mjs';
import { report, say } from './setup/ground.mjs';
import { ensureWritable } from './setup/ownership.mjs';
import { conclude, runVitest } from './test.mjs';

const node = (...args) => runStep(process.execPath, args, { env: { ...process.env, NEXT_TELEMETRY_DISABLED: '1' } });

async function checkTypes() {
  await node('node_modules/next/dist/bin/next', 'typegen');
  await node('node_modules/typescript/bin/tsc', '--noEmit');
  say('types: nothing to mend');
}

async function checkLint() {
  await node('node_modules/eslint/bin/eslint.js', '.', '--max-warnings', '0', '--cache', '--cache-location', '.data/eslint-cache');
  say('lint: nothing to mend');
}

try {
  ensureWritable();
  await ensureDependencies();
  const [types, lint] = await Promise.allSettled([checkTypes(), checkLint()]);
  const tests = await runVitest(['--project', 'units', ...process.argv.slice(2)], 'check-report.json');
  for (const step of [types, lint]) if (step.status === 'rejected') report(step.reason);
  const broken = [types, lint].some(({ status }) => status === 'rejected');
  process.exitCode = conclude(tests) || (broken ? 1 : 0);
} catch (error) {
  report(error);
  process.exitCode = 1;
}
