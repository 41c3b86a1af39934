import type { Claim } from '@/lib/claims/claim';
import type { UsedSetting } from '@/lib/engine/contract/measurement';
import type { NoiseCurve } from '@/lib/engine/contract/noise-curve';
import type { SettingName } from '@/lib/engine/contract/settings';
import type { Waveform } from '@/lib/engine/contract/waveform';
import type { Place } from '@/lib/kernel/place';

/** Words that came with the sheet: its statement, comments in the heads of files. */
export interface Written {
  /** The file, or the statement. */
  readonly where: string;
  readonly inFile: boolean;
  readonly text: string;
  /** It says whose it is beside (V29): no more of it is quoted than the words that tell. */
  readonly saysWhose?: boolean;
}

/** The noise of the claim as declared. */
export interface NoiseFacts {
  readonly curve: NoiseCurve;
  /** Null for a built-in curve. */
  readonly column: 'asd' | 'psd' | 'characteristic' | null;
}

/** What the samples of a file themselves say against its declaration. */
export interface Shown {
  readonly convention: string;
  /** The option that the data speak for, where one is named; null for any other than the declared. */
  readonly option: string | null;
  readonly reason: string;
}

/** A claim of the same sheet and quantity whose number may have been carried on to another's. */
export interface SiblingClaim {
  readonly claimId: string;
  readonly fieldGauss: number | null;
}

/** Everything that decides how one claim could be read otherwise. */
export interface FlipContext {
  readonly claim: Claim;
  /** Settings in force, by name. */
  readonly used: ReadonlyMap<string, UsedSetting>;
  readonly points: readonly { readonly at: Place; readonly value: number | null }[];
  readonly waveforms: readonly Waveform[];
  readonly noise: NoiseFacts | null;
  /** Published curves with their range. */
  readonly curves: readonly { readonly id: string; readonly fLowHz: number; readonly fHighHz: number }[];
  readonly texts: readonly Written[];
  readonly shown: readonly Shown[];
  readonly siblings: readonly SiblingClaim[];
  /** Redshift at a luminosity distance, for the cosmology in force. */
  readonly redshiftAt: (distanceMpc: number) => number;
}

export const isSwept = ({ claim }: FlipContext, name: SettingName): boolean => claim.over?.setting === name;

/** May this quantity be asked with that setting? */
export const takes = ({ claim }: FlipContext, name: SettingName): boolean => claim.quantity.settings.includes(name);

/** The one number in force for all points; null where it is swept, hangs on the point, or is no number. */
export function numberInForce(context: FlipContext, name: SettingName): number | null {
  if (isSwept(context, name)) return null;
  const value = context.used.get(name)?.value ?? context.claim.settings[name];
  return typeof value === 'number' && Number.isFinite(value) ? value : null;
}

export const inForce = ({ claim, used }: FlipContext, name: SettingName): unknown => used.get(name)?.value ?? claim.settings[name];

/** Nobody declared it, or nobody could: reading it otherwise contradicts no one. */
export const isAssumed = ({ claim, used }: FlipContext, name: SettingName): boolean =>
  claim.over?.setting !== name && claim.settings[name] === undefined && used.get(name)?.standing !== 'declared';

/** The value of a setting at each point, swept or not; null where it is no number. */
export const atPoints = (context: FlipContext, name: SettingName): (number | null)[] =>
  context.points.map(({ at }) => {
    const swept = at[name];
    return typeof swept === 'number' ? swept : numberInForce(context, name);
  });

/** The redshift of the source as far as the claim tells it. */
export function redshiftOf(context: FlipContext): number | null {
  const declared = numberInForce(context, 'redshift') ?? context.claim.settings.redshift ?? null;
  if (declared !== null) return declared;
  const distance = numberInForce(context, 'distanceMpc') ?? context.waveforms[0]?.ownDistanceMpc ?? null;
  return distance === null ? null : context.redshiftAt(distance);
}
