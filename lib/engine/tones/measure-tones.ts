import { routeBIndices, worstIndex } from '../budget/chosen-points';
import { dominantMode } from '../conditioning/dominant-mode';
import { expandedOf } from '../budget/total';
import type { Finding } from '../contract/finding';
import type { BudgetLine, Figure, MeasuredPoint, Measurement, UsedSetting } from '../contract/measurement';
import { Cancelled, notComputable, type MeasureRequest, type Watch } from '../contract/quantity';
import type { ModeIndex } from '../contract/settings';
import type { Mode } from '../contract/waveform';
import { recordFindings } from '../findings/record-findings';
import type { Place } from '@/lib/kernel/place';

export type At = Place;

/** What route A says at one point. */
export interface Reading {
  readonly value: number;
  readonly components: Readonly<Record<string, number | null>>;
}

export const isFinding = (entry: object): entry is Finding => 'code' in entry;

export const stop = (code: string, where: string, text: string, fix: string): Finding => ({ code, level: 'stops-lodging', where, text, fix });

/** How one claim about tones is measured; P is a point with its settings filled in. */
export interface ToneRecipe<P> {
  readonly byRouteA: (point: P) => Reading | Finding;
  readonly byRouteB: (point: P) => number;
  /** Lines that make U. */
  readonly computation: (point: P, reading: Reading) => readonly BudgetLine[];
  /** Lines that are listed and decide coverage. */
  readonly coverage: (point: P, reading: Reading) => readonly BudgetLine[];
  readonly findings: (point: P) => readonly Finding[];
  readonly settings: (point: P) => { readonly settings: readonly UsedSetting[]; readonly assumed: readonly string[] };
  readonly figures: (point: P) => readonly Figure[];
  readonly tolerance: (claimed: number) => number;
}

const unique = (findings: readonly Finding[]): Finding[] => findings.filter((f, i) => findings.findIndex((g) => g.text === f.text) === i);

/** What the files of the claim show by themselves, in the modes that it follows. */
function recordsOf({ inputs, settings }: MeasureRequest): Finding[] {
  const listed = settings.modes === 'all' ? undefined : settings.modes;
  return Object.values(inputs.of).flat().flatMap((waveform) => {
    const followed = listed ?? (waveform.content.kind === 'modes' ? loudestOf(waveform.content.modes) : []);
    return recordFindings(waveform, (l, m) => followed.some(([p, q]) => p === l && q === m));
  });
}

function loudestOf(modes: readonly Mode[]): readonly ModeIndex[] {
  const loudest = dominantMode(modes);
  return loudest === undefined ? [] : [[loudest.l, loudest.m]];
}

/** Counts the steps of a measurement and lets it be cancelled between them. */
function stepper(watch: Watch, steps: number): (doing: string) => void {
  let done = 0;
  return (doing) => {
    if (watch.cancelled()) throw new Cancelled();
    watch.onProgress(Math.min(1, done++ / steps), doing);
  };
}

/** A first look: route A alone, nothing estimated. */
const looked = (ats: readonly At[], readings: readonly Reading[], findings: readonly Finding[]): Measurement => ({
  points: readings.map(({ value }, i) => ({ at: ats[i]!, value, routes: { A: value, B: null }, expandedUncertainty: null })),
  budget: [], findings, assumed: [], settings: [], routeBPoints: [], figures: [],
});

/**
 * Route A at every point, route B at up to ten of them, U at each, the budget at the worst.
 * Shape:  see Measurement; ats and points are parallel.
 * Units:  those of the recipe.
 * Error:  U from the recipe's computation lines, k = 2.
 * Fails:  notComputable with the findings that say why; throws Cancelled when told to stop.
 * Source: settings.md rules 11 and 12.
 */
export function measureTones<P extends object>(request: MeasureRequest, watch: Watch, ats: readonly At[], points: readonly (P | Finding)[], recipe: ToneRecipe<P>): Measurement {
  const refused = points.filter((point): point is Finding => isFinding(point));
  if (refused.length > 0) return notComputable(unique(refused), ats);
  const ready = points as readonly P[];
  const step = stepper(watch, ready.length * 2 + 12);
  const byA = ready.map((point) => {
    step('route A');
    return recipe.byRouteA(point);
  });
  const stops = byA.filter(isFinding);
  if (stops.length > 0) return notComputable(unique(stops), ats);
  const readings = byA as readonly Reading[];
  const worst = worstIndex(readings.map(({ value }) => value), request.claimed, recipe.tolerance);
  const findings = unique([...recipe.findings(ready[worst]!), ...recordsOf(request)]);
  if (findings.some(({ level }) => level === 'stops-lodging')) return notComputable(findings, ats);
  if (request.routeAOnly) return looked(ats, readings, findings);
  const routeBPoints = routeBIndices(ready.length, worst);
  const byB = new Map(routeBPoints.map((i) => {
    step('route B');
    return [i, recipe.byRouteB(ready[i]!)] as const;
  }));
  const lines = ready.map((point, i) => {
    step('uncertainty');
    return recipe.computation(point, readings[i]!);
  });
  return {
    points: readings.map(({ value, components }, i): MeasuredPoint => ({ at: ats[i]!, value, routes: { A: value, B: byB.get(i) ?? null }, expandedUncertainty: expandedOf(lines[i]!.map(({ u }) => u ?? Number.NaN)), components })),
    budget: [...lines[worst]!, ...recipe.coverage(ready[worst]!, readings[worst]!)],
    findings,
    ...recipe.settings(ready[worst]!),
    routeBPoints,
    figures: request.withFigures ? recipe.figures(ready[worst]!) : [],
  };
}
