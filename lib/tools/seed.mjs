/** `npm run db:seed`: fills the running demonstration's database, when it is empty. */
import { prepareDatabase, runningDemoEnvironment } from './setup/demo.mjs';
import { report } from './setup/ground.mjs';

try {
  await prepareDatabase(runningDemoEnvironment());
} catch (error) {
  report(error);
  process.exitCode = 1;
}
