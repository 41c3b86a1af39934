import { pathProblem } from '@/lib/claims/file-path';
import { describe, pointer } from '@/lib/claims/pointer';
import { parseSheetText } from '@/lib/claims/sheet-text';
import { FileRefused, unreadable, type OpenFile } from '@/lib/formats/open-file';
import type { Problem } from '@/lib/kernel/problem';

interface NamedFile {
  readonly file: string;
  readonly where: string;
}

const entriesOf = (value: unknown): [string, unknown][] => (typeof value === 'object' && value !== null && !Array.isArray(value) ? Object.entries(value) : []);

/** Every file that a sheet names, read from its JSON as it stands: the sheet need not be sound. */
function namedFiles(sheetJson: unknown): NamedFile[] {
  const text = sheetJson instanceof Uint8Array ? parseSheetText(sheetJson) : null;
  const sheet = text === null ? sheetJson : text.ok ? text.value : null;
  const named = entriesOf(sheet).filter(([part]) => part === 'waveforms' || part === 'noise').flatMap(([part, all]) =>
    entriesOf(all).flatMap(([name, declaration]) =>
      entriesOf(declaration).flatMap(([word, value]): [unknown, string][] =>
        word === 'file' ? [[value, pointer(part, name, word)]] : word === 'files' ? entriesOf(value).map(([mode, file]): [unknown, string] => [file, pointer(part, name, word, mode)]) : [])));
  return named.flatMap(([file, where]) => (typeof file === 'string' && pathProblem(file, where) === null ? [{ file, where }] : []));
}

/** No more than its first bytes are asked for. */
async function isMissing(open: OpenFile, file: string): Promise<boolean> {
  const bytes = open(file)[Symbol.asyncIterator]();
  try {
    await bytes.next();
    return false;
  } catch (thrown) {
    return unreadable(file, thrown).code === 'formats/file-missing' || (thrown instanceof FileRefused && thrown.saw.startsWith('no file of this name'));
  } finally {
    await bytes.return?.();
  }
}

const mostLooked = 2000;

/** The files that are not there, by their places in a sheet that is refused already: all of its problems at once. */
export async function missingFiles(sheetJson: unknown, open: OpenFile): Promise<Problem[]> {
  const problems: Problem[] = [];
  for (const { file, where } of namedFiles(sheetJson).slice(0, mostLooked))
    if (await isMissing(open, file)) problems.push({ code: 'formats/file-missing', where, saw: `no file ${describe(file)}`, expected: 'the file beside the claim sheet', hint: 'Add the file, or correct its name in the sheet.' });
  return problems;
}

/** Problems of files with missing ones told by their places in the sheet. */
export async function placed(problems: readonly Problem[], sheetJson: unknown, open: OpenFile): Promise<Problem[]> {
  const others = problems.filter(({ code }) => code !== 'formats/file-missing');
  return others.length === problems.length ? others : [...others, ...(await missingFiles(sheetJson, open))];
}
