import { describe, expect, it } from 'vitest';
import { standingOf, type Grounds } from '@/lib/explain/search/standing';

const single: Grounds = { changes: 1, chance: 0.05, supported: false, inFile: false, points: 1, explains: [], breaks: [], beatsDeclared: true };
const pair: Grounds = { ...single, changes: 2, chance: 0.01 };

describe('one change', () => {
  it('stands where chance does as well in at most 5 % of claims, and not beyond', () => {
    expect(standingOf(single)).toBe('candidate');
    expect(standingOf({ ...single, chance: 0.0501 })).toBe('coincidence');
  });

  it('stands however often chance does as well where the head or the samples of a file speak for it, not where the statement has the word', () => {
    expect(standingOf({ ...single, chance: 0.6, supported: true, inFile: true })).toBe('candidate');
    expect(standingOf({ ...single, chance: 0.6, supported: true })).toBe('coincidence');
  });
});

describe('two changes at once', () => {
  it('do not stand on one number, rare as the fit may be', () => {
    expect(standingOf({ ...pair, chance: 0.0005 })).toBe('coincidence');
    expect(standingOf({ ...pair, chance: 0.0005, points: 2 })).toBe('coincidence');
  });

  it('stand at 1 % with three points, a second claim that they explain, or words that speak for them', () => {
    expect(standingOf({ ...pair, points: 3 })).toBe('candidate');
    expect(standingOf({ ...pair, explains: ['C2'] })).toBe('candidate');
    expect(standingOf({ ...pair, supported: true })).toBe('candidate');
  });

  it('do not stand beyond 1 %, whatever supports them', () => {
    expect(standingOf({ ...pair, chance: 0.0101, points: 9, explains: ['C2'], supported: true })).toBe('coincidence');
  });
});

describe('whatever its changes', () => {
  it.each([single, { ...pair, points: 3 }])('a reading that takes an agreeing claim out of agreement does not stand', (grounds) => {
    expect(standingOf({ ...grounds, supported: true, breaks: ['C3'] })).toBe('coincidence');
  });

  it('nor does one that fits an unsettled claim no better than the declared settings do', () => {
    expect(standingOf({ ...single, supported: true, beatsDeclared: false })).toBe('coincidence');
  });
});
