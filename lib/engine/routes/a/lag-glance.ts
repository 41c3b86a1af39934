import { powerOfTwoFrom, transformOfSize } from '@/lib/engine/fourier/transform';
import type { CrossSpectrum } from './cross-spectrum';

/** Of Σ|c_j|, what may be left out at each end while a lag is looked for; every so-manieth bin tells how much there is. */
const LEFT_OUT = 0.01;
const SAMPLE = 4;
/** Lags for each bin of the core. */
const OVERSAMPLED = 1.3;
const TURN = 2 * Math.PI;

interface Scratch {
  readonly data: Float64Array;
  readonly out: Float64Array;
}

const scratches = new Map<number, Scratch>();
function scratchOf(size: number): Scratch {
  const known = scratches.get(size);
  if (known) return known;
  const made = { data: new Float64Array(2 * size), out: new Float64Array(2 * size) };
  scratches.clear();
  scratches.set(size, made);
  return made;
}

function coreOf({ plusRe, plusIm, n }: CrossSpectrum): { from: number; to: number } {
  let total = 0;
  for (let j = 0; j < n; j += SAMPLE) total += Math.abs(plusRe[j]!) + Math.abs(plusIm[j]!);
  const least = LEFT_OUT * SAMPLE * total;
  let to = n;
  for (let left = 0; to > 1 && (left += Math.abs(plusRe[to - 1]!) + Math.abs(plusIm[to - 1]!)) < least; ) to--;
  let from = 0;
  for (let left = 0; from < to - 1 && (left += Math.abs(plusRe[from]!) + Math.abs(plusIm[from]!)) < least; ) from++;
  return { from, to };
}

/** The lag in cycles per bin where the core's modulus is highest, between grid points by a parabola. */
function likeliest(c: CrossSpectrum): number {
  const { plusRe, plusIm } = c;
  const { from, to } = coreOf(c);
  const size = powerOfTwoFrom(OVERSAMPLED * (to - from));
  const { data, out } = scratchOf(size);
  data.fill(0, 2 * (to - from));
  for (let j = from; j < to; j++) {
    data[2 * (j - from)] = plusRe[j]!;
    data[2 * (j - from) + 1] = plusIm[j]!;
  }
  transformOfSize(size).inverse(out, data);
  let top = 0;
  let most = -1;
  for (let i = 0; i < size; i++) {
    const x = out[2 * i]!;
    const y = out[2 * i + 1]!;
    const height = x * x + y * y;
    if (height > most) {
      most = height;
      top = i;
    }
  }
  const heightAt = (i: number): number => out[2 * i]! * out[2 * i]! + out[2 * i + 1]! * out[2 * i + 1]!;
  const [before, after] = [heightAt((top + size - 1) % size), heightAt((top + 1) % size)];
  const bend = before - 2 * most + after;
  return (top + (bend < 0 ? Math.max(-0.5, Math.min(0.5, (before - after) / (2 * bend))) : 0)) / size;
}

/**
 * About how large the modulus of a one-sided product gets over all lags: the sum over all bins where the core alone is highest,
 * with one Newton step's rise.
 * Shape:  one number; both polarisations at once are not looked at.
 * Units:  those of the cross spectrum.
 * Error:  low by a few parts in ten thousand, or by what another hill of nearly the same height is higher; for ranking only.
 * Fails:  never; an empty spectrum gives 0.
 * Source: as `findLag`, without its refinement.
 */
export function glanceAtLag(c: CrossSpectrum): number {
  const { plusRe, plusIm, n } = c;
  if (n === 0) return 0;
  const x = likeliest(c);
  const stepRe = Math.cos(TURN * x);
  const stepIm = Math.sin(TURN * x);
  let er = 1;
  let ei = 0;
  let zr = 0;
  let zi = 0;
  let dr = 0;
  let di = 0;
  let sr = 0;
  let si = 0;
  const middle = n / 2;
  for (let j = 0; j < n; j++) {
    const a = plusRe[j]!;
    const b = plusIm[j]!;
    const k = j - middle;
    const u = a * er - b * ei;
    const v = a * ei + b * er;
    zr += u;
    zi += v;
    dr -= k * v;
    di += k * u;
    sr -= k * k * u;
    si -= k * k * v;
    const next = er * stepRe - ei * stepIm;
    ei = er * stepIm + ei * stepRe;
    er = next;
  }
  const height = zr * zr + zi * zi;
  const slope = 2 * (zr * dr + zi * di);
  const bend = 2 * (dr * dr + di * di + zr * sr + zi * si);
  const rise = bend < 0 ? (slope * slope) / (-2 * bend) : 0;
  // A step that leaves the hill would promise too much.
  return Math.sqrt(height + Math.min(rise, RISE * height));
}

const RISE = 0.05;
