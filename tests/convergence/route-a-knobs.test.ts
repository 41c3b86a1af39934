import { describe, expect, it } from 'vitest';
import type { Band, Side } from '@/lib/engine/contract/route';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import { binWeights } from '@/lib/engine/routes/a/bin-weights';
import { noiseWeigher } from '@/lib/engine/routes/a/noise-weigher';
import { houseNumerics, type Numerics } from '@/lib/engine/routes/a/numerics';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';
import { interpolatePair } from '@/lib/engine/series/local-interpolation';
import { builtInCurves } from '@/lib/engine/noise/built-in-curves';
import { binary, curve } from '../support/detector-claims';
import { MSUN_S } from '@/lib/engine/units/constants';

const observedOrder = (errors: readonly number[]): number => Math.log2(errors[0]! / errors[1]!);

describe('local interpolation', () => {
  it.each([[4], [6], [8]])('of order %d gains that order when the step is halved', (order) => {
    const error = (step: number): number => {
      const axis = Float64Array.from({ length: Math.round(200 / step) }, (_, i) => i * step + 0.2 * Math.sin(i * step));
      const f = axis.map((t) => Math.cos(t));
      const grid = { t0: 50.13, dt: 0.37, n: 200 };
      const [found] = interpolatePair({ axis, first: f, second: f }, grid, order);
      return Math.max(...found.map((x, k) => Math.abs(x - Math.cos(grid.t0 + k * grid.dt))));
    };
    const order1 = observedOrder([error(0.8), error(0.4)]);
    expect(order1).toBeGreaterThan(order - 1);
    expect(order1).toBeLessThan(order + 2);
  });
});

describe('end weights between bins', () => {
  // ∫ f^(−7/3)/f^(−4) df from 31.7 to 97.3 Hz in closed form: both edges and the law of the noise lie between bins.
  const noise: NoiseCurve = {
    name: 'f⁻⁴',
    builtIn: null,
    fLowHz: 1,
    fHighHz: 4000,
    psd: (f) => f ** -4,
    points: null,
    alreadyAveraged: false,
    source: 'closed form',
  };
  const [low, high] = [31.7, 97.3];
  const exact = (high ** (8 / 3) - low ** (8 / 3)) / (8 / 3);
  const error = (dfHz: number, order: number): number => {
    const { first, values } = binWeights(noiseWeigher(noise, 0), {
      dfHz,
      fLowHz: low,
      fHighHz: high,
      firstBin: 1,
      lastBin: 4000,
      curveLowHz: 1,
      curveHighHz: 4000,
      order,
    });
    const sum = values.reduce((total, v, i) => total + v * ((first + i) * dfHz) ** (-7 / 3), 0);
    return Math.abs((dfHz * sum) / exact - 1);
  };

  it.each([[2], [4], [6]])('of order %d gain more than that order when the bins are halved', (order) => {
    expect(observedOrder([error(2, order), error(1, order)])).toBeGreaterThan(order);
  });

  it('leave 1e-12 where a hard mask leaves 1e-3', () => {
    expect(error(0.5, 8)).toBeLessThan(1e-12);
    const mask = Array.from({ length: 400 }, (_, k) => k * 0.5)
      .filter((f) => f >= low && f <= high)
      .reduce((sum, f) => sum + 0.5 * f ** (5 / 3), 0);
    expect(Math.abs(mask / exact - 1)).toBeGreaterThan(1e-3);
  });
});

describe('weights of a tabulated curve', () => {
  const f = [10, 14.3, 19.9, 31.3, 33.1, 47.7, 52.2, 77.7, 120.1, 200];
  const values = [5, 1.2, 0.9, 0.31, 2.2, 0.28, 0.21, 0.19, 0.3, 0.9];
  const table = tabulatedCurve({ name: 'table', f, values, meaning: 'psd', sided: 'one' });
  const noise = table.ok ? table.value.curve : null;

  /** Each segment is a power law: ∫ f^(−1.5) f^(−s) df in closed form. */
  const exact = f.slice(1).reduce((sum, to, i) => {
    const from = f[i]!;
    const s = Math.log(values[i + 1]! / values[i]!) / Math.log(to / from);
    const c = values[i]! * from ** -s;
    const p = -1.5 - s + 1;
    return sum + (to ** p - from ** p) / (p * c);
  }, 0);
  const error = (dfHz: number): number => {
    const { first, values: w } = binWeights(noiseWeigher(noise!, 0), {
      dfHz,
      fLowHz: 10,
      fHighHz: 200,
      firstBin: 1,
      lastBin: 1e5,
      curveLowHz: 10,
      curveHighHz: 200,
      order: 8,
    });
    const sum = w.reduce((total, v, i) => total + v * ((first + i) * dfHz) ** -1.5, 0);
    return Math.abs((dfHz * sum) / exact - 1);
  };

  it('see every kink: the error falls faster than the seventh power', () => {
    expect(observedOrder([error(0.8), error(0.4)])).toBeGreaterThan(6);
    expect(error(0.05)).toBeLessThan(1e-11);
  });
});

