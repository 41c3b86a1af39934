/** `npm test`: set-up from nothing, then every project of vitest; extra arguments go to vitest. */
import { spawn } from 'node:child_process';
import fs from 'node:fs';
import path from 'node:path';
import { ensureBuild } from './setup/build.mjs';
import { ensureChromium } from './setup/debian.mjs';
import { ensureDependencies } from './setup/dependencies.mjs';
import { DATA, ROOT, report } from './setup/ground.mjs';
import { ensureWritable } from './setup/ownership.mjs';
import { ensurePostgres } from './setup/postgres.mjs';

/** Runs vitest once; gives its exit code and the counts of its report. */
export async function runVitest(args, reportName) {
  const reportFile = path.join(DATA, reportName);
  fs.rmSync(reportFile, { force: true });
  const vitest = spawn(
    process.execPath,
    ['node_modules/vitest/vitest.mjs', 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${reportFile}`, ...args],
    {
      cwd: ROOT,
      stdio: 'inherit',
      env: { ...process.env, NODE_ENV: 'test', NEXT_TELEMETRY_DISABLED: '1', AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true' },
    },
  );
  for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => vitest.kill(signal));
  const code = await new Promise((resolve) => vitest.once('exit', (exitCode) => resolve(exitCode ?? 1)));
  return { code, ...countsOf(reportFile) };
}

function countsOf(reportFile) {
  if (!fs.existsSync(reportFile)) return { passed: 0, failed: 0, skipped: 0, skippedTitles: [] };
  const { numPassedTests, numFailedTests, numPendingTests, numTodoTests, numFailedTestSuites, testResults } = JSON.parse(
    fs.readFileSync(reportFile, 'utf8'),
  );
  // A file that does not load has no tests of its own, and still has to be counted as a failure.
  const unloaded = testResults.filter((file) => file.status === 'failed' && file.assertionResults.length === 0).length;
  const failed = Math.max(numFailedTests + unloaded, numFailedTestSuites > 0 ? 1 : 0);
  const skippedTitles = testResults.flatMap((file) =>
    file.assertionResults
      .filter(({ status }) => ['pending', 'skipped', 'todo'].includes(status))
      .map(({ fullName }) => `${path.relative(ROOT, file.name)}: ${fullName}`),
  );
  return { passed: numPassedTests, failed, skipped: numPendingTests + (numTodoTests ?? 0), skippedTitles };
}

/** The closing line that people and machines read; no test at all is a failure. */
export function conclude({ code, passed, failed, skipped, skippedTitles }) {
  if (skippedTitles.length > 0) console.log(`\nSkipped:\n${skippedTitles.map((title) => `  ${title}`).join('\n')}`);
  console.log(`\n${passed} passed, ${failed} failed, ${skipped} skipped`);
  if (passed + failed === 0) console.error('No test ran, which counts as a failure.');
  return code !== 0 || failed > 0 || passed === 0 ? 1 : 0;
}

async function main() {
  ensureWritable();
  await ensureDependencies();
  ensurePostgres();
  ensureChromium();
  const args = process.argv.slice(2);
  if (needsBuild(args)) await ensureBuild();
  return conclude(await runVitest(args, 'test-report.json'));
}

/** `npm test -- tests/unit` and `-- --project units` have no use for a build of the web. */
function needsBuild(args) {
  const projects = args.flatMap((arg, i) => (arg === '--project' ? [args[i + 1]] : arg.startsWith('--project=') ? [arg.slice(10)] : []));
  if (projects.length > 0) return projects.includes('browser');
  const paths = args.filter((arg) => arg.startsWith('tests/'));
  return paths.length === 0 || paths.some((file) => file.startsWith('tests/browser'));
}

if (process.argv[1] === new URL(import.meta.url).pathname) {
  try {
    process.exitCode = await main();
  } catch (error) {
    report(error);
    process.exitCode = 1;
  }
}
