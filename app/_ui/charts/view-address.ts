import { createParser } from 'nuqs';
import type { Range } from './zoom';

/**
 * What is looked at, in the address: `zoom=C1.time.s:-0.1,0.05;C1.frequency.Hz:20,400` and
 * `at=C1.time.s:0.02`. An address is typed by anyone: what cannot be read is left out.
 */
const mostParts = 40;

function parts<T>(text: string, read: (numbers: readonly number[]) => T | null): Record<string, T> | null {
  const found: Record<string, T> = {};
  for (const part of text.split(';').slice(0, mostParts)) {
    const [, group = '', numbers = ''] = /^([\w.-]{1,120}):([-+.\deE,]{1,60})$/.exec(part) ?? [];
    const value = group === '' ? null : read(numbers.split(',').map(Number));
    if (value !== null) found[group] = value;
  }
  return Object.keys(found).length > 0 ? found : null;
}

/** Six digits: finer than a screen, short enough for an address. */
const brief = (value: number): string => String(Number(value.toPrecision(6)));

const written = <T,>(all: Readonly<Record<string, T>>, write: (value: T) => string): string =>
  Object.entries(all).map(([group, value]) => `${group}:${write(value)}`).join(';');

const sameText = <T,>(write: (all: T) => string) => (a: T, b: T): boolean => write(a) === write(b);

export const writeRanges = (all: Readonly<Record<string, Range>>): string => written(all, ([low, high]) => `${brief(low)},${brief(high)}`);
export const readRanges = (text: string): Record<string, Range> | null =>
  parts(text, ([low, high, ...more]) => (low !== undefined && high !== undefined && more.length === 0 && Number.isFinite(low) && Number.isFinite(high) && low < high ? ([low, high] as const) : null));

export const writePlaces = (all: Readonly<Record<string, number>>): string => written(all, brief);
export const readPlaces = (text: string): Record<string, number> | null =>
  parts(text, ([at, ...more]) => (at !== undefined && more.length === 0 && Number.isFinite(at) ? at : null));

export const rangesInAddress = createParser<Readonly<Record<string, Range>>>({ parse: readRanges, serialize: writeRanges, eq: sameText(writeRanges) });
export const placesInAddress = createParser<Readonly<Record<string, number>>>({ parse: readPlaces, serialize: writePlaces, eq: sameText(writePlaces) });
