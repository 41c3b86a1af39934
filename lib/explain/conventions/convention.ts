import type { SettingName } from '@/lib/engine/contract/settings';

/** A number of the catalogue of conventions, `C01` to `C55`. */
export type ConventionId = `C${number}`;

/** Met in most comparisons, regularly, or rarely but ruinously. */
export type Commonness = 'most' | 'regular' | 'rare';

/** How likely an author is to have read the convention otherwise, before anything is computed (domain reference 3.1). */
export const priorWeight: Readonly<Record<Commonness, number>> = { most: 0.2, regular: 0.06, rare: 0.01 };

/** Two changes at once come from different groups: two of one group would mostly undo or repeat each other. */
export const conventionGroups = ['noise', 'band', 'maximisation', 'angle', 'mass', 'variable', 'modes', 'integration', 'units'] as const;
export type ConventionGroup = (typeof conventionGroups)[number];

/**
 * What changing it takes: the same number times a factor, another run of the engine with other
 * settings, or an exchange of what a file or a label means.
 */
export type ConventionKind = 'factor' | 'rerun' | 'exchange';

export interface ConventionOption {
  /** Short and stable, e.g. `two-sided`; part of addresses and of results. */
  readonly id: string;
  readonly label: string;
}

/** One thing two groups can mean differently by the same words. */
export interface Convention {
  readonly id: ConventionId;
  readonly title: string;
  readonly options: readonly ConventionOption[];
  /** What it does to a number, with the size where it was measured. */
  readonly effect: string;
  readonly kinds: readonly ConventionKind[];
  readonly commonness: Commonness;
  readonly group: ConventionGroup;
  /** Ids of the quantities whose number it can move. */
  readonly affects: readonly string[];
  /** Settings of the sheet that say it; empty where no setting does. */
  readonly settings: readonly SettingName[];
  /** How a file or a header shows it; null where nothing in the data can. */
  readonly detect: string | null;
  /** One sentence for people. */
  readonly sentence: string;
}
