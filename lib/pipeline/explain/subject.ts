import type { Claim, ClaimSheet } from '@/lib/claims/claim';
import { halfLastDigit } from '@/lib/claims/claimed';
import { waveformNames } from '@/lib/claims/claim';
import { atWords, routeBIndices, worstIndex } from '@/lib/engine/budget/chosen-points';
import type { Measurement } from '@/lib/engine/contract/measurement';
import type { QuantityInputs } from '@/lib/engine/contract/quantity';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { builtInCurves } from '@/lib/engine/noise/built-in-curves';
import { houseCosmology, redshiftAt, type Cosmology } from '@/lib/engine/units/cosmology';
import type { Flip } from '@/lib/explain/flip';
import type { FlipContext, NoiseFacts, SiblingClaim, Written } from '@/lib/explain/flips/flip-context';
import { flipsOf } from '@/lib/explain/flips/flips-of';
import type { JudgedClaim, JudgedPoint } from '@/lib/explain/search/node';
import { identityIn } from '@/lib/formats/hidden-identity';
import type { Inputs } from '../read-inputs';
import type { ResultClaim } from '../result';
import type { Asked } from './predict';
import { shownByNoise, shownByWaveform } from './shown';

/** A claim that was measured and weighed, with what it was measured from. */
export interface Weighed {
  readonly claim: Claim;
  readonly inputs: QuantityInputs;
  readonly measurement: Measurement;
  readonly result: ResultClaim;
}

/** One claim as the search takes it. */
export interface Subject {
  readonly asked: Asked;
  readonly context: FlipContext;
  readonly judged: JudgedClaim;
  readonly flips: readonly Flip[];
}

const nearOne = new Set(['match', 'overlap', 'fitting-factor', 'mode-content', 'degeneracy']);

/** Null where there is nothing to explain it with: an inequality, or no number. */
export function subjectOf(weighed: Weighed, sheet: ClaimSheet, inputs: Inputs, siblings: readonly SiblingClaim[]): Subject | null {
  const { claim, result } = weighed;
  const points = judgedPoints(weighed);
  if (points === null) return null;
  const told = contextOf(weighed, sheet, inputs, siblings);
  const context: FlipContext = { ...told, shown: [...told.waveforms.flatMap(shownByWaveform), ...shownByNoise(claim.noise, sheet, inputs)] };
  const judged: JudgedClaim = {
    id: claim.id,
    quantity: claim.quantity.id,
    unit: result.unit,
    law: nearOne.has(claim.quantity.id) ? 'distance-from-one' : 'size',
    scale: claim.quantity.scale,
    wanting: result.verdict === 'differs' || result.verdict === 'unsettled',
    points: points.map(({ point }) => point),
  };
  return { asked: { claim, inputs: weighed.inputs, points: points.map(({ index }) => index) }, context, judged, flips: flipsOf(context) };
}

/** All points up to ten; of more both ends, the one furthest off and some between. */
function judgedPoints({ claim, result }: Weighed): { readonly index: number; readonly point: JudgedPoint }[] | null {
  const claimed = claim.claimed.map((entry) => (entry.kind === 'value' ? entry.value : null));
  const values = result.points.map(({ value }) => value);
  const chosen = routeBIndices(values.length, worstIndex(values, claimed, (value) => claim.quantity.naturalTolerance(value, claim.settings)), atWords(claim.over?.values ?? []));
  const points = chosen.flatMap((index) => {
    const entry = claim.claimed[index];
    const found = result.points[index];
    if (entry?.kind !== 'value' || !found || found.value === null || found.expandedUncertainty === null || found.tolerance === null) return [];
    return [{ index, point: { at: found.at, claimed: entry.value, halfDigit: halfLastDigit(entry), tolerance: found.tolerance, expandedUncertainty: found.expandedUncertainty, value: found.value } }];
  });
  return points.length === chosen.length && points.length > 0 ? points : null;
}

/** What decides how the claim could be read otherwise; what its samples show is looked at only where readings are judged. */
export function contextOf({ claim, inputs: resolved, measurement }: Omit<Weighed, 'result'>, sheet: ClaimSheet, inputs: Inputs, siblings: readonly SiblingClaim[]): FlipContext {
  const used = new Map(measurement.settings.map((setting) => [setting.name, setting]));
  const cosmology = (used.get('cosmology')?.value as Cosmology | undefined) ?? claim.settings.cosmology ?? houseCosmology;
  const waveforms = Object.values(resolved.of).flat().filter((waveform): waveform is Waveform => waveform !== undefined);
  return {
    claim,
    used,
    points: measurement.points.map(({ at, value }) => ({ at, value })),
    waveforms,
    noise: noiseFacts(claim, resolved, sheet),
    curves: builtInCurves.map(({ id, fLowHz, fHighHz }) => ({ id, fLowHz, fHighHz })),
    texts: textsOf(claim, sheet, inputs),
    shown: [],
    siblings: siblings.filter(({ claimId }) => claimId !== claim.id),
    redshiftAt: (distance) => redshiftAt(distance, cosmology),
  };
}

function noiseFacts(claim: Claim, { noise: curve }: QuantityInputs, sheet: ClaimSheet): NoiseFacts | null {
  const declared = claim.noise === null ? undefined : sheet.noise.get(claim.noise);
  if (curve === null || declared === undefined) return null;
  if (declared.kind === 'built-in') return { curve, column: null };
  const column = declared.columns.find(({ role }) => role.kind === 'noise')?.role;
  return { curve, column: column?.kind === 'noise' ? column.meaning : 'asd' };
}

/** What the author wrote, beside the numbers: the statement and the heads of the claim's own files. */
function textsOf(claim: Claim, sheet: ClaimSheet, inputs: Inputs): Written[] {
  const statement = [sheet.title, sheet.statement].filter((text) => text !== '').map((text) => ({ where: 'the statement', inFile: false, text }));
  const ofWaveforms = waveformNames(claim.of).flatMap((name) => inputs.waveforms.get(name)?.writing ?? []);
  const ofNoise = claim.noise === null ? [] : (inputs.noise.get(claim.noise)?.writing ?? []);
  return [...statement, ...[...ofWaveforms, ...ofNoise].map((written) => ({ ...written, inFile: true, saysWhose: identityIn(written.text) !== null }))];
}
