import { identityIn, type IdentityMark } from '../hidden-identity';
import { structureLimits } from '../arrays/structure';
import { attributesOf } from './attributes';
import type { OneFile } from './one-file';

const mostMarks = 64;

/** Attributes of the file, its groups and datasets that say whose it is: all of the file is given on, not what was read of it. */
export function identityMarks(one: OneFile): IdentityMark[] {
  const { h5, id } = one;
  const marks: IdentityMark[] = [];
  const seen = new Set<string>();
  let left = structureLimits.entries;
  const visit = (path: string, depth: number): void => {
    try {
      const isGroup = path === '/' || h5.get_type(id, path) === h5.H5G_GROUP;
      if (!isGroup && h5.get_type(id, path) !== h5.H5G_DATASET) return;
      const identity = String(h5.create_object_reference(id, path));
      if (seen.has(identity) || left-- <= 0 || marks.length >= mostMarks) return;
      seen.add(identity);
      marks.push(...marksOf(one, path));
      if (!isGroup || depth >= structureLimits.depth) return;
      for (const name of h5.get_names(id, path, false)) visit(`${path === '/' ? '' : path}/${name}`, depth + 1);
    } catch {
      // What cannot be looked at says nothing here; it is refused where it is read.
    }
  };
  visit('/', 0);
  return marks.slice(0, mostMarks);
}

const marksOf = (one: OneFile, path: string): IdentityMark[] =>
  attributesOf(one, path).flatMap(({ name, values }) => {
    const what = (values ?? []).flatMap((value) => (typeof value === 'string' ? (identityIn(`${name}: ${value}`) ?? []) : []))[0];
    return what === undefined ? [] : [{ path, name, what }];
  });
