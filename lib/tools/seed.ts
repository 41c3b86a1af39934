/** Command line: fills the empty database that the environment names with the demonstration. */
import { requiredVariable } from './process';
import { seedDemonstration } from './demo/seed-demonstration';

const say = (line: string): void => console.log(`[counterfoil] seed: ${line}`);

try {
  const seeded = await seedDemonstration(requiredVariable('DATA_DIR'), say, process.argv.includes('--everything'));
  if (!seeded) say('there are accounts already, so nothing was added');
} catch (error) {
  console.error(error instanceof Error ? `The demonstration was not seeded. ${error.message}` : error);
  process.exitCode = 1;
}
