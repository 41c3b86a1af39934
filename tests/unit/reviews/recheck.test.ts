import { describe, expect, it } from 'vitest';
import type { ResultClaim, VerdictWord } from '@/lib/pipeline/result';
import { compareResults, staysValid } from '@/lib/reviews/recheck';

const claimOf = (value: number | null, expandedUncertainty: number | null, verdict: VerdictWord = 'agrees'): ResultClaim => ({ id: 'C1', points: [{ at: {}, value, expandedUncertainty, verdict }] }) as unknown as ResultClaim;
const moveOf = (before: ResultClaim, now: ResultClaim): string | undefined => compareResults([before], [now])[0]?.move;

describe('a published number measured again', () => {
  it.each([
    [36.3, 36.3, 'same'],
    [36.3, 36.3 + 1e-9, 'same'],
    [36.3, 36.301, 'within a tenth of U'],
    [36.3, 36.33, 'within U'],
    [36.3, 36.36, 'beyond U'],
    [36.3, null, 'beyond U'],
  ])('%d → %d with U = 0.05 is %s', (before, now, move) => expect(moveOf(claimOf(before, 0.05), claimOf(now, 0.05))).toBe(move));

  it('a verdict that changed is beyond U, however small the move', () => {
    expect(moveOf(claimOf(36.3, 0.05), claimOf(36.301, 0.05, 'unsettled'))).toBe('beyond U');
  });
  it('a claim that the newer result lacks, an uncertainty that is unknown, or one that is no number, is beyond U', () => {
    expect(compareResults([claimOf(1, 0.1)], [])[0]?.move).toBe('beyond U');
    for (const U of [null, Number.NaN]) expect(moveOf(claimOf(36.3, U), claimOf(36.301, U))).toBe('beyond U');
  });
  it('stays valid only when every number does', () => {
    const numbers = compareResults([claimOf(1, 0.1)], [claimOf(1.05, 0.1)]);
    expect(staysValid(numbers)).toBe(true);
    expect(staysValid([...numbers, ...compareResults([claimOf(1, 0.1)], [claimOf(2, 0.1)])])).toBe(false);
  });
});
