import type { RecordDocument } from './record';
import { submissionWord, type SubmissionWord } from './submission-word';

/** The sentences of the badge page, drawn from the signed document alone. */
const MEANING_1 = 'From the attached files and the stated settings this service obtains the claimed number within the stated tolerance by two computational routes';
const MEANING_2 = 'the stated uncertainty covers the error components that can be estimated from the attached data, including resolution';
const MEANING_3 = 'the statement holds over its whole declared domain and does not depend, beyond its uncertainty, on the settings listed as varied';

export const LEVEL_MEANINGS: Readonly<Record<1 | 2 | 3, string>> = {
  1: `${MEANING_1}.`,
  2: `${MEANING_1}, and ${MEANING_2}.`,
  3: `${MEANING_1}, ${MEANING_2}, and ${MEANING_3}.`,
};

export const wordOf = (record: RecordDocument): SubmissionWord => submissionWord(record.claims.map((c) => c.verdict));

const list = (items: readonly string[]): string => (items.length < 2 ? (items[0] ?? '') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`);

/** `The level covers C2, which is 1 of the 3 claims of this record; it does not cover C1 (differs) and C3 (unsettled).` */
export function coversLine(record: RecordDocument): string {
  const covered = record.claims.filter((c) => c.covered).map((c) => c.id);
  const left = record.claims.filter((c) => !c.covered).map((c) => `${c.id} (${c.verdict.replace('-', ' ')})`);
  const total = record.claims.length;
  if (left.length === 0) return `The level covers ${list(covered)}, ${total === 1 ? 'the only claim' : 'all claims'} of this record.`;
  return `The level covers ${list(covered)}, ${covered.length} of the ${total} claims of this record. It does not cover ${list(left)}.`;
}

const HOW: Readonly<Record<1 | 2 | 3, string>> = {
  1: 'from its files',
  2: 'from its files, and its stated uncertainty covers what the data allow',
  3: 'from its files, its stated uncertainty covers what the data allow, and it holds over its declared domain',
};
const HOW_MANY: Readonly<Record<1 | 2 | 3, string>> = {
  1: 'from their files',
  2: 'from their files, and their stated uncertainties cover what the data allow',
  3: 'from their files, their stated uncertainties cover what the data allow, and they hold over their declared domain',
};

export function badgeSentence(record: RecordDocument): string {
  const covered = record.claims.filter((c) => c.covered).length;
  const total = record.claims.length;
  const { level } = record.decision;
  if (total === 1) return `The number in ${record.title} follows ${HOW[level]}.`;
  if (covered === total) return `The ${total} claims in ${record.title} follow ${HOW_MANY[level]}.`;
  return `Of the ${total} claims in ${record.title}, ${covered} ${covered === 1 ? `follows ${HOW[level]}` : `follow ${HOW_MANY[level]}`}.`;
}
