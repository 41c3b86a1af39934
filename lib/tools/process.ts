/** Manners of a process that `npm start` supervises. */

export function requiredVariable(name: string): string {
  const value = process.env[name];
  if (!value) throw new Error(`The environment variable ${name} is not set.`);
  return value;
}

const PARENT_CHECK_MS = 500;
const PATIENCE_MS = 5000;

/**
 * Stops on SIGTERM and SIGINT, and when the supervisor was killed outright, which sends no signal.
 * Outside `npm start` (a worker under a service manager) the parent is not watched.
 */
export function endWithParent(stop: () => Promise<void>): void {
  let ending = false;
  const end = (): void => {
    if (ending) return;
    ending = true;
    setTimeout(() => process.exit(1), PATIENCE_MS).unref();
    void stop().then(
      () => process.exit(0),
      () => process.exit(1),
    );
  };
  process.on('SIGTERM', end);
  process.on('SIGINT', end);
  if (process.env['SUPERVISED'] === '1') watchParent(end);
}

export function watchParent(end: () => void): void {
  const parent = process.ppid;
  setInterval(() => {
    if (process.ppid !== parent) end();
  }, PARENT_CHECK_MS).unref();
}
