import type { RunStep } from '@/db/schema/runs';

/** Beyond this a log is no longer read by anybody; the last line says how many steps it leaves out. */
const MOST_STEPS = 400;

/**
 * What a run did, one line for each new activity, with the time since it began. It lies beside the
 * result and is no part of it: times differ from run to run, a result does not.
 */
export function stepLog(now: () => number) {
  const began = now();
  const steps: RunStep[] = [];
  let last = '';
  let left = 0;
  return {
    note(doing: string): void {
      if (doing === last) return;
      last = doing;
      if (steps.length < MOST_STEPS) steps.push({ atMs: Math.round(now() - began), doing: doing.slice(0, 200) });
      else left++;
    },
    steps: (): readonly RunStep[] => (left === 0 ? steps : [...steps, { atMs: Math.round(now() - began), doing: `and ${left} more steps` }]),
  };
}
