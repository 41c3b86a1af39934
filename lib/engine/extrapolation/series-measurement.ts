import { expandedOf } from '../budget/total';
import type { Finding } from '../contract/finding';
import type { BudgetLine, Figure, Measurement, UsedSetting } from '../contract/measurement';
import { Cancelled, notComputable, type MeasureRequest, type Quantity, type Watch } from '../contract/quantity';
import type { Observable } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { followRuns } from './followed-runs';
import { isStopped, meterAtPeak, meterOfQuantity, type Meter, type RunScalar } from './run-scalar';
import type { Run } from './runs';
import { waveformsOfRuns } from './series-findings';

/** Quantities of one waveform whose number a series may be claimed to converge in, by id. */
export type Scalars = ReadonlyMap<string, Quantity>;

const unique = (findings: readonly Finding[]): Finding[] => findings.filter((f, i) => findings.findIndex((g) => g.text === f.text && g.where === f.where) === i);

export const stopped = (findings: readonly Finding[]): Measurement => notComputable(unique(findings), [{}]);

/** Lets a measurement be cancelled between its steps, and says what it does. */
export function stepper(watch: Watch, steps: number): (doing: string) => void {
  let done = 0;
  return (doing) => {
    if (watch.cancelled()) throw new Cancelled();
    watch.onProgress(Math.min(1, done++ / steps), doing);
  };
}

/**
 * What gives the observable's number of any run.
 * Shape:  one meter.
 * Units:  the observable's.
 * Error:  see Meter.
 * Fails:  with the findings that stop every run.
 * Source: settings.md section 6.
 */
export function meterOf(observable: Observable, runs: readonly Run[], leader: Waveform, scalars: Scalars, request: MeasureRequest, watch: Watch): Meter | readonly Finding[] {
  if (observable === 'amplitude-at-peak' || observable === 'phase-at-peak') {
    const followed = followRuns(waveformsOfRuns(runs), leader, request.settings);
    return 'code' in followed ? [followed] : meterAtPeak(observable === 'phase-at-peak' ? 'phase' : 'amplitude', followed, request);
  }
  const quantity = scalars.get(observable);
  if (quantity !== undefined) return meterOfQuantity(quantity, request, watch);
  return [{ code: 'engine/no-signal', level: 'stops-lodging', where: request.claimId, text: `The observable ${observable} is not a number of one run.`, fix: `Declare one of ${['amplitude-at-peak', 'phase-at-peak', ...scalars.keys()].join(', ')}.` }];
}

/** What the observable is called in words. */
export const titleOf = (observable: string, scalars: Scalars): string => (observable === 'phase-at-peak' ? 'Phase at the peak' : observable === 'amplitude-at-peak' ? 'Amplitude at the peak' : (scalars.get(observable)?.title ?? observable));

export const isMeter = (found: Meter | readonly Finding[]): found is Meter => 'of' in found;

/** Every run's number, or what stops one of them. */
export function readRuns(meter: Meter, runs: readonly Run[], step: (doing: string) => void): readonly RunScalar[] | readonly Finding[] {
  const found = runs.map(({ waveform }) => {
    step(`${waveform.name}, both routes`);
    return meter.of(waveform);
  });
  const stops = found.filter(isStopped).flat();
  return stops.length > 0 ? stops : (found as readonly RunScalar[]);
}

export const areNumbers = (found: readonly RunScalar[] | readonly Finding[]): found is readonly RunScalar[] => found.length > 0 && 'A' in found[0]!;

export interface Found {
  readonly value: number;
  readonly byRouteB: number;
  readonly components: Readonly<Record<string, number | null>>;
  /** Not asked for in a first look. */
  readonly budget: () => readonly BudgetLine[];
  readonly findings: readonly Finding[];
  readonly used: { readonly settings: readonly UsedSetting[]; readonly assumed: readonly string[] };
  readonly figures: () => readonly Figure[];
}

/**
 * One number of a series as a measurement.
 * Shape:  one point.
 * Units:  the quantity's.
 * Error:  U from the lines of the computation.
 * Fails:  where a finding stops it.
 * Source: settings.md rules 11 and 12.
 */
export function measurementOf(found: Found, { routeAOnly, withFigures }: MeasureRequest): Measurement {
  const findings = unique(found.findings);
  if (findings.some(({ level }) => level === 'stops-lodging')) return notComputable(findings, [{}]);
  const { value } = found;
  if (routeAOnly) return { points: [{ at: {}, value, routes: { A: value, B: null }, expandedUncertainty: null }], budget: [], findings, assumed: [], settings: [], routeBPoints: [], figures: [] };
  const budget = found.budget();
  const expandedUncertainty = expandedOf(budget.filter(({ group }) => group === 'computation').map(({ u }) => u ?? Number.NaN));
  return {
    points: [{ at: {}, value, routes: { A: value, B: found.byRouteB }, expandedUncertainty, components: found.components }],
    budget,
    findings,
    ...found.used,
    routeBPoints: [0],
    figures: withFigures ? found.figures() : [],
  };
}