describe('the table of a closed-form curve', () => {
  it.each(builtInCurves.map(({ id }) => [id]))('%s agrees with its formula to 1e-12 between nodes', (id) => {
    const noise = curve(id);
    const weigher = noiseWeigher(noise, 0);
    for (let i = 0; i <= 997; i++) {
      const logF = Math.log(noise.fLowHz) + (i / 997) * Math.log(noise.fHighHz / noise.fLowHz);
      const exact = noise.psd(Math.min(noise.fHighHz, Math.max(noise.fLowHz, Math.exp(logF))));
      expect(weigher.continuedAt(0, 1, logF) * exact).toAgreeWith(1, 1e-11);
    }
  });
});

describe('route A against itself', () => {
  const w = binary('A', { stepM: 0.9 });
  const other = binary('B', { stepM: 0.9, chi1z: 0.15, chi2z: 0.15 });
  /** The same records on uneven steps, so that they must be interpolated. */
  const uneven = (of: typeof w): typeof w => {
    const axis = of.axis.map((t, i) => t + (i > 0 && i < of.axis.length - 1 ? 0.2 * Math.sin(0.01 * t) : 0));
    const fine = binary(of.name, { stepM: 0.3, ...(of === other ? { chi1z: 0.15, chi2z: 0.15 } : {}) });
    const set = fine.content.kind === 'modes' ? fine.content.modes : [];
    const inside = axis.filter((t) => t <= fine.axis[fine.axis.length - 1]!);
    const modes = set.map((mode) => {
      const read = (values: Float64Array) =>
        inside.map((t) => interpolatePair({ axis: fine.axis, first: values, second: values }, { t0: t, dt: 1, n: 1 }, 10)[0][0]!);
      return { ...mode, re: read(mode.re), im: read(mode.im) };
    });
    return { ...of, axis: inside, uniformStep: null, content: { kind: 'modes', modes } };
  };
  const side = (waveform: typeof w): Side => ({
    waveform,
    taper: { start: null, end: null },
    secondsPerUnit: 140 * MSUN_S,
    strainPerUnit: 1e-21,
    inclinationRad: 0.6,
    azimuthRad: 0.2,
  });
  const band: Band = { noise: curve('G2'), fLowHz: 25.3, fHighHz: 611.7 };
  const taper = { start: { from: 0, to: 300 }, end: null };
  const [a, b] = [w, other].map((x) => ({ ...side(uneven(x)), taper }));
  const store = new SpectrumStore();
  const mismatch = (change: Partial<Numerics>): number =>
    createRouteA({ ...houseNumerics, ...change }, store).match({
      a: a!,
      b: b!,
      band,
      response: 'plus',
      maximise: ['time', 'phase'],
      templateMassRange: [1, 1],
      rescale: (s) => s,
    }).mismatch;
  const base = mismatch({});

  it.each([
    ['half the step', { stepHalvings: 1 }, 1e-8],
    ['twice the padding', { padDoublings: 1 }, 1e-9],
    ['end weights of order 6', { edgeOrder: 6 }, 1e-8],
    ['half the step of the noise table', { noiseTableHalvings: 1 }, 1e-12],
    ['interpolation of order 6', { interpolationOrder: 6 }, 1e-5],
    ['a lower upper end', { topShare: 0.95 }, 1e-9],
  ] as const)('%s moves a mismatch by little', (_, change, bound) => {
    expect(Math.abs(mismatch({ refineStep: false, ...change }) - base)).toBeLessThan(bound);
    expect(base).toBeGreaterThan(1e-3);
  });
});
