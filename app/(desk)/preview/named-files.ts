import type { NamedFile } from './preview-message';

const hidden = (name: string): boolean => name.split('/').some((part) => part.startsWith('.') || part === '__MACOSX');

/** A file by its path below the folder that was chosen: the name by which a sheet calls it. */
function nameBelow(path: string): string {
  return path.includes('/') ? path.slice(path.indexOf('/') + 1) : path;
}

export const nameFiles = (files: Iterable<File> | null): readonly NamedFile[] =>
  [...(files ?? [])].map((file) => ({ name: nameBelow(file.webkitRelativePath || file.name), file })).filter(({ name }) => !hidden(name));

/** Files that were dropped, a folder's by their path below it. The entries have to be taken before the event is over. */
export async function droppedFiles(data: DataTransfer): Promise<readonly NamedFile[]> {
  const entries = [...data.items].flatMap((item) => (item.kind === 'file' ? (item.webkitGetAsEntry() ?? []) : []));
  if (entries.length === 0) return nameFiles(data.files);
  const found = await Promise.all(entries.map((entry) => filesOf(entry, '')));
  // One folder alone stands for what is in it; several things beside each other keep their names.
  const all = found.flat();
  const alone = entries.length === 1 && entries[0]?.isDirectory;
  return all.map(({ name, file }) => ({ name: alone ? nameBelow(name) : name, file })).filter(({ name }) => !hidden(name));
}

async function filesOf(entry: FileSystemEntry, above: string): Promise<readonly NamedFile[]> {
  const name = `${above}${entry.name}`;
  if (entry.isFile) return [{ name, file: await new Promise<File>((resolve, reject) => (entry as FileSystemFileEntry).file(resolve, reject)) }];
  const reader = (entry as FileSystemDirectoryEntry).createReader();
  const inside: FileSystemEntry[] = [];
  // The browser gives a hundred at a time, and nothing at the end.
  for (;;) {
    const some = await new Promise<FileSystemEntry[]>((resolve, reject) => reader.readEntries(resolve, reject));
    if (some.length === 0) break;
    inside.push(...some);
  }
  return (await Promise.all(inside.map((one) => filesOf(one, `${name}/`)))).flat();
}

const isArchive = (name: string): boolean => /\.zip$/i.test(name);

/** A folder with its `claim.json`, or one archive; else the sentence that says what is missing. */
export function folderFault(files: readonly NamedFile[]): string | null {
  if (files.length === 0) return 'No file was found in what was given.';
  if (soleArchive(files) || files.some(({ name }) => name === 'claim.json')) return null;
  return 'The folder holds no claim.json. Choose the folder it lies in, or begin a new submission and add the files there.';
}

export const soleArchive = (files: readonly NamedFile[]): NamedFile | null => (files.length === 1 && files[0] && isArchive(files[0].name) ? files[0] : null);
