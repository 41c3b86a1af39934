import type { PointRequest } from '@/lib/engine/conditioning/detector-settings';
import type { Finding } from '@/lib/engine/contract/finding';
import { houseValues } from '@/lib/engine/contract/house-values';
import type { BinaryFacts } from '@/lib/engine/contract/waveform';
import type { SpinMeasure } from '@/lib/engine/fraction/fraction-found';

const LEAST_SIGNALS = 5;
/** Ratios and spins that differ by less are the same number printed twice. */
const SAME = 1e-9;

const stop = (code: string, where: string, text: string, fix: string): Finding => ({ code, level: 'stops-lodging', where, text, fix });

const binaries = ({ signals = [] }: PointRequest): readonly { readonly name: string; readonly binary: BinaryFacts }[] => signals.map(({ given }) => given);

/** With equal spins the effective spin is the spin, whatever the masses. */
export const spinOf = ({ binary: { chi1z, chi2z } }: { readonly binary: BinaryFacts }): number => (chi1z !== undefined && chi2z !== undefined ? (chi1z + chi2z) / 2 : Number.NaN);

export const isPlane = (request: PointRequest): boolean => (request.declared.weight ?? houseValues.weight).startsWith('plane');

const ratiosOf = (request: PointRequest): number[] => [...new Set(binaries(request).flatMap(({ binary: { massRatio } }) => massRatio ?? []))];

/** The measure along the effective spin that a claim asks for. */
export function measureOf(request: PointRequest): SpinMeasure {
  const [q = 1] = ratiosOf(request);
  const heavier = Math.max(q, 1 / q);
  return { kind: isPlane(request) ? 'plane' : 'diagonal', m1: heavier / (1 + heavier), m2: 1 / (1 + heavier), volume: (request.declared.weight ?? houseValues.weight).endsWith('volume') };
}

function listed(names: readonly string[]): string {
  return names.length > 6 ? `${names.slice(0, 6).join(', ')} and ${names.length - 6} more` : names.join(', ');
}

/**
 * What makes a fraction impossible to read off its signals.
 * Shape:  findings that stop; at most one of a kind.
 * Units:  none.
 * Error:  none.
 * Fails:  never.
 * Source: settings.md section 3.
 */
export function sampleStops(request: PointRequest): Finding[] {
  const given = binaries(request);
  const without = given.filter((signal) => !Number.isFinite(spinOf(signal))).map(({ name }) => name);
  if (without.length > 0) return [stop('engine/setting-missing', without[0]!, `The spins of ${listed(without)} are not stated.`, 'Give binary.chi1z and binary.chi2z beside each signal.')];
  const unequal = given.filter(({ binary: { chi1z = 0, chi2z = 0 } }) => Math.abs(chi1z - chi2z) > SAME);
  if (unequal.length > 0)
    return [stop('engine/unequal-spins', unequal[0]!.name, `${listed(unequal.map(({ name, binary }) => `${name} (${binary.chi1z} and ${binary.chi2z})`))}: the two spins of every signal have to be equal, because the matches are read along the diagonal of the plane of spins.`, 'List signals with equal spins only.')];
  const spins = given.map(spinOf).sort((p, q) => p - q);
  const twice = spins.find((spin, i) => i > 0 && spin - spins[i - 1]! < SAME);
  if (twice !== undefined) return [stop('engine/same-spin-twice', given.filter((signal) => Math.abs(spinOf(signal) - twice) < SAME).map(({ name }) => name).join(', '), `Two signals have the spin ${twice}; a curve has one match at each.`, 'Leave one of them out.')];
  if (spins.length < LEAST_SIGNALS) return [stop('engine/too-few-points', listed(given.map(({ name }) => name)), `There are ${spins.length} signals; a spline whose ends are not fixed needs at least ${LEAST_SIGNALS}.`, 'List more signals, at other spins.')];
  const ratios = ratiosOf(request);
  if (isPlane(request) && ratios.some((q) => Math.abs(q - ratios[0]!) > SAME * q))
    return [stop('engine/mass-ratios-differ', listed(given.map(({ name }) => name)), `The signals have mass ratios from ${Math.min(...ratios)} to ${Math.max(...ratios)}; over the plane of spins the effective spin is weighted by one.`, 'List signals of one mass ratio, or declare weight "diagonal".')];
  return [];
}

/** A mass ratio that nobody states is taken as 1, where it weighs the plane. */
export function sampleLooks(request: PointRequest): Finding[] {
  if (!isPlane(request) || ratiosOf(request).length > 0) return [];
  return [{ code: 'engine/mass-ratio-assumed', level: 'worth-a-look', where: request.a.given.name, text: 'No signal states its mass ratio; over the plane of spins equal masses were assumed.', fix: 'Give binary.massRatio beside the signals.' }];
}
