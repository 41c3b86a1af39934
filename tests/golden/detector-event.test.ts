import { beforeAll, describe, expect, it } from 'vitest';
import type { Band, Side } from '@/lib/engine/contract/route';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { blackman, hann, isThere, measuredNoise, recordOf, strainOf, template, title } from './detector-data';
import { neutronStars, neutronStarsAt } from './chirps';

/**
 * The first event's data and template, Gravitational Wave Open Science Center (CC BY 4.0). The engine filters no detector data of its own
 * accord; but a record of data is a waveform, and match × loudness of it is the loudness that a filter finds in it. Recipe of the
 * centre's tutorial: ramps over an eighth, noise by Welch's method with 4 s Blackman segments, straight lines between its points.
 */
const route = createRouteA();
const edges = { fLowHz: 20, fHighHz: 1900 };
interface Heard {
  readonly filtered: number;
  readonly shiftS: number;
  readonly horizonMpc: number;
}

function hear(strain: Float64Array, t: Side): Heard {
  const band: Band = { noise: measuredNoise(strain, blackman, 'density'), ...edges };
  const data = recordOf('data', strain, strain);
  const { match, timeShiftS } = route.match({ a: data, b: t, band, response: 'plus', maximise: ['time', 'phase'], templateMassRange: [1, 1], rescale: (side) => side });
  const rho = (side: Side): number => Math.sqrt(route.gram(side, band).plusPlus);
  return { filtered: match * rho(data), shiftS: timeShiftS, horizonMpc: rho(t) / 8 };
}

describe.runIf(isThere)(title('the first event'), () => {
  const heard: Partial<Record<'H' | 'L', Heard>> = {};
  const strain: Partial<Record<'H' | 'L', Float64Array>> = {};
  beforeAll(async () => {
    const { plus, cross } = await template();
    const t = recordOf('T', plus, cross!);
    for (const site of ['H', 'L'] as const) {
      strain[site] = await strainOf(site);
      heard[site] = hear(strain[site], t);
    }
  }, 300_000);

  it('G1: is found with loudness 18.6 at one site and 13.2 at the other (required: from memory; tutorial of the open science centre)', () => {
    expect(heard.H!.filtered).toAgreeWith(18.6, { relative: 0.01 });
    expect(heard.L!.filtered).toAgreeWith(13.2, { relative: 0.01 });
  });
  it('G1c: is found with loudness 24 by both together (required: published; Abbott et al. 2016, PRL 116, 061102, abstract)', () => {
    expect(Math.hypot(heard.H!.filtered, heard.L!.filtered)).toAgreeWith(24, { relative: 0.07 });
  });
  it('G1d: would be heard to 1889.64 and 1650.62 Mpc (required: independent derivation; transforms of whole records and sums over their bins in a scipy script)', () => {
    expect(heard.H!.horizonMpc).toAgreeWith(1889.64, { relative: 1e-3 });
    expect(heard.L!.horizonMpc).toAgreeWith(1650.62, { relative: 1e-3 });
  });
  it('G1e: arrives 6.9 ms later at the first (required: from memory; Abbott et al. 2016, PRL 116, 061102)', () => {
    expect(1e3 * (heard.H!.shiftS - heard.L!.shiftS)).toAgreeWith(6.9, 0.6);
  });
  it('B13: lies in noise whose range for 1.4 + 1.4 M☉ is that of a plain sum over its points (required: published; moment of f^(−7/3)), see the decision on outside values', () => {
    const waveform = neutronStars(20);
    const side: Side = { waveform, taper: { start: null, end: null }, secondsPerUnit: 1, strainPerUnit: 1, inclinationRad: 0, azimuthRad: 0 };
    const noise = measuredNoise(strain.H!, hann, 'inverse');
    const { plusPlus } = route.gram(side, { noise, fLowHz: 20, fHighHz: 1570 });
    const one = neutronStarsAt(1);
    const points = Array.from({ length: 1550 * 4 + 1 }, (_, i) => 20 + i / 4);
    const sum = points.reduce((total, f, i) => total + (i === 0 || i === points.length - 1 ? 0.125 : 0.25) * (f ** (-7 / 3) / noise.psd(f)), 0);
    expect(plusPlus).toAgreeWith(4 * one ** 2 * sum, { relative: 2e-3 });
  });
});
