/**
 * Something a person must mend: what was seen, where, what was expected, what to do next.
 * `where` is a JSON Pointer for sheets, `file:line` for data.
 */
export interface Problem {
  /** Room and cause, e.g. `formats/time-not-monotone`. */
  readonly code: string;
  readonly where: string;
  readonly saw: string;
  readonly expected: string;
  readonly hint?: string;
}

export const formatProblem = (p: Problem): string =>
  `${p.where === '' ? '' : `${p.where}: `}saw ${p.saw}; expected ${p.expected}.${p.hint ? ` ${p.hint}` : ''}`;
