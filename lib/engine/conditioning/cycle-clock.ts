/** Counts cycles of one series from one end of its record: by unwrapped phase, or by zero crossings when only a real part is known. */
export interface CycleClock {
  /** Time at which so many cycles have passed, linearly interpolated; null when the record does not hold them. */
  readonly timeAfter: (cycles: number) => number | null;
  /** Cycles per unit around a time: one cycle centred there (or the nearest that the record holds). */
  readonly frequencyAt: (t: number) => number | null;
}

/** Unwrapped cycles and times, grown on demand: a record of a million samples is not unwrapped for its first two cycles. */
interface Track {
  readonly times: number[];
  readonly cycles: number[];
  readonly advance: () => boolean;
}

function phaseTrack(axis: Float64Array, re: Float64Array, im: Float64Array, forward: boolean): Track {
  const n = axis.length;
  const at = (i: number): number => (forward ? i : n - 1 - i);
  let i = 0;
  // Not a number of its own: a closure would box it anew at every sample.
  const phase = new Float64Array(1);
  const times = [axis[at(0)]!];
  const cycles = [0];
  const advance = (): boolean => {
    if (i + 1 >= n) return false;
    const p = at(i);
    const q = at(i + 1);
    phase[0]! += Math.atan2(im[q]! * re[p]! - re[q]! * im[p]!, re[q]! * re[p]! + im[q]! * im[p]!);
    i++;
    times.push(axis[q]!);
    cycles.push(Math.abs(phase[0]!) / (2 * Math.PI));
    return true;
  };
  return { times, cycles, advance };
}

/** Half a cycle at each change of sign, at the linearly interpolated time of the zero. */
function crossingTrack(axis: Float64Array, values: Float64Array, forward: boolean): Track {
  const n = axis.length;
  const at = (i: number): number => (forward ? i : n - 1 - i);
  let i = 0;
  const times = [axis[at(0)]!];
  const cycles = [0];
  const advance = (): boolean => {
    while (i + 1 < n) {
      const p = at(i);
      const q = at(++i);
      const [u, v] = [values[p]!, values[q]!];
      if (u !== 0 && u * v <= 0) {
        times.push(axis[p]! + (axis[q]! - axis[p]!) * (u / (u - v)));
        cycles.push(cycles[cycles.length - 1]! + 0.5);
        return true;
      }
    }
    return false;
  };
  return { times, cycles, advance };
}

function timeAfter(track: Track, cycles: number): number | null {
  let k = 0;
  while (true) {
    while (k >= track.cycles.length) if (!track.advance()) return null;
    if (track.cycles[k]! >= cycles) break;
    k++;
  }
  if (k === 0) return track.times[0]!;
  const [c0, c1] = [track.cycles[k - 1]!, track.cycles[k]!];
  const share = (cycles - c0) / (c1 - c0);
  return track.times[k - 1]! + share * (track.times[k]! - track.times[k - 1]!);
}

function cyclesAt(track: Track, t: number): number {
  const past = (x: number): boolean => (track.times[0]! <= t ? x >= t : x <= t);
  let k = 0;
  while (true) {
    while (k >= track.times.length) if (!track.advance()) return track.cycles[track.cycles.length - 1]!;
    if (past(track.times[k]!)) break;
    k++;
  }
  if (k === 0) return 0;
  const [t0, t1] = [track.times[k - 1]!, track.times[k]!];
  const share = (t - t0) / (t1 - t0);
  return track.cycles[k - 1]! + share * (track.cycles[k]! - track.cycles[k - 1]!);
}

function frequencyAt(track: Track, t: number): number | null {
  const centre = cyclesAt(track, t);
  const low = Math.max(0, centre - 0.5);
  for (const high of [low + 1, low + 0.5, low + 0.1]) {
    const after = timeAfter(track, high);
    const before = timeAfter(track, low);
    if (after !== null && before !== null && after !== before) return (high - low) / Math.abs(after - before);
  }
  return null;
}

/**
 * A clock that counts the cycles of a series inward from one end.
 * Shape:  re, im share the axis; im null counts zero crossings, two to a cycle.
 * Units:  times in the axis's unit, frequency in cycles per that unit.
 * Error:  linear interpolation between samples (part of the taper's definition).
 * Fails:  null where the record ends first.
 * Source: settings.md rule 2.4 (house rule).
 */
export function cyclesFrom(
  end: 'start' | 'end',
  axis: Float64Array,
  series: { readonly re: Float64Array; readonly im: Float64Array | null },
): CycleClock {
  const forward = end === 'start';
  const track = series.im === null ? crossingTrack(axis, series.re, forward) : phaseTrack(axis, series.re, series.im, forward);
  return { timeAfter: (cycles) => timeAfter(track, cycles), frequencyAt: (t) => frequencyAt(track, t) };
}
