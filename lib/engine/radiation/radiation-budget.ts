import { LEAST, ROOT3 } from '../budget/half-width';
import { expandedOf } from '../budget/total';
import type { BudgetLine } from '../contract/measurement';
import type { PreparedPoint } from './prepare-radiated';
import { house, type EllShare, type Outcome, type RadiationRecipe, type SampledStore } from './radiation-recipe';
import { divisionsTo } from './radiation-record';
import type { RadiationSettings } from './radiation-settings';

/** E07: the start moved by ±50 M, as far as the record goes. */
const START_MOVED_M = 50;

/** Standard uncertainties of the computation, in the quantity's unit. */
export interface ComputationUncertainty {
  readonly quadrature: number;
  readonly stencil: number;
  /** Zero for binary doubles: nothing was printed. */
  readonly rounding: number;
  /** The value itself with either knob turned; none where a turned route gives no number. */
  readonly turned: { readonly quadrature: readonly number[]; readonly stencil: readonly number[] };
}

const apart = (p: Outcome, q: Outcome | null): number => (q === null ? Number.NaN : Math.hypot(...p.vector.map((x, i) => x - (q.vector[i] ?? Number.NaN))));

/** A word of where a point stands and how it is computed. */
export interface Measuring {
  readonly recipe: RadiationRecipe;
  readonly point: PreparedPoint;
  readonly store: SampledStore;
  readonly digits: number | null;
}

/**
 * How far route A moves when each of its knobs is turned, as standard uncertainties (half-widths over √3).
 * Shape:  one number a component.
 * Units:  the quantity's.
 * Error:  the stencil's is that of the shorter one, so it errs on the large side.
 * Fails:  NaN where a turned route gives no number, and nothing is then decided.
 * Source: settings.md rule 12; domain reference section 5.
 */
export function computationUncertainty({ recipe, point, store, digits }: Measuring, here: Outcome): ComputationUncertainty {
  const least = LEAST * Math.hypot(...here.vector);
  const moved = (found: Outcome | null): number => Math.max(apart(here, found) / ROOT3, least);
  const takenAsItStands = point.record.variable === 'news' && !recipe.withStrain;
  const [byOrder, byStencil] = [recipe.byRouteA(point, store, { ...house, order: 6 }), takenAsItStands ? here : recipe.byRouteA(point, store, { ...house, coarse: true })];
  const valueOf = (found: Outcome | null): readonly number[] => (found === null ? [] : [found.value]);
  return {
    quadrature: moved(byOrder),
    stencil: takenAsItStands ? 0 : moved(byStencil),
    rounding: recipe.rounding(point, store, digits, here),
    turned: { quadrature: valueOf(byOrder), stencil: valueOf(byStencil) },
  };
}

export const combinedU = ({ quadrature, stencil, rounding }: ComputationUncertainty): number => expandedOf([quadrature, stencil, rounding]);

type Elsewhere = (changed: Partial<RadiationSettings>) => number | null;

function startLine({ record, settings }: PreparedPoint, elsewhere: Elsewhere): BudgetLine {
  const moved = [-START_MOVED_M, START_MOVED_M]
    .map((by) => settings.startM + by)
    .filter((startM) => startM >= record.axis[0]! && startM < record.axis[record.axis.length - 1]!)
    .map((startM) => elsewhere({ startM }))
    .filter((found) => found !== null);
  const u = moved.length === 0 ? null : Math.max(...moved) / ROOT3;
  const note = moved.length === 0 ? 'The record is too short to move its start by 50 M.' : `Start of the integral moved by ${moved.length === 2 ? '±50 M' : '50 M (the record does not reach further)'}; half-width over √3.`;
  return { component: 'Start-up radiation', id: 'E07', group: 'coverage', u, note };
}

