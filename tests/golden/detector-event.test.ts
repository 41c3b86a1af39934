import { beforeAll, describe, expect, it } from 'vitest';
import type { Band, Side } from '@/lib/engine/contract/route';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { horizonOverRange, lastStableOrbitHz, neutronStars, neutronStarsAt } from './chirps';
import { blackman, hann, isThere, measuredNoise, RATE_HZ, recordOf, strainOf, template, title } from './detector-data';

/**
 * The first event's data and template, Gravitational Wave Open Science Center (CC BY 4.0). The engine filters no detector data of its own
 * accord; but a record of data is a waveform, and match × loudness of it is the loudness that a filter finds in it. Recipe of the
 * centre's tutorial: ramps over an eighth, noise by Welch's method with 4 s Blackman segments that overlap by half, straight lines between its
 * points, all frequencies (here from 11 Hz, above the lowest point of the curve).
 */
const route = createRouteA();
const edges = { fLowHz: 11, fHighHz: 2000 };
interface Heard {
  readonly filtered: number;
  readonly shiftS: number;
  readonly horizonMpc: number;
  /** At the sample of the record nearest to the largest value; a filter that is read at samples alone finds this. */
  readonly atSample: number;
}

function hear(strain: Float64Array, { plus, cross }: { readonly plus: Float64Array; readonly cross: Float64Array }): Heard {
  const band: Band = { noise: measuredNoise(strain, blackman, 'density', 'half-overlapping'), ...edges };
  const data = recordOf('data', strain, strain);
  const template = (later: number): Side => recordOf('T', plus, cross, later);
  const rho = (side: Side): number => Math.sqrt(route.gram(side, band).plusPlus);
  const matched = (b: Side, maximise: ('time' | 'phase')[]) => route.match({ a: data, b, band, response: 'plus', maximise, templateMassRange: [1, 1], rescale: (side) => side });
  const { match, timeShiftS } = matched(template(0), ['time', 'phase']);
  const atSample = matched(template(Math.round(timeShiftS * RATE_HZ)), ['phase']).match * rho(data);
  return { filtered: match * rho(data), shiftS: timeShiftS, horizonMpc: rho(template(0)) / 8, atSample };
}

describe.runIf(isThere)(title('the first event'), () => {
  const heard: Partial<Record<'H' | 'L', Heard>> = {};
  const strain: Partial<Record<'H' | 'L', Float64Array>> = {};
  beforeAll(async () => {
    const { plus, cross } = await template();
    for (const site of ['H', 'L'] as const) {
      strain[site] = await strainOf(site);
      heard[site] = hear(strain[site], { plus, cross: cross! });
    }
  }, 300_000);

  it('G1: is found with loudness 18.6 at one site and 13.2 at the other (required: from memory; tutorial of the open science centre)', () => {
    expect(heard.H!.filtered).toAgreeWith(18.6, { relative: 0.01 });
    expect(heard.L!.filtered).toAgreeWith(13.2, { relative: 0.01 });
  });
  it('G1c: is found with loudness 24 by both together (required: published; Abbott et al. 2016, PRL 116, 061102, abstract)', () => {
    expect(Math.hypot(heard.H!.filtered, heard.L!.filtered)).toAgreeWith(24, { relative: 0.07 });
  });
  it('G1d: would be heard to 1889.64 and 1650.62 Mpc, and is as loud as from 814.45 and 999.76 Mpc (required: independent derivation; numpy transforms of the whole 32 s, template h₊ + ih×, sums over bins of 1/32 Hz, the loudest sample of the filter)', () => {
    for (const [site, horizonMpc, effectiveMpc] of [['H', 1889.64, 814.45], ['L', 1650.62, 999.76]] as const) {
      const found = heard[site]!;
      expect(found.horizonMpc).toAgreeWith(horizonMpc, { relative: 1e-3 });
      expect((8 * found.horizonMpc) / found.atSample).toAgreeWith(effectiveMpc, { relative: 1e-3 });
      // The peak lies between two samples, so that a search of time finds more.
      expect(found.filtered).toBeGreaterThan(found.atSample);
      expect(found.filtered).toAgreeWith(found.atSample, { relative: 2e-3 });
    }
  });
  it('G1e: arrives 6.9 ms later at the first (required: from memory; Abbott et al. 2016, PRL 116, 061102)', () => {
    expect(1e3 * (heard.H!.shiftS - heard.L!.shiftS)).toAgreeWith(6.9, 0.6);
  });
  it('B13: lies in noise in which 1.4 + 1.4 M☉ are heard to 75 ± 3 % Mpc on average (required: published; Martynov et al. 2016, arXiv:1604.00439), by eight segments of 4 s side by side, Hann, mean', () => {
    const waveform = neutronStars(20);
    const side: Side = { waveform, taper: { start: null, end: null }, secondsPerUnit: 1, strainPerUnit: 1, inclinationRad: 0, azimuthRad: 0 };
    const noise = measuredNoise(strain.H!, hann, 'inverse', 'side-by-side');
    const fHighHz = lastStableOrbitHz(2.8);
    const { plusPlus } = route.gram(side, { noise, fLowHz: 20, fHighHz });
    const rangeMpc = Math.sqrt(plusPlus) / 8 / horizonOverRange;
    expect(rangeMpc).toAgreeWith(75, { relative: 0.03 });
    // The same by a plain sum over the points of the estimate, the moment of f^(−7/3).
    const last = Math.floor(4 * fHighHz) / 4;
    const points = Array.from({ length: 4 * (last - 20) + 1 }, (_, i) => 20 + i / 4);
    const sum = points.reduce((total, f, i) => total + (i === 0 || f === last ? 0.125 : 0.25) * (f ** (-7 / 3) / noise.psd(f)), 0);
    expect(rangeMpc).toAgreeWith((2 * neutronStarsAt(1) * Math.sqrt(sum)) / 8 / horizonOverRange, { relative: 1e-3 });
  });
});
