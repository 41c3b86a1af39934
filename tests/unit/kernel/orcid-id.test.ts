import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { orcidCheckCharacter, orcidChecks, parseOrcidId } from '@/lib/kernel/orcid-id';
import { OPENID_PEOPLE } from '@/lib/tools/fakes/openid-people';

/** Below the block that is given out, so these are nobody's. */
const digits = fc.integer({ min: 0, max: 999_999_999 }).map((n) => String(n).padStart(15, '0'));
const whole = (fifteen: string): string => `${fifteen}${orcidCheckCharacter(fifteen)}`.replace(/(.{4})(?=.)/g, '$1-');

describe('a typed-in ORCID iD', () => {
  // From memory of ISO 7064 mod 11-2: the remainders of 1·2 = 2 → (12 − 2) mod 11 = 10 → X.
  it('ends in the character that the fifteen before it give', () => {
    expect(orcidCheckCharacter('000000000000000')).toBe('1');
    expect(orcidCheckCharacter('000000000000001')).toBe('X');
  });

  it('is read with or without address, hyphens and capitals', () => {
    for (const text of ['0000-0000-0000-001X', '000000000000001x', ' https://orcid.org/0000-0000-0000-001X ', 'http://www.orcid.org/0000-0000-0000-001x/'])
      expect(parseOrcidId(text)).toEqual({ ok: true, value: '0000-0000-0000-001X' });
  });

  it('is refused when one digit is wrong or two neighbours are swapped', () => {
    fc.assert(
      fc.property(digits, fc.integer({ min: 0, max: 14 }), fc.integer({ min: 1, max: 9 }), (fifteen, at, by) => {
        const wrong = fifteen.slice(0, at) + String((Number(fifteen[at]) + by) % 10) + fifteen.slice(at + 1);
        expect(orcidChecks(whole(fifteen))).toBe(true);
        expect(orcidChecks(`${wrong}${orcidCheckCharacter(fifteen)}`.replace(/(.{4})(?=.)/g, '$1-'))).toBe(false);
        const swapped = at < 14 ? fifteen.slice(0, at) + fifteen[at + 1] + fifteen[at] + fifteen.slice(at + 2) : fifteen;
        if (swapped !== fifteen) expect(orcidChecks(`${swapped}${orcidCheckCharacter(fifteen)}`.replace(/(.{4})(?=.)/g, '$1-'))).toBe(false);
      }),
    );
  });

  it('is told what was seen and what was expected', () => {
    const short = parseOrcidId('0000-0000-0001');
    const wrong = parseOrcidId('0000-0000-0000-0012');
    expect(short).toMatchObject({ ok: false, error: { code: 'accounts/orcid-form', saw: '0000-0000-0001' } });
    expect(wrong).toMatchObject({ ok: false, error: { code: 'accounts/orcid-check', hint: expect.stringContaining('swapped') } });
  });
});

describe('the people of the local provider', () => {
  it('have iDs of the right form that cannot be anybody’s', () => {
    for (const { id } of OPENID_PEOPLE) {
      expect(id).toMatch(/^\d{4}-\d{4}-\d{4}-\d{3}[\dX]$/);
      expect(orcidChecks(id), id).toBe(false);
    }
  });
});
