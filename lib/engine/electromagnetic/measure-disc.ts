import { LEAST, ROOT3 } from '../budget/half-width';
import type { BudgetLine, Figure, Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import { scientific } from '../findings/spelt';
import { relativeSlip } from '../radiation/input-rounding';
import { measureTones, type ToneRecipe } from '../tones/measure-tones';
import { usedSettings, type UsedRow } from '../tones/used-rows';
import { curvePeakOnSamples, curvePeakOnSplines } from './curve-peak';
import { discFindings } from './disc-findings';
import { accretionErgPerS, coolingS, discPreparer, dynamicalS, eddingtonErgPerS, type DiscPoint } from './disc-point';
import { pointsOf } from './measure-em-energy';

const MOST_POINTS = 1200;

const ratioOf = ({ peak, totalMassMsun }: DiscPoint): number => peak.value / eddingtonErgPerS(totalMassMsun);

function computation(point: DiscPoint): BudgetLine[] {
  const { curve, peak, waveform } = point;
  const value = ratioOf(point);
  const digits = waveform.significantDigits;
  const moved = Math.abs(curvePeakOnSamples(curve, 4).value / peak.value - 1);
  return [
    { component: 'Height of the peak', id: 'E01', group: 'computation', u: value * Math.max(moved / ROOT3, LEAST), note: 'Local polynomial of order 6 against 4; half-width over √3.' },
    { component: 'Rounding of the input', id: 'rounding', group: 'computation', u: digits === null ? 0 : value * relativeSlip(digits), note: digits === null ? 'Binary doubles: nothing was printed.' : `${digits} significant digits in the file.` },
  ];
}

const coverage = (): BudgetLine[] => [
  { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution.' },
  { component: 'Rule of emission', id: 'model', group: 'coverage', u: null, note: 'Not available: how the gas shines, and how light leaves it, is an assumption of the curve.' },
];

function rowsOf({ declared, totalMassMsun }: DiscPoint): UsedRow[] {
  const optional = [['radiativeEfficiency', undefined], ['accretionRateMsunPerYear', 'M☉/yr'], ['internalEnergyErg', 'erg'], ['radiusM', 'M']] as const;
  return [
    { name: 'totalMassMsun', value: totalMassMsun, unit: 'M☉', matters: false },
    ...optional.flatMap(([name, unit]): UsedRow[] => (declared[name] === undefined ? [] : [{ name, value: declared[name], matters: false, ...(unit === undefined ? {} : { unit }) }])),
  ];
}

function figureOf({ waveform, curve, peak, totalMassMsun, declared }: DiscPoint): Figure {
  const stride = Math.max(1, Math.ceil(curve.axis.length / MOST_POINTS));
  const picked = Array.from(curve.axis.keys()).filter((i) => i % stride === 0);
  const drawn = { quantity: 'luminosity L', unit: 'erg/s', axis: 'left', scale: 'log' } as const;
  const flat = (value: number): number[] => picked.map(() => value);
  const accreted = accretionErgPerS(declared);
  return {
    kind: 'curve',
    title: `Luminosity of ${waveform.name}, brightest at ${Number(peak.t.toPrecision(6))} ${waveform.unit}, and Eddington’s of ${scientific(totalMassMsun)} M☉`,
    x: { label: 'Time', unit: waveform.unit, scale: 'linear', values: picked.map((i) => curve.axis[i]!) },
    series: [
      { ...drawn, label: 'Luminosity', role: 'recomputed', values: picked.map((i) => (curve.values[i]! > 0 ? curve.values[i]! : null)) },
      { ...drawn, label: 'Eddington luminosity', role: 'noise', values: flat(eddingtonErgPerS(totalMassMsun)) },
      ...(accreted === null ? [] : [{ ...drawn, label: 'From accretion', role: 'claimed', values: flat(accreted) } as const]),
    ],
  };
}

function recipeOf(request: MeasureRequest, tolerance: (claimed: number) => number): ToneRecipe<DiscPoint> {
  return {
    byRouteA: (point) => ({
      value: ratioOf(point),
      components: { peakErgPerS: point.peak.value, accretionErgPerS: accretionErgPerS(point.declared), coolingS: coolingS(point.declared, point.peak.value), dynamicalS: dynamicalS(point.declared, point.totalMassMsun) },
    }),
    byRouteB: ({ curve, totalMassMsun }) => curvePeakOnSplines(curve).value / eddingtonErgPerS(totalMassMsun),
    computation, coverage,
    findings: discFindings,
    settings: (point) => usedSettings(rowsOf(point), request),
    figures: (point) => [figureOf(point)],
    tolerance,
  };
}

/**
 * Measures how bright a curve of luminosity is at most, over Eddington's.
 * Shape:  see Measurement; points whose peak lies at an end say so in a remark.
 * Units:  dimensionless.
 * Error:  see computation.
 * Fails:  notComputable with the findings that say why.
 * Source: Q28; settings.md section 7.
 */
export const measureDisc =
  (tolerance: (claimed: number) => number) =>
  (request: MeasureRequest, watch: Watch): Measurement => {
    const ats = pointsOf(request);
    const points = ats.map(discPreparer(request));
    const measured = measureTones(request, watch, ats, points, recipeOf(request, tolerance));
    const isBound = points.some((point) => 'peak' in point && point.peak.atEdge !== null);
    return isBound ? { ...measured, points: measured.points.map((point) => ({ ...point, remarks: ['lower bound only'] })) } : measured;
  };
