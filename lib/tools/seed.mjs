/** `npm run db:seed`: fills the running demonstration's database, when it is empty; its worker measures the rest. */
import { prepareDatabase, runningDemoEnvironment, startRestOfSeed } from './setup/demo.mjs';
import { report } from './setup/ground.mjs';

try {
  const env = runningDemoEnvironment();
  await prepareDatabase(env);
  await startRestOfSeed(env)?.ended;
} catch (error) {
  report(error);
  process.exitCode = 1;
}
