import type { UsedSetting } from './measurement';

/** How far one setting, put elsewhere alone, moves the number at its worst point. */
export interface Sensitivity {
  readonly setting: string;
  readonly standing: UsedSetting['standing'];
  readonly unit?: string;
  readonly used: unknown;
  readonly tried: unknown;
  /** By route A; null where the claim cannot be computed so, or where it was not tried. */
  readonly value: number | null;
  /** value − the number, in the quantity's unit. */
  readonly change: number | null;
  /** Why there is no value. */
  readonly because?: string;
}