function floorLine({ settings: { floor } }: PreparedPoint, elsewhere: Elsewhere): BudgetLine[] {
  if (floor === null) return [];
  const moved = [0.7, 1.4].map((by) => elsewhere({ floor: floor * by })).filter((found) => found !== null);
  const u = moved.length === 0 ? null : Math.max(...moved) / ROOT3;
  return [{ component: 'Integration floor', id: 'E08', group: 'coverage', u, note: `ω₀ = ${Number(floor.toPrecision(4))} rad/M times 0.7 and 1.4; half-width over √3.` }];
}

/**
 * E09: the modes above the last ℓ, as the tail of a geometric series in what each ℓ adds. Symmetry can
 * silence every other ℓ, so the ratio is taken over two steps where the file has three and ℓ does not
 * multiply its neighbours. One-sided: half of it ± half/√3; we leave the value as it is and give the whole over √3.
 * Shape:  one line; null where the shares show no series to continue.
 * Units:  those of the shares.
 * Error:  an estimate.
 * Fails:  never.
 * Source: domain reference E09.
 */
export function modesLine(shares: readonly EllShare[], { noun, couplesEll }: Pick<RadiationRecipe, 'noun' | 'couplesEll'>): BudgetLine {
  const base = { component: 'Modes left out', id: 'E09', group: 'coverage' } as const;
  const [last, before] = [shares.at(-1), shares.at(-2)];
  const earlier = couplesEll ? undefined : shares.at(-3);
  if (!last || !before) return { ...base, u: null, note: 'One ℓ alone gives no trend to continue.' };
  const from = earlier ?? before;
  const ratio = last.size / from.size;
  if (!(ratio < 1)) return { ...base, u: null, note: `The ${noun} does not fall from ℓ = ${from.l} to ${last.l}: no series to continue.` };
  const repeated = earlier ? before.size + last.size : last.size;
  const rest = (repeated * ratio) / (1 - ratio);
  return { ...base, u: rest / ROOT3, note: `The ${noun} falls to ${Number((100 * ratio).toPrecision(2))} % from ℓ = ${from.l} to ${last.l}; the rest of that series above ℓ = ${last.l}, one-sided.` };
}

function computationLines({ recipe, point, digits }: Measuring, { quadrature, stencil, rounding, turned }: ComputationUncertainty): BudgetLine[] {
  const { variable } = point.record;
  const integrates = divisionsTo(variable, recipe.withStrain) > 0;
  return [
    { component: 'Quadrature over time', id: 'E01', group: 'computation', u: quadrature, turned: { values: turned.quadrature }, note: 'Local polynomials of order 8 against 6; half-width over √3.' },
    {
      component: integrates ? 'Integration in frequency' : 'Differentiation',
      id: 'E02',
      group: 'computation',
      u: stencil,
      turned: { values: turned.stencil },
      note: integrates ? 'Interpolation of order 8 against 6 and half the points.' : variable === 'news' ? 'News is taken as it stands.' : '13-point against 9-point differences.',
    },
    {
      component: 'Rounding of the input',
      id: 'rounding',
      group: 'computation',
      u: rounding,
      note: digits === null ? 'Binary doubles: nothing was printed.' : `${digits} significant digits in the file.`,
    },
  ];
}

/**
 * The error budget at one point.
 * Shape:  computation lines make U, coverage lines do not.
 * Units:  the quantity's.
 * Error:  estimates; what one file cannot show is null.
 * Fails:  never.
 * Source: domain reference section 5; settings.md rule 12.
 */
export function radiationBudget(measuring: Measuring, here: Outcome): BudgetLine[] {
  const { recipe, point, store } = measuring;
  const elsewhere: Elsewhere = (changed) => {
    const found = recipe.byRouteA({ ...point, settings: { ...point.settings, ...changed } }, store, house);
    return found === null ? null : apart(here, found);
  };
  return [
    ...computationLines(measuring, computationUncertainty(measuring, here)),
    { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution.' },
    { component: 'Extraction radius', id: 'E06', group: 'coverage', u: null, note: 'Not available: one radius.' },
    startLine(point, elsewhere),
    ...floorLine(point, elsewhere),
    modesLine(recipe.shares(point, store, here), recipe),
    ...(recipe.coverage?.(point, store) ?? []),
  ];
}
