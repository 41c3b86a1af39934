import { houseMatchThreshold, houseValues } from '../contract/house-values';
import type { KnownTo, MetricBound } from '../contract/metric-bound';
import type { MeasureRequest, QuantityInputs } from '../contract/quantity';
import type { DeclaredSettings, MaximiseOver } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import type { Interval } from './monte-carlo';
import { relativesOf, waveformsOf, type Kind } from './relatives';
import type { Measured, Rerun } from './rerun';
import { areal } from './areal-radius';

/** Of a waveform and its reverse. */
const MOST = 2;
/** Of waveforms that are turned against each other: whatever is left, half a turn more would not make it negative. */
const MOST_TURNED = 1;

/**
 * The mismatches between the true waveforms that the one seen allows for, and that a mismatch can be at all.
 * Shape:  an interval of mismatches in [0, most].
 * Units:  none.
 * Error:  none; a triangle inequality twice.
 * Fails:  never; not finite for what is not.
 * Source: domain reference 5.1: max(0, √m − Σ√ε) ≤ √m_true ≤ √m + Σ√ε.
 */
export function mismatchBound(seen: number, known: readonly number[], most: number = MOST): Interval {
  const slack = known.reduce((sum, epsilon) => sum + Math.sqrt(Math.max(0, epsilon)), 0);
  const root = Math.sqrt(Math.max(0, seen));
  return { low: Math.min(most, Math.max(0, root - slack) ** 2), high: Math.min(most, (root + slack) ** 2) };
}

/** How a match-like number follows from a mismatch, and how alike its waveforms are compared. */
interface Likeness {
  readonly mismatchOf: (value: number, declared: DeclaredSettings) => number;
  readonly valueOf: (mismatch: number, declared: DeclaredSettings) => number;
  readonly maximise: readonly MaximiseOver[] | null;
  readonly complex?: true;
}

const parametersOf = ({ parameters }: DeclaredSettings): number => parameters ?? houseValues.parameters;
const ofMatch = { mismatchOf: (value: number) => 1 - value, valueOf: (mismatch: number) => 1 - mismatch };
const shifts: readonly MaximiseOver[] = ['time', 'phase'];
const rotations: readonly MaximiseOver[] = ['time', 'polarisation', 'phase'];

const likenesses: ReadonlyMap<string, Likeness> = new Map<string, Likeness>([
  ['overlap', { ...ofMatch, maximise: null }],
  ['match', { ...ofMatch, maximise: shifts }],
  ['mismatch', { mismatchOf: (value) => value, valueOf: (mismatch) => mismatch, maximise: shifts }],
  ['fitting-factor', { ...ofMatch, maximise: shifts }],
  ['detectable-fraction', { ...ofMatch, maximise: shifts }],
  ['distinguishability-snr', { mismatchOf: (value, declared) => parametersOf(declared) / (2 * value * value), valueOf: (mismatch, declared) => Math.sqrt(parametersOf(declared) / (2 * mismatch)), maximise: shifts }],
  ['mode-content', { ...ofMatch, maximise: rotations, complex: true }],
  ['degeneracy', { ...ofMatch, maximise: rotations, complex: true }],
]);

/** Any of these, searched, can reverse a signal or bring it to where its product with the other vanishes. */
const TURNING = new Set<MaximiseOver>([...shifts, ...rotations]);

const searchedBy = (likeness: Likeness, { maximise }: DeclaredSettings): readonly MaximiseOver[] => (likeness.maximise === null ? [] : (maximise ?? likeness.maximise));

const mostOf = (likeness: Likeness, settings: DeclaredSettings): number => (searchedBy(likeness, settings).some((what) => TURNING.has(what)) ? MOST_TURNED : MOST);

export const isMatchLike = (quantityId: string): boolean => likenesses.has(quantityId);

export interface BoundContext {
  readonly quantityId: string;
  readonly request: MeasureRequest;
  readonly index: number;
  /** The claim's number and components at this point. */
  readonly here: number;
  readonly components: Readonly<Record<string, number | null>>;
  readonly rerun: Rerun;
  /** The quantities by which two runs of one simulation are compared. */
  readonly overlap: Measured;
  readonly mismatch: Measured;
  readonly cancelled: () => boolean;
}

const BETTER = { resolution: (p: Waveform, q: Waveform) => (p.resolution ?? 0) - (q.resolution ?? 0), radius: (p: Waveform, q: Waveform) => (areal(q) ?? 0) - (areal(p) ?? 0) };

/** Only the template that fits best speaks for a fitting factor. */
function inUse({ quantityId, request: { inputs }, components }: BoundContext): Waveform[] {
  const best = components.bestTemplate;
  if (quantityId !== 'fitting-factor' || typeof best !== 'number') return waveformsOf(inputs);
  return [inputs.of.a, inputs.of.templates?.[best]].filter((waveform) => waveform !== undefined);
}

