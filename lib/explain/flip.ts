import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { ConventionGroup, ConventionId, ConventionKind } from './conventions/convention';

/** What headers and statement say of the other reading. */
export type Evidence = 'supports' | 'contradicts' | 'none';

/** Another meaning of a file, put in before the engine sees it. The pipeline knows how to do each. */
export type InputEdit =
  /** The curve's column read as its square root, or as its square. */
  | { readonly edit: 'noise-power'; readonly power: 0.5 | 2 }
  /** The curve's power multiplied or divided by the frequency: a characteristic strain taken for an amplitude density, or the reverse. */
  | { readonly edit: 'noise-times-frequency'; readonly power: 1 | -1 }
  /** The curve's frequencies were angular: divided by 2π. */
  | { readonly edit: 'noise-angular' }
  /** The curve of the library instead of the attached one, or the reverse. */
  | { readonly edit: 'noise-curve'; readonly curve: string }
  /** Sense of rotation: every mode conjugated, of the roles named. */
  | { readonly edit: 'conjugate'; readonly roles: readonly string[] }
  /** m read as −m, without the sign (−1)^l that belongs to it. */
  | { readonly edit: 'relabel-m' }
  /** Modes of negative m multiplied by (−1)^l. */
  | { readonly edit: 'mirror-sign' }
  /** Modes of negative m left out. */
  | { readonly edit: 'drop-negative-m' }
  /** The series taken for another variable of the radiation. */
  | { readonly edit: 'variable'; readonly variable: 'strain' | 'news' | 'psi4' }
  /** A stretch of the files' own time set to zero; nobody's reading, asked for by hand. */
  | { readonly edit: 'mask'; readonly from: number; readonly to: number };

/** How the number under the other reading comes to be. */
export type FlipChange =
  /** Value under the other reading = value × factor (one for all points, or one a point). */
  | { readonly kind: 'factor'; readonly factor: number | readonly number[] }
  | {
      readonly kind: 'rerun';
      readonly settings: Readonly<Partial<DeclaredSettings>>;
      readonly inputs?: readonly InputEdit[];
      /** Multiplies what is in force, declared or swept. */
      readonly scaled?: { readonly setting: 'totalMassMsun' | 'distanceMpc' | 'fieldGauss'; readonly by: number };
      /** Further settings, one set a point of the claim, where they hang on the point. */
      readonly perPoint?: readonly Readonly<Partial<DeclaredSettings>>[];
    };

/** One convention of one claim read otherwise. */
export interface Flip {
  /** Stable within a sheet: convention and option, e.g. `C04:fLowHz=30`. Claims of a sheet that share an id are judged together. */
  readonly id: string;
  readonly convention: ConventionId;
  /** The other option in words, to stand after "if": `the lower cut-off is 30 Hz instead of 20 Hz`. */
  readonly clause: string;
  readonly kind: ConventionKind;
  readonly group: ConventionGroup;
  /** π of the convention. */
  readonly prior: number;
  /** ●●●: met in most comparisons. */
  readonly common: boolean;
  /** The author declared nothing here: reading it otherwise contradicts nobody. */
  readonly assumed: boolean;
  readonly evidence: Evidence;
  /** Where the evidence stands, in words; null without any. */
  readonly evidenceFrom: string | null;
  /** It stands in a file itself, in its head or its samples: that a statement mentions a word excuses no chance. */
  readonly inFile: boolean;
  readonly change: FlipChange;
  /** What a sheet would have to say for it, as far as its settings can; empty where none does. */
  readonly declares: Readonly<Partial<DeclaredSettings>>;
}
