import type { Claim } from '@/lib/claims/claim';
import type { Claimed } from '@/lib/claims/claimed';
import type { BudgetLine, MeasuredPoint, Measurement, UsedSetting } from '@/lib/engine/contract/measurement';
import { physicalRange } from '@/lib/engine/budget/physical-range';
import { totalOf } from '@/lib/engine/budget/total';
import type { Finding } from '@/lib/engine/contract/finding';
import type { Sensitivity } from '@/lib/engine/contract/sensitivity';
import { unitOf } from '@/lib/engine/contract/quantity';
import { coverageOf } from '@/lib/verdicts/coverage';
import { remarksOf } from '@/lib/verdicts/remarks';
import { claimVerdict, decideVerdict, type PointVerdict } from '@/lib/verdicts/verdict';
import { samePlace } from '@/lib/kernel/place';
import { stopsAt } from './stopped-points';
import type { ResultClaim, ResultPoint, ResultSensitivity, ResultUncertainty } from './result';

interface Weighed {
  readonly claimed: Claimed;
  readonly measured: MeasuredPoint;
  readonly verdict: PointVerdict;
}

/** A claim and its measurement as one line of the result, every field in its fixed place. */
export function weighClaim(claim: Claim, measurement: Measurement): ResultClaim {
  const points = measurement.points.flatMap((measured, i): Weighed[] => {
    const claimed = claim.claimed[i];
    if (!claimed) return [];
    const { scale } = claim.quantity;
    const naturalTolerance = (value: number): number => claim.quantity.naturalTolerance(value, claim.settings);
    const weighing = { claimed, measured, routeBRan: measurement.routeBPoints.includes(i), scale, declaredTolerance: claim.tolerance, naturalTolerance, stopped: stopsAt(measurement.findings, measured.at) };
    return [{ claimed, measured, verdict: decideVerdict(weighing) }];
  });
  const worst = points.reduce((far, next) => (farness(next) > farness(far) ? next : far));
  const uncertainty = uncertaintyOf(claim, worst, measurement);
  const { metricBound, sensitivities } = measurement;
  return {
    id: claim.id,
    quantity: claim.quantity.id,
    unit: unitOf(claim.quantity, claim.settings),
    verdict: claimVerdict(points.map((point) => point.verdict.word)),
    remarks: [...ofFindings(measurement.findings), ...remarksOf(points.map(({ claimed, measured, verdict }) => ({ claimed, measured, word: verdict.word })), measurement.budget, uncertainty.data)],
    coverage: coverageOf(worst.claimed, worst.measured.value, measurement.budget, uncertainty.data),
    points: points.map((point) => resultPoint(point, measurement.findings)),
    budget: measurement.budget.map(budgetLine),
    ...(measurement.budget.length > 0 ? { uncertainty } : {}),
    ...(metricBound ? { metricBound } : {}),
    ...(sensitivities ? { sensitivities: sensitivities.map((row) => weighedSensitivity(row, claim, worst)) } : {}),
    assumed: [...measurement.assumed],
    settings: measurement.settings.map(usedSetting),
    routeB: [...measurement.routeBPoints],
    findings: measurement.findings.map(finding),
    candidates: [],
  };
}

/** An order whose quartiles lie further apart than one is none (domain reference 5.4); the number stands, and the remark beside it. */
const ofFindings = (findings: readonly Finding[]): string[] => (findings.some(({ code }) => code === 'engine/no-single-order') ? ['no single order'] : []);

const farness = ({ verdict }: Weighed): number => (verdict.apart === null ? -1 : Math.abs(verdict.apart));

/** JSON has no NaN: what is not a finite number is null, never zero and never left out. */
const number = (x: number | null | undefined): number | null => (typeof x === 'number' && Number.isFinite(x) ? x : null);

function resultPoint({ claimed, measured, verdict }: Weighed, findings: readonly Finding[]): ResultPoint {
  const own = findings.filter(({ at, level }) => at !== undefined && level === 'stops-lodging' && samePlace(at, measured.at));
  return {
    at: { ...measured.at },
    claimed: claimed.kind === 'value' ? claimed.value : claimed.kind === 'above' ? { above: claimed.bound } : { below: claimed.bound },
    printed: claimed.printed,
    tolerance: number(verdict.tolerance),
    value: number(measured.value),
    expandedUncertainty: number(measured.expandedUncertainty),
    routes: { A: number(measured.routes.A), B: number(measured.routes.B) },
    apart: number(verdict.apart),
    verdict: verdict.word,
    ...(own.length > 0 ? { because: own.map(({ text }) => text).join(' ') } : {}),
    ...(measured.settings ? { settings: { ...measured.settings } } : {}),
    ...(measured.components ? { components: Object.fromEntries(Object.entries(measured.components).map(([name, value]) => [name, number(value)])) } : {}),
  };
}

const budgetLine = ({ component, id, group, u, note, degreesOfFreedom, shape, share }: BudgetLine): BudgetLine => ({
  component, id, group, u: number(u), note,
  ...(degreesOfFreedom === undefined ? {} : { degreesOfFreedom }),
  ...(shape === undefined ? {} : { shape }),
  ...(share === undefined ? {} : { share: number(share) }),
});

/** The two totals: what the computation alone leaves open, and what the data do. */
function uncertaintyOf(claim: Claim, { measured: { value } }: Weighed, { budget }: Measurement): ResultUncertainty {
  const range = physicalRange(claim.quantity.id);
  const computation = budget.filter(({ group }) => group === 'computation');
  return { computation: totalOf(value, computation, range), data: totalOf(value, budget, range) };
}

/** On the scale of the verdict, in units of the tolerance; a bound has none and takes the natural one at the number. */
function weighedSensitivity(row: Sensitivity, { quantity, settings }: Claim, { measured: { value: here }, verdict }: Weighed): ResultSensitivity {
  const { setting, standing, unit, used, tried, because } = row;
  const isLn = quantity.scale === 'ln';
  const natural = quantity.naturalTolerance(here ?? Number.NaN, settings);
  const tolerance = verdict.tolerance ?? (isLn ? Math.log1p(natural) : natural);
  const moved = row.value === null || here === null ? null : isLn ? Math.log(row.value / here) : row.value - here;
  return {
    setting, standing, ...(unit === undefined ? {} : { unit }), used, tried,
    value: number(row.value), change: number(row.change), inTolerances: moved === null ? null : number(moved / tolerance),
    ...(because === undefined ? {} : { because }),
  };
}

const usedSetting = ({ name, value, standing, unit }: UsedSetting): UsedSetting => ({ name, value, standing, ...(unit === undefined ? {} : { unit }) });

const finding = ({ code, level, text, where, fix, at }: Finding): Finding => ({ code, level, text, where, ...(fix === undefined ? {} : { fix }), ...(at === undefined ? {} : { at: { ...at } }) });
