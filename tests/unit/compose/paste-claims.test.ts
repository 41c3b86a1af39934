import { describe, expect, it } from 'vitest';
import { emptyClaim } from '@/app/(desk)/compose/[id]/claim-fields';
import { pasteClaims } from '@/app/(desk)/compose/[id]/paste-claims';

const settings = ['totalMassMsun', 'fLowHz'];
const like = { ...emptyClaim([]), a: 'A', b: 'B', noise: 'S' };

describe('a table pasted from a spreadsheet', () => {
  it('fills one claim a row and takes what a row leaves out from the draft', () => {
    const { claims, problems } = pasteClaims('quantity\tmass\tfLowHz\tclaimed\nmatch\t60\t20\t0.9753(2)\nmismatch\t100\t\t4.1e-3', ['C1'], settings, like);
    expect(problems).toEqual([]);
    expect(claims.map((c) => [c.id, c.quantity, c.a, c.noise, c.claimed])).toEqual([['C2', 'match', 'A', 'S', '0.9753(2)'], ['C3', 'mismatch', 'A', 'S', '4.1e-3']]);
    expect(claims.map((c) => c.settings)).toEqual([{ totalMassMsun: '60', fLowHz: '20' }, { totalMassMsun: '100' }]);
  });

  it('reads commas and semicolons as well, and names of columns in any case', () => {
    for (const between of [',', ';']) {
      const { claims } = pasteClaims([['ID', 'Claimed', 'TOTALMASSMSUN'], ['X1', '0.9', '60']].map((r) => r.join(between)).join('\r\n'), [], settings, like);
      expect(claims.map((c) => [c.id, c.claimed, c.settings['totalMassMsun']])).toEqual([['X1', '0.9', '60']]);
    }
  });

  it('says which column it does not know and which id is taken, and shares no settings between rows', () => {
    const { claims, problems } = pasteClaims('id\tcolour\tclaimed\nC1\tred\t1\nC1\tblue\t2', ['C1'], settings, like);
    expect(problems.filter((p) => p.includes('colour'))).toHaveLength(1);
    expect(problems.filter((p) => p.includes('C1 is taken'))).toHaveLength(2);
    expect(new Set(claims.map((c) => c.id)).size).toBe(2);
    expect(claims[0]?.settings).not.toBe(claims[1]?.settings);
  });

  it('asks for a head and a row', () => {
    expect(pasteClaims('claimed', [], settings).claims).toEqual([]);
    expect(pasteClaims('claimed', [], settings).problems[0]).toMatch(/at least one row/);
  });
});
