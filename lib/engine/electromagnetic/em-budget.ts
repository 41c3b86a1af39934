import { ROOT3 } from '../budget/half-width';
import type { BudgetLine } from '../contract/measurement';
import { energyOnSamples, totalEnergy } from '../radiation/energy-on-samples';
import { sharesByEll } from '../radiation/energy-recipe';
import { modesLine } from '../radiation/radiation-budget';
import { emUncertainty, type EmPoint } from './em-point';

/** E07: the start moved by ±50 M, as far as the record goes. */
const START_MOVED_M = 50;

const roundingNote = (digits: number | null): string => (digits === null ? 'Binary doubles: nothing was printed.' : `${digits} significant digits in the file.`);

/**
 * Lines that make U of an electromagnetic energy.
 * Shape:  two lines; φ₂ is neither differentiated nor integrated.
 * Units:  fraction of M.
 * Error:  half-width over √3; rounding as a slip in common.
 * Fails:  never.
 * Source: settings.md rule 12.
 */
export function emComputation(point: EmPoint): BudgetLine[] {
  const { quadrature, rounding } = emUncertainty(point);
  return [
    { component: 'Quadrature over time', id: 'E01', group: 'computation', u: quadrature, note: 'Local polynomials of order 8 against 6, and half of the samples; half-width over √3.' },
    { component: 'Rounding of the input', id: 'rounding', group: 'computation', u: rounding, note: roundingNote(point.source.waveform.significantDigits) },
  ];
}

function startLine({ source, scale }: EmPoint): BudgetLine {
  const { radiation, startM, overFlux } = source;
  const { axis } = radiation;
  const here = totalEnergy(source.modes);
  const moved = [-START_MOVED_M, START_MOVED_M]
    .map((by) => startM + by)
    .filter((t) => t >= axis[0]! && t < axis[axis.length - 1]!)
    .map((t) => scale.factor * Math.abs(overFlux * totalEnergy(energyOnSamples(radiation, t)) - here));
  const note = moved.length === 0 ? 'The record is too short to move its start by 50 M.' : `Start of the integral moved by ${moved.length === 2 ? '±50 M' : '50 M (the record does not reach further)'}; half-width over √3.`;
  return { component: 'Start-up radiation', id: 'E07', group: 'coverage', u: moved.length === 0 ? null : Math.max(...moved) / ROOT3, note };
}

/**
 * Lines that are listed and decide coverage, never U.
 * Shape:  truncation, radius, start, modes.
 * Units:  fraction of M.
 * Error:  estimates; what one file cannot show is null.
 * Fails:  never.
 * Source: domain reference section 5.
 */
export const emCoverage = (point: EmPoint): BudgetLine[] => [
  { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution.' },
  { component: 'Extraction radius', id: 'E06', group: 'coverage', u: null, note: 'Not available: one radius.' },
  startLine(point),
  modesLine(sharesByEll(point.source.modes.map((mode) => ({ ...mode, energy: point.scale.factor * mode.energy })), 1), { noun: 'electromagnetic energy' }),
];

/** A line of another quantity carried into this one: its relative size times the value. */
export const carried = (lines: readonly BudgetLine[], over: number, value: number, whose: string): BudgetLine[] =>
  lines.map((line) => ({ ...line, component: `${line.component} (${whose})`, u: line.u === null ? null : Math.abs((line.u / over) * value) }));

