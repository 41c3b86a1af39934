/** Beside the open site: takes the rest of the demonstration's courses through the real queue. */
import { seedTheRest } from './demo/seed-demonstration';
import { requiredVariable } from './process';

const say = (line: string): void => console.log(line);

try {
  await seedTheRest(requiredVariable('DATA_DIR'), say);
} catch (error) {
  console.error(error instanceof Error ? `A course of the demonstration broke off. ${error.message}` : error);
  process.exitCode = 1;
}
