import { describe, expect, it } from 'vitest';
import { atOnce } from '@/app/(public)/variations/at-once';
import type { BinaryFacts } from '@/lib/engine/contract/waveform';
import type { AskedChanges } from '@/lib/services/variations/changes';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';
import type { ResultClaim } from '@/lib/pipeline/result';
import { burstFiles, burstSheet } from '../../support/burst-sheet';
import { turningBurst } from '../../support/turning-burst';
import { ofQuantity, oneClaim, run, runClaim, type SheetClaim } from '../../support/specimen-claim';

const asItStands = (claim: SheetClaim): SheetClaim => claim;
const settled = (settings: Record<string, unknown>) => (claim: SheetClaim): SheetClaim => ({ ...claim, settings: { ...claim.settings, ...settings } });

/** Facts beside the files of every specimen here, so that what a number is referred to is known. */
const binary: BinaryFacts = { remnantMass: 0.955, admEnergy: 0.99 };

/** What the factor says of a base against what a rerun says: the number and its U. */
async function expectHeld(compute: (claim: (given: SheetClaim) => SheetClaim) => Promise<ResultClaim>, base: (claim: SheetClaim) => SheetClaim, settings: Record<string, unknown>, factor?: 1): Promise<void> {
  const official = await compute(base);
  const told = atOnce({ ...official, binary }, { settings });
  const rerun = (await compute((claim) => settled(settings)(base(claim)))).points[0];
  expect(rerun?.value).not.toBeNull();
  expect(Math.abs((told?.points[0]?.value ?? Number.NaN) / (rerun?.value ?? Number.NaN) - 1)).toBeLessThan(1e-11);
  // Below 10⁻⁹ of the number stand floors of rounding, which need not scale.
  const [ofTold, ofRerun] = [told?.points[0]?.expandedUncertainty ?? Number.NaN, rerun?.expandedUncertainty ?? Number.NaN];
  expect(Math.abs(ofTold - ofRerun)).toBeLessThan(1e-3 * ofRerun + 1e-9 * Math.abs(rerun?.value ?? 0));
  expect(told?.factor === 1).toBe(factor === 1);
}

const specimen = (name: string, pick: (claim: SheetClaim) => boolean) => async (change: (claim: SheetClaim) => SheetClaim): Promise<ResultClaim> =>
  oneClaim(await runClaim(name, { pick, change, ...(name.startsWith('electro') ? {} : { binary: { ...binary } }) }));

const inMemory = async (sheet: DraftSheet, files: Readonly<Record<string, string>>, change: (claim: SheetClaim) => SheetClaim): Promise<ResultClaim> =>
  oneClaim(await run({ ...sheet, claims: sheet.claims.map((claim) => change(claim)) }, async function* open(name) { yield new TextEncoder().encode(files[name]); }));

/** Two short bursts in white noise. */
const bursts = (change: (claim: SheetClaim) => SheetClaim) => inMemory(burstSheet(), burstFiles(), change);

const turning = (change: (claim: SheetClaim) => SheetClaim): Promise<ResultClaim> => {
  const { sheet, files } = turningBurst('s', burstSheet().claims[0] ?? {});
  return inMemory(sheet, files, change);
};

describe('a number told at once is what a rerun of the engine gives, U included', () => {
  const inSpace = { fLowHz: 10, fHighHz: 1900, taper: 'none', totalMassMsun: 60, distanceMpc: 400 };
  const loud = (settings: Record<string, unknown>, quantity = 'snr') => (claim: SheetClaim): SheetClaim => ({ ...claim, quantity, of: { a: 'A' }, claimed: 100, tolerance: 1, settings });

  it('for a loudness with another network and distance', () => expectHeld(turning, loud(inSpace), { distanceMpc: 50, armAngleDeg: 45, detectors: 3 }));

  it('for a loudness with both polarisations, averaged over the sky', () => expectHeld(turning, loud({ ...inSpace, response: 'complex', inclinationRad: 1 }), { average: 'sky', detectors: 2 }));

  it('for a reach in the detector’s frame', () => {
    const { distanceMpc: _distance, ...settings } = inSpace;
    return expectHeld(turning, loud({ ...settings, massFrame: 'detector' }, 'horizon-distance'), { threshold: 5, detectors: 2, armAngleDeg: 60 });
  });

  it.each(['snr-ratio', 'volume-ratio', 'match', 'overlap', 'mismatch'])('for a %s, in which the network cancels', (quantity) =>
    expectHeld(bursts, (claim) => ({ ...claim, quantity, claimed: 0.9, tolerance: 0.1 }), { detectors: 3, armAngleDeg: 45 }, 1));

  it('for the loudness that tells two waveforms apart, with more parameters', () => expectHeld(bursts, (claim) => ({ ...claim, quantity: 'distinguishability-snr', claimed: 5, tolerance: 0.1 }), { parameters: 4, detectors: 2 }));

  it.each(['radiated-energy', 'recoil'])('for a %s referred to another mass', (quantity) => expectHeld(specimen('recoil-of-two-to-one', ofQuantity(quantity)), settled({ normaliseBy: 'M' }), { normaliseBy: 'remnant' }));

  it.each(['ringdown-frequency', 'ringdown-damping'])('for a %s referred to the remnant', (quantity) => expectHeld(specimen('ringdown-and-resolution', ofQuantity(quantity)), settled({ normaliseBy: 'M' }), { normaliseBy: 'remnant' }));

  it('for an electromagnetic energy in another field, of another mass, and as a ratio', async () => {
    const fields = { fieldGauss: 1e4, totalMassMsun: 1e8 };
    await expectHeld(specimen('electromagnetic-twin', ofQuantity('em-energy')), settled(fields), { fieldGauss: 3e4, totalMassMsun: 5e7 });
    await expectHeld(specimen('electromagnetic-twin', ofQuantity('em-ratio')), settled(fields), { fieldGauss: 3e4, totalMassMsun: 5e7 });
  });

  it('for a frequency and a luminosity at another mass', async () => {
    await expectHeld(specimen('electromagnetic-twin', ofQuantity('em-frequency')), asItStands, { totalMassMsun: 2e7, plasmaDensityCm3: 1 });
    await expectHeld(specimen('shaken-disc', ofQuantity('disc-luminosity')), asItStands, { totalMassMsun: 2e7, radiusM: 30 });
  });
});

