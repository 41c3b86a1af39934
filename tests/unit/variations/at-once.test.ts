import { readFile } from 'node:fs/promises';
import { createReadStream } from 'node:fs';
import { createHash } from 'node:crypto';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { atOnce } from '@/app/(public)/variations/at-once';
import { reproduce } from '@/lib/pipeline/reproduce';
import type { ResultClaim } from '@/lib/pipeline/result';
import type { VariationChanges } from '@/lib/services/variations/variation-view';

const digest = () => {
  const hash = createHash('sha256');
  return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
};

type Claim = Record<string, unknown> & { readonly settings?: Record<string, unknown> };

/** One claim of a specimen, with other settings, computed by the engine itself. */
async function compute(specimen: string, change: (claim: Claim) => Claim, pick: (claim: Claim) => boolean): Promise<ResultClaim> {
  const folder = path.resolve('content/specimens', specimen);
  const sheet = JSON.parse(await readFile(path.join(folder, 'claim.json'), 'utf8')) as { claims: Claim[] };
  const claims = sheet.claims.filter(pick).slice(0, 1).map(change);
  const openFile = (name: string) => createReadStream(path.join(folder, name)) as AsyncIterable<Uint8Array>;
  const done = await reproduce({ sheetJson: { ...sheet, claims }, openFile }, { withFigures: false, digest, onProgress: () => undefined, cancelled: () => false });
  const claim = done.ok ? done.value.result.claims[0] : undefined;
  if (!claim) throw new Error(JSON.stringify(done.ok ? 'no claim came back' : done.error));
  return claim;
}

/** The base with its settings, and what the factor says against what a rerun says. */
async function held(specimen: string, base: (claim: Claim) => Claim, pick: (claim: Claim) => boolean, settings: Record<string, unknown>): Promise<{ readonly told: number; readonly rerun: number }> {
  const official = await compute(specimen, base, pick);
  const known = atOnce(official, { settings });
  const rerun = await compute(specimen, (claim) => { const own = base(claim); return { ...own, settings: { ...own.settings, ...settings } }; }, pick);
  return { told: known?.points[0]?.value ?? Number.NaN, rerun: rerun.points[0]?.value ?? Number.NaN };
}

const ofQuantity = (quantity: string) => (claim: Claim): boolean => claim['quantity'] === quantity;
const asItStands = (claim: Claim): Claim => claim;
const atSixty = ({ over: _over, claimed, ...claim }: Claim): Claim => ({ ...claim, claimed: Array.isArray(claimed) ? claimed[0] : claimed, settings: { ...claim.settings, totalMassMsun: 60 } });

describe('a number told at once is what a rerun of the engine gives', () => {
  it.each([{ detectors: 3 }, { distanceMpc: 50, armAngleDeg: 45 }])('for a loudness with %o', async (settings) => {
    const { told, rerun } = await held('loudness', atSixty, ofQuantity('snr'), settings);
    expect(Math.abs(told / rerun - 1)).toBeLessThan(1e-12);
  });

  it('for the loudness that tells two waveforms apart, with more parameters', async () => {
    const asDistinguishing = (claim: Claim): Claim => ({ ...atSixty(claim), quantity: 'distinguishability-snr', claimed: 5, tolerance: 0.1 });
    const { told, rerun } = await held('spin-visible', asDistinguishing, ofQuantity('match'), { parameters: 4 });
    expect(Math.abs(told / rerun - 1)).toBeLessThan(1e-12);
  });

  it('for an electromagnetic energy in another field', async () => {
    const { told, rerun } = await held('electromagnetic-twin', asItStands, (claim) => claim['quantity'] === 'em-energy' && claim.settings?.['fieldGauss'] !== undefined, { fieldGauss: 3e4 });
    expect(Math.abs(told / rerun - 1)).toBeLessThan(1e-12);
  });
});

describe('nothing is told at once', () => {
  const used = (name: string, value: unknown, standing: 'declared' | 'assumed' | 'swept' = 'declared') => ({ name, value, standing });
  const official = (settings: ReturnType<typeof used>[], quantity = 'snr') => ({ quantity, settings, points: [{ at: {}, value: 10, expandedUncertainty: 0.1 }] });
  const told = (changes: VariationChanges, settings = [used('distanceMpc', 100), used('massFrame', 'detector', 'assumed')]) => atOnce(official(settings), changes);

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

  it('as a number, where the official one is missing', () => {
    const none = { quantity: 'snr', settings: [used('detectors', 1)], points: [{ at: {}, value: null, expandedUncertainty: null }] };
    expect(atOnce(none, { settings: { detectors: 4 } })?.points[0]).toMatchObject({ value: null, expandedUncertainty: null });
  });
});
