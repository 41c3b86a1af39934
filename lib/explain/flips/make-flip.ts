import type { DeclaredSettings, SettingName } from '@/lib/engine/contract/settings';
import { conventionById } from '../conventions/conventions';
import { priorWeight, type ConventionId, type ConventionKind } from '../conventions/convention';
import type { Flip, FlipChange } from '../flip';
import { evidenceIn, type Found, type Telling } from './evidence';
import { isAssumed, type FlipContext } from './flip-context';

/** One convention of a claim, with the ways in which it may be read otherwise. */
export type FlipsOfConvention = (context: FlipContext) => readonly Flip[];

export interface FlipDraft {
  readonly convention: ConventionId;
  /** Short and stable; the same reading of another claim has the same. */
  readonly option: string;
  readonly clause: string;
  readonly change: FlipChange;
  /** The setting that says it: where nobody declared it, it is assumed. */
  readonly setting?: SettingName;
  /** Where no setting says it. */
  readonly assumed?: boolean;
  readonly exchange?: boolean;
  readonly telling?: Telling;
  /** Where it is not what the change itself sets. */
  readonly declares?: DeclaredSettings;
}

const kindOf = ({ exchange, change }: FlipDraft): ConventionKind => (exchange ? 'exchange' : change.kind);

export function makeFlip(context: FlipContext, draft: FlipDraft): Flip {
  const { convention: id, option, clause, change, setting, assumed, telling = {} } = draft;
  const convention = conventionById(id);
  return {
    id: `${id}:${option}`,
    convention: id,
    clause,
    kind: kindOf(draft),
    group: convention.group,
    prior: priorWeight[convention.commonness],
    common: convention.commonness === 'most',
    assumed: assumed ?? (setting === undefined ? false : isAssumed(context, setting)),
    ...(evidenceOfData(context, draft) ?? evidenceIn(context.texts, telling)),
    change,
    declares: draft.declares ?? declaredBy(context, change),
  };
}

/** What the samples show weighs before what somebody wrote. */
function evidenceOfData({ shown }: FlipContext, { convention, option }: FlipDraft): Found | null {
  const found = shown.find((one) => one.convention === convention && (one.option === null || one.option === option));
  return found === undefined ? null : { evidence: 'supports', evidenceFrom: found.reason, inFile: true };
}

/** A mass of a sweep is no setting of the claim: nothing can be declared for it in one word. */
function declaredBy({ claim }: FlipContext, change: FlipChange): DeclaredSettings {
  if (change.kind === 'factor') return {};
  const { scaled } = change;
  const now = scaled === undefined ? undefined : claim.settings[scaled.setting];
  return { ...change.settings, ...(scaled === undefined || now === undefined ? {} : { [scaled.setting]: now * scaled.by }) };
}

/** The same for several, passing over what is not there. */
export const makeFlips = (context: FlipContext, drafts: readonly (FlipDraft | null)[]): Flip[] => drafts.flatMap((draft) => (draft === null ? [] : [makeFlip(context, draft)]));

/**
 * What a factor k of loudness does to the claim's number: an SNR and a distance in the detector's
 * frame take it as it stands, a distance whose redshift moves the mass has to be found again with
 * the threshold divided by it. Null where a factor common to everything cancels.
 */
export function loudnessChange(context: FlipContext, k: number): FlipChange | null {
  const { quantity, settings } = context.claim;
  if (quantity.id === 'snr' || quantity.id === 'hybrid-snr') return { kind: 'factor', factor: k };
  if (quantity.id !== 'horizon-distance' && quantity.id !== 'horizon-redshift') return null;
  const frame = context.used.get('massFrame')?.value ?? settings.massFrame;
  if (quantity.id === 'horizon-distance' && frame === 'detector') return { kind: 'factor', factor: k };
  const threshold = context.used.get('threshold')?.value;
  return typeof threshold === 'number' && context.claim.over?.setting !== 'threshold' ? { kind: 'rerun', settings: { threshold: threshold / k } } : null;
}
