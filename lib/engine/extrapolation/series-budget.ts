import { LEAST, ROOT3 } from '../budget/half-width';
import { unavailable } from '../budget/relatives';
import { radiusError, truncationError } from '../budget/simulation-error';
import type { BudgetLine } from '../contract/measurement';
import type { Waveform } from '../contract/waveform';
import type { Meter, RunScalar } from './run-scalar';
import { isSamePlace, placeOf, type Apart } from './runs';

/** A number made of the runs' numbers. */
export interface Made {
  readonly scalars: readonly RunScalar[];
  readonly from: (values: readonly number[]) => number;
  readonly value: number;
  /** How much it moves with each of them. */
  readonly moves: readonly number[];
}

const keyOf = ({ id, component }: BudgetLine): string => id + component;

/** What one knob does to the result when it is turned in all runs at once, beside what of it the runs do not share. */
function oneKnob({ scalars, from, value, moves }: Made, turned: readonly number[]): number {
  const shifts = turned.map((x, i) => x - scalars[i]!.A);
  const common = shifts.reduce((sum, shift) => sum + shift, 0) / shifts.length;
  return Math.hypot(from(turned) - value, ...shifts.map((shift, i) => moves[i]! * (shift - common)));
}

/** What a line's knobs do to the result; null where a run does not tell. */
function turnedTogether(made: Made, key: string): number | null {
  const { scalars } = made;
  const of = scalars.map(({ computation }) => computation.find((line) => keyOf(line) === key)?.turned?.values);
  const knobs = of[0]?.length ?? 0;
  if (knobs === 0 || of.some((values) => values?.length !== knobs)) return null;
  let sum = 0;
  for (let k = 0; k < knobs; k++) sum += oneKnob(made, of.map((values) => values![k]!));
  return sum / ROOT3;
}

/**
 * Lines that make U of a number that is made of several runs' numbers. A knob is turned in all runs at once, since what it does to
 * them is mostly common; by how much it moves one run more than the mean is carried as independent, since a change that happens
 * to fall like the runs' own differences would move nothing. Where a run does not tell, sizes are added. Printed digits of
 * different files are independent.
 * Shape:  one line for each that any run has, in the order of the first.
 * Units:  those of the result.
 * Error:  errs on the large side.
 * Fails:  a size that is not known makes its line unknown.
 * Source: JCGM 100:2008, 5.2.
 */
export function propagatedLines(made: Made, how: string): BudgetLine[] {
  const { scalars, value, moves } = made;
  const keys = new Map<string, BudgetLine>();
  for (const { computation } of scalars) for (const line of computation) if (!keys.has(keyOf(line))) keys.set(keyOf(line), line);
  return [...keys].map(([key, { component, id, group, note, turned }]): BudgetLine => {
    const sizes = scalars.map(({ computation }, i) => {
      const own = computation.find((line) => keyOf(line) === key);
      return own === undefined ? 0 : Math.abs(moves[i]!) * (own.u ?? Number.NaN);
    });
    const turnedAll = turnedTogether(made, key);
    const together = turnedAll ?? sizes.reduce((sum, size) => sum + size, 0);
    // What doubles cut off differs from run to run, whatever cancels.
    const least = id === 'E01' ? Math.hypot(LEAST * value, ...moves.map((move, i) => move * LEAST * scalars[i]!.A)) : 0;
    const u = id === 'rounding' ? Math.hypot(...sizes) : Math.max(together, least);
    return { component, id, group, u, note: `${turnedAll === null ? note : `${turned?.note ?? note} Turned in all runs at once.`} ${how}` };
  });
}

/** E08: the floor times 0.7 and 1.4. */
const FLOORS = [0.7, 1.4];

/**
 * What another integration floor would have made of a number.
 * Shape:  one line; none where nothing was integrated.
 * Units:  those of the number.
 * Error:  an estimate.
 * Fails:  null where no other floor gives a number.
 * Source: domain reference 5.1.
 */
