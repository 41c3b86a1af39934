/** U+0000 and halves of a pair: a database keeps neither in text, and half a character has no one spelling. */
const UNKEEPABLE = /\0|\p{Surrogate}/u;
const DEEPEST = 64;

export const isKeepable = (text: string): boolean => !UNKEEPABLE.test(text);

export interface UnkeepableText {
  /** JSON Pointer of what holds it. */
  readonly where: string;
  readonly saw: string;
}

/** The first text in a JSON value that cannot be kept, in a name or a value; also what is nested beyond all use. No recursion. */
export function findUnkeepable(value: unknown): UnkeepableText | null {
  const open: { readonly value: unknown; readonly where: string; readonly depth: number }[] = [{ value, where: '', depth: 0 }];
  for (let here = open.pop(); here; here = open.pop()) {
    if (here.depth > DEEPEST) return { where: here.where.slice(0, 200), saw: `more than ${DEEPEST} levels of brackets` };
    if (typeof here.value === 'string' && !isKeepable(here.value)) return { where: here.where, saw: 'text with U+0000 or half of a character in it' };
    if (typeof here.value !== 'object' || here.value === null) continue;
    for (const [name, part] of Object.entries(here.value)) {
      if (!isKeepable(name)) return { where: here.where, saw: 'a name with U+0000 or half of a character in it' };
      open.push({ value: part, where: `${here.where}/${name.replaceAll('~', '~0').replaceAll('/', '~1')}`, depth: here.depth + 1 });
    }
  }
  return null;
}
