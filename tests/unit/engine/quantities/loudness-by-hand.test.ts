import { describe, expect, it } from 'vitest';
import { MSUN_PER_MPC, MSUN_S } from '@/lib/engine/units/constants';
import { spinWeightedHarmonic } from '@/lib/engine/modes/spin-weighted-harmonic';
import { taperWeightAt, measureTaper } from '@/lib/engine/conditioning/taper-window';
import { binary, curve, measured, valueOf } from '../../../support/detector-claims';

const modes22 = [
  [2, 2],
  [2, -2],
] as const;
const at = { totalMassMsun: 120, distanceMpc: 700, fLowHz: 25, fHighHz: 400 } as const;
const a = binary('A');
const snr = (settings = {}): number => valueOf({ quantity: 'snr', a, settings: { ...at, ...settings } });

/** ρ² by nothing but sums: h̃(f) = Σ h(t) e^{−2πift} Δt at midpoints in f, on the record's own samples. */
function squaredByHand(inclinationRad: number, azimuthRad: number, pick: 'plus' | 'cross'): number {
  const second = at.totalMassMsun * MSUN_S;
  const strain = (at.totalMassMsun * MSUN_PER_MPC) / at.distanceMpc;
  const set = a.content.kind === 'modes' ? a.content.modes : [];
  const { window } = measureTaper(a, a, 'auto');
  const h = Array.from(a.axis, (t, i) => {
    let [re, im] = [0, 0];
    for (const mode of set) {
      const y = spinWeightedHarmonic(mode.l, mode.m, inclinationRad, azimuthRad);
      re += y.re * mode.re[i]! - y.im * mode.im[i]!;
      im += y.re * mode.im[i]! + y.im * mode.re[i]!;
    }
    return strain * taperWeightAt(window, t) * (pick === 'plus' ? re : -im);
  });
  const noise = curve('G2');
  const df = 0.25;
  let sum = 0;
  for (let f = at.fLowHz + df / 2; f < at.fHighHz; f += df) {
    let [re, im] = [0, 0];
    const [c, s] = [Math.cos(2 * Math.PI * f * 0.5 * second), -Math.sin(2 * Math.PI * f * 0.5 * second)];
    let [er, ei] = [1, 0];
    for (const x of h) {
      re += x * er;
      im += x * ei;
      [er, ei] = [er * c - ei * s, er * s + ei * c];
    }
    sum += (4 * df * (re * re + im * im) * (0.5 * second) ** 2) / noise.psd(f);
  }
  return sum;
}

describe('loudness against sums by hand', () => {
  it('face-on', () => {
    expect(snr()).toAgreeWith(Math.sqrt(squaredByHand(0, 0, 'plus')), { relative: 2e-5 });
  });

  it('along an inclined line of sight, each polarisation and both', () => {
    const sight = { inclinationRad: 1.1, azimuthRad: 0.6 };
    const [plus, cross] = [squaredByHand(1.1, 0.6, 'plus'), squaredByHand(1.1, 0.6, 'cross')];
    expect(snr(sight)).toAgreeWith(Math.sqrt(plus), { relative: 2e-5 });
    expect(snr({ ...sight, response: 'cross' })).toAgreeWith(Math.sqrt(cross), { relative: 2e-5 });
    expect(snr({ ...sight, response: 'complex' })).toAgreeWith(Math.sqrt(plus + cross), { relative: 2e-5 });
  });
});

/** The stylised merger joins its pieces with a bend, which sends 3e-4 of the loudness into frequencies that turn the other way. */
const turned = 6e-4;

describe('factors of two and their kin', () => {
  const face = snr({ modes: modes22 });

  it('both polarisations are √2 louder than plus, face-on', () => {
    expect(snr({ modes: modes22, response: 'complex' })).toAgreeWith(Math.SQRT2 * face, { relative: turned });
    expect(snr({ modes: modes22, response: { plus: 0.6, cross: 0.8 } })).toAgreeWith(face, { relative: turned });
  });

  it('edge-on, plus is half of face-on', () => {
    expect(snr({ modes: modes22, inclinationRad: Math.PI / 2 })).toAgreeWith(face / 2, { relative: 1e-10 });
  });

  // Averages of a (2,±2) signal: published closed forms 1/√5·√2, 2/5 (domain reference Q10); 2.2648 from the definition there, confirmed by 4·10⁶ draws.
  it.each([
    ['sky', Math.sqrt(2 / 5), turned],
    ['sky-orientation', 0.4, turned],
    ['volume', 1 / 2.2648, turned],
  ] as const)('the average "%s" is %d of face-on', (average, factor, relative) => {
    expect(snr({ modes: modes22, average })).toAgreeWith(factor * face, { relative });
  });

  it('detectors add in quadrature, and arms at 60° lose a factor √3/2', () => {
    expect(snr({ detectors: 3, armAngleDeg: 60 })).toAgreeWith(snr() * Math.sqrt(3) * Math.sin(Math.PI / 3), { relative: 1e-12 });
  });

  it('doubling the distance halves it and leaves the match (T9)', () => {
    expect(snr({ distanceMpc: 1400 })).toAgreeWith(snr() / 2, { relative: 1e-13 });
    const b = binary('B', { chi1z: 0.2, chi2z: 0.2 });
    const match = (distanceMpc: number) => valueOf({ quantity: 'match', a, b, settings: { ...at, distanceMpc } });
    expect(match(1400)).toBe(match(700));
  });

  it('a source-frame mass enters as M(1+z), in time and in amplitude', () => {
    const source = snr({ totalMassMsun: 100, massFrame: 'source', redshift: 0.2 });
    expect(source).toAgreeWith(snr({ totalMassMsun: 120 }), { relative: 1e-12 });
  });

  it('a redshift without a distance gives the luminosity distance, and the other way round', () => {
    const { distanceMpc: _, ...rest } = at;
    const far = measured({ quantity: 'snr', a, settings: { ...rest, redshift: 0.2 } });
    expect(far.points[0]!.value!).toAgreeWith((snr() * 700) / 1015.6, { relative: 5e-5 });
    expect(far.assumed).toEqual(expect.arrayContaining(['distanceMpc', 'cosmology']));
    const near = measured({ quantity: 'snr', a, settings: { ...at, totalMassMsun: 100, distanceMpc: 1015.6, massFrame: 'source' } });
    expect(near.points[0]!.value!).toAgreeWith((snr() * 700) / 1015.6, { relative: 1e-4 });
    expect(near.assumed).toContain('redshift');
  });

  it('arms, averages and detectors leave a ratio of loudness alone; distance is not needed for one', () => {
    const b = binary('B', { chi1z: 0.5, chi2z: 0.5 });
    const { distanceMpc: _, ...rest } = at;
    const ratio = measured({ quantity: 'snr-ratio', a, b, settings: { ...rest, detectors: 2, armAngleDeg: 60 } });
    const { rhoA, rhoB } = ratio.points[0]!.components as { rhoA: number; rhoB: number };
    expect(ratio.points[0]!.value!).toAgreeWith(rhoA / rhoB, { relative: 1e-14 });
    expect(rhoA).toAgreeWith(snr({ distanceMpc: 1000 }) * Math.SQRT2 * Math.sin(Math.PI / 3), { relative: 1e-12 });
    expect(valueOf({ quantity: 'volume-ratio', a, b, settings: rest })).toAgreeWith((rhoA / rhoB) ** 3, { relative: 1e-12 });
    expect(ratio.assumed).not.toContain('detectors');
  });
});
