import type { Claim } from '@/lib/claims/claim';
import type { MeasureRequest, QuantityInputs, Watch } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Workshop } from '@/lib/engine/contract/workshop';
import type { FlipChange } from '@/lib/explain/flip';
import type { Prediction } from '@/lib/explain/search/node';
import type { EditedInputs } from './edit-inputs';
import type { SweptValue } from '@/lib/kernel/place';

type Rerun = Extract<FlipChange, { kind: 'rerun' }>;

/** One claim with its inputs, ready to be asked again at some of its points. */
export interface Asked {
  readonly claim: Claim;
  readonly inputs: QuantityInputs;
  /** Points of the claim that are asked; of many only some. */
  readonly points: readonly number[];
}

export interface Asking {
  readonly workshop: Workshop;
  readonly edits: EditedInputs;
  readonly watch: Watch;
}

/** Several changes of one node as one: later ones win, factors do not belong here. */
export function joined(changes: readonly Rerun[]): Rerun {
  return changes.reduce((all, next) => ({
    kind: 'rerun',
    settings: { ...all.settings, ...next.settings },
    inputs: [...(all.inputs ?? []), ...(next.inputs ?? [])],
    ...(all.scaled ? { scaled: all.scaled } : {}),
    ...(all.perPoint ? { perPoint: all.perPoint } : {}),
    ...(next.scaled ? { scaled: next.scaled } : {}),
    ...(next.perPoint ? { perPoint: next.perPoint } : {}),
  }));
}

/** A word has no size. */
const scaledBy = (value: SweptValue, by: number): SweptValue => (typeof value === 'number' ? value * by : value);

/** The swept values that are asked, scaled where the change scales them. */
export function sweepOf({ claim, points }: Asked, { scaled }: Rerun): MeasureRequest['over'] {
  const { over } = claim;
  if (over === null) return null;
  const by = scaled?.setting === over.setting ? scaled.by : 1;
  return { setting: over.setting, values: points.map((i) => scaledBy(over.values[i] ?? Number.NaN, by)) };
}

export function settingsUnder({ settings }: Claim, { settings: changed, scaled }: Rerun): DeclaredSettings {
  const now = scaled === undefined ? undefined : settings[scaled.setting];
  return { ...settings, ...changed, ...(scaled === undefined || now === undefined ? {} : { [scaled.setting]: now * scaled.by }) };
}

/**
 * The claim's numbers under one change, by route A.
 * Shape:  one value a point asked, null where that point has none.
 * Fails:  a prediction without values says why; throws Cancelled when told to stop.
 */
export function predict(asked: Asked, change: Rerun, asking: Asking): Prediction {
  const inputs = asking.edits.apply(asked.inputs, change.inputs ?? []);
  if (inputs === null) return { because: 'it leaves no noise curve' };
  if (change.perPoint === undefined) return measured(asked.claim, inputs, settingsUnder(asked.claim, change), sweepOf(asked, change), asking);
  const values: (number | null)[] = [];
  for (const [k, index] of asked.points.entries()) {
    const over = sweepOf({ ...asked, points: [index] }, change);
    const one = measured(asked.claim, inputs, { ...settingsUnder(asked.claim, change), ...change.perPoint[index] }, over, asking);
    if ('because' in one && k === 0) return one;
    values.push('because' in one ? null : (one.values[0] ?? null));
  }
  return { values };
}

function measured({ id, quantity }: Claim, inputs: QuantityInputs, settings: DeclaredSettings, over: MeasureRequest['over'], { workshop, watch }: Asking): Prediction {
  const missing = quantity.required(inputs, settings, over?.setting ?? null).filter((name) => settings[name] === undefined && over?.setting !== name);
  if (missing.length > 0) return { because: `it needs ${missing.join(', ')}` };
  const count = over === null ? 1 : over.values.length;
  const request: MeasureRequest = { claimId: id, inputs, settings, over, claimed: Array.from({ length: count }, () => null), withFigures: false, routeAOnly: true, workshop };
  const { points, findings } = quantity.measure(request, watch);
  const values = points.map(({ value }) => (value !== null && Number.isFinite(value) ? value : null));
  const stop = findings.find(({ level }) => level === 'stops-lodging');
  return values.every((value) => value === null) ? { because: stop?.text ?? 'it gives no number' } : { values };
}
