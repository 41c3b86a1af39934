import type { Measurement } from '@/lib/engine/contract/measurement';
import type { MeasureRequest, Quantity } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { evenTimes, modeFrom, modeSet } from './energy-signals';

/** A claim about a series, measured. */
export function measureSeries(quantity: Quantity, series: readonly Waveform[], settings: DeclaredSettings = {}, more: Partial<MeasureRequest> = {}): Measurement {
  return quantity.measure({ claimId: 'S', inputs: { of: { series }, noise: null }, settings, over: null, claimed: [null], withFigures: false, ...more }, { onProgress: () => undefined, cancelled: () => false });
}

const known = new WeakMap<readonly Waveform[], Map<string, Measurement>>();

/** The number by the route asked for, NaN when it was not computed; both routes of a claim are computed once. */
export function seriesBy(route: 'A' | 'B', quantity: Quantity, series: readonly Waveform[], settings: DeclaredSettings = {}): number {
  const of = known.get(series) ?? new Map<string, Measurement>();
  known.set(series, of);
  const key = quantity.id + JSON.stringify(settings);
  const found = of.get(key) ?? measureSeries(quantity, series, settings);
  of.set(key, found);
  return found.points[0]?.routes[route] ?? Number.NaN;
}

export const PEAK_M = 583.1343508007187;
const AROUND_M = 600;

/** A swell that rings down; largest at PEAK_M. */
const amplitudeAt = (t: number): number => 0.4 * (0.25 + 0.75 / (1 + Math.exp(-(t - AROUND_M + 60) / 25))) * Math.exp((-0.09 * (Math.hypot(t - AROUND_M, 8) + (t - AROUND_M))) / 2);

/** Frequency from 0.1 to 0.54 rad/M, rising as a tanh. */
const phaseAt = (t: number): number => {
  const x = (t - AROUND_M + 15) / 60;
  return 0.1 * t + 0.22 * (t + 60 * (Math.abs(x) + Math.log1p(Math.exp(-2 * Math.abs(x)))));
};

const stepUp = (t: number): number => Math.sin((Math.PI / 2) * Math.min(Math.max(t / AROUND_M, 0), 1)) ** 2;

export interface RunError {
  /** Phase by which the run is late at the end, and the part by which it is too loud. */
  readonly phaseRad: number;
  readonly amplitude: number;
}

/** One run of the signal: (2,2) and its mirror, times from 0. */
export function runOf({ phaseRad, amplitude }: RunError, facts: Partial<Waveform>, stepM = 0.5, lastM = 760): Waveform {
  const axis = evenTimes(0, Math.floor(lastM / stepM) * stepM, stepM);
  const of22 = modeFrom(axis, 2, 2, (t) => {
    const [a, p] = [amplitudeAt(t) * (1 + amplitude), phaseAt(t) + phaseRad * stepUp(t)];
    return [a * Math.cos(p), -a * Math.sin(p)];
  });
  const mirror: Mode = { l: 2, m: -2, re: of22.re, im: of22.im.map((x) => -x) };
  return { ...modeSet(axis, [of22, mirror]), series: 'U', ...facts };
}

/** Design reference, D6: phase off by a part of fourth order and one of order 1.2; amplitude of third order. */
export const mixedError = (h: number): RunError => ({ phaseRad: 0.35 * (80 * h) ** 4 + 0.55 * (80 * h) ** 1.2, amplitude: 2e-3 * (80 * h) ** 3 });

const points = [64, 80, 96, 112] as const;
const steps = [0.6, 0.5, 0.45, 0.4] as const;

/** Four runs, each with a step of its own; the coarsest is the fourth that a claim does not use. */
export const mixedRuns = (): Waveform[] => points.map((n, i) => runOf(mixedError(1 / n), { name: `n${n}`, resolution: 1 / n }, steps[i]!));

/** The signal at a finite radius by the terms of the design reference, section 7; `areal` is what the stated radius means. */
export function atRadius(r: number, areal: number, facts: Partial<Waveform> = {}): Waveform {
  const gain = 1 - 1.5 / areal + 8 / areal ** 2;
  const turn = (2 * 2.5) / areal;
  const exact = runOf({ phaseRad: 0, amplitude: gain - 1 }, { name: `r${r}`, extractionRadiusM: r, ...facts }, 0.4);
  if (exact.content.kind !== 'modes') return exact;
  const modes = exact.content.modes.map(({ l, m, re, im }): Mode => {
    const [c, s] = [Math.cos((Math.sign(m) * turn)), Math.sin(Math.sign(m) * turn)];
    return { l, m, re: re.map((x, i) => c * x - s * im[i]!), im: im.map((y, i) => c * y + s * re[i]!) };
  });
  return { ...exact, content: { kind: 'modes', modes } };
}
