import type { Side } from '@/lib/engine/contract/route';
import { spinWeightedHarmonic } from '@/lib/engine/modes/spin-weighted-harmonic';
import { windowWeights } from '@/lib/engine/series/window-weights';
import type { Numerics } from './numerics';
import { sampleGrid } from './sample-grid';
import { spectrumOf, type Spectrum } from './spectrum';
import { taperKey, type SpectrumStore } from './spectrum-store';

/** Line of sight, or one mode alone by its place in the list. */
export type Content =
  | { readonly kind: 'line'; readonly inclinationRad: number; readonly azimuthRad: number }
  | { readonly kind: 'mode'; readonly index: number };

const contentKey = (content: Content): string =>
  content.kind === 'line' ? `${content.inclinationRad},${content.azimuthRad}` : `mode ${content.index}`;

/** An open end without a ramp is a jump: its tail is only summed well on a finer grid. */
const HALVINGS_FOR_JUMPS = 2;
const hasJump = (side: Side, store: SpectrumStore): boolean => {
  const { waveform, taper } = side;
  if (waveform.domain === 'frequency') return false;
  const source = store.time(waveform);
  const last = source.axis.length - 1;
  const parts =
    waveform.content.kind === 'modes'
      ? waveform.content.modes
      : [{ re: waveform.content.plus, im: waveform.content.cross ?? waveform.content.plus }];
  const sizeAt = (i: number): number => Math.max(0, ...parts.map((part) => Math.hypot(part.re[i]!, part.im[i]!)));
  const small = (i: number): boolean => parts.some(({ re }) => isLarger(re, 1e3 * sizeAt(i)));
  return (taper.start === null && sizeAt(0) > 0 && !small(0)) || (taper.end === null && sizeAt(last) > 0 && !small(last));
};

/** Is any sample so large? From the end, since a record's peak lies there. */
function isLarger(series: Float64Array, size: number): boolean {
  for (let i = series.length - 1; i >= 0; i--) if (Math.abs(series[i]!) >= size) return true;
  return false;
}

const jumps = new WeakMap<object, Map<string, boolean>>();
function halvingsFor(side: Side, store: SpectrumStore, numerics: Numerics): number {
  const known = jumps.get(side.waveform) ?? new Map<string, boolean>();
  jumps.set(side.waveform, known);
  const key = taperKey(side.taper);
  const jump = known.get(key) ?? hasJump(side, store);
  known.set(key, jump);
  return store.halvings(side.waveform) + numerics.stepHalvings + (jump ? HALVINGS_FOR_JUMPS : 0);
}

/** The step as it stands for one side and bin spacing; route planning matches the bins of two sides to it. */
export function gridFor(side: Side, store: SpectrumStore, numerics: Numerics, dF: number) {
  return sampleGrid(store.time(side.waveform), dF, halvingsFor(side, store, numerics));
}

function timeSpectrum(side: Side, content: Content, dF: number, store: SpectrumStore, numerics: Numerics): Spectrum {
  const source = store.time(side.waveform);
  const grid = gridFor(side, store, numerics, dF);
  const key = `${dF}|${grid.dt}|${numerics.interpolationOrder}|${numerics.edgeOrder}|${numerics.topShare}|${taperKey(side.taper)}|${contentKey(content)}`;
  return store.spectrum(side.waveform, key, () => {
    const order = numerics.interpolationOrder;
    const seriesKey = `${grid.dt}|${grid.n}|${order}|${numerics.edgeOrder}|${taperKey(side.taper)}|${contentKey(content)}`;
    const { samples, weights } = store.series(side.waveform, seriesKey, () => ({
      samples:
        content.kind === 'line'
          ? source.lineOfSight(grid, order, content.inclinationRad, content.azimuthRad)
          : source.mode(grid, order, content.index),
      weights: windowWeights(grid, grid.tEnd, side.taper, numerics.edgeOrder),
    }));
    // Modes are added bin by bin later, so they count time from one common instant.
    const origin = content.kind === 'line' ? {} : { origin: Math.floor(grid.n / 2) };
    return spectrumOf({
      samples,
      grid,
      weights,
      dF,
      variable: side.waveform.variable,
      nyquist: source.nyquist,
      topShare: numerics.topShare,
      ...origin,
    });
  });
}

function frequencySpectrum(side: Side, content: Content, dF: number, fTop: number, store: SpectrumStore, numerics: Numerics): Spectrum {
  const { waveform } = side;
  const key = `${dF}|${fTop}|${numerics.interpolationOrder}|${contentKey(content)}`;
  return store.spectrum(waveform, key, () => {
    const modes = waveform.content.kind === 'modes' ? waveform.content.modes : [];
    const weigh = (l: number, m: number) => {
      if (content.kind === 'line') return spinWeightedHarmonic(l, m, content.inclinationRad, content.azimuthRad);
      const chosen = modes[content.index];
      return { re: chosen?.l === l && chosen.m === m ? 1 : 0, im: 0 };
    };
    return store.frequency(waveform).spectrum(dF, numerics.interpolationOrder, fTop, weigh);
  });
}

/**
 * The spectrum of one side along its line of sight, or of one of its modes, on bins dF.
 * Shape:  as `Spectrum`; a frequency-domain file is read up to fTop only.
 * Units:  the waveform's own; dF and fTop in cycles per its unit.
 * Error:  see `spectrumOf` and the sources.
 * Fails:  never.
 * Source: settings.md rules 2.1 to 2.4.
 */
export const sideSpectrum = (side: Side, content: Content, dF: number, fTop: number, store: SpectrumStore, numerics: Numerics): Spectrum =>
  side.waveform.domain === 'frequency'
    ? frequencySpectrum(side, content, dF, fTop, store, numerics)
    : timeSpectrum(side, content, dF, store, numerics);

export const lineOf = (side: Side): Content => ({ kind: 'line', inclinationRad: side.inclinationRad, azimuthRad: side.azimuthRad });
