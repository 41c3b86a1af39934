import { describe, expect, it } from 'vitest';
import { stepLog } from '@/lib/worker/step-log';

const clock = () => {
  let ms = 1000;
  return () => (ms += 10);
};

describe('the log of a run', () => {
  it('has one line for each new activity, with the time since the run began', () => {
    const log = stepLog(clock());
    for (const doing of ['reading a.txt', 'reading a.txt', 'C1: Match', 'reading a.txt']) log.note(doing);
    expect(log.steps()).toEqual([{ atMs: 10, doing: 'reading a.txt' }, { atMs: 20, doing: 'C1: Match' }, { atMs: 30, doing: 'reading a.txt' }]);
  });

  it('ends at 400 lines and says how many it leaves out', () => {
    const log = stepLog(clock());
    for (let i = 0; i < 405; i++) log.note(`step ${i}`);
    expect(log.steps()).toHaveLength(401);
    expect(log.steps().at(-1)?.doing).toBe('and 5 more steps');
  });
});
