import type { Band, DetectorRoute, Side } from '@/lib/engine/contract/route';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { MSUN_PER_MPC, MSUN_S } from '@/lib/engine/units/constants';
import { chirp, pair, unevenTimes, type Chirp } from './waveforms';

export const masses: readonly number[] = Array.from({ length: 200 }, (_, i) => 40 + i);
export const fLowHz = 20;
export const fHighHz = 2048;
export const samples = 1_000_000;

function waveformOf(name: string, axis: Float64Array, parameters: Chirp): Waveform {
  const { re, im } = chirp(axis, parameters);
  return {
    name,
    domain: 'time',
    unit: 'M',
    amplitudeUnit: 'rh/M',
    variable: 'strain',
    axis,
    uniformStep: null,
    content: { kind: 'modes', modes: [{ l: 2, m: 2, re, im }] },
    negativeM: 'given',
    ownTotalMassMsun: null,
    ownDistanceMpc: null,
    junkEndM: null,
    binary: {},
    significantDigits: null,
  };
}

export function makePair(n = samples): readonly [Waveform, Waveform] {
  const axis = unevenTimes(n);
  return [waveformOf('A', axis, pair[0]), waveformOf('B', axis, pair[1])];
}

export const band = (): Band => {
  const noise = builtInCurve('A2');
  if (!noise) throw new Error('curve A2 is not built in');
  return { noise, fLowHz, fHighHz };
};

const sideOf = (waveform: Waveform, massMsun: number): Side => ({
  waveform,
  taper: { start: null, end: null },
  secondsPerUnit: massMsun * MSUN_S,
  strainPerUnit: (massMsun * MSUN_PER_MPC) / 1000,
  inclinationRad: 0,
  azimuthRad: 0,
});

/** The base: one match a mass by one route, from samples in memory, nothing prepared beforehand. */
export function sweepBase(route: DetectorRoute, [a, b]: readonly [Waveform, Waveform], at: readonly number[] = masses, edges: Band = band()): number[] {
  return at.map(
    (mass) =>
      route.match({
        a: sideOf(a, mass),
        b: sideOf(b, mass),
        band: edges,
        response: 'plus',
        maximise: ['time', 'phase'],
        templateMassRange: [1, 1],
        rescale: (side) => side,
      }).match,
  );
}