/** Mismatch of two runs under the claim's own mass, band, response and line of sight. */
function between(context: BoundContext, likeness: Likeness, a: Waveform, b: Waveform, more: DeclaredSettings): number | null {
  const { request, index, components } = context;
  const by = likeness.maximise === null ? context.overlap : context.mismatch;
  const inclination = likeness.complex && typeof components.inclinationRad === 'number' ? { inclinationRad: components.inclinationRad } : {};
  const { maximise: _, ...declared } = { ...request.settings, ...inclination };
  const kept = Object.fromEntries(Object.entries(declared).filter(([name]) => (by.settings as readonly string[]).includes(name))) as DeclaredSettings;
  const searched = searchedBy(likeness, request.settings).filter((what) => what !== 'inclination' && what !== 'templateMass');
  const settings = { ...kept, ...(likeness.complex ? { response: 'complex' as const } : {}), ...(likeness.maximise === null ? {} : { maximise: searched }), ...more };
  const { over } = request;
  const swept = over !== null && by.settings.includes(over.setting) ? { setting: over.setting, values: [over.values[index]!] } : null;
  const inputs: QuantityInputs = { of: { a, b }, noise: request.inputs.noise };
  const found = by.measure({ claimId: request.claimId, inputs, settings, over: swept, claimed: [null], withFigures: false, routeAOnly: true }, { onProgress: () => undefined, cancelled: context.cancelled });
  const value = found.points[0]?.value ?? null;
  if (value === null || !Number.isFinite(value)) return null;
  return likeness.maximise === null ? 1 - value : value;
}

/** A signal set against its own (2,2) part carries its error twice: in the whole, and in the part. */
const partsOf = (quantityId: string): readonly DeclaredSettings[] => (quantityId === 'mode-content' ? [{}, { modes: [[2, 2], [2, -2]] }] : [{}]);

interface Compared {
  readonly knownTo: KnownTo[];
  readonly missing: string[];
}

function compareRuns(context: BoundContext, likeness: Likeness, kind: Kind): Compared {
  const compared: Compared = { knownTo: [], missing: [] };
  for (const waveform of inUse(context)) {
    const [best] = relativesOf(kind, waveform, context.request.inputs).sort(BETTER[kind]);
    const mismatches = best === undefined ? [null] : partsOf(context.quantityId).map((more) => between(context, likeness, waveform, best, more));
    if (best === undefined || mismatches.some((x) => x === null)) compared.missing.push(`${kind} of ${waveform.name}`);
    else compared.knownTo.push(...mismatches.map((x) => ({ waveform: waveform.name, relative: best.name, by: kind, mismatch: x ?? Number.NaN })));
  }
  return compared;
}

/** The least match that still counts moves by the slack; of many signals the least known one speaks. */
function fractionBound({ rerun, request, index }: BoundContext, known: readonly KnownTo[], most: number): Interval | null {
  const signals = new Set((request.inputs.of.signals ?? []).map(({ name }) => name));
  const worst = (list: readonly KnownTo[]): number => {
    const sums = new Map<string, number>();
    for (const { waveform, mismatch } of list) sums.set(waveform, (sums.get(waveform) ?? 0) + Math.sqrt(Math.max(0, mismatch)));
    return Math.max(0, ...sums.values());
  };
  const slack = worst(known.filter(({ waveform }) => signals.has(waveform))) + worst(known.filter(({ waveform }) => !signals.has(waveform)));
  const { over, settings } = request;
  const threshold = over?.setting === 'threshold' ? Number(over.values[index]) : (settings.threshold ?? houseMatchThreshold);
  const at = mismatchBound(1 - threshold, [slack * slack], most);
  const asked = (match: number): number | null => (over?.setting === 'threshold' ? rerun({ swept: match }) : rerun({ settings: { threshold: match } }));
  const [low, high] = [asked(1 - at.low), asked(1 - at.high)];
  return low === null || high === null ? null : { low: Math.min(low, high), high: Math.max(low, high) };
}

function inUnit(context: BoundContext, likeness: Likeness, known: readonly KnownTo[]): Interval | null {
  if (known.length === 0) return null;
  const { settings } = context.request;
  const most = mostOf(likeness, settings);
  if (context.quantityId === 'detectable-fraction') return fractionBound(context, known, most);
  const seen = context.components.mismatch ?? likeness.mismatchOf(context.here, settings);
  const { low, high } = mismatchBound(seen, known.map(({ mismatch }) => mismatch), most);
  const ends = [likeness.valueOf(low, settings), likeness.valueOf(high, settings)];
  return { low: Math.min(...ends), high: Math.max(...ends) };
}

export interface BoundFound {
  readonly bound: MetricBound;
  /** By resolution alone and by radius alone, for the lines of the budget; null where one of the waveforms lacks it. */
  readonly alone: Readonly<Record<Kind, { readonly interval: Interval; readonly knownTo: readonly KnownTo[] } | null>>;
}

const orOpen = (x: number | undefined): number | null => (x !== undefined && Number.isFinite(x) ? x : null);

/**
 * The bound that is printed beside every match-like claim.
 * Shape:  one bound; null for a quantity that is not of this kind.
 * Units:  the quantity's.
 * Error:  none of its own: what two runs differ by stands for how far the better one is from the truth.
 * Fails:  both sides are null where no waveform has another run.
 * Source: domain reference 5.1, for Q01–Q05, Q09, Q11 and Q26.
 */
export function metricBound(context: BoundContext): BoundFound | null {
  const likeness = likenesses.get(context.quantityId);
  if (likeness === undefined) return null;
  const found = { resolution: compareRuns(context, likeness, 'resolution'), radius: compareRuns(context, likeness, 'radius') };
  const knownTo = [...found.resolution.knownTo, ...found.radius.knownTo];
  const both = inUnit(context, likeness, knownTo);
  const alone = (kind: Kind) => {
    const interval = found[kind].missing.length > 0 ? null : inUnit(context, likeness, found[kind].knownTo);
    return interval === null ? null : { interval, knownTo: found[kind].knownTo };
  };
  return {
    bound: { low: orOpen(both?.low), high: orOpen(both?.high), knownTo, missing: [...found.resolution.missing, ...found.radius.missing] },
    alone: { resolution: alone('resolution'), radius: alone('radius') },
  };
}
