/**
 * The quantities of one detector share their walk: settings to points, two routes, an error bar,
 * findings and figures. What makes each one itself is a recipe: a value at a point by a route.
 */
import type { DetectorPoint, DetectorTraits, PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { BudgetLine, Figure } from '@/lib/engine/contract/measurement';
import type { Finding } from '@/lib/engine/contract/finding';
import type { DetectorRoute, MatchOutcome, Sight, SightMatch } from '@/lib/engine/contract/route';
import type { DeclaredSettings, SettingName } from '@/lib/engine/contract/settings';
import type { Waveform } from '@/lib/engine/contract/waveform';
import type { FractionFound } from '@/lib/engine/fraction/fraction-found';
import type { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';

/** A route, and the same route allowed to be cruder while it only looks for a bracket. */
export interface RouteKit {
  readonly route: DetectorRoute;
  readonly scan: DetectorRoute;
  /** Asked during long work with the share that is done; throws to stop. */
  readonly onStep?: (share: number) => void;
}

export interface Evaluated {
  /** NaN when there is nothing to compute. */
  readonly value: number;
  readonly components?: Readonly<Record<string, number | null>>;
  readonly remarks?: readonly string[];
  /** Where a search ended, so that the error bar does not search again. */
  readonly outcome?: MatchOutcome;
  /** Redshift at which a horizon was found. */
  readonly redshift?: number;
  readonly distanceMpc?: number;
  readonly roots?: readonly number[];
  /** Lines of sight that make the value, with their shares, and where b was left for each. */
  readonly sights?: readonly { readonly sight: Sight; readonly share: number; readonly match: SightMatch }[];
  /** Of many sights, those that were searched once more by themselves: the error bar asks for these. */
  readonly checked?: readonly { readonly sight: Sight; readonly match: SightMatch }[];
  /** Place in the list of the template that fits best. */
  readonly bestTemplate?: number;
  /** What a fraction was read off. */
  readonly fraction?: FractionFound;
  /** Half-width of what a search or a mean leaves open, beside the route's own error. */
  readonly doubt?: number;
}

/** What the recipe adds to the budget: how the value moves under other settings. */
export interface OwnBudget {
  readonly request: PointRequest;
  readonly found: Evaluated;
  readonly movedBy: (settings: DeclaredSettings) => number;
  /** The same under another request, such as shorter records. */
  readonly movedIn: (change: Partial<PointRequest>) => number;
}

/** What the recipe's own figures are drawn from. */
export interface OwnFigures {
  readonly kit: RouteKit;
  readonly request: PointRequest;
  readonly found: Evaluated;
  readonly store: SpectrumStore;
}

export interface Recipe {
  readonly traits: (declared: DeclaredSettings) => DetectorTraits;
  readonly evaluate: (kit: RouteKit, request: PointRequest) => Evaluated;
  /** The same value under other numerics or data, from where the first search ended. */
  readonly again: (kit: RouteKit, request: PointRequest, found: Evaluated) => number;
  /** Components that only route A's spectra show; for the reader, not compared. */
  readonly alsoShown?: (request: PointRequest, store: SpectrumStore) => Readonly<Record<string, number | null>>;
  /** Smallest half-width of the computation's error, at a value. */
  readonly floor: (value: number) => number;
  /** A signal cut by the band's edge makes this value a lower bound. */
  readonly snrLike: boolean;
  /** Settings without a default, beyond those of every quantity of one detector; `has` tells what is declared or swept. */
  readonly requires?: (waveforms: readonly Waveform[], has: (name: SettingName) => boolean) => readonly SettingName[];
  /** What makes this quantity alone impossible to compute. */
  readonly stops?: (request: PointRequest) => readonly (Finding | null)[];
  /** Findings of this quantity alone, at one point. */
  readonly looks?: (request: PointRequest) => readonly (Finding | null)[];
  readonly ownBudget?: (context: OwnBudget) => readonly BudgetLine[];
  /** Drawn at the point furthest from its claim. */
  readonly ownFigures?: (context: OwnFigures) => readonly Figure[];
  /** The point whose band and mass the findings and figures look at. */
  readonly shownPoint: (request: PointRequest, found: Evaluated) => DetectorPoint;
}

/** Relative rounding that no rerun shows. */
export const ROUNDING_FLOOR = 1e-13;
