import { combine, sharedCorrelation, type Term } from './combine';
import { fitInInverseRadius } from '../extrapolation/radius-fit';
import { orderOfValues, richardsonValue } from '../extrapolation/richardson';
import { standardOf } from './half-width';
import { numeral, withUnit } from './numeral';

/** A number computed from one run of a simulation. */
export interface RunNumber {
  readonly value: number;
  /** Grid spacing, or extraction radius. */
  readonly place: number;
  /** Is it the run that the claim uses? */
  readonly isOwn: boolean;
}

/** How far the claim's own run may lie from the truth; signed, so that runs of one simulation can be taken together. */
export interface SimulationError {
  readonly u: number;
  readonly degreesOfFreedom?: number;
  readonly note: string;
}

/** How near a measured order has to come to the formal one. */
const ORDER_APART = 0.7;
/** Orders of the schemes in use, where a sheet names none. */
const [LOWEST_ORDER, HIGHEST_ORDER] = [1, 8];
const SAFETY_BY_ORDER = 1.25;
const SAFETY_BY_DIFFERENCE = 3;

/** Finer by less than this is the same grid. */
const SAME = 1e-9;

function distinct(runs: readonly RunNumber[], order: (p: RunNumber, q: RunNumber) => number): RunNumber[] {
  const sorted = [...runs].sort((p, q) => order(p, q) || Number(q.isOwn) - Number(p.isOwn));
  return sorted.filter((run, i) => i === 0 || Math.abs(run.place - sorted[i - 1]!.place) > SAME * run.place);
}

const isFormal = (order: number, formal: number | null): boolean => (formal === null ? order >= LOWEST_ORDER - ORDER_APART && order <= HIGHEST_ORDER + ORDER_APART : Math.abs(order - formal) <= ORDER_APART);

/**
 * E05: by Richardson's rule from the three finest runs where they show the formal order, else three times the
 * difference of the two finest.
 * Shape:  one signed size, n − 1 degrees of freedom for n runs; null where there is one spacing only.
 * Units:  those of the values; spacings in any one unit.
 * Error:  1.25 times the distance from the limit.
 * Fails:  null for fewer than two spacings.
 * Source: domain reference 5.1 and Q20; grid-convergence practice for the factors.
 */
export function truncationError(given: readonly RunNumber[], formalOrder: number | null, unit: string): SimulationError | null {
  const runs = distinct(given, (p, q) => q.place - p.place);
  const own = runs.find((run) => run.isOwn);
  if (runs.length < 2 || own === undefined) return null;
  const [middle, finest] = [runs.at(-2)!, runs.at(-1)!];
  const coarsest = runs.at(-3);
  const because = coarsest === undefined ? 'two resolutions show no order' : null;
  if (coarsest !== undefined) {
    const order = orderOfValues([coarsest.value, middle.value, finest.value], [coarsest.place, middle.place, finest.place]);
    if (order.ok && isFormal(order.value, formalOrder)) {
      const limit = richardsonValue(middle.value, finest.value, middle.place, finest.place, order.value);
      return { u: SAFETY_BY_ORDER * (limit - own.value), degreesOfFreedom: 2, note: `Richardson's rule from the three finest runs, order ${numeral(order.value)}: limit ${withUnit(limit, unit, 6)}; ${SAFETY_BY_ORDER} times the distance to it.` };
    }
    const why = order.ok ? `order ${numeral(order.value)} is not ${formalOrder === null ? `one of ${LOWEST_ORDER} to ${HIGHEST_ORDER}` : `the formal ${numeral(formalOrder)}`}` : `three runs ${order.error}`;
    return byDifference(runs, own, unit, why);
  }
  return byDifference(runs, own, unit, because ?? '');
}

function byDifference(runs: readonly RunNumber[], own: RunNumber, unit: string, why: string): SimulationError {
  const [middle, finest] = [runs.at(-2)!, runs.at(-1)!];
  const steps = [finest.value - middle.value, finest.value - own.value];
  const larger = Math.abs(steps[0]!) >= Math.abs(steps[1]!) ? steps[0]! : steps[1]!;
  return { u: SAFETY_BY_DIFFERENCE * larger, degreesOfFreedom: Math.min(2, runs.length - 1), note: `${SAFETY_BY_DIFFERENCE} times the difference of the two finest runs (${withUnit(larger, unit)}), since ${why}.` };
}

/**
 * E06: how far the claim's radius lies from the limit of a polynomial in 1/r, and that limit from the one of an order less.
 * Shape:  one signed size; second order from four radii, a straight line from two or three.
 * Units:  those of the values; radii in M.
 * Error:  half-width over √3.
 * Fails:  null for fewer than two radii.
 * Source: domain reference 5.1 and Q21.
 */
export function radiusError(given: readonly RunNumber[], unit: string): SimulationError | null {
  const runs = distinct(given, (p, q) => p.place - q.place);
  const own = runs.find((run) => run.isOwn);
  if (runs.length < 2 || own === undefined) return null;
  const degree = runs.length >= 4 ? 2 : 1;
  const fit = fitInInverseRadius(runs.map(({ place }) => place), runs.map(({ value }) => value), degree);
  if (!fit.ok) return null;
  const { atInfinity, previousOrder } = fit.value;
  const apart = atInfinity - own.value;
  const doubt = Math.abs(atInfinity - (previousOrder ?? atInfinity));
  const size = apart < 0 ? apart - doubt : apart + doubt;
  const note = `Polynomial of degree ${degree} in 1/r over ${runs.length} radii: limit ${withUnit(atInfinity, unit, 6)}, ${withUnit(apart, unit)} away; degree ${degree - 1} differs by ${withUnit(doubt, unit)}; both added, half-width over √3.`;
  return { u: standardOf(size), note };
}

/** One simulation's part in a component. */
export interface Part {
  /** Name of the simulation (its series). */
  readonly from: string;
  readonly error: SimulationError;
}

/** The parts of several simulations in one component: those of the same simulation with their signs, others in quadrature. */
export function togetherAs(id: 'E05' | 'E06' | 'E07', parts: readonly Part[]): Term & { readonly note: string } {
  const { u, degreesOfFreedom } = combine(parts.map(({ error }) => error), sharedCorrelation(parts.map(({ from }) => ({ id, from }))));
  return { u, ...(Number.isFinite(degreesOfFreedom) ? { degreesOfFreedom } : {}), note: parts.map(({ from, error }) => (parts.length > 1 ? `${from}: ${error.note}` : error.note)).join(' ') };
}
