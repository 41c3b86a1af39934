/** `npm run db:migrate`: the database that the environment names, or the running demonstration's. */
import { runStep } from './setup/commands.mjs';
import { runningDemoEnvironment } from './setup/demo.mjs';
import { report } from './setup/ground.mjs';

try {
  const env = process.env.OWNER_DATABASE_URL ? process.env : runningDemoEnvironment();
  await runStep(process.execPath, ['--import', 'tsx', 'lib/tools/migrate.ts'], { env });
} catch (error) {
  report(error);
  process.exitCode = 1;
}
