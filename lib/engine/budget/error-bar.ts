/**
 * Budget: how far a number can be trusted. The computation's own part comes from turning each knob
 * of route A; what was chosen, or cannot be known from the files, stands beside it and never in U.
 */
import { waveformsIn, withEach, type PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { ConditionedWaveform } from '@/lib/engine/conditioning/condition-waveform';
import type { Waveform } from '@/lib/engine/contract/waveform';
import type { Evaluated, Recipe, RouteKit } from '@/lib/engine/quantities/detector/recipe';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { houseNumerics, type Numerics } from '@/lib/engine/routes/a/numerics';
import type { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { standardOf } from './half-width';
import { withFewerDigits } from './reduce-digits';
import { expandedOf } from './total';

interface Knob {
  readonly name: string;
  readonly numerics: Numerics;
}

/** Values read from compressed nodes are compared with the sums over all bins: what that moves enters the error. */
const onBins: Numerics = { ...houseNumerics, compress: false };

const knob = (name: string, change: Partial<Numerics>): Knob => ({ name, numerics: { ...onBins, refineStep: false, ...change } });

/** engine.md: step/2, padding ×2, end weights 8 → 6, noise table step/2, interpolation 8 → 6, upper end lowered. */
const knobs: readonly Knob[] = [
  knob('half the time step', { stepHalvings: 1 }),
  knob('twice the padding', { padDoublings: 1 }),
  knob('end weights of order 6', { edgeOrder: 6 }),
  knob('half the step of the noise table', { noiseTableHalvings: 1 }),
  knob('interpolation of order 6', { interpolationOrder: 6 }),
  knob('upper end lowered by 5 %', { topShare: 0.95 }),
];

export const kitOf = (numerics: Numerics, store: SpectrumStore): RouteKit => ({
  route: createRouteA(numerics, store),
  scan: createRouteA({ ...numerics, refineStep: false, refineBins: false }, store),
});

/** Where two orders less move the value by more than this part, the steps are too coarse for the orders to converge, and the last difference says too little. */
const NOT_CONVERGING = 1e-4;
const COARSE_FACTOR = 5;

/** More digits than this are a double's own. */
const DOUBLE_DIGITS = 16;

export interface ComputationError {
  /** Half-widths. */
  readonly quadrature: number;
  readonly rounding: number;
  readonly largestKnob: string;
  readonly expanded: number;
}

const roundedOnce = new WeakMap<Waveform, Map<number, Waveform>>();
function fewer(waveform: Waveform, digits: number): Waveform {
  const known = roundedOnce.get(waveform) ?? new Map<number, Waveform>();
  roundedOnce.set(waveform, known);
  const made = known.get(digits) ?? withFewerDigits(waveform, digits);
  known.set(digits, made);
  return made;
}

/** The taper and the modes in use stay those of the data as given; only the samples are printed shorter. */
function printedShorter(c: ConditionedWaveform): ConditionedWaveform {
  const digits = c.given.significantDigits;
  if (digits === null || digits >= DOUBLE_DIGITS || digits < 2) return c;
  return { ...c, used: (lMax) => fewer(c.used(lMax), digits - 1) };
}

export const isPrinted = (request: PointRequest): boolean =>
  waveformsIn(request).some(({ given: { significantDigits: digits } }) => digits !== null && digits < DOUBLE_DIGITS);

/**
 * The computation's own error at one point: each knob turned once, the changes added up.
 * Shape:  one point; `found` is route A's value there.
 * Units:  the quantity's.
 * Error:  an estimate; it errs on the large side, because changes are added without regard to sign.
 * Fails:  a knob that gives no number makes the error NaN, and with it the verdict unsettled or not computable.
 * Source: engine.md (error bar by itself); JCGM 100:2008 for the combination.
 */
export function computationError(recipe: Recipe, request: PointRequest, found: Evaluated, store: SpectrumStore): ComputationError {
  const base = recipe.again(kitOf(onBins, store), request, found);
  let quadrature = Math.abs(base - found.value) + (found.doubt ?? 0);
  let largest = { name: 'none', by: 0 };
  for (const { name, numerics } of knobs) {
    const moved = Math.abs(recipe.again(kitOf(numerics, store), request, found) - base);
    const coarse = numerics.interpolationOrder < houseNumerics.interpolationOrder && moved > NOT_CONVERGING * Math.abs(base);
    const by = coarse ? COARSE_FACTOR * moved : moved;
    quadrature += by;
    if (by > largest.by) largest = { name, by };
  }
  quadrature = Math.max(quadrature, recipe.floor(found.value));
  const shorter = withEach(request, printedShorter);
  const rounding = isPrinted(request) ? Math.abs(recipe.again(kitOf(onBins, store), shorter, found) - base) / 10 : 0;
  return { quadrature, rounding, largestKnob: largest.name, expanded: expandedOf([standardOf(quadrature), standardOf(rounding)]) };
}
