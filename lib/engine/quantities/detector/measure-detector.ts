import { atWords, errorBarIndices, fromNeighbours, routeBIndices, worstIndex } from '@/lib/engine/budget/chosen-points';
import { detectorBudget } from '@/lib/engine/budget/detector-budget';
import { computationError, kitOf, type ComputationError } from '@/lib/engine/budget/error-bar';
import { conditionWaveform, type ConditionedWaveform } from '@/lib/engine/conditioning/condition-waveform';
import { waveformsIn, type DetectorPoint, type PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { MeasuredPoint, Measurement } from '@/lib/engine/contract/measurement';
import { Cancelled, notComputable, type MeasureRequest, type Quantity, type Watch } from '@/lib/engine/contract/quantity';
import type { SettingName } from '@/lib/engine/contract/settings';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { startsInBand } from '@/lib/engine/findings/detector-findings';
import { houseNumerics } from '@/lib/engine/routes/a/numerics';
import { SpectrumStore } from '@/lib/engine/routes/a/spectrum-store';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { detectorFigures } from './figures';
import type { Evaluated, Recipe, RouteKit } from './recipe';
import { findingsOf, stopsOf, valueStops } from './stops';
import { settingsByPoint, usedSettings, type SettingsContext } from './used-settings';
import type { Place } from '@/lib/kernel/place';

/** What a quantity of one detector is, beside its recipe. */
export interface DetectorQuantity {
  readonly id: string;
  /** Printed after the value; empty without one. */
  readonly unit: string;
  readonly settings: readonly SettingName[];
  readonly recipe: Recipe;
  readonly naturalTolerance: Quantity['naturalTolerance'];
}

export interface Walk {
  readonly quantity: DetectorQuantity;
  readonly request: MeasureRequest;
  readonly requests: readonly PointRequest[];
  readonly store: SpectrumStore;
  readonly kitA: RouteKit;
}

const pointsOf = ({ over }: MeasureRequest): Place[] =>
  over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value }));

/** Of a list of signals the first stands where one waveform is asked for. */
const firstOf = ({ inputs: { of } }: MeasureRequest): Waveform | undefined => of.a ?? of.signals?.[0];

function requestsOf(quantity: DetectorQuantity, request: MeasureRequest): PointRequest[] {
  const { settings, inputs } = request;
  const made = new Map<Waveform, ConditionedWaveform>();
  const condition = (given: Waveform): ConditionedWaveform => {
    const known = made.get(given) ?? conditionWaveform(given, settings.modes ?? 'all');
    made.set(given, known);
    return known;
  };
  const { b: second, signals, templates } = inputs.of;
  const a = condition(firstOf(request)!);
  const b = second === undefined ? null : condition(second);
  const lists = { ...(signals === undefined ? {} : { signals: signals.map(condition) }), ...(templates === undefined ? {} : { templates: templates.map(condition) }) };
  return pointsOf(request).map((at) => {
    const declared = { ...settings, ...at };
    return { declared, at, a, b, ...lists, noise: inputs.noise!, traits: quantity.recipe.traits(declared) };
  });
}

function step(watch: Watch, fraction: number, doing: string): void {
  if (watch.cancelled()) throw new Cancelled();
  watch.onProgress(fraction, doing);
}

/** One route over some points; null where it was not asked. */
function evaluateAt(
  walk: Walk,
  kit: RouteKit,
  indices: readonly number[],
  watch: Watch,
  span: readonly [number, number],
  doing: string,
): Map<number, Evaluated> {
  const found = new Map<number, Evaluated>();
  indices.forEach((i, k) => {
    const onStep = (share: number): void => step(watch, span[0] + ((span[1] - span[0]) * (k + share)) / indices.length, doing);
    onStep(0);
    found.set(i, walk.quantity.recipe.evaluate({ ...kit, onStep }, walk.requests[i]!));
  });
  return found;
}

const finiteOrNull = (x: number | undefined): number | null => (x !== undefined && Number.isFinite(x) ? x : null);

const finiteComponents = (components: Readonly<Record<string, number | null>>): Record<string, number | null> =>
  Object.fromEntries(Object.entries(components).map(([name, x]) => [name, x === null ? null : finiteOrNull(x)]));

function remarksOf(walk: Walk, found: Evaluated, shown: DetectorPoint): string[] {
  const cut = walk.quantity.recipe.snrLike && startsInBand(walk.requests[0]!.a, shown, shown.a);
  return [...new Set([...(found.remarks ?? []), ...(cut ? ['lower bound only'] : [])])];
}

/**
 * Measures one detector quantity at all points of a claim.
 * Shape:  one point, or one for every swept value; route B at all of up to ten points, of more at eleven.
 * Units:  the quantity's.
 * Error:  U from route A's own knobs and the printed digits, measured at up to five points.
 * Fails:  findings that stop leave every value null; throws only when cancelled.
 * Source: settings.md sections 2 to 4.
 */
