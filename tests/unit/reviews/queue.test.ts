import { describe, expect, it } from 'vitest';
import { dayOf } from '@/lib/reviews/clocks';
import { placeInQueue, type QueueFacts, type QueueReferee } from '@/lib/reviews/queue';

const since = '2026-11-01T09:00:00Z';
const on = (day: number): string => new Date(Date.parse(since) + (day - 1) * 86_400_000).toISOString();
const referee = (slot: string, over: Partial<QueueReferee> = {}): QueueReferee => ({ slot, state: 'accepted', since, hasReported: false, ...over });
const of = (over: Partial<QueueFacts>): QueueFacts => ({
  state: 'triage', round: 1, stateSince: since, editorName: 'R. Amsel', isYours: true, referees: [], verdicts: [{ claim: 'C1', verdict: 'agrees' }], run: 'finished', signing: 'not-needed', ...over,
});
const placed = (over: Partial<QueueFacts>, day = 1) => {
  const place = placeInQueue(of(over), on(day));
  return place && [place.group, place.next, place.ball.with, place.ball.day, place.ball.of];
};

describe('the queue says what is needed now, of whom, since when', () => {
  it.each([
    ['nobody has taken it', { editorName: null }, 2, ['assign', 'take', 'no editor yet', 2, 5]],
    ['no referee asked', {}, 3, ['assign', 'assign', 'R. Amsel', 3, 5]],
    ['an invitation out', { referees: [referee('B', { state: 'asked' })] }, 6, ['waiting', 'open', 'Referee B', 6, 8]],
    ['silent too long', { referees: [referee('B', { state: 'asked' })] }, 7, ['chase', 'remind', 'Referee B', 7, 8]],
    ['referees stayed from the last round', { referees: [referee('B')] }, 1, ['assign', 'send-to-review', 'R. Amsel', 1, 5]],
    ['reports in time', { state: 'in-review', referees: [referee('D'), referee('B', { hasReported: true })] }, 10, ['waiting', 'open', 'Referee D', 10, 21]],
    ['a report soon due', { state: 'in-review', referees: [referee('D'), referee('B')] }, 20, ['chase', 'remind', 'Referees B, D', 20, 21]],
    ['a report over', { state: 'in-review', referees: [referee('A')] }, 25, ['chase', 'remind', 'Referee A', 25, 21]],
    ['later rounds are shorter', { state: 'in-review', round: 2, referees: [referee('A')] }, 13, ['chase', 'remind', 'Referee A', 13, 14]],
    ['all reports in', { state: 'deciding' }, 3, ['decide', 'decide', 'R. Amsel', 3, 7]],
    ['being signed', { state: 'deciding', signing: 'waiting' }, 1, ['waiting', 'open', 'Signer', 1, 1]],
    ['the signer refused', { state: 'deciding', signing: 'refused' }, 1, ['unsettled-runs', 'look', 'R. Amsel', 1, 2]],
    ['routes disagree', { verdicts: [{ claim: 'C2', verdict: 'routes-disagree' }] }, 1, ['unsettled-runs', 'look', 'Administrator', 1, 2]],
    ['the run stopped', { state: 'lodged', run: 'stopped' }, 1, ['unsettled-runs', 'look', 'Administrator', 1, 2]],
    ['being computed', { state: 'lodged', run: 'working' }, 1, ['waiting', 'open', 'Machine', 1, 1]],
    ['revision asked', { state: 'back-with-author' }, 20, ['waiting', 'open', 'Authors', 20, 30]],
    ['revision overdue', { state: 'back-with-author' }, 29, ['chase', 'open', 'Authors', 29, 30]],
  ] as const)('%s', (_what, over, day, expected) => expect(placed(over as Partial<QueueFacts>, day)).toEqual(expected));

  it('drafts and ended matters are no editor’s business', () => {
    for (const state of ['draft', 'checking', 'entered', 'set-aside', 'withdrawn', 'struck'] as const) expect(placed({ state })).toBeUndefined();
  });

  it('who joined late has the full time', () => {
    expect(placed({ state: 'in-review', referees: [referee('A', { since: on(15) })] }, 25)).toEqual(['waiting', 'open', 'Referee A', 11, 21]);
  });

  it('the day of arrival is day 1, also under a clock that runs backwards', () => {
    expect([dayOf(since, since), dayOf(since, on(2)), dayOf(since, on(-3))]).toEqual([1, 2, 1]);
  });
});
