import { RULES_SENTENCE } from '@/lib/badges/cautions';
import { quantities } from '@/lib/engine/quantities/registry';
import { settingsTable } from '@/lib/engine/quantities/settings-table';
import type { LetterNumber, LetterPoint } from '@/lib/reviews/letter';
import type { OptionalLetter } from '@/lib/reviews/optional-letters';
import type { Place } from '@/lib/kernel/place';

/** The texts that go out. Plain text, no picture and no link but to the desk: a letter tells its reader nothing about anybody else. */
export interface Letter {
  readonly subject: string;
  readonly body: string;
  /** For letters that one may do without; whoever does gets none. */
  readonly kind?: OptionalLetter;
}

const sign = 'Counterfoil';
/** How to have fewer of these, for letters that one may do without. */
const optional = (kind: OptionalLetter, { subject, body }: Letter): Letter => ({ subject, kind, body: `${body}\nYour account says which letters you get.\n` });
const write = (subject: string, ...paragraphs: readonly string[]): Letter => ({ subject, body: `${paragraphs.filter((p) => p !== '').join('\n\n')}\n\n${sign}\n` });

export const invitationLetter = (facts: { readonly name: string; readonly title: string; readonly editor: string; readonly answerBy: string; readonly url: string }): Letter =>
  write(
    `Will you referee “${facts.title}”?`,
    `Dear ${facts.name},`,
    `${facts.editor} asks you to referee the claims of “${facts.title}”. You see the files, the recomputed numbers and their error budgets once you accept and state that you have no conflict of interest. The authors will not learn who you are.`,
    `Please answer by ${facts.answerBy}:\n${facts.url}`,
  );

const OWED = {
  answer: 'Your answer to the invitation to referee it is still out. If you cannot, one click says so.',
  report: 'Your report is still out. If you need more time, or cannot write it, tell the editor by a note on the same page.',
} as const;

export const reminderLetter = (facts: { readonly name: string; readonly title: string; readonly owes: keyof typeof OWED; readonly url: string }): Letter =>
  optional('reminder', write(`A reminder: “${facts.title}”`, `Dear ${facts.name},`, `This is about “${facts.title}”. ${OWED[facts.owes]}`, facts.url));

export const reportReceivedLetter = (facts: { readonly name: string; readonly title: string; readonly slot: string; readonly round: number; readonly allIn: boolean; readonly url: string }): Letter =>
  optional('report-received', write(
    `A report on “${facts.title}” is in`,
    `Dear ${facts.name},`,
    `Referee ${facts.slot} has handed in the report of round ${facts.round} on “${facts.title}”. ${facts.allIn ? 'All reports of this round are in; the submission waits for your decision.' : 'Other reports of this round are still out.'}`,
    facts.url,
  ));

const OPENINGS = {
  enter: 'The editor has decided to enter it in the register. The server now hashes your files once more and signs the record; it then stands at the address below.',
  'back-with-author': 'The editor sends it back to you. Revise it in the composer and lodge it again; the revision goes through everything anew.',
  'set-aside': 'The editor has set it aside. It will not be entered in the register.',
} as const;

export interface DecisionLetterFacts {
  readonly name: string;
  readonly title: string;
  readonly revision: number;
  readonly kind: keyof typeof OPENINGS;
  readonly editor: string;
  readonly level: number | null;
  readonly covers: readonly string[];
  readonly remarks: readonly string[];
  readonly numbers: readonly LetterNumber[];
  readonly points: readonly LetterPoint[];
  readonly prose: string;
  readonly url: string;
}

/** Enough digits to read beside the claim; the record page has them all. */
const shown = (value: number | null): string => (value === null ? 'not computable' : Number(value.toPrecision(6)).toString());
const unitOf = (name: string): string => (settingsTable as ReadonlyMap<string, { readonly unit: string }>).get(name)?.unit ?? '';
const place = (at: Place): string =>
  Object.entries(at).map(([name, value]) => (unitOf(name) === '' ? ` at ${name} ${value}` : ` at ${value} ${unitOf(name)}`)).join(',');

const numberLine = (n: LetterNumber): string =>
  `  ${n.claim}, ${quantities.get(n.quantity)?.title ?? n.quantity}${place(n.at)}: claimed ${n.claimed}, recomputed ${shown(n.recomputed)}, U = ${shown(n.expandedUncertainty)}${n.unit === '' ? '' : ` (${n.unit})`}: ${n.verdict.replaceAll('-', ' ')}`;
const pointLine = (p: LetterPoint): string => `  ${p.kind.replaceAll('-', ' ')}, on ${p.anchor.claim}${place(p.anchor.at ?? {})}: ${p.text}`;
const section = (head: string, lines: readonly string[]): string => (lines.length === 0 ? '' : [head, ...lines].join('\n'));

export const decisionLetter = (facts: DecisionLetterFacts): Letter =>
  write(
    `The decision on “${facts.title}”`,
    `Dear ${facts.name},`,
    `This is about revision ${facts.revision} of “${facts.title}”. ${OPENINGS[facts.kind]}`,
    facts.level === null ? '' : `Level ${facts.level}, covering ${facts.covers.join(', ')}.${facts.remarks.length > 0 ? ` Remarks: ${facts.remarks.join(', ')}.` : ''}`,
    facts.prose,
    section('Numbers:', facts.numbers.map(numberLine)),
    section('Points taken from the threads:', facts.points.map(pointLine)),
    facts.url,
    RULES_SENTENCE,
    facts.editor,
  );

export const verifyAddressLetter = (facts: { readonly name: string; readonly url: string }): Letter =>
  write('Confirm your address', `Dear ${facts.name},`, `Open this link within a day to confirm that this address is yours:\n${facts.url}`, 'If you did not ask for an account, leave this letter alone; nothing will happen.');

export const confirmAddressLetter = (facts: { readonly name: string; readonly url: string }): Letter =>
  write('Confirm your address', `Dear ${facts.name},`, `Somebody signed in with ORCID and named this address as theirs. Open this link within a day, in the browser in which you are signed in, to confirm it:\n${facts.url}`, 'If that was not you, leave this letter alone; nothing will happen.');

export const addressTakenLetter = (facts: { readonly url: string }): Letter =>
  write('This address has an account already', 'Somebody signed in with ORCID and named this address as theirs. An account here has it already, and the two were not joined.', `If that was you: on the page where you gave the address, choose “I have an account already”. Then sign in with your password and link ORCID on your account page:\n${facts.url}`, 'If that was not you, leave this letter alone; nothing will happen.');

export const resetPasswordLetter = (facts: { readonly name: string; readonly url: string }): Letter =>
  write('Choose a new password', `Dear ${facts.name},`, `Open this link within an hour to choose a new password. All your sessions end when you do.\n${facts.url}`, 'If you did not ask for this, leave this letter alone; your password stays.');
