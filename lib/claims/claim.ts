import type { NoiseDeclaration, WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { Quantity } from '@/lib/engine/contract/quantity';
import type { DeclaredSettings, SettingName } from '@/lib/engine/contract/settings';
import type { Claimed } from './claimed';

/** One claim whose every word was checked; what remains open is only what the files hold. */
export interface Claim {
  readonly id: string;
  readonly quantity: Quantity;
  /** Role to the waveform's name in the sheet. */
  readonly of: { readonly a?: string; readonly b?: string };
  readonly noise: string | null;
  readonly settings: DeclaredSettings;
  readonly over: { readonly setting: SettingName; readonly values: readonly number[] } | null;
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
