import { describe, expect, it } from 'vitest';
import type { MaximiseOver } from '@/lib/engine/contract/settings';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { burstMode, columnWaveform, evenAxis, modeWaveform, requestOf, sideOf, steepBand, type Burst } from './signals-in-m';

const axis = evenAxis(-180, 180, 0.5);
const burst: Burst = { amplitude: 1, omega: 0.5, width: 10, at: 3 };
const other: Burst = { amplitude: 0.7, omega: 0.62, width: 14, at: -20 };
const modesOf = (b: Burst, share33 = 0) => [burstMode(axis, 2, 2, b), burstMode(axis, 2, -2, { ...b, omega: -b.omega }), burstMode(axis, 3, 3, { ...b, amplitude: share33 * b.amplitude, omega: 1.5 * b.omega })];
const waveOf = (b: Burst, share33 = 0) => modeWaveform(axis, modesOf(b, share33), 0.5);
const a = sideOf(waveOf(burst));
const b = sideOf(waveOf(other), { azimuthRad: 0.35 });

describe('route B, match', () => {
  it('finds a shift of a fraction of a step, of many cycles, and leaves no mismatch', () => {
    for (const by of [0.137, -31.4, 77.77]) {
      const moved = sideOf(waveOf({ ...burst, at: burst.at + by }));
      const found = routeB.match(requestOf(a, moved));
      expect(found.timeShiftS).toAgreeWith(-by * 1e-3, 1e-11);
      expect(found.mismatch).toAgreeWith(0, 1e-12);
      expect(found.match).toAgreeWith(1, 1e-12);
    }
  });

  it('is symmetric, and the mismatch is one minus the match', () => {
    const forth = routeB.match(requestOf(a, b));
    const back = routeB.match(requestOf(b, a));
    expect(forth.match).toAgreeWith(back.match, 1e-12);
    expect(forth.timeShiftS).toAgreeWith(-back.timeShiftS, 1e-10);
    expect(forth.mismatch).toAgreeWith(1 - forth.match, 1e-13);
  });

  it('orders itself by what it may maximise', () => {
    const value = (maximise: readonly MaximiseOver[]): number => routeB.match(requestOf(a, b, { maximise })).match;
    const [none, phase, time, both] = [value([]), value(['phase']), value(['time']), value(['time', 'phase'])];
    expect(none).toAgreeWith(routeB.overlap(a, b, steepBand(20, 400), 'plus'), 1e-15);
    expect(phase).toBeGreaterThan(Math.abs(none));
    expect(time).toBeGreaterThan(none);
    expect(both).toBeGreaterThan(Math.max(time, phase));
  });

  it('keeps its digits in a mismatch of 1e-10', () => {
    const near = sideOf(waveOf({ ...burst, width: burst.width * (1 + 1e-5) }));
    const nearer = sideOf(waveOf({ ...burst, width: burst.width * (1 + 5e-6) }));
    const [far, close] = [routeB.match(requestOf(a, near)).mismatch, routeB.match(requestOf(a, nearer)).mismatch];
    expect(far).toBeGreaterThan(0);
    expect(far).toBeLessThan(1e-9);
    expect(far / close).toAgreeWith(4, { relative: 1e-3 });
  });

  it('recovers a mass factor, and says when the best one lies on a bound', () => {
    const lighter = sideOf(waveOf(burst), { secondsPerUnit: 1e-3 / 1.234 });
    const free = routeB.match(requestOf(a, lighter, { maximise: ['time', 'phase', 'templateMass'] }));
    expect(free.massFactor).toAgreeWith(1.234, { relative: 2e-5 });
    expect(free.onBound).toBe(false);
    const bounded = routeB.match(requestOf(a, lighter, { maximise: ['time', 'phase', 'templateMass'], templateMassRange: [0.9, 1.1] }));
    expect(bounded.massFactor).toAgreeWith(1.1, { relative: 1e-5 });
    expect(bounded.onBound).toBe(true);
    expect(bounded.match).toBeLessThan(free.match);
  });

  it('recovers an azimuth with the complex response, and a polarisation with it', () => {
    const full = sideOf(waveOf(burst, 0.3), { inclinationRad: 1, azimuthRad: 1.1 });
    const turned = sideOf(waveOf(burst, 0.3), { inclinationRad: 1, azimuthRad: 0.2 });
    const found = routeB.match(requestOf(full, turned, { response: 'complex' }));
    expect(found.match).toAgreeWith(1, 1e-9);
    expect(found.phaseShiftRad).toAgreeWith(0.9, 1e-4);
    const rotated = modeWaveform(axis, modesOf(burst, 0.3).map(({ l, m, re, im }) => ({ l, m, re: im.map((y) => -y), im: re })), 0.5);
    const both = routeB.match(requestOf(sideOf(rotated, { inclinationRad: 1 }), sideOf(waveOf(burst, 0.3), { inclinationRad: 1 }), { response: 'complex', maximise: ['time', 'polarisation'] }));
    expect(both.match).toAgreeWith(1, 1e-12);
    expect(both.polarisationRad).toAgreeWith(Math.PI / 4, 1e-9);
  });

  it('recovers an inclination', () => {
    const inclined = sideOf(waveOf(burst, 0.5), { inclinationRad: 0.8 });
    const found = routeB.match(requestOf(inclined, sideOf(waveOf(burst, 0.5)), { maximise: ['time', 'phase', 'inclination'] }));
    expect(found.match).toAgreeWith(1, 1e-8);
    expect(found.inclinationRad).toAgreeWith(0.8, 1e-3);
  });

  it('turns complex columns by one phase, whose sign is that of the wave', () => {
    const columns = (phase: number) => {
      const { re, im } = burstMode(axis, 2, 2, burst);
      const [c, s] = [Math.cos(phase), Math.sin(phase)];
      return sideOf(columnWaveform(axis, re.map((x, i) => c * x + s * im[i]!), im.map((y, i) => -(c * y - s * re[i]!)), 0.5));
    };
    for (const response of ['complex', 'plus'] as const) {
      const found = routeB.match(requestOf(columns(0.4), columns(0), { response }));
      expect(found.match).toAgreeWith(1, 1e-9);
      expect(found.phaseShiftRad).toAgreeWith(0.4, 1e-6);
    }
  });

  it('gives the residual of actual amplitudes', () => {
    const half = sideOf(waveOf(burst), { strainPerUnit: 0.5e-21 });
    const request = requestOf(a, half);
    const power = routeB.gram(a, request.band).plusPlus;
    expect(routeB.residualPower(request, routeB.match(request))).toAgreeWith(power / 4, { relative: 1e-10 });
  });
});
