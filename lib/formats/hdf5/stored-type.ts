import type { Metadata } from 'h5wasm';
import type { ElementType, NumberBase } from '../arrays/element-type';

/** The classes of stored type, by the numbers that the format gives them. */
const whole = 0;
const float = 1;
const string = 3;
const compound = 6;
const enumeration = 8;
const complexClass = 11;

/** A number or a pair of them; else the words for what is stored instead. */
export function elementTypeOf(meta: Metadata, field: string | null): ElementType | string {
  if (field !== null) return fieldOf(meta, field);
  const base = baseOf(meta);
  // What the library hands over was turned into this order, single numbers and whole records alike.
  if (base) return { base, littleEndian: true, size: meta.size, firstAt: 0, secondAt: null };
  if (meta.type === complexClass && (meta.size === 16 || meta.size === 8)) return { base: meta.size === 16 ? 'f8' : 'f4', littleEndian: true, size: meta.size, firstAt: 0, secondAt: meta.size / 2 };
  return pairOf(meta) ?? typeWords(meta);
}

function baseOf({ type, size, signed }: Metadata): NumberBase | null {
  if (type === float && (size === 2 || size === 4 || size === 8)) return `f${size}`;
  if (type === whole && (size === 1 || size === 2 || size === 4 || size === 8)) return `${signed ? 'i' : 'u'}${size}`;
  return null;
}

const realNames = /^(r|re|real)$/i;
const imaginaryNames = /^(i|im|imag|imaginary)$/i;

/** Complex numbers as records of two like fields, as most writers store them. */
function pairOf(meta: Metadata): ElementType | string | null {
  const [first, second, ...more] = meta.compound_type?.members ?? [];
  if (!first || !second || more.length > 0) return null;
  const [base, other] = [baseOf(first), baseOf(second)];
  if (!base || base !== other || !realNames.test(first.name) || !imaginaryNames.test(second.name)) return null;
  if (first.littleEndian !== second.littleEndian) return `complex numbers whose two parts are stored in unequal orders of bytes (${first.name}, ${second.name})`;
  const littleEndian = orderOf(meta, first);
  return littleEndian === null ? unsure(meta) : { base, littleEndian, size: meta.size, firstAt: first.offset, secondAt: second.offset };
}

function fieldOf(meta: Metadata, field: string): ElementType | string {
  const members = meta.compound_type?.members ?? [];
  const member = members.find(({ name }) => name === field);
  if (!member) return members.length > 0 ? `records without a field of that name (${fieldNames(meta)})` : `${typeWords(meta)} without fields`;
  const base = baseOf(member);
  if (!base) return typeWords(member);
  const littleEndian = orderOf(meta, member);
  return littleEndian === null ? unsure(meta) : { base, littleEndian, size: meta.size, firstAt: member.offset, secondAt: null };
}

type Member = NonNullable<Metadata['compound_type']>['members'][number];

/**
 * The order in which the library hands over one field. It turns a record whose members are all
 * big-endian, as a whole, and leaves every other as it was stored; members of one byte count with
 * the order that their type names. Null when it cannot be told what it does.
 */
function orderOf(meta: Metadata, own: Member): boolean | null {
  if (own.littleEndian) return true;
  const orders = (meta.compound_type?.members ?? []).map(storedOrder);
  if (orders.includes('little')) return false;
  return orders.every((order) => order === 'big' || order === 'none') ? true : null;
}

function storedOrder({ type, littleEndian }: Member): 'little' | 'big' | 'none' | 'unknown' {
  if (type === whole || type === float) return littleEndian ? 'little' : 'big';
  // Text of fixed length has no order; that of any length counts as its bytes do.
  if (type === string) return littleEndian ? 'little' : 'none';
  // A truth value is an enumeration of one little-endian byte. The library cannot turn one that is big-endian.
  return type === enumeration && littleEndian ? 'little' : 'unknown';
}

const unsure = (meta: Metadata): string => `big-endian numbers in records with a part that cannot be turned beside them (${fieldNames(meta)})`;

const longestName = 60;
const fieldNames = (meta: Metadata): string => (meta.compound_type?.members ?? []).slice(0, 8).map(({ name }) => (name.length > longestName ? `${name.slice(0, longestName)}…` : name)).join(', ');

export function typeWords(meta: Metadata): string {
  const base = baseOf(meta);
  if (base) return `${base.startsWith('f') ? 'real' : 'whole'} numbers of ${meta.size} bytes`;
  const pair = pairOf(meta);
  if (typeof pair === 'string') return pair;
  if (meta.type === complexClass || pair) return `complex numbers of ${meta.size} bytes`;
  if (meta.type === float || meta.type === whole) return `numbers of ${meta.size} bytes`;
  if (meta.type === string) return 'text';
  if (meta.type === enumeration) return 'named values';
  if (meta.type === compound) return `records (${fieldNames(meta)})`;
  return 'something that is not numbers';
}
