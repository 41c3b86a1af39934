import { describe, expect, it } from 'vitest';
import { atOnce } from '@/app/(public)/variations/at-once';
import type { ReadOtherwise } from '@/lib/explain/read-otherwise';
import type { Reproduced } from '@/lib/pipeline/reproduce-with';
import { burstFiles, burstSheet } from '../../support/burst-sheet';
import { turningBurst } from '../../support/turning-burst';
import { oneClaim, run, type SheetClaim } from '../../support/specimen-claim';

const LOUD = { id: 'C2', quantity: 'snr', of: { a: 'A' }, noise: 'W', settings: { fLowHz: 10, fHighHz: 1900, taper: 'none' }, claimed: '5.9', tolerance: 0.02 };

/** A burst in white noise, loud or against another, read as asked. */
const bursts = (claim: SheetClaim, otherwise?: ReadOtherwise) =>
  run({ ...burstSheet(), claims: [claim] }, async function* open(name) { yield new TextEncoder().encode(burstFiles()[name]); }, { withFigures: true, ...(otherwise && { otherwise }) });

const must = (done: Awaited<ReturnType<typeof bursts>>): Reproduced => {
  if (!done.ok) throw new Error(JSON.stringify(done.error));
  return done.value;
};

const weighted = (widthS: number, weight: (t: number) => number): number =>
  Array.from({ length: 4096 }, (_, i) => (i - 2048) / 4096).reduce((sum, t) => sum + (weight(t) * Math.exp(-(t ** 2) / (2 * widthS ** 2)) * Math.cos(2 * Math.PI * 150 * t)) ** 2, 0);

describe('a claim read otherwise', () => {
  it('is offered its readings beside the result, each with what it takes', async () => {
    const { readings, result } = must(await bursts(LOUD));
    const of = (id: string) => readings['C2']?.find((reading) => reading.id === id);
    expect(of('C02:quieter')).toMatchObject({ convention: 'C02', says: null, factor: Math.SQRT1_2 });
    expect(of('C16:detectors=2')).toMatchObject({ says: { settings: { detectors: 2 } }, factor: Math.SQRT2 });
    expect(of('C37:taper=auto')).toMatchObject({ says: { settings: { taper: 'auto' } }, factor: null });
    expect(of('C01:root')).toMatchObject({ says: null, factor: null });
    expect(readings['C2']?.filter(({ says }) => says?.noise !== undefined).length).toBeGreaterThan(0);
    expect(JSON.stringify(result)).not.toContain('C02:quieter');
  });

  it('is multiplied where the reading is a factor, U too, exactly as the panel tells it at once', async () => {
    const base = must(await bursts(LOUD));
    const told = atOnce({ ...oneClaim({ ok: true, value: base }), readings: base.readings['C2'] ?? [] }, { readings: ['C02:quieter'] });
    const [point] = oneClaim(await bursts(LOUD, { readings: ['C02:quieter'] })).points;
    expect(point?.value).toBe(told?.points[0]?.value);
    expect(point?.expandedUncertainty).toBe(told?.points[0]?.expandedUncertainty);
    expect(point?.routes.B).not.toBeNull();
  });

  it('is rerun where the inputs are edited: an amplitude for a power, in white noise a power of S', async () => {
    const plain = oneClaim(await bursts(LOUD)).points[0]?.value ?? Number.NaN;
    // ρ ∝ S^(−1/2), and S = 4·10⁻⁴⁶ becomes its root.
    expect(oneClaim(await bursts(LOUD, { readings: ['C01:root'] })).points[0]?.value).toBeCloseTo(plain * Math.sqrt(4e-46 / 2e-23), 20);
  });

  it('puts readings together: a factor on what a rerun gives', async () => {
    const root = oneClaim(await bursts(LOUD, { readings: ['C01:root'] })).points[0]?.value ?? Number.NaN;
    expect(oneClaim(await bursts(LOUD, { readings: ['C01:root', 'C35:divided'] })).points[0]?.value).toBeCloseTo(root / Math.sqrt(2 * Math.PI), 20);
  });

  it('leaves out a stretch of time, its edges falling inside it', async () => {
    const plain = oneClaim(await bursts(LOUD)).points[0]?.value ?? Number.NaN;
    const mask = { from: 0, to: 0.2 };
    const masked = oneClaim(await bursts(LOUD, { readings: [], mask })).points[0]?.value ?? Number.NaN;
    // Parseval in white noise: ρ² goes with the energy in time that is left.
    const left = weighted(0.01, (t) => (t <= 0 || t >= 0.2 ? 1 : Math.cos((Math.PI / 2) * Math.min(1, Math.min(t, 0.2 - t) / 0.02)) ** 2));
    expect(masked / plain).toBeCloseTo(Math.sqrt(left / weighted(0.01, () => 1)), 4);
    expect(masked).toBeLessThan(plain);
  });

  it('leaves nothing where the stretch is as long as numbers go', async () => {
    expect(oneClaim(await bursts(LOUD, { readings: [], mask: { from: -1.7e308, to: 1.7e308 } })).points[0]?.value ?? 0).toBe(0);
  });

  const swept = { ...LOUD, id: 'C3', settings: { ...LOUD.settings, distanceMpc: 400 }, over: { totalMassMsun: [50, 60] }, claimed: ['5', '5'], tolerance: 1 };
  const ofMass = async (otherwise?: ReadOtherwise) => {
    const { sheet, files } = turningBurst('M', swept);
    return must(await run(sheet, async function* open(name) { yield new TextEncoder().encode(files[name]); }, { withFigures: true, ...(otherwise && { otherwise }) }));
  };

  it('keeps the places that the author stated, though the mass means something else', async () => {
    const [base, other] = [await ofMass(), await ofMass({ readings: ['C12:component'] })];
    const [plain, read] = [base, other].map((value) => oneClaim({ ok: true, value }));
    expect(read?.points.map(({ at }) => at)).toEqual(plain?.points.map(({ at }) => at));
    // Twice the mass at 60 is what the plain number is at 120: only the places are those of the author.
    expect(read?.points[1]?.value).not.toBeCloseTo(plain?.points[1]?.value ?? 0, 3);
    const xs = ({ figures }: Reproduced) => figures['C3']?.find(({ kind }) => kind === 'sweep')?.x.values;
    expect(xs(other)?.map((x) => Number(x.toFixed(6)))).toEqual(xs(base)?.map((x) => Number(x.toFixed(6))));
  });

  it('takes an edge of its own at each place, and stands in one sweep', async () => {
    const done = await ofMass({ readings: ['C05:last-orbit'] });
    const claim = oneClaim({ ok: true, value: done });
    expect(claim.points.map(({ at }) => at)).toEqual([{ totalMassMsun: 50 }, { totalMassMsun: 60 }]);
    expect(claim.points.every(({ value, routes }) => value !== null && routes.B !== null)).toBe(true);
    expect(done.figures['C3']?.filter(({ kind }) => kind === 'sweep').map(({ x }) => x.values.length)).toEqual([2]);
  });

  it('is refused in words where the settings leave no such reading, or the stretch no sample', async () => {
    expect(await bursts(LOUD, { readings: ['C16:detectors=1'] })).toMatchObject({ ok: false, error: [{ where: '/changes/readings', saw: 'C16:detectors=1' }] });
    expect(await bursts(LOUD, { readings: [], mask: { from: 5, to: 6 } })).toMatchObject({ ok: false, error: [{ where: '/changes/mask', saw: '5 to 6' }] });
  });
});
