import type { Commonness, Convention, ConventionId, ConventionKind } from '@/lib/explain/conventions/convention';

/** What is said of a convention beside a setting. */
export type ConventionNote = Pick<Convention, 'id' | 'title' | 'sentence' | 'effect'>;

/** A setting in use, and the conventions that it belongs to. */
export interface SettingReadings {
  readonly setting: string;
  readonly notes: readonly ConventionNote[];
}

/** Its entry on the page of conventions. */
export const conventionHref = (id: ConventionId): `/methods/conventions#${string}` => `/methods/conventions#${id}`;

export const commonWords: Readonly<Record<Commonness, string>> = { most: 'in most comparisons', regular: 'regularly', rare: 'rarely, and ruinously' };
export const kindWords: Readonly<Record<ConventionKind, string>> = { factor: 'a factor', rerun: 'another run', exchange: 'an exchange of files or labels' };
