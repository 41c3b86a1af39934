import { describe, expect, it } from 'vitest';
import { routeB, routeBWith } from '@/lib/engine/routes/b/route-b';
import { gaussRule } from '@/lib/engine/routes/b/gauss-legendre';
import { burstMode, columnWaveform, evenAxis, modeWaveform, sideOf, steepBand, tabulatedBand, type Burst } from './signals-in-m';

const burst: Burst = { amplitude: 1, omega: 0.5, width: 10, at: 3 };
const even = evenAxis(-120, 120, 0.4);
/** Steps between 0.3 and 0.6, changing smoothly. */
const uneven = Float64Array.from({ length: 560 }, (_, i) => -125 + 0.45 * i + 5 * Math.sin(i / 30));
const band = steepBand(20, 400);
const powerOf = (side: Parameters<typeof routeB.gram>[0], b = band): number => routeB.gram(side, b).plusPlus;

/** The transform of the burst, and from it the integral, by a fine midpoint rule in closed form. */
function closedForm(fLowHz: number, fHighHz: number, psd: (f: number) => number): number {
  const n = 400000;
  const width = (fHighHz - fLowHz) / n;
  const y22 = Math.sqrt(5 / Math.PI) / 2;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const f = fLowHz + (i + 0.5) * width;
    const gauss = (omega: number): number => Math.exp(-(((omega - 0.5) * burst.width) ** 2) / 2);
    const w = 2 * Math.PI * f * 1e-3;
    // z = Y H with H at −f: the plus strain is half of it at each sign of f.
    const size = (y22 * 1e-24 * burst.width * Math.sqrt(2 * Math.PI)) / 2;
    sum += 4 * (size * gauss(w)) ** 2 * (width / psd(f));
  }
  return sum;
}

describe('route B, loudness', () => {
  it('agrees with the closed-form transform of a Gaussian burst, on a smooth curve and on a kinked table', () => {
    const side = sideOf(modeWaveform(even, [burstMode(even, 2, 2, burst)], 0.4));
    expect(powerOf(side)).toAgreeWith(closedForm(20, 400, band.noise.psd), { relative: 1e-9 });
    const table = tabulatedBand(20, 400, 60);
    expect(powerOf(side, table)).toAgreeWith(closedForm(20, 400, table.noise.psd), { relative: 1e-8 });
  });

  it('is the same on uneven samples to the spline’s error', () => {
    const regular = powerOf(sideOf(modeWaveform(even, [burstMode(even, 2, 2, burst)], 0.4)));
    const irregular = powerOf(sideOf(modeWaveform(uneven, [burstMode(uneven, 2, 2, burst)], null)));
    expect(irregular / regular).toAgreeWith(1, 2e-8);
  });

  it('is the same from strain, news and ψ4', () => {
    const power = (['strain', 'news', 'psi4'] as const).map((variable, order) =>
      powerOf(sideOf(modeWaveform(even, [burstMode(even, 2, 2, burst, order as 0 | 1 | 2)], 0.4, variable))),
    );
    expect(power[1]! / power[0]!).toAgreeWith(1, 1e-10);
    expect(power[2]! / power[0]!).toAgreeWith(1, 1e-10);
  });

  it('integrates a signal that is cut off sharply as the cut function, not as its samples', () => {
    // e^{−t/12}cos 0.55t from t = 0, without a taper: h₊ = the real part, no harmonics.
    const decay = evenAxis(0, 400, 0.5);
    const plus = decay.map((t) => Math.exp(-t / 12) * Math.cos(0.55 * t));
    const found = powerOf(sideOf(columnWaveform(decay, plus, null, 0.5)), steepBand(20, 400));
    let expected = 0;
    const n = 200000;
    for (let i = 0; i < n; i++) {
      const f = 20 + ((i + 0.5) * 380) / n;
      const w = 2 * Math.PI * f * 1e-3;
      const [g, omega] = [1 / 12, 0.55];
      const [dr, di] = [g * g - w * w + omega * omega, 2 * g * w];
      const size = (g * g + w * w) / (dr * dr + di * di);
      expected += ((4 * size * 1e-48 * 380) / n) / band.noise.psd(f);
    }
    // Eight samples at 0.28 rad a step fix the edge to 2e-8; half weights alone would leave 1e-4.
    expect(found).toAgreeWith(expected, { relative: 1e-7 });
  });

  it('does not move when its own knobs are turned', () => {
    const fine = evenAxis(-120, 120, 0.01);
    const side = sideOf(modeWaveform(fine, [burstMode(fine, 2, 2, burst)], 0.01));
    const harder = routeBWith({ thinning: 1 }).gram(side, band).plusPlus;
    const softer = routeBWith({ quadrature: 1e-11 }).gram(side, band).plusPlus;
    expect(powerOf(side) / harder).toAgreeWith(1, 1e-12);
    expect(powerOf(side) / softer).toAgreeWith(1, 1e-10);
  });

  it('gives on many lines of sight what it gives on each', () => {
    const modes = [burstMode(even, 2, 2, burst), burstMode(even, 2, -2, { ...burst, omega: -0.5 }), burstMode(even, 3, 2, { ...burst, amplitude: 0.3, at: 7 })];
    const side = sideOf(modeWaveform(even, modes, 0.4));
    const sights = [{ inclinationRad: 0.3, azimuthRad: 1 }, { inclinationRad: 2, azimuthRad: -0.7 }];
    const together = routeB.grams!(side, band, sights);
    sights.forEach((sight, i) => {
      const alone = routeB.gram({ ...side, ...sight }, band);
      for (const part of ['plusPlus', 'crossCross', 'plusCross'] as const) {
        expect(together[i]![part]).toAgreeWith(alone[part], { absolute: 1e-11 * (alone.plusPlus + alone.crossCross) });
      }
    });
  });

  it('averages over the sphere to the power of the modes', () => {
    const side = sideOf(modeWaveform(even, [burstMode(even, 2, 2, burst), burstMode(even, 3, 2, { ...burst, amplitude: 0.4 })], 0.4));
    const { x, w } = gaussRule(8);
    const azimuths = Array.from({ length: 12 }, (_, k) => (2 * Math.PI * k) / 12);
    const sights = [...x].flatMap((cosine) => azimuths.map((azimuthRad) => ({ inclinationRad: Math.acos(cosine), azimuthRad })));
    const sum = routeB.grams!(side, band, sights).reduce((total, g, k) => total + (w[Math.floor(k / 12)]! / 12) * (g.plusPlus + g.crossCross), 0);
    expect((2 * Math.PI * sum) / routeB.modePower(side, band)).toAgreeWith(1, 1e-12);
  });
});
