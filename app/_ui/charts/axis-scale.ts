import type { Figure } from '@/lib/engine/contract/measurement';
import { decimalsFor, formatNumber, powerOfTen } from '../math/format-number';

/**
 * The plotting library is only given plain numbers of ordinary size on linear scales: a log axis is
 * drawn through its logarithm, and values like a power density of 10⁻⁴⁶ through their power of ten.
 * Its own log and tick code fails on both.
 */
export interface AxisScale {
  readonly toPlot: (value: number) => number | null;
  readonly fromPlot: (place: number) => number;
  /** Places of the ticks in plot units and what stands at them. */
  readonly ticks: ((low: number, high: number) => readonly number[]) | null;
  readonly labels: (places: readonly number[]) => string[];
  /** One place alone, to the digits that tell it from others nearby: for ticks that are no round powers. */
  readonly valueLabel: (place: number) => string;
}

const most = 7;
const tiny = 1e-4;
const huge = 1e7;

function logTicks(low: number, high: number): number[] {
  const first = Math.floor(low);
  const last = Math.ceil(high);
  const leads = high - low <= 3 ? [1, 2, 5] : [1];
  const stride = Math.max(1, Math.ceil((last - first) / most));
  const places: number[] = [];
  for (let power = first; power <= last; power += stride) for (const lead of leads) places.push(power + Math.log10(lead));
  return places.filter((place) => place >= low - 1e-9 && place <= high + 1e-9);
}

const logLabel = (place: number): string => {
  const value = Number((10 ** place).toPrecision(1));
  return formatNumber(value, value < 1e-3 || value >= huge ? { significant: 1 } : {});
};

const logScale: AxisScale = {
  toPlot: (value) => (value > 0 ? Math.log10(value) : null),
  fromPlot: (place) => 10 ** place,
  valueLabel: (place) => formatNumber(10 ** place, { significant: 4 }),
  ticks: logTicks,
  labels: (places) => places.map((place) => logLabel(place).replace(/^1 × /, '')),
};

/** Ticks keep the decimals that tell them apart. */
function linearLabels(places: readonly number[]): string[] {
  const step = places.length > 1 ? Math.abs((places[1] ?? 0) - (places[0] ?? 0)) : Math.abs(places[0] ?? 1) || 1;
  const lead = step / 10 ** Math.floor(Math.log10(step) + 1e-9);
  const decimals = decimalsFor(Number(step.toPrecision(6)), Math.abs(lead - 2.5) < 1e-6 ? 2 : 1);
  return places.map((place) => formatNumber(place, { decimals, plain: true }));
}

const linearScale: AxisScale = { toPlot: (value) => value, fromPlot: (place) => place, ticks: null, labels: linearLabels, valueLabel: (place) => formatNumber(place) };

function shifted(power: number): AxisScale {
  const factor = 10 ** -power;
  const valueLabel = (place: number) => formatNumber(place / factor, { significant: 4 });
  return { toPlot: (value) => value * factor, fromPlot: (place) => place / factor, ticks: null, valueLabel, labels: (places) => linearLabels(places).map((label) => (/[1-9]/.test(label) ? `${label} × ${powerOfTen(power)}` : '0')) };
}


/** Words side by side, each at its place; between two of them is nothing. */
const wordScale = (words: readonly string[]): AxisScale => {
  const at = (place: number): string => words[Math.round(place)] ?? '';
  const ticks = (low: number, high: number) => words.flatMap((_, i) => (i >= low && i <= high ? [i] : []));
  return { ...linearScale, ticks, labels: (places) => places.map(at), valueLabel: at };
};

/** The horizontal axis of a figure. */
export const acrossScale = ({ x }: Figure): AxisScale => (x.words ? wordScale(x.words) : axisScale(x.scale, x.values));

/** What the horizontal axis spans; words have half a step of room on either side. */
export function acrossEnds({ x }: Figure): readonly [number, number] {
  const [low, high] = [x.values[0] ?? 0, x.values.at(-1) ?? 0];
  return x.words ? [low - 0.5, high + 0.5] : [low, high];
}

/** A log axis only where it can be one: all values above zero, and more than a factor five apart. */
export function axisScale(wanted: 'linear' | 'log', values: readonly (number | null)[]): AxisScale {
  const known = values.filter((v): v is number => v !== null && Number.isFinite(v));
  const low = known.reduce((a, b) => Math.min(a, b), Infinity);
  const high = known.reduce((a, b) => Math.max(a, b), -Infinity);
  if (wanted === 'log' && low > 0 && high / low >= 5) return logScale;
  const size = Math.max(Math.abs(low), Math.abs(high));
  if (size > 0 && Number.isFinite(size) && (size < tiny || size >= huge)) return shifted(Math.floor(Math.log10(size)));
  return linearScale;
}
