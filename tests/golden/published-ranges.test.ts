import { existsSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';
import { distinguishabilitySnr } from '@/lib/engine/quantities/distinguishability-snr';
import { horizonDistance } from '@/lib/engine/quantities/horizon-distance';
import { match } from '@/lib/engine/quantities/match';
import { snr } from '@/lib/engine/quantities/snr';
import { volumeRatio } from '@/lib/engine/quantities/volume-ratio';
import type { MeasureRequest, Quantity } from '@/lib/engine/contract/quantity';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { C_M_PER_S, MPC_M, MSUN_S } from '@/lib/engine/units/constants';
import { columns } from '../support/detector-claims';
import { chirp, chirpMassS, horizonOverRange, lastStableOrbitHz, neutronStars } from './chirps';

function measured(quantity: Quantity, of: MeasureRequest['inputs']['of'], noise: NoiseCurve, settings: MeasureRequest['settings']) {
  const request: MeasureRequest = { claimId: 'G', inputs: { of, noise }, settings, over: null, claimed: [null], withFigures: false };
  const { points, findings } = quantity.measure(request, { onProgress: () => {}, cancelled: () => false });
  const [point] = points;
  if (!point || point.value === null) throw new Error(findings.map(({ text }) => text).join(' '));
  return point;
}

const data = `${process.cwd()}/../shared/reference/data/noise`;
const isThere = existsSync(data);

function fileCurve(name: string): NoiseCurve {
  const rows = readFileSync(`${data}/${name}`, 'utf8').split('\n').filter((line) => /^\s*[\d.]/.test(line)).map((line) => line.trim().split(/[\s,]+/).map(Number));
  const curve = tabulatedCurve({ name, f: rows.map(([f]) => f!), values: rows.map(([, asd]) => asd!), meaning: 'asd', sided: 'one' });
  if (!curve.ok) throw new Error(name);
  return curve.value.curve;
}

const horizon = (curve: string, fLowHz: number): number =>
  measured(horizonDistance, { a: neutronStars(fLowHz) }, fileCurve(curve), { fLowHz, fHighHz: lastStableOrbitHz(2.8), massFrame: 'detector' }).value!;
describe.runIf(isThere)(isThere ? 'how far 1.4 + 1.4 M☉ are heard' : `how far 1.4 + 1.4 M☉ are heard (skipped: ${data} is missing)`, () => {
  it.each([
    ['B6', 'T0900288_ZERO_DET_high_P.txt', 10, 445, 0.002],
    ['B7', 'LIGO_srd_asd.txt', 40, 33, 0.04],
  ] as const)('%s: horizon with %s from %d Hz is %d Mpc (required: published; Abadie et al. 2010, arXiv:1003.2480)', (_, curve, fLowHz, value, relative) => {
    expect(horizon(curve, fLowHz)).toAgreeWith(value, { relative });
  });

  it.each([
    ['B8a', 'aLIGO_early_asd.txt', 60, 20],
    ['B8b', 'aLIGO_mid_asd.txt', 100, 20],
    ['B8c', 'aLIGO_late_asd.txt', 145, 25],
    ['B9', 'T0900288_ZERO_DET_high_P.txt', 200, 5],
  ] as const)('%s: range with %s is %d ± %d Mpc (required: from memory; design ranges of the detector documents)', (_, curve, value, absolute) => {
    expect(horizon(curve, 10) / horizonOverRange).toAgreeWith(value, { absolute });
  });
});

const early: NoiseCurve = builtInCurve('A2')!;

const shortOfThreeAndAHalf = [
  ['0PN', 1, 0.19849],
  ['1PN', 3, 0.117231],
  ['1.5PN', 4, 0.34157],
  ['2PN', 5, 0.258034],
  ['2.5PN', 6, 0.981303],
  ['3PN', 7, 0.829524],
] as const;

/** Phase of the transform with the first `kept` half orders. */
function taylorPhase(m1: number, m2: number, kept: number): (f: number) => number {
  const total = m1 + m2;
  const eta = (m1 * m2) / total ** 2;
  const lastV = 6 ** -0.5;
  const euler = 0.5772156649015329;
  const pi = Math.PI;
  const terms = (v: number): number[] => [
    1,
    0,
    3715 / 756 + (55 / 9) * eta,
    -16 * pi,
    15293365 / 508032 + (27145 / 504) * eta + (3085 / 72) * eta ** 2,
    pi * (38645 / 756 - (65 / 9) * eta) * (1 + 3 * Math.log(v / lastV)),
    11583231236531 / 4694215680 - (640 / 3) * pi ** 2 - (6848 / 21) * (euler + Math.log(4 * v)) + (-15737765635 / 3048192 + (2255 / 12) * pi ** 2) * eta + (76055 / 1728) * eta ** 2 - (127825 / 1296) * eta ** 3,
    pi * (77096675 / 254016 + (378515 / 1512) * eta - (74045 / 756) * eta ** 2),
  ];
  return (f) => {
    const v = Math.cbrt(pi * total * MSUN_S * f);
    return (3 / (128 * eta * v ** 5)) * terms(v).slice(0, kept).reduce((sum, term, k) => sum + term * v ** k, 0);
  };
}

/** Sensitivity of a space detector with a tabulated response and four years of unresolved binaries: Robson, Cornish & Liu 2019, arXiv:1803.01944, Eqs. (1), (9)–(14). */
function spaceCurve(): NoiseCurve {
  const [length, turn] = [2.5e9, 0.01909];
  const rows = readFileSync(`${data}/lisa_R_own.txt`, 'utf8').split('\n').filter((line) => /^\s*\d/.test(line)).map((line) => line.trim().split(/\s+/).map(Number) as [number, number]);
  const inside = rows.map(([x, one]) => [x * turn, 2 * one] as const).filter(([f]) => f > 5e-4 && f < 0.02);
  const density = ([f, response]: readonly [number, number]): number => {
    const optical = 1.5e-11 ** 2 * (1 + (2e-3 / f) ** 4);
    const push = 3e-15 ** 2 * (1 + (0.4e-3 / f) ** 2) * (1 + (f / 8e-3) ** 4);
    const own = (optical + (2 * (1 + Math.cos(f / turn) ** 2) * push) / (2 * Math.PI * f) ** 4) / length ** 2;
    return own / response + 9e-45 * f ** (-7 / 3) * Math.exp(-(f ** 0.138) - 221 * f * Math.sin(521 * f)) * (1 + Math.tanh(1680 * (0.00113 - f)));
  };
  const curve = tabulatedCurve({ name: 'space', f: inside.map(([f]) => f), values: inside.map(density), meaning: 'psd', sided: 'one' });
  if (!curve.ok) throw new Error('the curve');
  return curve.value.curve;
}

describe.runIf(isThere)(isThere ? 'a binary that hardly changes' : `a binary that hardly changes (skipped: ${data} is missing)`, () => {
  it('B10: 0.5 + 0.25 M☉ at 1 kpc and 2.6 mHz are heard with 139.7 in four years (required: published; worked example of Robson, Cornish & Liu 2019)', () => {
    const h0 = (2 * (chirpMassS(0.5, 0.25) ** (5 / 3)) * (Math.PI * 2.6e-3) ** (2 / 3) * C_M_PER_S) / (MPC_M / 1000);
    // Loudness counts amplitude² × time: four years in a record of ten days.
    const [stepS, n] = [20, 43_200];
    const size = h0 * Math.sqrt((16 / 5) * ((4 * 365.25 * 86400) / (n * stepS)));
    const axis = Float64Array.from({ length: n + 1 }, (_, i) => i * stepS);
    const a = columns('A', axis, axis.map((t) => size * Math.cos(2 * Math.PI * 2.6e-3 * t)), null);
    expect(measured(snr, { a }, spaceCurve(), { fLowHz: 1e-3, fHighHz: 0.01, taper: 'none' }).value).toAgreeWith(139.70704772165996, { relative: 5e-3 });
  });
});

describe('stationary-phase chirps', () => {
  const newtonian = (mcS: number) => (f: number) => (3 / 128) * (Math.PI * mcS * f) ** (-5 / 3);
  const tenTen = chirpMassS(10, 10);
  const band = { fLowHz: 20, fHighHz: lastStableOrbitHz(20) };
  const of = (mcS: number): Waveform => chirp(mcS, 20, 20, 240, 30_000, newtonian(mcS));

  it.each([
    [0.001, 0.9980372],
    [0.002, 0.9923482],
    [0.004, 0.9722331],
  ])('C9: a chirp mass higher by %d of itself matches by %d (required: independent derivation; closed-form phases, trapezoids, padded transform and bounded refinement in a separate script)', (more, value) => {
    const { routes } = measured(match, { a: of(tenTen), b: of(tenTen * (1 + more)) }, early, band);
    for (const route of [routes.A, routes.B]) expect(route).toAgreeWith(value, { relative: 1e-5 });
  });

  it.each(shortOfThreeAndAHalf)('C8: stopped at %s, against 3.5PN, 10 + 1.4 M☉ from 30 Hz match by %d (required: from memory; phases of Buonanno et al. 2009, arXiv:0907.0700, Eq. (3.18), match an independent derivation: trapezoids, padded transform and bounded refinement in a separate script)', (_, terms, value) => {
    const mixed = (kept: number): Waveform => chirp(chirpMassS(10, 1.4), 11.4, 30, 390, 30_000, taylorPhase(10, 1.4, kept));
    const { routes } = measured(match, { a: mixed(8), b: mixed(terms) }, early, { fLowHz: 30, fHighHz: lastStableOrbitHz(11.4) });
    for (const route of [routes.A, routes.B]) expect(route).toAgreeWith(value, { relative: 2e-4 });
  });

  it('B4, B5, T8: averages over sky and orientation are 2/5 of the optimal loudness, and its cube mean 1/2.2648 (required: published; Finn & Chernoff 1993)', () => {
    const modes: Waveform = modesOf(of(tenTen));
    const settings = { ...band };
    const optimal = measured(snr, { a: modes }, early, settings).value!;
    // ρ_c² = 2ρ₊² face-on, so 1/5 of it is 2/5 of ρ₊² (T8: ⟨F₊²⟩ = 1/5).
    expect((measured(snr, { a: modes }, early, { ...settings, average: 'sky' }).value! / optimal) ** 2 / 2).toAgreeWith(0.2, { relative: 1e-6 });
    expect(measured(snr, { a: modes }, early, { ...settings, average: 'sky-orientation' }).value! / optimal).toAgreeWith(0.4, { relative: 1e-6 });
    expect(optimal / measured(snr, { a: modes }, early, { ...settings, average: 'volume' }).value!).toAgreeWith(horizonOverRange, { relative: 1e-4 });
  });

  it('B11: twice as loud is eight times the volume (required: published; closed form)', () => {
    const loud = of(tenTen);
    const { content } = loud;
    const halved: Waveform = { ...loud, content: content.kind === 'line-of-sight' ? { ...content, plus: content.plus.map((x) => x / 2), plusIm: content.plusIm!.map((x) => x / 2) } : content };
    const { value, components } = measured(volumeRatio, { a: loud, b: halved }, early, band);
    expect(value).toAgreeWith(8, { relative: 1e-12 });
    expect(components?.['ratio']).toAgreeWith(2, { relative: 1e-12 });
  });

  it.each([
    [0.97, 0.087327],
    [0.965, 0.101367875],
  ])('C5: a filter that keeps %d of the loudness loses %d of the events (required: from memory; Owen 1996, Lindblom, Owen & Brown 2008, arXiv:0809.3844)', (kept, lost) => {
    const loud = of(tenTen);
    const { content } = loud;
    const heard: Waveform = { ...loud, content: content.kind === 'line-of-sight' ? { ...content, plus: content.plus.map((x) => kept * x), plusIm: content.plusIm!.map((x) => kept * x) } : content };
    expect(1 - measured(volumeRatio, { a: heard, b: loud }, early, band).value!).toAgreeWith(lost, { relative: 1e-9 });
  });

  it.each([
    [1, 'C6: 1/(2ρ²) (required: from memory; Lindblom, Owen & Brown 2008, arXiv:0809.3844)'],
    [4, 'C7: D/(2ρ²) for D = 4 (required: from memory; Chatziioannou et al. 2017)'],
  ])('for D = %d the largest indistinguishable mismatch is that of %s', (parameters) => {
    const { value, components } = measured(distinguishabilitySnr, { a: of(tenTen), b: of(tenTen * 1.002) }, early, { ...band, parameters });
    expect(components?.['mismatch']).toAgreeWith(parameters / (2 * value! ** 2), { relative: 1e-9 });
    expect(components?.['mismatch']).toAgreeWith(1 - 0.9923482, { relative: 2e-3 });
  });
});

/** The same chirp as the (2,2) mode and its mirror, per unit of the harmonic face-on. */
function modesOf(sight: Waveform): Waveform {
  if (sight.content.kind !== 'line-of-sight') throw new Error('a line of sight');
  const faceOn = Math.sqrt(5 / (4 * Math.PI));
  const re = sight.content.plus.map((x) => x / faceOn);
  const im = sight.content.plusIm!.map((x) => x / faceOn);
  return { ...sight, content: { kind: 'modes', modes: [{ l: 2, m: 2, re, im }] }, negativeM: 'mirror' };
}
