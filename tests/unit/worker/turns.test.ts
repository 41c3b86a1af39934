import { describe, expect, it } from 'vitest';
import { flagsOf, URGENCY } from '@/lib/jobs/urgency';
import { Turns, type Turn } from '@/lib/worker/turns';

const house = { slots: 4, cores: 2 };

/** Enters, and remembers whether it stands aside. */
function follow(turns: Turns, urgency: number): { readonly turn: Turn; readonly aside: () => boolean } {
  const turn = turns.enter(urgency);
  let stands = false;
  turn.follow((aside) => (stands = aside));
  return { turn, aside: () => stands };
}

const seeding = URGENCY.check + 40;

describe('runs under way in one worker', () => {
  it('compute in the order of their urgency: seeding stands aside for two checks, and goes on after one', () => {
    const turns = new Turns(house);
    const [one, two] = [follow(turns, seeding), follow(turns, seeding)];
    const [mine, yours] = [follow(turns, URGENCY.check), follow(turns, URGENCY.check)];
    expect([one, two, mine, yours].map(({ aside }) => aside())).toEqual([true, true, false, false]);
    mine.turn.leave();
    expect([one, two, yours].map(({ aside }) => aside())).toEqual([false, true, false]);
  });
  it('let the numbers of others pass when they search', () => {
    const turns = new Turns({ slots: 4, cores: 1 });
    const [searching, asked] = [follow(turns, URGENCY.check), follow(turns, URGENCY.official)];
    expect([searching.aside(), asked.aside()]).toEqual([false, true]);
    searching.turn.searching();
    expect([searching.aside(), asked.aside()]).toEqual([true, false]);
  });
  it('give a slot back when searches and seeding hold them all', () => {
    const turns = new Turns(house);
    const [seed, ...asked] = [seeding, URGENCY.check, URGENCY.check, URGENCY.check].map((urgency) => turns.enter(urgency));
    for (const turn of asked.slice(0, 2)) turn.searching();
    expect(seed?.putOff.aborted).toBe(false);
    asked[2]?.searching();
    expect([seed?.putOff.aborted, ...asked.map(({ putOff }) => putOff.aborted)]).toEqual([true, false, false, false]);
  });
  it('never all search: the least urgent gives its slot back, and only that one', () => {
    const turns = new Turns(house);
    const all = [URGENCY.check, seeding, URGENCY.check, URGENCY.check].map((urgency) => turns.enter(urgency));
    for (const turn of all.slice(0, 3)) turn.searching();
    expect(all.map(({ putOff }) => putOff.aborted)).toEqual([false, false, false, false]);
    all[3]?.searching();
    expect(all.map(({ putOff }) => putOff.aborted)).toEqual([false, true, false, false]);
  });
});

describe('what a worker takes from the queue', () => {
  it('leaves the last slot to what somebody waits for, and the one before to what was lodged', () => {
    const turns = new Turns(house);
    const allowed = (urgency: number): boolean => {
      const forbidden = turns.ask();
      turns.answered();
      return !flagsOf(urgency).some((flag) => forbidden.includes(flag));
    };
    const kinds = [URGENCY.check, URGENCY.variation, URGENCY.official, URGENCY.recheck, seeding];
    const seen = [0, 1, 2, 3].map(() => {
      const now = kinds.map(allowed);
      turns.enter(URGENCY.check);
      return now;
    });
    expect(seen).toEqual([
      [true, true, true, true, true],
      [true, true, true, true, true],
      [true, true, true, false, false],
      [true, true, false, false, false],
    ]);
  });
  it('counts questions that have no answer yet, so that four at once do not take four of a kind', () => {
    const turns = new Turns(house);
    expect([1, 2, 3, 4].map(() => turns.ask())).toEqual([[], [], ['unhurried'], ['can-wait', 'put-off']]);
    turns.answered();
    expect(turns.ask()).toEqual(['can-wait', 'put-off']);
  });
  it('does not begin a search that was put off once while one slot is left', () => {
    const turns = new Turns({ slots: 1, cores: 1 });
    expect(turns.ask()).toContain('put-off');
  });
});
