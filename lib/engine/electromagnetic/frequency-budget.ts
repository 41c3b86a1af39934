import { LEAST, ROOT3 } from '../budget/half-width';
import type { BudgetLine } from '../contract/measurement';
import { relativeSlip } from '../radiation/input-rounding';
import { ringdownComputation, ringdownCoverage } from '../ringdown/ringdown-budget';
import { isFinding } from '../tones/measure-tones';
import { frequencyByRouteA, hzPerOmega, type FrequencyPoint, type FrequencyReading } from './frequency-point';
import { frequencyOnSamples } from './tone-frequency';

function slopeLines(point: FrequencyPoint, { omega, timeM }: FrequencyReading, hz: number): BudgetLine[] {
  const { tones, completed } = point.ringdown;
  const digits = completed.waveform.significantDigits;
  const other = frequencyByRouteA(point, 'parabola', { stencil: 7, interpolation: 6 });
  const moved = isFinding(other) ? Number.NaN : Math.abs(other.omega - omega);
  const integrated = Math.abs(Math.abs(frequencyOnSamples(tones.coarse, timeM!).omega) - omega);
  const slip = digits === null ? 0 : relativeSlip(digits) * frequencyOnSamples(tones.A, timeM!).gain;
  return [
    { component: 'Slope of the phase and time of the peak', id: 'E01', group: 'computation', u: hz * Math.max(moved / ROOT3, LEAST * omega), note: 'Nine points against seven, interpolation of order 8 against 6, peak by a polynomial against the five-sample parabola; half-width over √3.' },
    ...(tones.floor === null ? [] : [{ component: 'Integration in frequency', id: 'E02', group: 'computation', u: hz * Math.max(integrated / ROOT3, LEAST * omega), note: 'Interpolation of order 8 against 6 and half the points.' } as const]),
    { component: 'Rounding of the input', id: 'rounding', group: 'computation', u: hz * slip, note: digits === null ? 'Binary doubles: nothing was printed.' : `${digits} significant digits in the file.` },
  ];
}

/**
 * Lines that make U: those of the ringdown's line, or of the slope at one time.
 * Shape:  two or three lines.
 * Units:  Hz.
 * Error:  half-width over √3.
 * Fails:  never.
 * Source: settings.md rule 12.
 */
export function frequencyComputation(point: FrequencyPoint, reading: FrequencyReading): BudgetLine[] {
  const hz = hzPerOmega(point.totalMassMsun);
  return reading.window === null ? slopeLines(point, reading, hz) : ringdownComputation({ ...point.ringdown, scale: hz }, reading.window, hz * reading.omega, ({ omega }) => hz * Math.abs(omega));
}

/** Lines that are listed and decide coverage, never U. */
export function frequencyCoverage(point: FrequencyPoint, { window }: FrequencyReading): BudgetLine[] {
  const hz = hzPerOmega(point.totalMassMsun);
  if (window !== null) return ringdownCoverage(point.ringdown, window, ({ omega }) => hz * Math.abs(omega));
  return [
    { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution.' },
    { component: 'Extraction radius', id: 'E06', group: 'coverage', u: null, note: 'Not available: one radius.' },
  ];
}
