import { Logger } from 'graphile-worker';

/** The queue tells of each job it takes; only what a person should look at is kept. */
export const quietLogger = new Logger(() => (level, message) => {
  if (level === 'error' || level === 'warning') console.error(JSON.stringify({ level, at: new Date().toISOString(), where: 'queue', message }));
});

export const report = (error: unknown): void => console.error(JSON.stringify({ level: 'error', at: new Date().toISOString(), where: 'worker', message: error instanceof Error ? error.message : String(error) }));
