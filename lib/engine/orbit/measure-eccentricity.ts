import { LEAST, ROOT3 } from '../budget/half-width';
import type { Finding } from '../contract/finding';
import type { BudgetLine, Figure, Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import { relativeSlip } from '../radiation/input-rounding';
import { isFinding, measureTones, stop, type At, type ToneRecipe } from '../tones/measure-tones';
import { short } from '../findings/spelt';
import { shorterPeak, type PeakBy } from '../tones/peak';
import { toneSampling } from '../tones/tone-findings';
import { toneName } from '../tones/tone';
import { usedSettings } from '../tones/used-rows';
import { floorLine, integrationLine, madeUp } from './orbit-budget';
import { orbitPreparer, orbitRows, stretchByRouteA, stretchByRouteB, type OrbitPoint, type Stretch } from './orbit-point';
import { advanceOnSamples } from './phase-advance';
import { eccentricityOf, houseRule, smoothedOnPanels, smoothedOnSamples } from './smooth-frequency';

const MOST_POINTS = 1200;
/** What the default window leaves out: the settling of the start and the plunge, which no fifth-degree polynomial follows. */
const margins = { afterStart: 200, beforePeak: 200 };

export const eccentricityTolerance = (value: number): number => Math.max(0.2 * Math.abs(value), 1e-4);

const found = (point: OrbitPoint): Stretch => stretchByRouteA(point, margins) as Stretch;

/** Printed digits make ω noisy, and noise counts as oscillation: e² grows by twice its mean square. */
function rounding(point: OrbitPoint, value: number): BudgetLine {
  const digits = point.waveform.significantDigits;
  const base = { component: 'Rounding of the input', id: 'rounding', group: 'computation' } as const;
  if (digits === null) return { ...base, u: 0, note: 'Binary doubles: nothing was printed.' };
  const { w, fit, noiseGain } = smoothedOnSamples(point.tones.A, found(point));
  let [sum, length, count] = [0, 0, 0];
  w.forEach((weight, i) => {
    if (weight === 0) return;
    sum += weight * ((noiseGain[i]! * relativeSlip(digits)) / (2 * fit[i]!)) ** 2;
    length += weight;
    count += 1;
  });
  const noise = sum / length;
  return { ...base, u: Math.sqrt(value ** 2 + 2 * noise) - value + Math.sqrt((2 * noise) / count), note: `${digits} significant digits in the file: their noise in ω, counted as oscillation.` };
}

function computation(point: OrbitPoint, value: number): BudgetLine[] {
  const stretch = found(point);
  const tone = point.tones.A;
  const byPeakOf = (by: PeakBy): number => {
    const other = stretchByRouteA(point, margins, by);
    return isFinding(other) ? value : eccentricityOf(smoothedOnSamples(tone, other));
  };
  const byOrder = eccentricityOf(smoothedOnSamples(tone, stretch, { ...houseRule, order: 6 }));
  const turned = [byPeakOf('parabola'), byOrder];
  const stencil = eccentricityOf(smoothedOnSamples(tone, stretch, { ...houseRule, stencil: 9 }));
  return [
    { component: 'Fit and mean over the window', id: 'E01', group: 'computation', u: Math.max(turned.reduce((sum, x) => sum + Math.abs(x - value), 0) / ROOT3, LEAST), turned: { values: [byPeakOf('shorter polynomial'), byOrder], note: shorterPeak }, note: 'End weights of order 8 against 6, peak by a polynomial against the five-sample parabola; changes added, half-width over √3.' },
    { component: 'Differentiation', id: 'E02', group: 'computation', u: Math.max(Math.abs(stencil - value) / ROOT3, LEAST), turned: { values: [stencil] }, note: '13-point against 9-point differences.' },
    ...integrationLine(point, value, (coarse) => eccentricityOf(smoothedOnSamples(coarse, stretch))),
    rounding(point, value),
  ];
}

/** Nine windows inside the one that is used: towards the merger a wider one would change the question. */
function windowLine({ tones }: OrbitPoint, { from, to }: Stretch): BudgetLine {
  const tenths = [0, 0.1, 0.2].map((share) => share * (to - from));
  const values = tenths.flatMap((a) => tenths.map((b) => eccentricityOf(smoothedOnSamples(tones.A, { from: from + a, to: to - b }))));
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const u = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
  return { component: 'Choice of the window', id: 'E15', group: 'coverage', u, degreesOfFreedom: values.length - 1, note: 'Either edge drawn in by 0, 10 and 20 % of its length: standard deviation of nine windows.' };
}

const coverage = (point: OrbitPoint): BudgetLine[] => [
  { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution.' },
  { component: 'Extraction radius', id: 'E06', group: 'coverage', u: null, note: 'Not available: one radius.' },
  ...floorLine(point, (tone) => eccentricityOf(smoothedOnSamples(tone, found(point)))),
  windowLine(point, found(point)),
];

/** A polynomial of fifth degree follows up to two turns and a half by itself. */
const FEW_ORBITS = 3;

function fewOrbits(point: OrbitPoint): Finding[] {
  const { from, to } = found(point);
  const turns = Math.abs(advanceOnSamples(point.tones.A, { from, to })) / (2 * Math.PI);
  const orbits = turns / Math.max(Math.abs(point.mode?.[1] ?? 2), 1);
  if (orbits >= FEW_ORBITS) return [];
  return [{ code: 'engine/few-orbits', level: 'worth-a-look', where: point.waveform.name, text: `The window from ${short(from, 6)} to ${short(to, 6)} M holds ${short(orbits)} orbits of ${point.waveform.name}. A polynomial of fifth degree follows so few by itself, and what it leaves is too small an eccentricity.`, fix: 'Declare a longer window.' }];
}

function figureOf(point: OrbitPoint): Figure {
  const { t, w, omega, fit } = smoothedOnSamples(point.tones.A, found(point));
  const inside = Array.from(t.keys()).filter((i) => w[i] !== 0);
  const stride = Math.max(1, Math.ceil(inside.length / MOST_POINTS));
  const picked = inside.filter((_, k) => k % stride === 0);
  const line = { quantity: 'frequency ω', axis: 'left', scale: 'linear', unit: 'rad/M' } as const;
  return {
    kind: 'curve',
    title: `Frequency of ${toneName(point)} of ${point.waveform.name}, its smooth part and what is left`,
    x: { label: 'Time', unit: 'M', scale: 'linear', values: picked.map((i) => t[i]!) },
    series: [
      { ...line, label: 'Frequency', role: 'claimed', values: picked.map((i) => omega[i]!) },
      { ...line, label: 'Fifth-degree polynomial', role: 'recomputed', values: picked.map((i) => fit[i]!) },
      { label: 'Residual over twice the fit', unit: '', role: 'residual', axis: 'right', scale: 'linear', values: picked.map((i) => (omega[i]! - fit[i]!) / (2 * fit[i]!)) },
    ],
  };
}

const recipeOf = (request: MeasureRequest): ToneRecipe<OrbitPoint> => ({
  byRouteA: (point) => {
    const stretch = stretchByRouteA(point, margins);
    if (isFinding(stretch)) return stretch;
    const smoothed = smoothedOnSamples(point.tones.A, stretch);
    const value = eccentricityOf(smoothed);
    const { name } = point.waveform;
    if (!Number.isFinite(value)) return stop('engine/no-signal', name, `${toneName(point)} of ${name} does not turn throughout the window, or vanishes in it, so it has no smooth frequency there.`, 'Declare a window inside the inspiral.');
    return { value, components: { referenceFrequency: smoothed.atStart / 2 } };
  },
  byRouteB: (point) => {
    const stretch = stretchByRouteB(point, margins);
    return isFinding(stretch) ? Number.NaN : eccentricityOf(smoothedOnPanels(point.tones.B, stretch));
  },
  computation: (point, { value }) => computation(point, value),
  coverage,
  findings: (point) => [...madeUp(point), ...toneSampling(point.tones.B, point.waveform.name), ...fewOrbits(point)],
  settings: (point) => {
    const stretch = found(point);
    return usedSettings(orbitRows(point, stretch, request), request);
  },
  figures: (point) => [figureOf(point)],
  tolerance: eccentricityTolerance,
});

/**
 * Measures the eccentricity of the inspiral by what its frequency leaves of a smooth one (Q29).
 * Shape:  see Measurement; component `referenceFrequency`.
 * Units:  dimensionless; the reference frequency is the orbit's, in rad/M.
 * Error:  see computation.
 * Fails:  notComputable with the findings that say why.
 * Source: settings.md section 5; Pürrer, Husa & Hannam 2012, arXiv:1203.4258 (abstract).
 */
export function measureEccentricity(request: MeasureRequest, watch: Watch): Measurement {
  const { over } = request;
  const ats: At[] = over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value }));
  return measureTones(request, watch, ats, ats.map(orbitPreparer(request)), recipeOf(request));
}
