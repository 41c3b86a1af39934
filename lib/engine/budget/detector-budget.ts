import { waveformsIn, type DetectorTraits, type PointRequest } from '@/lib/engine/conditioning/detector-settings';
import { massFrameOf } from '@/lib/engine/conditioning/detector-settings';
import type { BudgetLine } from '@/lib/engine/contract/measurement';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import { short } from '@/lib/engine/findings/spelt';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { Evaluated, Recipe, RouteKit } from '@/lib/engine/quantities/detector/recipe';
import { houseCosmology } from '@/lib/engine/units/cosmology';
import { houseNumerics } from '@/lib/engine/routes/a/numerics';
import type { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { halfUnit } from './half-unit';
import { withUnit } from './numeral';
import { isPrinted, kitOf, type ComputationError } from './error-bar';
import { standardOf } from './half-width';

export interface BudgetContext {
  /** Of the value, for the notes; empty without one. */
  readonly unit: string;
  readonly recipe: Recipe;
  readonly kit: RouteKit;
  readonly request: PointRequest;
  readonly traits: DetectorTraits;
  readonly found: Evaluated;
  readonly error: ComputationError;
  readonly store: SpectrumStore;
}

const waveformsOf = waveformsIn;

/** How far the value moves when one thing is changed; NaN where the change leaves nothing to compute. */
function movedBy(context: BudgetContext, change: Partial<PointRequest>): number {
  const { recipe, kit, request, found } = context;
  return recipe.again(kit, { ...request, ...change }, found) - found.value;
}

const withSettings = ({ request }: BudgetContext, settings: DeclaredSettings): Partial<PointRequest> => ({
  declared: { ...request.declared, ...settings },
});

const largest = (moves: readonly number[]): number | null =>
  moves.length === 0 || moves.some((x) => !Number.isFinite(x)) ? null : Math.max(...moves.map(Math.abs));

function computationLines({ error, request }: BudgetContext): BudgetLine[] {
  const digits = waveformsOf(request).map((c) => c.given.significantDigits);
  const printed = [...new Set(digits.map((d) => (d === null ? 'binary' : `${d} digits`)))].join(' and ');
  return [
    {
      component: 'Quadrature and transform',
      id: 'E01',
      group: 'computation',
      u: standardOf(error.quadrature),
      note: `Six knobs of route A turned one by one, their changes added (largest: ${error.largestKnob}); half-width over √3.`,
    },
    {
      component: 'Derivative and integration stencil',
      id: 'E02',
      group: 'computation',
      u: 0,
      note: 'Not used: no derivative is taken; news and ψ₄ are divided by powers of 2πif.',
    },
    {
      component: 'Rounding of the input',
      id: 'rounding',
      group: 'computation',
      u: standardOf(error.rounding),
      note: isPrinted(request)
        ? `A tenth of the change when the samples (${printed}) are printed with one digit less; half-width over √3.`
        : `The samples carry the digits of a double (${printed}).`,
    },
    { component: 'Monte Carlo averages', id: 'E17', group: 'computation', u: 0, note: 'Not used: nothing is drawn at random.' },
  ];
}

/** E03: half the ramps, twice the ramps, none. The taper is a definition; this is what the choice weighs. */
function taperLine(context: BudgetContext): BudgetLine {
  const base = { component: 'Taper', id: 'E03', group: 'coverage' } as const;
  const { declared } = context.request;
  const lMax = declared.lMax ?? null;
  const open = waveformsOf(context.request).some((c) => c.taper('auto', lMax).startIsOpen || c.taper('auto', lMax).endIsOpen);
  if (!open) return { ...base, u: 0, note: 'Every end is quiet: nothing is tapered.' };
  const length = typeof declared.taper === 'number' ? declared.taper : 1;
  const tapers: readonly (number | 'none')[] = [length / 2, 2 * length, declared.taper === 'none' ? length : 'none'];
  const moves = tapers.map((taper) => movedBy(context, withSettings(context, { taper })));
  const moved = largest(moves);
  const note = `Ramps of half and twice the length and ${declared.taper === 'none' ? 'the house taper' : 'none'}: ${moves.map((x) => withUnit(x, context.unit)).join(', ')}; half-width over √3.`;
  return { ...base, u: moved === null ? null : standardOf(moved), note };
}

const LINEAR_PARTS = 8;
const COARSE_KINKS = 5;

/** The same table under S linear in f between points: its straight lines as eight short power laws each. */
function linearBetween(noise: NoiseCurve, points: Float64Array): NoiseCurve | null {
  const f: number[] = [points[0]!];
  const values: number[] = [noise.psd(points[0]!)];
  for (let i = 1; i < points.length; i++) {
    const [f0, f1] = [points[i - 1]!, points[i]!];
    const [s0, s1] = [noise.psd(f0), noise.psd(f1)];
    for (let k = 1; k <= LINEAR_PARTS; k++) {
      f.push(k === LINEAR_PARTS ? f1 : f0 + ((f1 - f0) * k) / LINEAR_PARTS);
      values.push(k === LINEAR_PARTS ? s1 : s0 + ((s1 - s0) * k) / LINEAR_PARTS);
    }
  }
  const made = tabulatedCurve({ name: noise.name, f, values, meaning: 'psd', sided: 'one' });
  return made.ok ? made.value.curve : null;
}

function everySecondPoint(noise: NoiseCurve, points: Float64Array): NoiseCurve | null {
  const f = Array.from(points).filter((_, i) => i % 2 === 0 || i === points.length - 1);
  const made = tabulatedCurve({ name: noise.name, f, values: f.map((x) => noise.psd(x)), meaning: 'psd', sided: 'one' });
  return made.ok ? made.value.curve : null;
}

/** E04: linear against log–log, and every second point left out. */
function noiseLine(context: BudgetContext): BudgetLine {
  const base = { component: 'Noise curve between its points', id: 'E04', group: 'coverage' } as const;
  const { noise } = context.request;
  if (noise.points === null) return { ...base, u: 0, note: 'A closed form is evaluated, not interpolated.' };
  if (noise.points.length < 3) return { ...base, u: 0, note: 'Two points: one power law.' };
  // Two curves are compared to a few digits: coarse bins serve, as long as both stand on them.
  const coarse = kitOf({ ...houseNumerics, refineStep: false, kinkChange: COARSE_KINKS }, context.store);
  const before = context.recipe.again(coarse, context.request, context.found);
  const others = [linearBetween(noise, noise.points), everySecondPoint(noise, noise.points)].filter((curve) => curve !== null);
  const moves = others.map(
    (curve) =>
      context.recipe.again(coarse, { ...context.request, noise: { ...curve, alreadyAveraged: noise.alreadyAveraged } }, context.found) -
      before,
  );
  const moved = largest(moves);
  return {
    ...base,
    u: moved === null ? null : standardOf(moved),
    note: `S linear in f between points, and every second of ${noise.points.length} points left out: ${moves.map((x) => withUnit(x, context.unit)).join(', ')}; half-width over √3.`,
  };
}

const unknownLines = (): BudgetLine[] => [
  { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution.' },
  { component: 'Extraction radius', id: 'E06', group: 'coverage', u: null, note: 'Not available: one radius.' },
  {
    component: 'Start-up radiation',
    id: 'E07',
    group: 'coverage',
    u: null,
    note: 'Not available: one record does not tell a start-up burst from signal in the band.',
  },
];

/** E09: the ℓ above the highest given, as the tail of a geometric series in what each ℓ adds to the value. */
function modesLine(context: BudgetContext): BudgetLine[] {
  const { declared } = context.request;
  const sets = waveformsOf(context.request).map((c) => c.used(declared.lMax ?? null).content);
  if (sets.every((set) => set.kind !== 'modes')) return [];
  const base = { component: 'Modes left out', id: 'E09', group: 'coverage' } as const;
  if (declared.lMax !== undefined || (declared.modes !== undefined && declared.modes !== 'all')) {
    return [{ ...base, u: 0, note: 'The claim names its modes: the others are no part of it.' }];
  }
  const tops = sets.flatMap((set) => (set.kind === 'modes' ? [Math.max(...set.modes.map((mode) => mode.l))] : []));
  const top = Math.min(...tops);
  if (top < 4) return [{ ...base, u: null, note: `Modes to ℓ = ${top} give no trend to continue.` }];
  const [one, two] = [
    movedBy(context, withSettings(context, { lMax: top - 1 })),
    movedBy(context, withSettings(context, { lMax: top - 2 })),
  ].map(Math.abs);
  const ratio = one! / (two! - one!);
  if (!(ratio >= 0 && ratio < 1))
    return [{ ...base, u: null, note: `What ℓ adds does not fall towards ℓ = ${top}: no series to continue.` }];
  const rest = (one! * ratio) / (1 - ratio);
  return [
    {
      ...base,
      u: standardOf(rest),
      note: `ℓ = ${top} moves the value by ${withUnit(one!, context.unit)}, ${short(100 * ratio, 2)} % of ℓ = ${top - 1}; the rest of that series, one-sided, over √3.`,
    },
  ];
}

const H0_UNCERTAINTY = 0.5;

/** E12: the expansion, where a redshift and a distance were tied by it. */
function cosmologyLine(context: BudgetContext): BudgetLine[] {
  const { request, traits } = context;
  const { declared } = request;
  const source =
    massFrameOf(
      declared,
      waveformsOf(request).map((c) => c.given),
      traits,
    ) === 'source';
  const tied =
    (traits.horizon && source) ||
    (source && declared.redshift === undefined) ||
    (traits.needsDistance && declared.distanceMpc === undefined && declared.redshift !== undefined);
  if (!tied) return [];
  const cosmology = declared.cosmology ?? houseCosmology;
  const moved = movedBy(context, withSettings(context, { cosmology: { ...cosmology, h0: cosmology.h0 + H0_UNCERTAINTY } }));
  return [
    {
      component: 'Cosmology',
      id: 'E12',
      group: 'coverage',
      u: Number.isFinite(moved) ? Math.abs(moved) : null,
      note: `H₀ = ${cosmology.h0} ± ${H0_UNCERTAINTY} km/s/Mpc.`,
    },
  ];
}

/** E13: distance and redshift are measured, so their last digit counts; band edges and masses on an axis are exact. */
function parameterLine(context: BudgetContext): BudgetLine[] {
  const { declared } = context.request;
  const { traits } = context;
  const measured = (['redshift', 'distanceMpc'] as const).filter(
    (name) => declared[name] !== undefined && !traits.horizon && (name === 'redshift' || traits.needsDistance),
  );
  if (measured.length === 0) return [];
  const moves = measured.map((name) => movedBy(context, withSettings(context, { [name]: declared[name]! + halfUnit(declared[name]!) })));
  const sum = Math.sqrt(moves.reduce((total, x) => total + x * x, 0));
  return [
    {
      component: 'Rounded parameters of the claim',
      id: 'E13',
      group: 'coverage',
      u: Number.isFinite(sum) ? standardOf(sum) : null,
      note: `Half a unit of the last digit of ${measured.join(' and ')}, over √3.`,
    },
  ];
}

/**
 * The error budget of a detector quantity at one point.
 * Shape:  computation lines make U, coverage lines decide coverage only.
 * Units:  the quantity's.
 * Error:  estimates; what the files cannot show is null.
 * Fails:  never.
 * Source: domain reference section 5.1; settings.md rule 12.
 */
export function detectorBudget(context: BudgetContext): BudgetLine[] {
  const own = context.recipe.ownBudget?.({ request: context.request, found: context.found, movedBy: (settings) => movedBy(context, withSettings(context, settings)), movedIn: (request) => movedBy(context, request) }) ?? [];
  // What a quantity estimates by itself takes the place of what is unknown in general.
  const common = commonLines(context).filter(({ id }) => !own.some((line) => line.id === id));
  return [...common, ...own];
}

const commonLines = (context: BudgetContext): BudgetLine[] => [
  ...computationLines(context),
  taperLine(context),
  noiseLine(context),
  ...unknownLines(),
  ...modesLine(context),
  ...cosmologyLine(context),
  ...parameterLine(context),
];