export function measureDetector(quantity: DetectorQuantity, request: MeasureRequest, watch: Watch): Measurement {
  const ats = pointsOf(request);
  if (firstOf(request) === undefined || request.inputs.noise === null) return notComputable([], ats);
  step(watch, 0, 'preparing the waveforms');
  const requests = requestsOf(quantity, request);
  const store = storeOf(request);
  const stops = stopsOf(quantity, request, requests, store);
  if (stops.length > 0) return notComputable([...stops, ...findingsOf(quantity, requests, null)], ats);
  const walk: Walk = { quantity, request, requests, store, kitA: kitOf(houseNumerics, store) };
  const all = requests.map((_, i) => i);
  const byA = evaluateAt(walk, walk.kitA, all, watch, [0.02, 0.4], 'route A');
  const found = all.map((i) => byA.get(i)!);
  const late = valueStops(quantity, walk, found);
  if (late.length > 0) return notComputable([...late, ...findingsOf(quantity, requests, found)], ats);
  return request.routeAOnly ? lookedAt(walk, found) : weighed(walk, found, watch);
}

const storeOf = ({ routeAOnly, workshop }: MeasureRequest): SpectrumStore =>
  routeAOnly && workshop !== undefined ? workshop.once('route-a', () => new SpectrumStore()) : new SpectrumStore();

/** Route A's values alone: what was not estimated is null. */
function lookedAt({ quantity, requests }: Walk, found: readonly Evaluated[]): Measurement {
  const points = found.map(({ value }, i): MeasuredPoint => ({ at: requests[i]!.at, value: finiteOrNull(value), routes: { A: finiteOrNull(value), B: null }, expandedUncertainty: null }));
  return { points, budget: [], findings: findingsOf(quantity, requests, found), assumed: [], settings: [], routeBPoints: [], figures: [] };
}

/** Two searches over a mass from all sights may end so far apart by their grids alone; what lies beyond is for the verdict to see. */
const SEARCHED_APART = 1e-5;

/** Where the mass is searched for from all sights, no knob turns the search: the other route's says what it leaves open. */
function withRoutesApart(request: PointRequest, found: Evaluated, byB: Evaluated | undefined): Evaluated {
  const apart = Math.abs(found.value - (byB?.value ?? found.value));
  const searched = request.traits.goesOver !== undefined && (request.declared.maximise?.includes('templateMass') ?? false);
  return searched && apart <= SEARCHED_APART ? { ...found, doubt: (found.doubt ?? 0) + apart } : found;
}

function weighed(walk: Walk, found: readonly Evaluated[], watch: Watch): Measurement {
  const { quantity, request, requests, store } = walk;
  const { recipe } = quantity;
  const values = found.map(({ value }) => finiteOrNull(value));
  const worst = worstIndex(values, request.claimed, (claimed) => quantity.naturalTolerance(claimed, request.settings));
  const alone = atWords(request.over?.values ?? []);
  const routeBPoints = routeBIndices(found.length, worst, alone);
  const byB = evaluateAt(walk, { route: routeB, scan: routeB }, routeBPoints, watch, [0.4, 0.75], 'route B');
  const errors = new Map<number, ComputationError>();
  errorBarIndices(found.length, worst, alone).forEach((i, k, chosen) => {
    step(watch, 0.75 + (0.15 * k) / chosen.length, 'error bar');
    errors.set(i, computationError(recipe, requests[i]!, withRoutesApart(requests[i]!, found[i]!, byB.get(i)), store));
  });
  const bars = fromNeighbours(found.length, new Map([...errors].map(([i, error]) => [i, error.expanded])), alone);
  step(watch, 0.9, 'error budget');
  const shown = requests.map((r, i) => recipe.shownPoint(r, found[i]!));
  const budget = detectorBudget({
    unit: quantity.unit,
    recipe,
    kit: walk.kitA,
    request: requests[worst]!,
    traits: requests[worst]!.traits,
    found: found[worst]!,
    error: errors.get(worst)!,
    store,
  });
  const inUse = settingsContext(walk, shown);
  const own = settingsByPoint(inUse);
  const points = found.map((here, i): MeasuredPoint => {
    const remarks = remarksOf(walk, here, shown[i]!);
    const components = { ...here.components, ...recipe.alsoShown?.(requests[i]!, store) };
    return {
      at: requests[i]!.at,
      value: values[i]!,
      routes: { A: values[i]!, B: finiteOrNull(byB.get(i)?.value) },
      expandedUncertainty: finiteOrNull(bars[i]),
      ...(Object.keys(components).length === 0 ? {} : { components: finiteComponents(components) }),
      ...(Object.keys(own[i]!).length === 0 ? {} : { settings: own[i]! }),
      ...(remarks.length > 0 ? { remarks } : {}),
    };
  });
  step(watch, 0.97, 'figures');
  const figures = request.withFigures ? detectorFigures({ walk, found, shown, worst, points }) : [];
  return { points, budget, findings: findingsOf(quantity, requests, found), ...usedSettings(inUse), routeBPoints, figures };
}

function settingsContext({ quantity, request, requests }: Walk, shown: readonly DetectorPoint[]): SettingsContext {
  const { traits } = requests[0]!;
  return { points: shown, waveforms: waveformsIn(requests[0]!), traits, allowed: quantity.settings, swept: request.over?.setting ?? null };
}
