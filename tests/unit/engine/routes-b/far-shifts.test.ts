import { describe, expect, it } from 'vitest';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { burstMode, evenAxis, modeWaveform, requestOf, sideOf, steepBand, type Burst } from './signals-in-m';

/**
 * Records 3.9 s long with a burst near each end. The early burst of one equals the late one of the
 * other, so the best shift is 3.66 s; there the other two bursts lie 7.3 s apart, and must not count.
 */
const SPAN = 3900;
const axis = evenAxis(-SPAN / 2, SPAN / 2, 0.5);
const end = SPAN / 2 - 120;
const shared: Burst = { amplitude: 1, omega: 0.5, width: 14, at: 0 };
const a: readonly Burst[] = [{ amplitude: 0.8, omega: 0.8, width: 12, at: -end }, { ...shared, at: end }];
const b: readonly Burst[] = [{ ...shared, at: -end }, { amplitude: 0.8, omega: 0.9, width: 15, at: end }];

const side = (bursts: readonly Burst[]) => {
  const parts = bursts.map((burst) => burstMode(axis, 2, 2, burst));
  const sum = (part: 're' | 'im') => axis.map((_, i) => parts.reduce((total, mode) => total + mode[part][i]!, 0));
  return sideOf(modeWaveform(axis, [{ l: 2, m: 2, re: sum('re'), im: sum('im') }], 0.5));
};

/** Σ of Gaussians with the phases of their times: the transform up to a factor that all share. */
function transform(bursts: readonly Burst[], f: number): readonly [number, number] {
  const w = 2 * Math.PI * f * 1e-3;
  let [re, im] = [0, 0];
  for (const { amplitude, omega, width, at } of bursts) {
    const size = amplitude * width * Math.exp(-(((w - omega) * width) ** 2) / 2);
    re += size * Math.cos(w * at);
    im -= size * Math.sin(w * at);
  }
  return [re, im];
}

/** |⟨p, q moved⟩|/(‖p‖‖q‖) by a plain midpoint sum, fine enough for lags of many records. */
function matchAt(p: readonly Burst[], q: readonly Burst[], shiftS: number): number {
  const { fLowHz, fHighHz, noise } = steepBand(20, 400);
  const n = 100000;
  let [pp, qq, re, im] = [0, 0, 0, 0];
  for (let i = 0; i < n; i++) {
    const f = fLowHz + ((i + 0.5) * (fHighHz - fLowHz)) / n;
    const [[pr, pi], [qr, qi]] = [transform(p, f), transform(q, f)];
    const [c, s] = [Math.cos(2 * Math.PI * f * shiftS), Math.sin(2 * Math.PI * f * shiftS)];
    const [zr, zi] = [pr * qr + pi * qi, pi * qr - pr * qi];
    const weight = 1 / noise.psd(f);
    pp += weight * (pr * pr + pi * pi);
    qq += weight * (qr * qr + qi * qi);
    re += weight * (zr * c - zi * s);
    im += weight * (zr * s + zi * c);
  }
  return Math.hypot(re, im) / Math.sqrt(pp * qq);
}

describe('route B, when b must be moved by about the length of the record', () => {
  it.each([
    ['later', a, b, 2 * end * 1e-3],
    ['earlier', b, a, -2 * end * 1e-3],
  ])('lets nothing from further away leak into the match, %s', (_, p, q, shiftS) => {
    const found = routeB.match(requestOf(side(p), side(q)));
    expect(found.timeShiftS).toAgreeWith(shiftS, 1e-8);
    expect(found.match).toAgreeWith(matchAt(p, q, shiftS), 1e-9);
  });

  it('gives the residual there as the definition does', () => {
    const request = requestOf(side(a), side(b));
    const power = (of: readonly Burst[]): number => routeB.gram(side(of), request.band).plusPlus;
    const [pp, qq] = [power(a), power(b)];
    const exact = pp + qq - 2 * matchAt(a, b, 2 * end * 1e-3) * Math.sqrt(pp * qq);
    expect(routeB.residualPower(request, routeB.match(request)) / exact).toAgreeWith(1, 1e-9);
  });
});