export function floorLines(floor: number | null, here: number, withFloor: (floor: number) => number | null): BudgetLine[] {
  if (floor === null) return [];
  const moved = FLOORS.map((by) => withFloor(floor * by)).flatMap((value) => (value === null ? [] : [Math.abs(value - here)]));
  return [{ component: 'Integration floor', id: 'E08', group: 'coverage', u: moved.length === 0 ? null : Math.max(...moved) / ROOT3, note: `ω₀ = ${Number(floor.toPrecision(4))} rad/M times 0.7 and 1.4; half-width over √3.` }];
}

/** Differences have to stand out of the rounding by this factor. */
const ABOVE_ROUNDING = 3;

/**
 * Do the two finest numbers differ by more than printed digits and doubles can tell?
 * Shape:  one truth value for the runs, coarsest first.
 * Units:  none.
 * Error:  none: thresholds only.
 * Fails:  never.
 * Source: settings.md section 6 (orders are null where differences are rounding).
 */
export function differsBeyondRounding(scalars: readonly RunScalar[]): boolean {
  const [middle, finest] = scalars.slice(-2) as [RunScalar, RunScalar];
  const printed = [middle, finest].map(({ computation }) => computation.find(({ id }) => id === 'rounding')?.u ?? 0);
  return Math.abs(middle.A - finest.A) > ABOVE_ROUNDING * (Math.hypot(...printed) + LEAST * Math.abs(finest.A));
}

/** Step of a numerical derivative, as a share of the smaller difference. */
const SHARE = 1e-4;

/**
 * How a function of some numbers moves with each of them, by central differences.
 * Shape:  parallel to the values.
 * Units:  result over value.
 * Error:  second order in a ten-thousandth of the smallest difference of neighbours.
 * Fails:  NaN where the function gives none.
 * Source: definition.
 */
export function sensitivities(f: (values: readonly number[]) => number, values: readonly number[]): number[] {
  const gaps = values.slice(1).map((x, i) => Math.abs(x - values[i]!));
  // Runs that do not differ still carry their uncertainty on.
  const step = SHARE * Math.min(...gaps) || 1e-6 * Math.max(...values.map(Math.abs)) || 1;
  const moved = (i: number, by: number): number => f(values.map((x, k) => (k === i ? x + by : x)));
  return values.map((_, i) => (moved(i, step) - moved(i, -step)) / (2 * step));
}

const OWN = new Set(['E05', 'E06']);

/** What was chosen for the leading run stands for all; truncation and radius have lines of the series' own. */
export const chosenLines = ({ coverage }: RunScalar): BudgetLine[] => coverage.filter(({ id }) => !OWN.has(id));

/**
 * What the series says of the respect in which it was not carried to a limit: E05 beside a limit in the radius, E06 beside one in
 * the spacing, from runs that stand with the leading one in all else.
 * Shape:  one line.
 * Units:  those of the number.
 * Error:  an estimate.
 * Fails:  null where the series holds no such run.
 * Source: domain reference 5.1.
 */
export function otherRespectLine(kind: Apart, leader: Waveform, here: number, series: readonly Waveform[], meter: Meter, unit: string): BudgetLine {
  const other: Apart = kind === 'resolution' ? 'radius' : 'resolution';
  const own = placeOf(kind, leader);
  const others = series.flatMap((waveform) => {
    const place = placeOf(kind, waveform);
    if (own === null || place === null || isSamePlace(place, own) || placeOf(other, waveform) !== placeOf(other, leader)) return [];
    const value = meter.looked(waveform);
    return value === null ? [] : [{ value, place, isOwn: false }];
  });
  if (own === null || others.length === 0) return unavailable(kind);
  const runs = [{ value: here, place: own, isOwn: true }, ...others];
  const found = kind === 'resolution' ? truncationError(runs, null, unit) : radiusError(runs, unit);
  const { component, id, group } = unavailable(kind);
  return found === null ? unavailable(kind) : { component, id, group, u: Math.abs(found.u), note: found.note, ...(found.degreesOfFreedom === undefined ? {} : { degreesOfFreedom: found.degreesOfFreedom }) };
}
