import { createHash } from 'node:crypto';
import type { RevisionView, SubmissionView } from './submission-view';

type Content = Pick<RevisionView, 'number' | 'version' | 'files' | 'answers'>;
type Version = Pick<RevisionView, 'number' | 'version'>;

const versionOf = ({ number, version }: Version): string => `r${number}v${version}`;

/** Files and answers come and go without a new version; a few letters tell whether they are the same. */
const contentOf = (revision: Content): string => {
  const parts = [revision.files.map(({ name, sha256 }) => [name, sha256]).toSorted(), revision.answers.map(({ code, where, text, answer }) => [code, where, text, answer]).toSorted()];
  return `${versionOf(revision)}.c${createHash('sha256').update(JSON.stringify(parts)).digest('hex').slice(0, 12)}`;
};

/**
 * The entity tag of a submission begins with revision, version and content, so that an act can be held
 * to the draft it was meant for while progress of a run, which also changes the tag, stands in no act's way.
 */
export const tagOf = ({ revision }: Pick<SubmissionView, 'revision'>): string => contentOf(revision);

/** Strong comparison: a weak tag names no version. */
const names = (ifMatch: readonly string[], beginning: string): boolean => ifMatch.some((tag) => tag === '*' || tag.startsWith(`"${beginning}.`));

/** The same text and sheet. */
export const namesVersion = (ifMatch: readonly string[], row: Version): boolean => names(ifMatch, versionOf(row));

/** The same files and answers too: what lodging freezes. */
export const namesContent = (ifMatch: readonly string[], revision: Content): boolean => names(ifMatch, contentOf(revision));

export const versionMoved = (row: Version): string =>
  `The draft is revision ${row.number}, version ${row.version} now, and that, or its files, is not what If-Match names. Read it again and repeat the edit on it.`;
