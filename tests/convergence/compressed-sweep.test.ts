import { describe, expect, it, vi } from 'vitest';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { MatchOutcome, Side } from '@/lib/engine/contract/route';
import type { MaximiseOver } from '@/lib/engine/contract/settings';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';
import { nodeOrder } from '@/lib/engine/routes/a/node-order';
import { noiseWeigher } from '@/lib/engine/routes/a/noise-weigher';
import { houseNumerics, type Numerics } from '@/lib/engine/routes/a/numerics';
import { PairSweep } from '@/lib/engine/routes/a/pair-sweep';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { MSUN_S } from '@/lib/engine/units/constants';
import { binary, curve } from '../support/detector-claims';

const a = binary('A', { stepM: 0.9 });
const b = binary('B', { stepM: 0.9, chi1z: 0.15, chi2z: 0.15 });
const masses = Array.from({ length: 60 }, (_, i) => 80 * 1.012 ** i);

interface Asked {
  readonly pair: readonly [Waveform, Waveform];
  readonly noise: NoiseCurve;
  readonly fLowHz: number;
  readonly fHighHz?: number;
  readonly maximise?: readonly MaximiseOver[];
  readonly taperM?: number;
  /** Halvings of the bins that both waveforms begin with: bins as fine for a point alone as for the sweep. */
  readonly halvings?: number;
}

function sweep({ pair, noise, fLowHz, fHighHz = 700, maximise = ['time', 'phase'], taperM = 300, halvings = 4 }: Asked, change: Partial<Numerics> = {}, at: readonly number[] = masses): MatchOutcome[] {
  const store = new SpectrumStore();
  for (const waveform of pair) store.pad(waveform, halvings);
  const route = createRouteA({ ...houseNumerics, ...change }, store);
  const sideAt = (waveform: Waveform, mass: number): Side => ({
    waveform,
    taper: { start: taperM > 0 ? { from: waveform.axis[0]!, to: waveform.axis[0]! + taperM } : null, end: null },
    secondsPerUnit: mass * MSUN_S,
    strainPerUnit: 1e-21,
    inclinationRad: 0.6,
    azimuthRad: 0.2,
  });
  const band = { noise, fLowHz, fHighHz };
  return at.map((mass) => route.match({ a: sideAt(pair[0], mass), b: sideAt(pair[1], mass), band, response: 'plus', maximise, templateMassRange: [1, 1], rescale: (side) => side }));
}

const furthest = (p: readonly MatchOutcome[], q: readonly MatchOutcome[], of: (o: MatchOutcome) => number): number => Math.max(...p.map((x, i) => Math.abs(of(x) - of(q[i]!))));

/** How many points the nodes answered, and how many they left to the bins. */
function counted<T>(work: () => T): { value: T; answered: number; left: number } {
  const spy = vi.spyOn(PairSweep.prototype, 'outcomeAt');
  const value = work();
  const left = spy.mock.results.filter((r) => r.value === null).length;
  const answered = spy.mock.results.length - left;
  spy.mockRestore();
  return { value, answered, left };
}

describe('a sweep over mass read from compressed nodes', () => {
  it.each([['G2', 20.3], ['A2', 20], ['A3', 11.7]] as const)('says what the bins say, curve %s', (id, fLowHz) => {
    const asked: Asked = { pair: [a, b], noise: curve(id), fLowHz };
    const { value: swept, answered } = counted(() => sweep(asked));
    const fine = sweep(asked, { compress: false });
    expect(answered).toBeGreaterThan(50);
    expect(furthest(swept, fine, (o) => o.match)).toBeLessThan(1e-12);
    expect(furthest(swept, fine, (o) => o.mismatch / fine[0]!.mismatch)).toBeLessThan(1e-9);
    expect(furthest(swept, fine, (o) => o.phaseShiftRad)).toBeLessThan(1e-5);
    expect(furthest(swept, fine, (o) => o.timeShiftS)).toBeLessThan(1e-8);
  });

  it('moves a point against the same point alone, on bins of its own, by far less than two orders less at the band’s edges do', () => {
    const asked: Asked = { pair: [a, b], noise: curve('A2'), fLowHz: 20, halvings: 0 };
    const [swept, alone, coarser] = [sweep(asked), sweep(asked, { compress: false }), sweep(asked, { compress: false, edgeOrder: 6 })];
    expect(furthest(swept, alone, (o) => o.match)).toBeLessThan(0.1 * furthest(alone, coarser, (o) => o.match));
  });

  it('keeps the digits of a mismatch of nothing: a waveform against itself', () => {
    const swept = sweep({ pair: [a, a], noise: curve('G2'), fLowHz: 20.3 });
    expect(Math.max(...swept.map((o) => Math.abs(o.mismatch)))).toBeLessThan(1e-20);
  });

  it('serves overlaps at the files’ own times, and a phase alone', () => {
    for (const maximise of [[], ['phase']] as const) {
      const asked: Asked = { pair: [a, b], noise: curve('G2'), fLowHz: 20.3, maximise };
      const { value: swept, answered } = counted(() => sweep(asked));
      expect(answered).toBeGreaterThan(50);
      expect(furthest(swept, sweep(asked, { compress: false }), (o) => o.match)).toBeLessThan(1e-12);
    }
  });

  it('gives the same bytes on every run, and falling masses the same numbers', () => {
    const asked: Asked = { pair: [a, b], noise: curve('A2'), fLowHz: 20 };
    const first = sweep(asked);
    expect(JSON.stringify(sweep(asked))).toBe(JSON.stringify(first));
    const falling = sweep(asked, {}, [...masses].reverse()).reverse();
    expect(furthest(first, falling, (o) => o.match)).toBeLessThan(1e-12);
  });

  it('is not begun for points that lie apart', () => {
    const { answered, left } = counted(() => sweep({ pair: [a, b], noise: curve('G2'), fLowHz: 20.3 }, {}, [60, 80, 100, 130]));
    expect(answered + left).toBe(0);
  });
});

