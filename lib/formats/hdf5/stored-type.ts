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
  if (type === float && (size === 4 || size === 8)) return `f${size}`;
  if (type === whole && (size === 1 || size === 2 || size === 4 || size === 8)) return `${signed ? 'i' : 'u'}${size}`;
  return null;
}

const realNames = /^(r|re|real)$/i;
const imaginaryNames = /^(i|im|imag|imaginary)$/i;

/** Complex numbers as records of two like fields, as most writers store them. */
function pairOf(meta: Metadata): ElementType | null {
  const [first, second, ...more] = meta.compound_type?.members ?? [];
  if (!first || !second || more.length > 0) return null;
  const [base, other] = [baseOf(first), baseOf(second)];
  if (!base || base !== other || !realNames.test(first.name) || !imaginaryNames.test(second.name)) return null;
  return { base, littleEndian: orderOf(meta, first.littleEndian), size: meta.size, firstAt: first.offset, secondAt: second.offset };
}

function fieldOf(meta: Metadata, field: string): ElementType | string {
  const members = meta.compound_type?.members ?? [];
  const member = members.find(({ name }) => name === field);
  if (!member) return members.length > 0 ? `records without a field of that name (${members.slice(0, 8).map(({ name }) => name).join(', ')})` : `${typeWords(meta)} without fields`;
  const base = baseOf(member);
  return base ? { base, littleEndian: orderOf(meta, member.littleEndian), size: meta.size, firstAt: member.offset, secondAt: null } : typeWords(member);
}

/** Records in one order are turned as a whole; in mixed order they come as they were stored. */
function orderOf(meta: Metadata, ownOrder: boolean): boolean {
  const orders = (meta.compound_type?.members ?? []).filter(({ size }) => size > 1).map(({ littleEndian }) => littleEndian);
  return orders.includes(true) && orders.includes(false) ? ownOrder : true;
}

export function typeWords(meta: Metadata): string {
  const base = baseOf(meta);
  if (base) return `${base.startsWith('f') ? 'real' : 'whole'} numbers of ${meta.size} bytes`;
  if (meta.type === complexClass || pairOf(meta)) return `complex numbers of ${meta.size} bytes`;
  if (meta.type === float || meta.type === whole) return `numbers of ${meta.size} bytes`;
  if (meta.type === string) return 'text';
  if (meta.type === enumeration) return 'named values';
  if (meta.type === compound) return `records (${(meta.compound_type?.members ?? []).slice(0, 8).map(({ name }) => name).join(', ')})`;
  return 'something that is not numbers';
}
