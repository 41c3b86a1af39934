import { formatProblem } from '@/lib/kernel/problem';
import { Listing, structureLimits, type ArrayStructure, type StructureEntry } from '../arrays/structure';
import { attributesOf } from './attributes';
import { readableDataset } from './dataset';
import { faultOf } from './hdf5-faults';
import type { OneFile } from './one-file';
import { typeWords } from './stored-type';

/** Groups and datasets in the file's own order. A group met twice is listed once, so that a circle ends. */
export function hdf5Structure(one: OneFile): ArrayStructure {
  const listing = new Listing();
  visit({ one, listing, seen: new Set() }, '/', 0);
  return { format: 'hdf5', entries: listing.entries, cut: listing.cut };
}

interface Walk {
  readonly one: OneFile;
  readonly listing: Listing;
  readonly seen: Set<string>;
}

function visit(walk: Walk, group: string, depth: number): void {
  const { h5, id } = walk.one;
  const identity = String(h5.create_object_reference(id, group));
  if (walk.seen.has(identity)) return;
  walk.seen.add(identity);
  for (const name of h5.get_names(id, group, false)) {
    if (walk.listing.full || depth >= structureLimits.depth) {
      walk.listing.cut = true;
      return;
    }
    const path = `${group === '/' ? '' : group}/${name}`;
    if (!walk.listing.takes(path)) continue;
    const isGroup = list(walk, path);
    if (isGroup) visit(walk, path, depth + 1);
  }
}

function list(walk: Walk, path: string): boolean {
  const { one, listing } = walk;
  const { h5, id } = one;
  const before = one.reachedFor.length;
  const nothing = { shape: null, complex: false, type: '', attributes: [], refusal: null };
  try {
    const type = h5.get_type(id, path);
    if (type === h5.H5G_GROUP) {
      listing.add({ ...nothing, path, kind: 'group', attributes: shownAttributes(one, path) });
      return true;
    }
    if (type === h5.H5G_DATASET) listing.add(datasetEntry(one, path));
    if (type === h5.H5G_UDLINK) throw new Error('a link to another file');
  } catch (thrown) {
    const outside = one.reachedFor.length > before || isExternal(one, path);
    listing.add({ ...nothing, path, kind: 'dataset', refusal: formatProblem(faultOf(thrown, '', outside ? [path] : [])) });
  }
  return false;
}

function isExternal({ h5, id }: OneFile, path: string): boolean {
  try {
    return Boolean(h5.get_external_link(id, path).filename);
  } catch {
    return false;
  }
}

function datasetEntry(one: OneFile, path: string): StructureEntry {
  const meta = one.h5.get_dataset_metadata(one.id, path);
  const readable = readableDataset(one, '', { path, indices: null, field: null });
  const records = !readable.ok && meta.compound_type !== undefined;
  return {
    path, kind: 'dataset', shape: meta.shape, type: typeWords(meta), attributes: shownAttributes(one, path),
    complex: readable.ok && readable.value.type.secondAt !== null,
    refusal: readable.ok || records ? null : readable.error.map(formatProblem).join(' '),
  };
}

const shownAttributes = (one: OneFile, path: string): StructureEntry['attributes'] =>
  attributesOf(one, path).map(({ name, shape, values }) => ({
    name: name.slice(0, structureLimits.valueLength),
    value: values === null ? `not shown${shape && shape.length > 0 ? ` (${shape.join('×')})` : ''}` : values.slice(0, 32).join(', ').slice(0, structureLimits.valueLength) + (values.length > 32 ? ', …' : ''),
  }));
