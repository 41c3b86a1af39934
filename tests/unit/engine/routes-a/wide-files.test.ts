import { describe, expect, it } from 'vitest';
import { evenLines, MOST_EVEN_LINES } from '@/lib/engine/routes/a/bin-plan';
import { piecesOf } from '@/lib/engine/routes/a/file-pieces';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { houseNumerics } from '@/lib/engine/routes/a/numerics';
import { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { weightedSpectrum } from '@/lib/engine/routes/a/weighted-spectrum';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { bandOf, frequencySide } from '../../../golden/signals';
import { measured } from '../../../support/detector-claims';

/** Lines spaced evenly in their logarithm over eight and a half decades: even ones at the lower end's spacing would be 10⁹. */
const [low, high] = [1e-6, 300];
const chirp = (f: number): number => 60 * (f / low) ** (-5 / 3);
const still = (): number => 0;
const side = (phase: (f: number) => number) =>
  frequencySide(low, high, 10000, (f) => {
    const size = 1e-22 * f ** (-7 / 6);
    const [c, s] = [Math.cos(phase(f)), Math.sin(phase(f))];
    return { plus: size * c, plusIm: size * s, cross: size * s, crossIm: -size * c };
  });
/** Against f^(−4/3) every octave of f^(−7/3) holds the same power. */
const band = bandOf((f) => 1e-44 * f ** (-4 / 3), low, high);
const exact = 4 * Math.log(high / low);

describe('route A on a file whose lines span many decades', () => {
  it.each([
    ['without a phase', still],
    ['of a chirp', chirp],
  ])('finds the power %s in closed form', (_, phase) => {
    const gram = createRouteA().gram(side(phase), band);
    expect(gram.plusPlus).toAgreeWith(exact, { relative: 1e-8 });
    expect(gram.crossCross).toAgreeWith(exact, { relative: 1e-8 });
  });

  it('finds what route B finds, without laying nodes for delays that a power does not have', () => {
    expect(routeB.gram(side(chirp), band).plusPlus).toAgreeWith(exact, { relative: 1e-8 });
  });

  it('is no less right with bins twice as fine', () => {
    const fine = createRouteA({ ...houseNumerics, padDoublings: 1 }).gram(side(still), band);
    expect(fine.plusPlus).toAgreeWith(exact, { relative: 1e-8 });
  });

  it('takes pieces that cover the band once, each with few lines', () => {
    const store = new SpectrumStore();
    const whole = side(chirp);
    const pieces = piecesOf(whole, band, store);
    expect(pieces.length).toBeGreaterThan(5);
    expect(pieces.map((piece) => piece.band.fLowHz)).toEqual([low, ...pieces.slice(0, -1).map((piece) => piece.band.fHighHz)]);
    expect(pieces.at(-1)?.band.fHighHz).toBe(high);
    for (const { side: part, band: inner, longestS } of pieces) {
      expect(inner.fHighHz / inner.fLowHz).toBeLessThanOrEqual(32);
      expect(evenLines({ sides: [part], band: inner, absoluteTimes: false, longestS: longestS ?? Infinity }, store)).toBeLessThan(MOST_EVEN_LINES / 2);
    }
  });

  it('leaves a file alone whose even lines fit', () => {
    const narrow = bandOf(() => 1e-46, 10, 300);
    expect(piecesOf(side(still), narrow, new SpectrumStore())).toHaveLength(1);
  });

  it('draws the same power for the eye in every piece', () => {
    const f = [3e-6, 2e-4, 0.01, 1, 90];
    const drawn = weightedSpectrum(side(still), band, 'plus', f, new SpectrumStore());
    for (const height of drawn) expect(height).toAgreeWith(4, 0.05);
  });

  it('refuses a match there, and says how many lines it would need', () => {
    const { waveform } = side(still);
    const { points, findings } = measured({ quantity: 'match', a: waveform, b: side(chirp).waveform, noise: band.noise, settings: { fLowHz: low, fHighHz: high } });
    expect(points[0]?.value).toBeNull();
    const stop = findings.find(({ code }) => code === 'engine/too-many-lines');
    expect(stop?.level).toBe('stops-lodging');
    expect(stop?.text).toMatch(/would need \S+ evenly spaced frequencies; at most 2097152 are held/);
  });
});
