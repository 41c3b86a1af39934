/** How one mode dies away after its largest sample: what V10, V11 and V12 look at. */
export interface LateDecay {
  readonly peakIndex: number;
  readonly peak: number;
  /** Amplitude at the last sample over that at the peak. */
  readonly endShare: number;
  /** Decay rate per unit of the axis, where the amplitude falls from a half to a twentieth; null when the record ends before a half. */
  readonly rate: number | null;
  /** Rad per unit of the axis in the same stretch, either sense. */
  readonly turning: number | null;
  /** Does it fall as an exponential there, and not ever faster as a pulse does? */
  readonly isExponential: boolean;
  /** Where the decay ends in a floor; null where it does not. */
  readonly floor: Floor | null;
}

export interface Floor {
  /** Over the peak. */
  readonly share: number;
  /** When the exponential would have come down to it. */
  readonly at: number;
}

const HALF = 0.5;
const TWENTIETH = 0.05;
/** Fewer samples give no line. */
const LEAST_SAMPLES = 6;
/** The part of the record after the peak, at its end, in which a floor is looked for. */
const TAIL = 0.2;
/** A floor stands so far above the exponential carried on, and decays so much slower. */
const ABOVE = 10;
const STALLED = 0.3;
/** Lower floors touch no number that is printed. */
const LEAST_FLOOR = 1e-4;
/** Slopes of the first and second half of an exponential agree to this. */
const STRAIGHT = 1.4;
/** A curve that varies less than this has no peak. */
const FLAT = 1e-3;

interface Line {
  readonly base: number;
  readonly slope: number;
}

/** Least-squares line of ln|A|, with times from that of the first sample. */
function logLine(axis: Float64Array, size: Float64Array, from: number, to: number): Line | null {
  let [n, st, sy, stt, sty] = [0, 0, 0, 0, 0];
  for (let i = from; i < to; i++) {
    if (!(size[i]! > 0)) continue;
    const [t, y] = [axis[i]! - axis[from]!, Math.log(size[i]!)];
    [n, st, sy, stt, sty] = [n + 1, st + t, sy + y, stt + t * t, sty + t * y];
  }
  const spread = n * stt - st * st;
  if (n < LEAST_SAMPLES || !(spread > 0)) return null;
  const slope = (n * sty - st * sy) / spread;
  return { slope, base: (sy - slope * st) / n };
}

function turningBetween(axis: Float64Array, re: Float64Array, im: Float64Array, from: number, to: number): number {
  let phase = 0;
  for (let i = from + 1; i < to; i++) phase += Math.atan2(im[i]! * re[i - 1]! - re[i]! * im[i - 1]!, re[i]! * re[i - 1]! + im[i]! * im[i - 1]!);
  return Math.abs(phase / (axis[to - 1]! - axis[from]!));
}

function floorOf(axis: Float64Array, size: Float64Array, start: number, line: Line, peakIndex: number): Floor | null {
  const last = axis.length - 1;
  const from = axis.findIndex((t) => t >= axis[last]! - TAIL * (axis[last]! - axis[peakIndex]!));
  const tail = size.slice(from).sort();
  if (tail.length < LEAST_SAMPLES) return null;
  const level = tail[tail.length >> 1]!;
  const carried = Math.exp(line.base + line.slope * (axis[from]! - axis[start]!));
  const late = logLine(axis, size, from, axis.length);
  const share = level / size[peakIndex]!;
  if (!(share > LEAST_FLOOR && level > ABOVE * carried && late !== null && -late.slope < -STALLED * line.slope)) return null;
  return { share, at: axis[start]! + (Math.log(level) - line.base) / line.slope };
}

/** Null where there is no peak inside the record: nothing has merged there. Linear in the samples. */
export function lateDecay(axis: Float64Array, re: Float64Array, im: Float64Array): LateDecay | null {
  const n = axis.length;
  const size = re.map((x, i) => Math.hypot(x, im[i]!));
  let [peakIndex, least] = [0, Infinity];
  for (let i = 0; i < n; i++) {
    if (size[i]! > size[peakIndex]!) peakIndex = i;
    if (size[i]! < least) least = size[i]!;
  }
  const peak = size[peakIndex]!;
  if (peakIndex === 0 || peakIndex >= n - 2 || !(peak - least > FLAT * peak)) return null;
  const bare = { peakIndex, peak, endShare: size[n - 1]! / peak, rate: null, turning: null, isExponential: false, floor: null };
  const start = size.findIndex((x, i) => i > peakIndex && x < HALF * peak);
  if (start < 0) return bare;
  const down = size.findIndex((x, i) => i > start && x < TWENTIETH * peak);
  const end = down < 0 ? n : down;
  const line = logLine(axis, size, start, end);
  if (line === null || !(line.slope < 0)) return bare;
  const middle = (start + end) >> 1;
  const [early, late] = [logLine(axis, size, start, middle), logLine(axis, size, middle, end)];
  const bend = early === null || late === null ? Number.NaN : late.slope / early.slope;
  return { ...bare, isExponential: bend < STRAIGHT && bend > 1 / STRAIGHT, rate: -line.slope, turning: turningBetween(axis, re, im, start, end), floor: floorOf(axis, size, start, line, peakIndex) };
}
