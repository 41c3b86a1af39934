import type { NoiseDeclaration, WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { ListRole, Quantity, SingleRole } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings, SettingName } from '@/lib/engine/contract/settings';
import type { SweptValue } from '@/lib/kernel/place';
import type { Claimed } from './claimed';

/** Role to the waveform's name in the sheet; a list, or the members of a series, in the order of the sheet. */
export type ClaimRoles = { readonly [role in SingleRole]?: string } & { readonly [role in ListRole]?: readonly string[] };

/** Every waveform that a claim names, once each. */
export const waveformNames = (of: ClaimRoles): string[] => [...new Set(Object.values(of).flat())];

/** One claim whose every word was checked; what remains open is only what the files hold. */
export interface Claim {
  readonly id: string;
  readonly quantity: Quantity;
  readonly of: ClaimRoles;
  readonly noise: string | null;
  readonly settings: DeclaredSettings;
  readonly over: { readonly setting: SettingName; readonly values: readonly SweptValue[] } | null;
  /** One entry a point. */
  readonly claimed: readonly Claimed[];
  /** Declared, or null for the natural one. */
  readonly tolerance: number | null;
}

export interface ClaimSheet {
  readonly title: string;
  readonly statement: string;
  readonly waveforms: ReadonlyMap<string, WaveformDeclaration>;
  readonly noise: ReadonlyMap<string, NoiseDeclaration>;
  readonly claims: readonly Claim[];
}
