import { Group } from 'h5wasm';
import type { ModeIndex } from '@/lib/engine/contract/settings';
import { modeFromName } from '../arrays/mode-name';
import type { OneFile } from './one-file';

const mostValues = 4096;
const mostBytes = 2 ** 18;

export interface AttributeValue {
  readonly name: string;
  readonly shape: readonly number[] | null;
  /** Null when it is too large to look at, or of no kind that has a value to show. */
  readonly values: readonly (number | string)[] | null;
}

/** Names and small values of an object's attributes; a broken one costs only itself. */
export function attributesOf({ h5, id }: OneFile, path: string, most = 64): AttributeValue[] {
  const names = h5.get_attribute_names(id, path).slice(0, most);
  return names.map((name) => {
    try {
      const { shape, total_size, size } = h5.get_attribute_metadata(id, path, name);
      if (shape === null || total_size > mostValues || total_size * size > mostBytes) return { name, shape, values: null };
      const value: unknown = new Group(id, path).get_attribute(name, true);
      const flat = [value].flat(4).filter((v) => typeof v === 'number' || typeof v === 'string' || typeof v === 'boolean');
      return { name, shape, values: flat.length > 0 ? flat.map((v) => (typeof v === 'boolean' ? String(v) : v)) : null };
    } catch {
      return { name, shape: null, values: null };
    }
  });
}

/** Names under which writers keep such lists. A list under another name must say itself that it is one. */
const tellingNames = /^(modes|columns|lm)$/i;
const fullForm = /^\s*(l\d{1,2}_m-?\d{1,2}|\(?\d{1,2}\s*,\s*-?\d{1,2}\)?)\s*$/;

/** Modes listed by one attribute, as L×2 whole numbers or as names such as l2_m2. Null when no or more than one attribute does. */
export function listedModes(attributes: readonly AttributeValue[]): ModeIndex[] | null {
  const lists = attributes.flatMap(({ name, shape, values }) => {
    const modes = shape && values ? modesIn(shape, values, tellingNames.test(name)) : null;
    return modes ? [modes] : [];
  });
  return lists.length === 1 ? lists[0]! : null;
}

function modesIn(shape: readonly number[], values: readonly (number | string)[], told: boolean): ModeIndex[] | null {
  const listed = values.filter((v) => typeof v === 'number');
  if (told && shape.length === 2 && shape[1] === 2 && listed.length === values.length && listed.length === 2 * shape[0]!)
    return Array.from({ length: shape[0]! }, (_, i): ModeIndex => [listed[2 * i]!, listed[2 * i + 1]! + 0]);
  const named = values.map((v) => (typeof v === 'string' && (told || fullForm.test(v)) ? modeFromName(v) : null));
  return shape.length === 1 && named.every((mode) => mode !== null) ? named : null;
}
