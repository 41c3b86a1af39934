import { LEAST, ROOT3 } from '../budget/half-width';
import type { BudgetLine, Figure, Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import { relativeSlip } from '../radiation/input-rounding';
import { polarOf } from '../series/polar';
import { isFinding, measureTones, stop, type At, type ToneRecipe } from '../tones/measure-tones';
import type { PeakBy } from '../tones/peak';
import { toneSampling } from '../tones/tone-findings';
import { stretchOf, toneName } from '../tones/tone';
import { usedSettings } from '../tones/used-rows';
import { floorLine, integrationLine, madeUp } from './orbit-budget';
import { orbitPreparer, orbitRows, stretchByRouteA, stretchByRouteB, type OrbitPoint, type Stretch } from './orbit-point';
import { advanceOnPanels, advanceOnSamples } from './phase-advance';

const TURN = 2 * Math.PI;
const MOST_POINTS = 1200;
const whole = { afterStart: 0, beforePeak: 0 };

const found = (point: OrbitPoint): Stretch => stretchByRouteA(point, whole) as Stretch;
const countA = ({ tones }: OrbitPoint, stretch: Stretch): number => Math.abs(advanceOnSamples(tones.A, stretch)) / TURN;

function computation(point: OrbitPoint, value: number): BudgetLine[] {
  const stretch = found(point);
  const byPeakOf = (by: PeakBy): number => {
    const other = stretchByRouteA(point, whole, by);
    return isFinding(other) ? value : countA(point, other);
  };
  const byPeak = byPeakOf('parabola');
  const byOrder = Math.abs(advanceOnSamples(point.tones.A, stretch, 6)) / TURN;
  const digits = point.waveform.significantDigits;
  return [
    { component: 'Phase at the edges of the window', id: 'E01', group: 'computation', u: Math.max((Math.abs(byPeak - value) + Math.abs(byOrder - value)) / ROOT3, LEAST * value), turned: { values: [byPeakOf('shorter polynomial'), byOrder], note: 'Interpolation of order 8 against 6, peak by a polynomial against a shorter one; changes added, half-width over √3.' }, note: 'Interpolation of order 8 against 6, peak by a polynomial against the five-sample parabola; changes added, half-width over √3.' },
    ...integrationLine(point, value, (tone) => Math.abs(advanceOnSamples(tone, stretch)) / TURN),
    { component: 'Rounding of the input', id: 'rounding', group: 'computation', u: digits === null ? 0 : (Math.SQRT2 * relativeSlip(digits)) / TURN, note: digits === null ? 'Binary doubles: nothing was printed.' : `${digits} significant digits in the file, at either edge.` },
  ];
}

function coverage(point: OrbitPoint): BudgetLine[] {
  const stretch = found(point);
  const length = stretch.to - stretch.from;
  const early = countA(point, { from: stretch.from, to: stretch.from + length / 50 }) / (length / 50);
  return [
    { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution.' },
    { component: 'Extraction radius', id: 'E06', group: 'coverage', u: null, note: 'Not available: one radius.' },
    ...floorLine(point, (tone) => Math.abs(advanceOnSamples(tone, stretch)) / TURN),
    { component: 'Choice of the window', id: 'E15', group: 'coverage', u: 0, note: `The window is part of what is counted. At its beginning each M holds ${Number(early.toPrecision(3))} cycles.` },
  ];
}

/** Cycles since the beginning of the window. */
function figureOf(point: OrbitPoint): Figure {
  const stretch = found(point);
  const tone = stretchOf(point.tones.A, stretch.from, stretch.to, 0);
  const { phase } = polarOf(tone);
  const stride = Math.max(1, Math.ceil(tone.axis.length / MOST_POINTS));
  const picked = Array.from(tone.axis.keys()).filter((i) => i % stride === 0);
  return {
    kind: 'curve',
    title: `Cycles of ${toneName(point)} of ${point.waveform.name} since the window began`,
    x: { label: 'Time', unit: 'M', scale: 'linear', values: picked.map((i) => tone.axis[i]!) },
    series: [{ label: 'Cycles', unit: '', role: 'recomputed', axis: 'left', scale: 'linear', values: picked.map((i) => Math.abs(phase[i]! - phase[picked[0]!]!) / TURN) }],
  };
}

const recipeOf = (request: MeasureRequest): ToneRecipe<OrbitPoint> => ({
  byRouteA: (point) => {
    const stretch = stretchByRouteA(point, whole);
    if (isFinding(stretch)) return stretch;
    const value = countA(point, stretch);
    const { name } = point.waveform;
    return Number.isFinite(value) ? { value, components: {} } : stop('engine/no-signal', name, `${toneName(point)} of ${name} vanishes at an edge of the window, where it has no phase.`, 'Declare a window inside the signal.');
  },
  byRouteB: (point) => {
    const stretch = stretchByRouteB(point, whole);
    return isFinding(stretch) ? Number.NaN : Math.abs(advanceOnPanels(point.tones.B, stretch)) / TURN;
  },
  computation: (point, { value }) => computation(point, value),
  coverage,
  findings: (point) => [...madeUp(point), ...toneSampling(point.tones.B, point.waveform.name)],
  settings: (point) => {
    const stretch = found(point);
    return usedSettings(orbitRows(point, stretch, request), request);
  },
  figures: (point) => [figureOf(point)],
  tolerance: () => houseCycles,
});

const houseCycles = 0.05;

/**
 * Counts the cycles of (2,2), or of the dominant mode, over a window (Q29).
 * Shape:  see Measurement.
 * Units:  cycles of the wave.
 * Error:  see computation.
 * Fails:  notComputable with the findings that say why.
 * Source: settings.md section 5.
 */
export function measureCycles(request: MeasureRequest, watch: Watch): Measurement {
  const { over } = request;
  const ats: At[] = over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value }));
  return measureTones(request, watch, ats, ats.map(orbitPreparer(request)), recipeOf(request));
}
