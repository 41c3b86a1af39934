import type { Band, Side } from '@/lib/engine/contract/route';
import type { ModeSet, LineOfSight, Waveform } from '@/lib/engine/contract/waveform';
import { contentBand, evenLines, MOST_EVEN_LINES } from './bin-plan';
import type { SpectrumStore } from './spectrum-store';

/** A part of the band with the lines of the file that it needs. */
export interface Piece {
  readonly side: Side;
  readonly band: Band;
  /** Length in seconds at which the piece's own bins still fit; a power does not depend on it. */
  readonly longestS: number | undefined;
}

/** Pieces cost less than as many even lines as this. */
const MOST_WHOLE = 1 << 18;
/** Pieces meet at powers of this in the file's own frequency, so that all masses share them. */
const RATIO = 16;
/** A piece is never narrower than this ratio; it joins its neighbour. */
const NARROWEST = 2;
/** Lines beyond a piece's ends, for end weights and interpolation. */
const MARGIN_RATIO = 2.5;
const MARGIN_LINES = 16;

const cuts = new WeakMap<Waveform, Map<number, Waveform>>();

function cutContent(content: ModeSet | LineOfSight, from: number, to: number): ModeSet | LineOfSight {
  const part = (values: Float64Array): Float64Array => values.subarray(from, to);
  const perhaps = (values: Float64Array | null | undefined): Float64Array | null => (values ? part(values) : null);
  if (content.kind === 'modes') return { ...content, modes: content.modes.map((mode) => ({ ...mode, re: part(mode.re), im: part(mode.im) })) };
  return {
    kind: content.kind,
    plus: part(content.plus),
    cross: perhaps(content.cross),
    ...(content.plusIm ? { plusIm: part(content.plusIm) } : {}),
    crossIm: perhaps(content.crossIm),
  };
}

/** The file's lines around [RATIO^k, RATIO^(k+1)], as views: nothing is copied. */
function cut(waveform: Waveform, k: number): Waveform {
  const known = cuts.get(waveform) ?? new Map<number, Waveform>();
  cuts.set(waveform, known);
  const made = known.get(k);
  if (made) return made;
  const { axis } = waveform;
  const start = axis.findIndex((f) => f > RATIO ** k / MARGIN_RATIO);
  const end = axis.findLastIndex((f) => f < RATIO ** (k + 1) * MARGIN_RATIO);
  const from = Math.max(0, (start < 0 ? axis.length : start) - MARGIN_LINES);
  const to = Math.min(axis.length, end + 1 + MARGIN_LINES);
  const piece = { ...waveform, axis: axis.subarray(from, to), content: cutContent(waveform.content, from, to) };
  known.set(k, piece);
  return piece;
}

/** The first joint that leaves a piece below it, as a power of RATIO. */
const firstJoint = (lowHz: number, secondsPerUnit: number): number => Math.ceil(Math.log(NARROWEST * lowHz * secondsPerUnit) / Math.log(RATIO));

/**
 * A file in frequency and a band so wide that even lines over all of it would not fit in memory, in
 * pieces whose powers add up to that of the whole. Each has lines as fine as its own lower end asks for.
 * Shape:  one piece, the whole, for any other side.
 * Units:  Hz and s.
 * Error:  none of its own: the pieces' edges are exact, as those of a band are.
 * Fails:  never.
 * Source: ∫ over a union is the sum of the integrals.
 */
export function piecesOf(side: Side, band: Band, store: SpectrumStore): Piece[] {
  const whole = { side, band, longestS: undefined };
  const { waveform, secondsPerUnit } = side;
  if (waveform.domain !== 'frequency' || !(evenLines({ sides: [side], band, absoluteTimes: false }, store) > MOST_WHOLE)) return [whole];
  const { low, high } = contentBand([side], band, store);
  if (!(high > low)) return [whole];
  const first = firstJoint(low, secondsPerUnit);
  const edges = [low];
  for (let k = first; RATIO ** k / secondsPerUnit < high / NARROWEST; k++) edges.push(RATIO ** k / secondsPerUnit);
  return edges.map((from, i): Piece => {
    const to = edges[i + 1] ?? high;
    const part = { ...side, waveform: cut(waveform, first - 1 + i) };
    const longest = store.frequency(part.waveform).span * secondsPerUnit;
    return { side: part, band: { ...band, fLowHz: from, fHighHz: to }, longestS: Math.min(longest, MOST_EVEN_LINES / (8 * to)) };
  });
}
