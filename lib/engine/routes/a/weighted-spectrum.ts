import type { Band, Side } from '@/lib/engine/contract/route';
import type { Response } from '@/lib/engine/contract/settings';
import { channelsOf } from './cross-spectrum';
import { piecesOf, type Piece } from './file-pieces';
import { houseNumerics } from './numerics';
import { prepare } from './prepare';
import type { SpectrumStore } from './spectrum-store';

/**
 * dρ²/d ln f = 4 f |h̃|²/S of one side in one response, read at frequencies for a figure or a peak.
 * Shape:  one value a frequency; null outside the content of the waveform.
 * Units:  dimensionless.
 * Error:  linear between bins: for the eye, and for a peak to one part in a few hundred.
 * Fails:  never.
 * Source: ρ² = ∫ (4 f |h̃|²/S) d ln f.
 */
export function weightedSpectrum(
  side: Side,
  band: Band,
  response: Response,
  fHz: readonly number[],
  store: SpectrumStore,
): (number | null)[] {
  const pieces = piecesOf(side, band, store);
  const found = pieces.map((piece) => pieceSpectrum(piece, response, fHz, store));
  return fHz.map((f, i) => {
    const at = pieces.findLastIndex((piece) => f >= piece.band.fLowHz);
    return found[Math.max(at, 0)]![i]!;
  });
}

function pieceSpectrum({ side, band, longestS }: Piece, response: Response, fHz: readonly number[], store: SpectrumStore): (number | null)[] {
  const lag = longestS === undefined ? {} : { longestS };
  const { spectra, dfHz } = prepare({ sides: [side], band, absoluteTimes: false, ...lag }, store, houseNumerics);
  const { plus, minus } = channelsOf(spectra[0]!, response);
  const scale = side.strainPerUnit * side.secondsPerUnit;
  const factor = (minus === null ? 4 : 2) * scale * scale;
  const sizeAt = (k: number): number => plus.re[k]! ** 2 + plus.im[k]! ** 2 + (minus === null ? 0 : minus.re[k]! ** 2 + minus.im[k]! ** 2);
  const { noise } = band;
  return fHz.map((f) => {
    const place = f / dfHz;
    const k = Math.floor(place);
    if (k < spectra[0]!.firstBin || k + 1 > spectra[0]!.lastBin) return null;
    const size = sizeAt(k) + (place - k) * (sizeAt(k + 1) - sizeAt(k));
    return (factor * f * size) / noise.psd(Math.min(Math.max(f, noise.fLowHz), noise.fHighHz));
  });
}
