import type { SubmissionView } from './submission-view';

/**
 * The entity tag of a submission begins with revision and version, so that an edit can be held to the
 * draft it was made on while progress of a run, which also changes the tag, stands in no edit's way.
 */
export const tagOf = ({ revision }: Pick<SubmissionView, 'revision'>): string => `r${revision.number}v${revision.version}`;

/** Strong comparison: a weak tag names no version. */
export const namesVersion = (ifMatch: readonly string[], row: { readonly number: number; readonly version: number }): boolean =>
  ifMatch.some((tag) => tag === '*' || tag.startsWith(`"r${row.number}v${row.version}.`));

export const versionMoved = (row: { readonly number: number; readonly version: number }): string =>
  `The draft is revision ${row.number}, version ${row.version} now, which is not the one that If-Match names. Read it again and repeat the edit on it.`;