/** Smooth to the eye, with six narrow lines, in a table of a few thousand rows. */
function curveWithLines(lines: readonly number[]): NoiseCurve {
  const smooth = curve('G2');
  const rows = 3000;
  const f = Array.from({ length: rows }, (_, i) => 11 * (1900 / 11) ** (i / (rows - 1)));
  const values = f.map((x) => smooth.psd(x) * (1 + lines.reduce((sum, line) => sum + 400 / (1 + ((x - line) / (0.002 * line)) ** 2), 0)));
  const made = tabulatedCurve({ name: 'with lines', f, values, meaning: 'psd', sided: 'one' });
  if (!made.ok) throw new Error('table');
  return made.value.curve;
}

describe('a measured curve', () => {
  const measured = curveWithLines([36.1, 60.3, 120.4, 180.9, 301.7, 508]);

  it('has no node order, with lines or without', () => {
    expect(nodeOrder(noiseWeigher(measured, 0), 20, 700)).toBeNull();
    expect(nodeOrder(noiseWeigher(curveWithLines([]), 0), 20, 700)).toBeNull();
    expect(nodeOrder(noiseWeigher(curveWithLines([508]), 0), 20, 2000)).toBeNull();
  });

  it('is read from the moments of its rows, and says what bins say', () => {
    const asked: Asked = { pair: [a, b], noise: measured, fLowHz: 20 };
    const { value: swept, answered } = counted(() => sweep(asked));
    const fine = sweep(asked, { compress: false });
    expect(answered).toBeGreaterThan(50);
    expect(furthest(swept, fine, (o) => o.match)).toBeLessThan(1e-12);
    expect(furthest(swept, fine, (o) => o.mismatch / fine[0]!.mismatch)).toBeLessThan(1e-9);
    expect(furthest(swept, fine, (o) => o.timeShiftS)).toBeLessThan(1e-8);
  });

  it('lies nearer to finer bins than bins do', () => {
    const asked: Asked = { pair: [a, b], noise: measured, fLowHz: 20, halvings: 0 };
    const [swept, bins, finer] = [sweep(asked), sweep(asked, { compress: false }), sweep(asked, { compress: false, padDoublings: 1 })];
    expect(furthest(swept.slice(1), finer.slice(1), (o) => o.match)).toBeLessThan(furthest(bins, finer, (o) => o.match) + 1e-13);
  });

  it('keeps the bins where a short taper leaves the pair rough', () => {
    const asked: Asked = { pair: [a, b], noise: measured, fLowHz: 20, taperM: 60 };
    const { value: swept, answered } = counted(() => sweep(asked));
    expect(answered).toBeGreaterThan(50);
    expect(furthest(swept, sweep(asked, { compress: false }), (o) => o.match)).toBeLessThan(1e-11);
  });
});

/** Two wave packets of frequencies F and 2.2 F, the second later by `lagM`. */
function packets(name: string, lagM: number, second: number): Waveform {
  const axis = Float64Array.from({ length: 4000 }, (_, i) => i);
  const packet = (t: number, at: number, f: number): readonly [number, number] => {
    const size = Math.exp(-0.5 * ((t - at) / 90) ** 2);
    return [size * Math.cos(2 * Math.PI * f * t), -size * Math.sin(2 * Math.PI * f * t)];
  };
  const both = (i: number): Float64Array => axis.map((t) => packet(t, 1600, 0.012)[i]! + second * packet(t, 1600 + lagM, 0.0264)[i]!);
  return { ...a, name, axis, uniformStep: 1, content: { kind: 'modes', modes: [{ l: 2, m: 2, re: both(0), im: both(1) }] } };
}

describe('the certificate of the highest hill', () => {
  // a and b share each packet, but not both at one shift: which hill is the higher hangs on where the noise is low.
  const pair = [packets('a', 0, 0.3), packets('b', 260, 0.3)] as const;
  const asked: Asked = { pair, noise: curve('A2'), fLowHz: 20, taperM: 0 };
  const many = Array.from({ length: 145 }, (_, i) => 30 * 1.012 ** i);

  it('holds under a measured curve as well', () => {
    const lined: Asked = { ...asked, noise: curveWithLines([36.1, 60.3, 180.9]) };
    const swept = sweep(lined, {}, many);
    const fine = sweep(lined, { compress: false }, many);
    const shifts = fine.map((o, i) => o.timeShiftS / (many[i]! * MSUN_S));
    expect(Math.max(...shifts) - Math.min(...shifts)).toBeGreaterThan(200);
    expect(furthest(swept, fine, (o) => o.match)).toBeLessThan(1e-11);
    expect(furthest(swept, fine, (o) => o.timeShiftS)).toBeLessThan(1e-7);
  });

  it('leaves to the bins where a second hill may overtake, and never holds on to a hill that was overtaken', () => {
    const { value: swept, left } = counted(() => sweep(asked, {}, many));
    const fine = sweep(asked, { compress: false }, many);
    const shifts = fine.map((o, i) => o.timeShiftS / (many[i]! * MSUN_S));
    expect(Math.max(...shifts) - Math.min(...shifts)).toBeGreaterThan(200);
    expect(left).toBeGreaterThan(0);
    expect(furthest(swept, fine, (o) => o.match)).toBeLessThan(1e-12);
    expect(furthest(swept, fine, (o) => o.timeShiftS)).toBeLessThan(1e-7);
  });
});
