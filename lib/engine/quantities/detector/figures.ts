import type { Figure, FigureSeries, MeasuredPoint } from '@/lib/engine/contract/measurement';
import type { DetectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { Side } from '@/lib/engine/contract/route';
import { taperWeightAt } from '@/lib/engine/conditioning/taper-window';
import { weightedSpectrum } from '@/lib/engine/routes/a/weighted-spectrum';
import { timeSource } from '@/lib/engine/routes/a/time-source';
import { derivativeOrder } from '@/lib/engine/routes/a/spectrum';
import type { Evaluated } from './recipe';
import type { Walk } from './measure-detector';

export interface FigureContext {
  readonly walk: Walk;
  readonly found: readonly Evaluated[];
  readonly shown: readonly DetectorPoint[];
  readonly worst: number;
  readonly points: readonly MeasuredPoint[];
}

const MOST_POINTS = 1500;
const INTEGRAND_POINTS = 600;

const line = (
  label: string,
  role: FigureSeries['role'],
  values: readonly (number | null)[],
  more: Partial<FigureSeries> = {},
): FigureSeries => ({ label, unit: '', role, axis: 'left', scale: 'linear', values, ...more });

/** Strain in the detector at times in seconds, for drawing: local interpolation of the tapered record. */
function traceOf(side: Side, point: DetectorPoint, timesS: readonly number[], turn: { shiftS: number; phaseRad: number }): number[] {
  const source = timeSource(side.waveform);
  const { plus, cross } =
    typeof point.response === 'object' ? point.response : point.response === 'cross' ? { plus: 0, cross: 1 } : { plus: 1, cross: 0 };
  const first = timesS[0]!;
  const dt = (timesS[timesS.length - 1]! - first) / Math.max(1, timesS.length - 1);
  const t0 = (first - turn.shiftS) / side.secondsPerUnit;
  const grid = { t0, dt: dt / side.secondsPerUnit, n: timesS.length, tEnd: 0, stride: null };
  const { re, im } = source.lineOfSight(grid, 4, side.inclinationRad, side.azimuthRad);
  const [start, end] = [source.axis[0]!, source.axis[source.axis.length - 1]!];
  // A phase advance turns h₊ − ih× by e^{−iφ}.
  const [c, s] = [Math.cos(turn.phaseRad), Math.sin(turn.phaseRad)];
  return Array.from(re, (x, k) => {
    const t = t0 + k * grid.dt;
    if (t < start || t > end) return 0;
    const y = im === null ? 0 : im[k]!;
    const [plusNow, crossNow] = [x * c + y * s, x * s - y * c];
    return side.strainPerUnit * taperWeightAt(side.taper, t) * (im === null ? plus * x : plus * plusNow + cross * crossNow);
  });
}

/** The time of the largest |h| in seconds. */
function peakTimeS(side: Side): number {
  const { content, axis } = side.waveform;
  const re = content.kind === 'modes' ? content.modes[0]?.re : content.plus;
  const im = content.kind === 'modes' ? content.modes[0]?.im : content.cross;
  let best = 0;
  let top = -1;
  for (let i = 0; i < axis.length; i++) {
    const size = (re?.[i] ?? 0) ** 2 + (im?.[i] ?? 0) ** 2;
    if (size > top) [best, top] = [i, size];
  }
  return axis[best]! * side.secondsPerUnit;
}

/** Seconds before and after the peak of a that are drawn: as many as 1 500 points show without breaking the waves up. */
function drawnTimes(side: Side): number[] {
  const source = timeSource(side.waveform);
  const step = (source.fastest > 0 ? 1 / (12 * source.fastest) : source.span / MOST_POINTS) * side.secondsPerUnit;
  const peak = peakTimeS(side);
  const [start, end] = [source.axis[0]! * side.secondsPerUnit, source.axis[source.axis.length - 1]! * side.secondsPerUnit];
  const after = Math.min(end, peak + 0.2 * MOST_POINTS * step);
  const before = Math.max(start, after - (MOST_POINTS - 1) * step);
  const n = Math.max(2, Math.min(MOST_POINTS, Math.floor((after - before) / step) + 1));
  return Array.from({ length: n }, (_, i) => before + ((after - before) * i) / (n - 1));
}

function waveformsFigure({ found, shown, worst }: FigureContext): Figure[] {
  const point = shown[worst]!;
  const sides = [point.a, ...(point.b === null ? [] : [point.b])];
  if (sides.some((side) => side.waveform.domain !== 'time' || derivativeOrder(side.waveform.variable) > 0)) return [];
  const timesS = drawnTimes(point.a);
  const a = traceOf(point.a, point, timesS, { shiftS: 0, phaseRad: 0 });
  const series = [line(point.a.waveform.name, 'claimed', a, { unit: 'strain' })];
  if (point.b !== null) {
    const { outcome } = found[worst]!;
    const modesTurn = point.response === 'complex' && point.b.waveform.content.kind === 'modes';
    const b = {
      ...point.b,
      azimuthRad: point.b.azimuthRad + (modesTurn ? (outcome?.phaseShiftRad ?? 0) : 0),
      inclinationRad: outcome?.inclinationRad ?? point.b.inclinationRad,
    };
    const factor = outcome?.massFactor ?? 1;
    const scaled = { ...b, secondsPerUnit: b.secondsPerUnit * factor, strainPerUnit: b.strainPerUnit * factor };
    const moved = traceOf(scaled, point, timesS, {
      shiftS: outcome?.timeShiftS ?? 0,
      phaseRad: modesTurn ? -2 * (outcome?.polarisationRad ?? 0) : (outcome?.phaseShiftRad ?? 0),
    });
    series.push(line(`${point.b.waveform.name}, aligned`, 'recomputed', moved, { unit: 'strain' }));
    series.push(
      line(
        'difference',
        'residual',
        a.map((x, i) => x - moved[i]!),
        { unit: 'strain' },
      ),
    );
  }
  return [
    {
      kind: 'waveforms',
      title: 'Strain in the detector around the peak',
      at: point.at,
      x: { label: 'time', unit: 's', scale: 'linear', values: timesS },
      series,
    },
  ];
}

const logSpaced = (low: number, high: number, n: number): number[] =>
  Array.from({ length: n }, (_, i) => low * (high / low) ** (i / (n - 1)));

function integrandFigure({ walk, shown, worst }: FigureContext): Figure {
  const point = shown[worst]!;
  const { noise, fLowHz, fHighHz } = point.band;
  const f = logSpaced(fLowHz, fHighHz, INTEGRAND_POINTS);
  const curve = (side: Side): (number | null)[] => weightedSpectrum(side, point.band, point.response, f, walk.store);
  const weighted = { unit: 'per unit of ln f' };
  const series = [
    line(`${point.a.waveform.name}: dρ²/d ln f`, 'claimed', curve(point.a), weighted),
    ...(point.b === null ? [] : [line(`${point.b.waveform.name}: dρ²/d ln f`, 'recomputed', curve(point.b), weighted)]),
    line(
      `noise ${noise.name}`,
      'noise',
      f.map((x) => Math.sqrt(noise.psd(Math.min(Math.max(x, noise.fLowHz), noise.fHighHz)))),
      { unit: 'Hz^−1/2', axis: 'right', scale: 'log' },
    ),
  ];
  return {
    kind: 'integrand',
    title: 'Where in the band the loudness comes from',
    at: point.at,
    x: { label: 'frequency', unit: 'Hz', scale: 'log', values: f },
    series,
  };
}

/**
 * The figures of a detector quantity, at the point furthest from its claim.
 * Shape:  at most 1 500 points a curve; numbers that are not finite are null.
 * Units:  on each axis.
 * Error:  for the eye only; never used for a verdict.
 * Fails:  never; frequency-domain files and ψ₄ or news get no trace in time.
 * Source: product.md, the record's linked plots.
 */
export function detectorFigures(context: FigureContext): Figure[] {
  const { walk, found, worst } = context;
  const own = walk.quantity.recipe.ownFigures?.({ kit: walk.kitA, request: walk.requests[worst]!, found: found[worst]!, store: walk.store }) ?? [];
  const figures = [...waveformsFigure(context), integrandFigure(context), ...own];
  const clean = (values: readonly (number | null)[]) => values.map((v) => (v !== null && Number.isFinite(v) ? v : null));
  return figures.map((figure) => ({ ...figure, series: figure.series.map((s) => ({ ...s, values: clean(s.values) })) }));
}
