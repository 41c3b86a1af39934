import type { Problem } from '@/lib/kernel/problem';
import { err, type Result, ok } from '@/lib/kernel/result';
import { quote } from '../text/diagnose-line';
import type { ArraySource } from '../arrays/array-source';
import { attributesOf, listedModes } from './attributes';
import { factsOf, readableDataset, readColumns, type Readable } from './dataset';
import { faultOf } from './hdf5-faults';
import type { OneFile } from './one-file';
import { parseSelection } from './selection';

/** The file's datasets by path. Whatever the library throws becomes a problem of that dataset. */
export function hdf5Source(file: string, one: OneFile): ArraySource {
  const whereOf = (path: string): string => `${file}:${path}`;
  const guarded = async <T>(path: string, read: () => Result<T, Problem[]>): Promise<Result<T, Problem[]>> => {
    const before = one.reachedFor.length;
    try {
      return read();
    } catch (thrown) {
      return err([faultOf(thrown, whereOf(path), one.reachedFor.slice(before))]);
    }
  };
  const open = (text: string): Result<Readable, Problem[]> => {
    const selection = parseSelection(text);
    const missing = missingDataset(one, file, selection.path);
    return missing ? err([missing]) : readableDataset(one, whereOf(text), selection);
  };
  return {
    file,
    facts: (path) => guarded(path, () => {
      const dataset = open(path);
      return dataset.ok ? ok(factsOf(dataset.value)) : dataset;
    }),
    read: (path, reading) => guarded(path, () => {
      const dataset = open(path);
      return dataset.ok ? readColumns(one, dataset.value, reading) : dataset;
    }),
    listedModes: async (path) => {
      const listed = await guarded(path, () => ok(listedModes(attributesOf(one, parseSelection(path).path))));
      return listed.ok ? listed.value : null;
    },
  };
}

const mostNames = 10;

/** Goes down the path a step at a time, so that the message can say where it ends. */
function missingDataset({ h5, id }: OneFile, file: string, path: string): Problem | null {
  const steps = path.split('/').filter((step) => step !== '');
  let above = '/';
  for (const [i, step] of steps.entries()) {
    const names = h5.get_names(id, above, false);
    if (!names.includes(step)) return { code: 'formats/no-dataset', where: file, saw: `no ${quote(step)} in ${quote(above)}`, expected: names.length === 0 ? 'a group with something in it' : `one of ${names.slice(0, mostNames).map(quote).join(', ')}${names.length > mostNames ? `, … (${names.length} in all)` : ''}`, hint: 'Correct the path under "datasets" in the sheet.' };
    const here = `${above === '/' ? '' : above}/${step}`;
    const type = h5.get_type(id, here);
    if (type === h5.H5G_UDLINK) return faultOf(null, `${file}:${path}`, [here]);
    const last = i === steps.length - 1;
    if (type !== (last ? h5.H5G_DATASET : h5.H5G_GROUP)) return { code: 'formats/no-dataset', where: `${file}:${here}`, saw: type === h5.H5G_GROUP ? 'a group' : type === h5.H5G_DATASET ? 'a dataset' : 'a link that leads nowhere, or something that is neither group nor dataset', expected: last ? 'a dataset' : 'a group' };
    above = here;
  }
  return steps.length > 0 ? null : { code: 'formats/no-dataset', where: file, saw: 'no path', expected: 'the path of a dataset' };
}
