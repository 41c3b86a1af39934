import type { Claim } from '@/lib/claims/claim';
import type { Claimed } from '@/lib/claims/claimed';
import type { BudgetLine, MeasuredPoint, Measurement, UsedSetting } from '@/lib/engine/contract/measurement';
import type { Finding } from '@/lib/engine/contract/finding';
import { coverageOf } from '@/lib/verdicts/coverage';
import { remarksOf } from '@/lib/verdicts/remarks';
import { claimVerdict, decideVerdict, type PointVerdict } from '@/lib/verdicts/verdict';
import type { ResultClaim, ResultPoint } from './result';

interface Weighed {
  readonly claimed: Claimed;
  readonly measured: MeasuredPoint;
  readonly verdict: PointVerdict;
}

/** A claim and its measurement as one line of the result, every field in its fixed place. */
export function weighClaim(claim: Claim, measurement: Measurement): ResultClaim {
  const stopped = measurement.findings.some((finding) => finding.level === 'stops-lodging');
  const points = measurement.points.flatMap((measured, i): Weighed[] => {
    const claimed = claim.claimed[i];
    if (!claimed) return [];
    const { scale } = claim.quantity;
    const naturalTolerance = (value: number): number => claim.quantity.naturalTolerance(value, claim.settings);
    const weighing = { claimed, measured, routeBRan: measurement.routeBPoints.includes(i), scale, declaredTolerance: claim.tolerance, naturalTolerance, stopped };
    return [{ claimed, measured, verdict: decideVerdict(weighing) }];
  });
  const worst = points.reduce((far, next) => (farness(next) > farness(far) ? next : far));
  return {
    id: claim.id,
    quantity: claim.quantity.id,
    unit: claim.quantity.unit,
    verdict: claimVerdict(points.map((point) => point.verdict.word)),
    remarks: remarksOf(points.map(({ claimed, measured, verdict }) => ({ claimed, measured, word: verdict.word })), measurement.budget),
    coverage: coverageOf(worst.claimed, worst.measured.value, measurement.budget),
    points: points.map(resultPoint),
    budget: measurement.budget.map(budgetLine),
    assumed: [...measurement.assumed],
    settings: measurement.settings.map(usedSetting),
    routeB: [...measurement.routeBPoints],
    findings: measurement.findings.map(finding),
    candidates: [],
  };
}

const farness = ({ verdict }: Weighed): number => (verdict.apart === null ? -1 : Math.abs(verdict.apart));

/** JSON has no NaN: what is not a finite number is null, never zero and never left out. */
const number = (x: number | null | undefined): number | null => (typeof x === 'number' && Number.isFinite(x) ? x : null);

function resultPoint({ claimed, measured, verdict }: Weighed): ResultPoint {
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
    ...(measured.settings ? { settings: { ...measured.settings } } : {}),
    ...(measured.components ? { components: Object.fromEntries(Object.entries(measured.components).map(([name, value]) => [name, number(value)])) } : {}),
  };
}

const budgetLine = ({ component, id, group, u, note }: BudgetLine): BudgetLine => ({ component, id, group, u: number(u), note });

const usedSetting = ({ name, value, standing, unit }: UsedSetting): UsedSetting => ({ name, value, standing, ...(unit === undefined ? {} : { unit }) });

const finding = ({ code, level, text, where, fix }: Finding): Finding => ({ code, level, text, where, ...(fix === undefined ? {} : { fix }) });