describe('nothing is told at once', () => {
  const used = (name: string, value: unknown, standing: 'declared' | 'assumed' | 'swept' = 'declared') => ({ name, value, standing });
  const official = (settings: ReturnType<typeof used>[], quantity = 'snr') => ({ quantity, settings, points: [{ at: {}, value: 10, expandedUncertainty: 0.1 }] });
  const told = (changes: AskedChanges, settings = [used('distanceMpc', 100), used('massFrame', 'detector', 'assumed')]) => atOnce(official(settings), changes);

  it('where one of the changes is more than a factor', () => {
    expect(told({ settings: { distanceMpc: 200 } })).toMatchObject({ factor: 0.5, points: [{ value: 5, expandedUncertainty: 0.05, official: 10 }] });
    expect(told({ settings: { distanceMpc: 200, fLowHz: 20 } })).toBeNull();
    expect(told({ settings: { distanceMpc: 200 }, noise: { curve: 'G2' } })).toBeNull();
    expect(told({})).toBeNull();
  });

  it('for a distance that sets the redshift of a mass in the source’s frame', () => {
    expect(told({ settings: { distanceMpc: 200 } }, [used('distanceMpc', 100), used('massFrame', 'source')])).toBeNull();
  });

  it('for a swept setting, one taken away, a text where a number belongs, or another quantity', () => {
    expect(told({ settings: { distanceMpc: 200 } }, [used('distanceMpc', null, 'swept'), used('massFrame', 'detector')])).toBeNull();
    expect(told({ settings: { distanceMpc: null } })).toBeNull();
    expect(told({ settings: { distanceMpc: '2OO' } })).toBeNull();
    expect(told({ settings: { detectors: 0 } }, [used('detectors', 1)])).toBeNull();
    expect(atOnce(official([used('distanceMpc', 100), used('massFrame', 'detector')], 'match'), { settings: { distanceMpc: 200 } })).toBeNull();
  });

  it('for a setting and a reading together, a mask, or a reading that is no factor', () => {
    const readings = [{ id: 'C02:quieter', factor: Math.SQRT1_2 }, { id: 'C01:root', factor: null }, { id: 'C27:isotropic', factor: [2] }];
    const base = { ...official([used('detectors', 1)]), readings };
    expect(atOnce(base, { readings: ['C02:quieter'] })?.points[0]).toMatchObject({ value: 10 * Math.SQRT1_2, expandedUncertainty: 0.1 * Math.SQRT1_2 });
    expect(atOnce(base, { readings: ['C02:quieter', 'C27:isotropic'] })).toMatchObject({ factor: null, points: [{ value: 20 * Math.SQRT1_2 }] });
    expect(atOnce(base, { readings: ['C02:quieter', 'C01:root'] })).toBeNull();
    expect(atOnce(base, { readings: ['C02:louder'] })).toBeNull();
    expect(atOnce(base, { readings: ['C02:quieter'], settings: { detectors: 4 } })).toBeNull();
    expect(atOnce(base, { readings: ['C02:quieter'], mask: { from: 0, to: 1 } })).toBeNull();
  });

  it('as a number, where the official one is missing', () => {
    const none = { quantity: 'snr', settings: [used('detectors', 1)], points: [{ at: {}, value: null, expandedUncertainty: null }] };
    expect(atOnce(none, { settings: { detectors: 4 } })?.points[0]).toMatchObject({ value: null, expandedUncertainty: null });
  });
});
