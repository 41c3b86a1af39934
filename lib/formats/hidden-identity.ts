import type { Finding } from '@/lib/engine/contract/finding';
import { quote } from './text/diagnose-line';
import type { CommentLine } from './text/table';

/** What a line of a file's header gives away, and the word for it. The finding never repeats it. */
const signs: readonly { readonly pattern: RegExp; readonly what: string }[] = [
  { pattern: /(^|[^\w.])(\/home|\/Users|\/u|\/scratch|\/gpfs\/home|\/lustre\/home|\/data\/users)\/[A-Za-z0-9._-]+/, what: 'a path that begins with somebody’s directory' },
  { pattern: /(^|\s)~[a-z][a-z0-9_-]*\//, what: 'a path that begins with somebody’s directory' },
  { pattern: /[A-Za-z]:\\Users\\[^\\\s]+/, what: 'a path that begins with somebody’s directory' },
  { pattern: /[A-Za-z0-9._%+-]+@[A-Za-z0-9-]+(\.[A-Za-z0-9-]+)*\.[A-Za-z]{2,}\b/, what: 'an address of e-mail' },
  { pattern: /\b(user|username|userid|login|uid|logname)\s*[:=]\s*\S+/i, what: 'the name of a user' },
  { pattern: /\b[a-z][a-z0-9_-]*@[a-z][a-z0-9.-]*:/, what: 'a user and a machine' },
  { pattern: /(^|[^\w.])\/mnt\/[A-Za-z0-9._-]+/, what: 'a path of somebody’s machine' },
  { pattern: /\b(authors?|creators?)[ _-](names?|e-?mails?)\s*[:=]\s*\S|\bauthors?\s*[:=]\s*\S/i, what: 'the name of an author' },
  // A program may have made a file and may be named: only what is written as a person's name counts.
  { pattern: /\b(([Cc]reated|[Ww]ritten)[ _-][Bb]y|[Cc]reator)\s*[:=]?\s*(([A-Z]\.\s*)+[A-Z]\p{L}+|[A-Z]\p{Ll}+ [A-Z]\p{Ll}+(?=\s*($|[,;.]|on\b|at\b)))/u, what: 'the name of an author' },
  { pattern: /\bhost([ _-]?name)?\s*[:=]\s*\S/i, what: 'the name of a machine' },
];

export const identityIn = (text: string): string | null => signs.find(({ pattern }) => pattern.test(text))?.what ?? null;

/** An attribute of an array file that gives somebody away, with the path of what it is an attribute of. */
export interface IdentityMark {
  readonly path: string;
  readonly name: string;
  readonly what: string;
}

const mostNamed = 5;
const handedOn = 'The file is given to referees, and with a record to everybody, as it was attached.';
const blanked = 'In the copy that referees download this is blanked; with a record everybody gets the file as it was attached.';
const fix = 'Attach the file without it, or answer that it may stay.';

/** V29 for the attributes of an array file, one finding a file. */
export function identityOfMarks(file: string, marks: readonly IdentityMark[]): Finding[] {
  const [first] = marks;
  if (first === undefined) return [];
  const others = marks.slice(1, mostNamed).map(({ path, name }) => `${quote(name)} of ${quote(path)}`);
  const more = marks.length > mostNamed ? ' and others' : '';
  const also = others.length === 0 ? '' : ` So ${others.length === 1 ? 'does' : 'do'} ${others.join(', ')}${more}.`;
  return [{
    code: 'formats/hidden-identity',
    level: 'needs-answer',
    where: `${file}:${first.path}`,
    text: `The attribute ${quote(first.name)} of ${quote(first.path)} in ${file} contains ${first.what}.${also} ${handedOn}`,
    fix,
  }];
}

/** V29: header lines by which a reader could tell whose file it is, one finding a file. */
export function identityFindings(file: string, comments: readonly CommentLine[]): Finding[] {
  const seen = comments.flatMap(({ line, text }) => {
    const what = identityIn(text);
    return what === null ? [] : [{ line, what }];
  });
  const [first] = seen;
  if (first === undefined) return [];
  const others = seen.slice(1, mostNamed).map(({ line }) => line);
  const more = seen.length > mostNamed ? ' and others' : '';
  const also = others.length === 0 ? '' : ` So ${others.length === 1 ? 'does line' : 'do lines'} ${others.join(', ')}${more}.`;
  return [
    {
      code: 'formats/hidden-identity',
      level: 'needs-answer',
      where: `${file}:${first.line}`,
      text: `Header line ${first.line} of ${file} contains ${first.what}.${also} ${blanked}`,
      fix,
    },
  ];
}
