import { waveformNames, type Claim, type ClaimSheet } from '@/lib/claims/claim';
import { inputRoles } from '@/lib/claims/claim-inputs';
import { claimFindings } from '@/lib/claims/sheet-findings';
import { completeMeasurement } from '@/lib/engine/budget/complete-measurement';
import { sweepFigure } from '@/lib/engine/quantities/sweep-figure';
import type { Finding } from '@/lib/engine/contract/finding';
import type { Measurement } from '@/lib/engine/contract/measurement';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { Cancelled, notComputable, type MeasureRequest, type QuantityInputs, type Watch } from '@/lib/engine/contract/quantity';
import { duplicateFindings, type Inputs } from './read-inputs';
import { isStopped, onlyPoints, stoppedPoints, withStoppedPoints } from './stopped-points';
import type { Place } from '@/lib/kernel/place';

export interface Extent {
  readonly withFigures: boolean;
  /** A first look by one route; see `MeasureRequest`. */
  readonly routeAOnly?: boolean;
}

/** One claim through the workshop: stopped by what its inputs show, or measured. */
export const measureClaim = (claim: Claim, sheet: ClaimSheet, inputs: Inputs, extent: Extent, watch: Watch): Measurement =>
  measureFrom(claim, { resolved: resolveInputs(claim, sheet, inputs), found: inputFindings(claim, sheet, inputs) }, extent, watch);

/** What a claim is measured from, and what was found in it. */
export interface Resolved {
  readonly resolved: QuantityInputs | null;
  readonly found: readonly Finding[];
}

/** The same from inputs that need not be those of the files. */
export function measureFrom(claim: Claim, { resolved, found }: Resolved, extent: Extent, watch: Watch): Measurement {
  const points = (claim.over?.values ?? [null]).map((value) => (claim.over && value !== null ? { [claim.over.setting]: value } : {}));
  const stopped = found.some((finding) => finding.level === 'stops-lodging');
  if (stopped || resolved === null) return notComputable([...found], points);
  const measurement = measureOrStop(claim, resolved, extent, watch, points);
  return { ...measurement, findings: distinct([...found, ...measurement.findings]) };
}

export function inputFindings(claim: Claim, sheet: ClaimSheet, inputs: Inputs): Finding[] {
  const names = waveformNames(claim.of);
  const ofWaveforms = names.flatMap((name) => inputs.waveforms.get(name)?.findings ?? []);
  const ofNoise = claim.noise === null ? [] : (inputs.noise.get(claim.noise)?.findings ?? []);
  return [...ofWaveforms, ...ofNoise, ...claimFindings(claim), ...duplicateFindings(claim, sheet, inputs.files)];
}

/** What the claim names, as the engine takes it; null where something of it could not be read. */
export function resolveInputs(claim: Claim, sheet: ClaimSheet, inputs: Inputs): QuantityInputs | null {
  const found = (name: string): Waveform | null => inputs.waveforms.get(name)?.input ?? null;
  const noise = claim.noise === null ? null : (inputs.noise.get(claim.noise)?.input ?? null);
  const names = waveformNames(claim.of);
  if (names.some((name) => found(name) === null) || (claim.noise !== null && noise === null)) return null;
  const read = (list: readonly string[]): Waveform[] => list.flatMap((name) => found(name) ?? []);
  const of = inputRoles(Object.fromEntries(Object.entries(claim.of).map(([role, value]) => [role, read([value].flat())])));
  const relatives = new Map(names.map((name) => [name, read(relativesOf(name, sheet))] as const).filter(([, list]) => list.length > 0));
  return { of, noise, ...(relatives.size > 0 ? { relatives } : {}) };
}

/** Other runs of the simulation that the waveform belongs to, in the order of the sheet. */
function relativesOf(name: string, sheet: ClaimSheet): string[] {
  const series = sheet.waveforms.get(name)?.run.series;
  return series === undefined ? [] : [...sheet.waveforms.values()].filter((w) => w.run.series === series && w.name !== name).map((w) => w.name);
}

/** A point that stops must not take the others of its sweep with it. */
function measureOrStop(claim: Claim, inputs: QuantityInputs, extent: Extent, watch: Watch, points: readonly Place[]): Measurement {
  const claimed = claim.claimed.map((entry) => (entry.kind === 'value' ? entry.value : null));
  const request: MeasureRequest = { claimId: claim.id, inputs, settings: claim.settings, over: claim.over, claimed, ...extent };
  const whole = completed(claim, request, watch);
  if (claim.over === null || !isStopped(whole)) return withSweep(whole, claim, request);
  const quiet: Watch = { onProgress: () => undefined, cancelled: watch.cancelled };
  const stopped = stoppedPoints(request, (part) => completed(claim, part, quiet));
  if (stopped === null) return withSweep(whole, claim, request);
  const rest = completed(claim, onlyPoints(request, points.flatMap((_, i) => (stopped.has(i) ? [] : [i]))), watch);
  return withSweep(isStopped(rest) ? whole : withStoppedPoints(rest, points, stopped), claim, request);
}

/** A defect of one quantity must not take the other claims with it: it fails closed and says so. */
function completed(claim: Claim, request: MeasureRequest, watch: Watch): Measurement {
  const { over } = request;
  const points = over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value }));
  try {
    const measurement = claim.quantity.measure(request, watch);
    if (measurement.points.length === points.length) return completeMeasurement(claim.quantity, request, measurement, watch);
    return notComputable([defect(claim, `it gave ${measurement.points.length} values for ${points.length} points`)], points);
  } catch (thrown) {
    if (thrown instanceof Cancelled) throw thrown;
    return notComputable([defect(claim, thrown instanceof Error ? thrown.message : String(thrown))], points);
  }
}

/** All points at once, behind what shows the one furthest off. */
const withSweep = (measurement: Measurement, { quantity }: Claim, request: MeasureRequest): Measurement =>
  request.withFigures ? { ...measurement, figures: [...measurement.figures, ...sweepFigure(quantity, request, measurement.points)] } : measurement;

const defect = (claim: Claim, reason: string): Finding => ({
  code: 'engine/defect', level: 'stops-lodging', where: claim.id,
  text: `The computation of ${claim.quantity.id} stopped on a condition it does not foresee: ${reason.slice(0, 300)}.`,
  fix: 'This is a fault of the program, not of the claim; please report it with the sheet.',
});

export const distinct = (findings: readonly Finding[]): Finding[] => [...new Map(findings.map((finding) => [JSON.stringify(finding), finding])).values()];
