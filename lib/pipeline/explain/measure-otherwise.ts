import type { Claim, ClaimSheet } from '@/lib/claims/claim';
import type { Measurement } from '@/lib/engine/contract/measurement';
import type { QuantityInputs, Watch } from '@/lib/engine/contract/quantity';
import { sweepFigure } from '@/lib/engine/quantities/sweep-figure';
import type { Flip } from '@/lib/explain/flip';
import { flipsOf } from '@/lib/explain/flips/flips-of';
import type { ReadOtherwise } from '@/lib/explain/read-otherwise';
import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import { inputFindings, measureClaim, measureFrom, resolveInputs, type Extent } from '../measure-claim';
import type { Inputs } from '../read-inputs';
import { EditedInputs } from './edit-inputs';
import { reaches } from './mask';
import type { Rerun } from './node-values';
import { joined, settingsUnder, sweepOf } from './predict';
import { atPlaces, oneAfterAnother, timesFactors } from './reread-measurement';
import { contextOf } from './subject';

const problem = (where: string, saw: string, expected: string, hint: string): Result<never, Problem[]> => err([{ code: 'pipeline/cannot-read-otherwise', where, saw, expected, hint }]);

/**
 * One claim under other readings, by both routes and with its error bar and figures: inputs edited, settings changed, the number
 * multiplied, as the search does by route A.
 * Shape:  as of the claim itself, its points at the places that the author stated.
 * Error:  U of the rerun, times the factor.
 * Fails:  a problem where a reading does not apply or leaves nothing to measure; throws Cancelled when told to stop.
 */
export function measureOtherwise(claim: Claim, sheet: ClaimSheet, inputs: Inputs, otherwise: ReadOtherwise, extent: Extent, watch: Watch): Result<Measurement, Problem[]> {
  const resolved = resolveInputs(claim, sheet, inputs);
  if (resolved === null) return ok(measureClaim(claim, sheet, inputs, extent, watch));
  const flips = otherwise.readings.length === 0 ? ok([]) : chosen(claim, sheet, inputs, resolved, otherwise, watch);
  if (!flips.ok) return flips;
  const edited = editedBy(flips.value, resolved, otherwise);
  if (!edited.ok) return edited;
  const { change, to } = edited.value;
  const measured = remeasured(claim, { sheet, inputs, change, to }, extent, watch);
  const factors = flips.value.flatMap((flip) => (flip.change.kind === 'factor' ? [flip.change.factor] : []));
  return ok(withSweep(timesFactors(measured, factors), claim, extent));
}

/** All points at the places of the author; curves of one place are of the number before its factor. */
function withSweep(measurement: Measurement, { id, quantity, settings, over, claimed }: Claim, { withFigures }: Extent): Measurement {
  if (!withFigures || over === null) return measurement;
  const request = { claimId: id, inputs: { of: {}, noise: null }, settings, over, claimed: claimed.map((entry) => (entry.kind === 'value' ? entry.value : null)), withFigures };
  return { ...measurement, figures: [...measurement.figures.filter(({ kind }) => kind !== 'sweep'), ...sweepFigure(quantity, request, measurement.points)] };
}

/** The readings by their names, as this claim with its present settings has them. */
function chosen(claim: Claim, sheet: ClaimSheet, inputs: Inputs, resolved: QuantityInputs, { readings }: ReadOtherwise, { cancelled }: Watch): Result<Flip[], Problem[]> {
  const quiet: Watch = { onProgress: () => undefined, cancelled };
  const measurement = measureClaim(claim, sheet, inputs, { withFigures: false, routeAOnly: true }, quiet);
  const flips = flipsOf(contextOf({ claim, inputs: resolved, measurement }, sheet, inputs, []));
  const missing = readings.find((id) => !flips.some((flip) => flip.id === id));
  if (missing !== undefined) return problem('/changes/readings', missing, 'a reading that these settings leave open', 'Take it away, or the setting that says the same or the opposite.');
  return ok(flips.filter(({ id }) => readings.includes(id)));
}

interface Edited {
  readonly change: Rerun;
  readonly to: QuantityInputs;
}

function editedBy(flips: readonly Flip[], resolved: QuantityInputs, { mask }: ReadOtherwise): Result<Edited, Problem[]> {
  const all = Object.values(resolved.of).flat().filter((waveform) => waveform !== undefined);
  if (mask !== undefined && !all.some((waveform) => reaches(waveform, mask))) return problem('/changes/mask', `${mask.from} to ${mask.to}`, 'a stretch of time that holds samples of some record of the claim', 'Times are those of the files, in their own unit.');
  const reruns = flips.flatMap(({ change }) => (change.kind === 'rerun' ? [change] : []));
  const change = joined([{ kind: 'rerun', settings: {} }, ...reruns]);
  const edits = [...(mask === undefined ? [] : [{ edit: 'mask' as const, ...mask }]), ...(change.inputs ?? [])];
  const to = edits.length === 0 ? resolved : new EditedInputs().apply(resolved, edits);
  return to === null ? problem('/changes/readings', 'readings that leave no noise curve', 'readings that leave one', 'Take one of them away.') : ok({ change, to });
}

interface Remeasuring extends Edited {
  readonly sheet: ClaimSheet;
  readonly inputs: Inputs;
}

function remeasured(claim: Claim, { sheet, inputs, change, to }: Remeasuring, extent: Extent, watch: Watch): Measurement {
  const points = claim.claimed.map((_, i) => i);
  const under = (indices: readonly number[], extra: object = {}): Claim => ({
    ...claim,
    settings: { ...settingsUnder(claim, change), ...extra },
    over: sweepOf({ claim, inputs: to, points: indices }, change),
    claimed: indices.flatMap((i) => claim.claimed[i] ?? []),
  });
  const measure = (changed: Claim): Measurement => measureFrom(changed, { resolved: to, found: inputFindings(changed, sheet, inputs) }, extent, watch);
  const measured = change.perPoint === undefined ? measure(under(points)) : oneAfterAnother(points.map((i) => measure(under([i], change.perPoint?.[i]))));
  return change.scaled !== undefined && change.scaled.setting === claim.over?.setting ? atPlaces(measured, claim.over.values, change.scaled) : measured;
}
