import { describe, expect, it } from 'vitest';
import { claimOf, explained } from '../support/explained';

/**
 * Scenarios of our design whose author meant something else: each is searched as the server does it. Which reading is
 * at work is known because the claim was made with it; its numbers are those of section 7 (an independent computation
 * in numpy, match to 1e-3, SNR to 0.3 %).
 */
const LONG = 180_000;

const withinOf = (value: number | null, expected: number, by: number): boolean => value !== null && Math.abs(value - expected) <= by;

describe('a claim that would agree under another reading', () => {
  it('D1: the lower cut-off of 30 Hz, by three points, alone among some fifty', async () => {
    const claim = claimOf(await explained('spin-visible'), 'C1');
    const [first, ...others] = claim.candidates;
    expect(first).toMatchObject({ standing: 'candidate', settings: { fLowHz: 30 }, changes: 1 });
    expect(others.filter(({ standing }) => standing === 'candidate')).toEqual([]);
    expect(first?.chance).toBeLessThan(0.01);
    expect(first?.tried).toBeGreaterThan(30);
    [0.9753, 0.9959, 0.9932].forEach((value, i) => expect(withinOf(first?.values[i] ?? null, value, 1e-3)).toBe(true));
    expect(claim.verdict).toBe('differs');
    expect(first?.sentence).not.toMatch(/author[s]? used/i);
  }, LONG);

  it('D2: a noise column of amplitudes used as power, for which its heading speaks', async () => {
    const [first] = claimOf(await explained('weak-spins'), 'C1').candidates;
    expect(first).toMatchObject({ standing: 'candidate', id: 'C01:root' });
    expect(first?.readings[0]).toMatchObject({ evidence: 'supports' });
    [0.8715, 0.9833].forEach((value, i) => expect(withinOf(first?.values[i] ?? null, value, 1e-3)).toBe(true));
  }, LONG);

  it('D3: a factor √2 whose two origins the number cannot tell apart', async () => {
    const [first] = claimOf(await explained('loudness'), 'C1').candidates;
    expect(first?.standing).toBe('candidate');
    expect(first?.readings.flatMap(({ conventions }) => conventions).sort()).toEqual(['C02', 'C03']);
    expect(first?.sentence).toContain('cannot tell which');
    [36.3 / Math.SQRT2, 52.68 / Math.SQRT2].forEach((value, i) => expect(withinOf(first?.values[i] ?? null, value, 0.003 * value)).toBe(true));
  }, LONG);

  it('D4: a mass in the frame of the detector, named first', async () => {
    const [ofSnr] = claimOf(await explained('source-frame'), 'C1').candidates;
    expect(ofSnr).toMatchObject({ id: 'C11:detector', settings: { massFrame: 'detector' } });
    expect(withinOf(ofSnr?.values[0] ?? null, 36.3, 0.003 * 36.3)).toBe(true);
  }, LONG);

  it('D7: modes of negative m without their sign, by the whole speed of the recoil', async () => {
    const [first] = claimOf(await explained('recoil-of-two-to-one'), 'C1').candidates;
    expect(first).toMatchObject({ id: 'C24:no-sign', standing: 'candidate' });
    // 112 is the vector (−103 km/s along z, 51 in the plane) of an independent sum in numpy, decision 0112.
    expect(withinOf(first?.values[0] ?? null, 112, 0.02 * 112)).toBe(true);
  }, LONG);

  it('D9: a field carried on with B instead of B²; a single digit leaves much to chance', async () => {
    const claim = claimOf(await explained('electromagnetic-twin'), 'C2');
    const found = claim.candidates.find(({ readings }) => readings.some(({ conventions }) => conventions.includes('C50')));
    expect(found?.breaks).toEqual([]);
    expect(withinOf(found?.values[0] ?? null, 1e-13, 0.05e-13)).toBe(true);
  }, LONG);
});

describe('what the samples of a file show', () => {
  it('speaks for the reading that they fit: a strain declared as ψ₄ is read as strain again', async () => {
    const declaredAsPsi4 = (sheet: Record<string, unknown>): unknown => {
      const waveforms = Object.entries(sheet['waveforms'] as Record<string, object>).map(([name, waveform]) => [name, { ...waveform, variable: 'psi4' }]);
      return { ...sheet, waveforms: Object.fromEntries(waveforms) as unknown };
    };
    const claim = claimOf(await explained('loudness', { sheet: declaredAsPsi4 }), 'C1');
    expect(claim.verdict).toBe('differs');
    const asStrain = claim.candidates.find(({ id }) => id.includes('C19:strain'));
    expect(asStrain?.readings.some(({ evidence, evidenceFrom }) => evidence === 'supports' && (evidenceFrom ?? '').length > 20)).toBe(true);
  }, LONG);
});

describe('the search', () => {
  it('gives the same bytes twice', async () => {
    const [once, twice] = [await explained('loudness'), await explained('loudness')];
    expect(JSON.stringify(twice)).toBe(JSON.stringify(once));
  }, LONG);

  it('ends where its clock asks for it, says so, and keeps what was tried', async () => {
    const { search } = claimOf(await explained('loudness', { endedBy: () => 'the time for the search was over' }), 'C1');
    expect(search?.stoppedBecause).toContain('time');
    expect(search?.tried).toBeGreaterThan(5);
    expect(search?.left).toBeGreaterThan(0);
    expect(search?.readings).toHaveLength(search?.tried ?? 0);
    for (const reading of search?.readings ?? []) expect('because' in reading || reading.values?.length === 2).toBe(true);
  }, LONG);

  it('leaves claims that agree alone', async () => {
    const result = await explained('radiated-energy');
    for (const claim of result.claims.filter(({ verdict }) => verdict === 'agrees')) {
      expect(claim.candidates).toEqual([]);
      expect(claim.search).toBeUndefined();
    }
  }, LONG);
});
