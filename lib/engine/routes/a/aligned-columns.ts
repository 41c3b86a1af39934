import type { Response } from '@/lib/engine/contract/settings';
import type { Alignment } from './alignment';
import type { BinColumns, FourColumns } from './compressed-bins';
import { realResponse } from './cross-spectrum';
import type { Spectrum } from './spectrum';

/** How two spectra were made alike: b moved by x, turned, and both scaled to norm 1 at the mass where that was found. */
export interface Standing {
  readonly x: number;
  readonly turnRad: number;
  readonly scales: readonly [number, number];
}

export const standingOf = ({ x, turnRad, norms }: Alignment): Standing => ({ x, turnRad, scales: [1 / Math.sqrt(norms[0]), 1 / Math.sqrt(norms[1])] });

const BLOCK = 256;

/**
 * |D|², D b*, |b|² of two spectra made alike, D = a − b: norms, product and residual at any mass are sums of these, and where the two are alike D is small by itself.
 * Shape:  four columns from bin `first` to `last`, which the spectra and `into` hold.
 * Units:  per unit of both norms.
 * Error:  rounding.
 * Fails:  never.
 * Source: a b* = D b* + |b|².
 */
export function alignedColumns(a: Spectrum, b: Spectrum, response: Exclude<Response, 'complex'>, standing: Standing, first: number, last: number, into: FourColumns): BinColumns {
  const [ca, cb] = [realResponse(a, response), realResponse(b, response)];
  const { re: aRe, im: aIm } = ca;
  const { re: bRe, im: bIm } = cb;
  const { x, turnRad } = standing;
  const [sa, sb] = standing.scales;
  const n = last - first + 1;
  const [dd, er, ei, bb] = into.map((column) => column.subarray(0, n)) as unknown as FourColumns;
  const stepC = Math.cos(2 * Math.PI * x);
  const stepS = -Math.sin(2 * Math.PI * x);
  let c = 0;
  let s = 0;
  for (let j = 0; j < n; j++) {
    const k = first + j;
    if (j % BLOCK === 0) {
      const turns = k * x - Math.round(k * x);
      c = Math.cos(turnRad - 2 * Math.PI * turns);
      s = Math.sin(turnRad - 2 * Math.PI * turns);
    }
    const p = sb * (bRe[k]! * c - bIm[k]! * s);
    const q = sb * (bRe[k]! * s + bIm[k]! * c);
    const dRe = sa * aRe[k]! - p;
    const dIm = sa * aIm[k]! - q;
    dd[j] = dRe * dRe + dIm * dIm;
    er[j] = dRe * p + dIm * q;
    ei[j] = dIm * p - dRe * q;
    bb[j] = p * p + q * q;
    const next = c * stepC - s * stepS;
    s = c * stepS + s * stepC;
    c = next;
  }
  return { first, columns: [dd, er, ei, bb] };
}
