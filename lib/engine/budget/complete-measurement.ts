import type { BudgetLine, Measurement } from '../contract/measurement';
import { unitOf, type MeasureRequest, type Quantity, type Watch } from '../contract/quantity';
import type { DeclaredSettings } from '../contract/settings';
import { mismatch } from '../quantities/mismatch';
import { overlap } from '../quantities/overlap';
import { worstIndex } from './chosen-points';
import { standardOf } from './half-width';
import { isMatchLike, metricBound, type BoundFound } from './metric-bound';
import { numeral, withUnit } from './numeral';
import { simulationLine, unavailable, waveformsOf, type Kind } from './relatives';
import { rerunner, type Measured, type Rerun } from './rerun';
import { sensitivitiesOf } from './sensitivities';
import { withShares } from './total';
import { variedLines } from './varied-lines';

type Completing = Measured & Pick<Quantity, 'naturalTolerance' | 'unit' | 'follows'>;

const ID = { resolution: 'E05', radius: 'E06' } as const;

/** The band stays that of the claim, whatever the sampling of a coarser run. */
function pinned({ settings }: Measurement, point: Measurement['points'][number]): DeclaredSettings {
  const top = point.settings?.fHighHz ?? settings.find(({ name, standing }) => name === 'fHighHz' && standing === 'assumed')?.value;
  return typeof top === 'number' ? { fHighHz: top } : {};
}

function boundLine(kind: Kind, found: BoundFound, unit: string): BudgetLine {
  const alone = found.alone[kind];
  if (alone === null) return unavailable(kind, found.bound.missing.filter((what) => what.startsWith(kind)).map((what) => `no other ${what}`).join(', '));
  const { interval, knownTo } = alone;
  const u = standardOf((interval.high - interval.low) / 2);
  const known = knownTo.map(({ waveform, relative, mismatch: by }) => `${waveform} and ${relative} differ by a mismatch of ${numeral(by)}`).join(', ');
  const between = `the number lies between ${numeral(interval.low, 5)} and ${Number.isFinite(interval.high) ? withUnit(interval.high, unit, 5) : 'no upper bound'}`;
  return { ...unavailable(kind), u: Number.isFinite(u) ? u : null, shape: 'rectangular', note: `${known}: ${between}. A bound, not a standard uncertainty; its width over 2√3.` };
}

/** New lines take the place of the one with their id, and stand behind the others where there is none. */
function merged(budget: readonly BudgetLine[], lines: readonly BudgetLine[]): BudgetLine[] {
  const replaced = budget.map((line) => lines.find(({ id }) => id === line.id && line.u === null) ?? line);
  return [...replaced, ...lines.filter(({ id }) => !budget.some((line) => line.id === id))];
}

interface Context {
  readonly quantity: Completing;
  readonly request: MeasureRequest;
  readonly measurement: Measurement;
  readonly index: number;
  readonly here: number;
  readonly rerun: Rerun;
  readonly watch: Watch;
}

function boundOf({ quantity, request, measurement, index, here, rerun, watch }: Context): BoundFound | null {
  const components = measurement.points[index]?.components ?? {};
  return metricBound({ quantityId: quantity.id, request, index, here, components, rerun, overlap, mismatch, cancelled: watch.cancelled });
}

function simulationLines(context: Context, found: BoundFound | null): BudgetLine[] {
  const { quantity, request, measurement, index, here, rerun } = context;
  const own = measurement.budget.filter(({ id, u }) => (id === ID.resolution || id === ID.radius) && u !== null).map(({ id }) => id);
  if (waveformsOf(request.inputs).length === 0) return [];
  const band = pinned(measurement, measurement.points[index]!);
  const sameBand: Rerun = (change) => rerun({ ...change, settings: { ...band, ...change.settings } });
  return (['resolution', 'radius'] as const).flatMap((kind) => {
    if (own.includes(ID[kind])) return [];
    if (found !== null) return request.inputs.relatives === undefined ? [unavailable(kind)] : [boundLine(kind, found, unitOf(quantity, request.settings))];
    return [simulationLine(kind, request.inputs, here, sameBand, request.settings.formalOrder ?? null, unitOf(quantity, request.settings))];
  });
}

/**
 * What a measurement cannot say of itself, because it takes other runs, other starts or other settings: computed by
 * asking for the same number again by route A, and added to its budget.
 * Shape:  the measurement with its budget completed, the metric bound of match-like claims and, with figures, the sensitivities.
 * Units:  the quantity's.
 * Error:  estimates; values, U and routes stay untouched.
 * Fails:  never; what cannot be computed is null with its reason. A measurement without a value is given back as it is.
 * Source: domain reference 5.1; settings.md rule 12.
 */
export function completeMeasurement(quantity: Completing, request: MeasureRequest, measurement: Measurement, watch: Watch): Measurement {
  const index = worstIndex(measurement.points.map(({ value }) => value), request.claimed, (claimed) => quantity.naturalTolerance(claimed, request.settings));
  const here = measurement.points[index]?.value ?? null;
  if (request.routeAOnly || here === null || measurement.budget.length === 0) return measurement;
  watch.onProgress(1, 'other runs, starts and settings');
  const rerun = rerunner(quantity, request, index, watch);
  const context: Context = { quantity, request, measurement, index, here, rerun, watch };
  const found = isMatchLike(quantity.id) ? boundOf(context) : null;
  const components = measurement.points[index]?.components ?? {};
  const varied = variedLines({ quantityId: quantity.id, unit: unitOf(quantity, request.settings), allowed: quantity.settings, request, measurement, here, rerun }, components);
  const budget = withShares(merged(measurement.budget, [...simulationLines(context, found), ...varied]));
  const sensitivities = request.withFigures ? sensitivitiesOf({ request, measurement, index, here, rerun }) : undefined;
  return { ...measurement, budget, ...(found ? { metricBound: found.bound } : {}), ...(sensitivities ? { sensitivities } : {}) };
}
