import type { SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';

type Json = Readonly<Record<string, unknown>>;

const steps = (where: string): readonly string[] => where.split('/').slice(1).map((part) => part.replaceAll('~1', '/').replaceAll('~0', '~'));

/** What stands at a place of the sheet; undefined where nothing does. */
export const valueAt = (sheet: unknown, where: string): unknown => steps(where).reduce<unknown>((at, step) => (typeof at === 'object' && at !== null ? (at as Json)[step] : undefined), sheet);

const words = (value: unknown): string | null => (value === undefined || value === null ? null : Array.isArray(value) ? value.join(' ') : String(value));
const same = (a: unknown, b: unknown): boolean => JSON.stringify(a ?? null) === JSON.stringify(b ?? null);

/**
 * A guess beside the sheet as it stands in the form now, which may have changed since the files were looked at: confirmed
 * where the sheet says it meanwhile, null where the sheet says a third thing or no longer has the word.
 */
export function guessAsNow(guess: SheetGuess, sheet: unknown): SheetGuess | null {
  const { field, changes, standing, value } = guess;
  if (valueAt(sheet, `/${steps(field).slice(0, 2).map((step) => step.replaceAll('~', '~0').replaceAll('/', '~1')).join('/')}`) === undefined) return null;
  const now = valueAt(sheet, field);
  if (changes !== null && changes.length > 0 && changes.every((change) => same(valueAt(sheet, change.field), change.value))) {
    const said = words(now);
    return { ...guess, standing: 'declared', agrees: true, value: typeof now === 'number' ? now : said };
  }
  const before = standing === 'assumed' ? null : words(value);
  return words(now) === before ? guess : null;
}
