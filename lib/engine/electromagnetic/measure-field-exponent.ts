import type { Finding } from '../contract/finding';
import type { BudgetLine, Figure, Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import type { Waveform } from '../contract/waveform';
import { totalEnergy } from '../radiation/energy-on-samples';
import { isFinding, measureTones, stop, type ToneRecipe } from '../tones/measure-tones';
import { usedSettings } from '../tones/used-rows';
import { earlyPlateau, testFieldFindings } from './em-findings';
import { emSource, emUncertainty, type EmPoint, type EmSource } from './em-point';
import { fieldHatOf } from './em-units';
import { reachOf, residualsOf, scatterOf, slopeAboutMeans, slopeBetweenPairs, type LogPoint } from './exponent-fit';

/** One file of the series with the field at which it was computed. */
interface Run {
  readonly source: EmSource;
  readonly fieldGauss: number;
  /** (B̂ of the file)² where its amplitude is per field, else 1. */
  readonly atItsField: number;
}
interface SeriesPoint {
  readonly runs: readonly Run[];
}

const FEWEST = 2;

/** Masses must be all known or all unknown: one unknown mass in common moves no slope. */
function massOf(waveform: Waveform, all: readonly Waveform[]): number | null {
  if (all.every(({ ownTotalMassMsun }) => ownTotalMassMsun === null)) return 1;
  return waveform.ownTotalMassMsun;
}

function runOf(waveform: Waveform, all: readonly Waveform[], request: MeasureRequest): Run | Finding {
  const { fieldGauss } = waveform.binary;
  const { name } = waveform;
  if (fieldGauss === undefined || !(fieldGauss > 0)) return stop('engine/no-field', name, `${name} does not state the field at which it was computed.`, 'State binary.fieldGauss beside every file of the series.');
  const mass = massOf(waveform, all);
  if (waveform.amplitudeUnit === 'perField' && mass === null) return stop('engine/no-field', name, `${name} holds rφ₂ over B̂ and states no totalMassMsun, though others of the series do.`, 'State totalMassMsun beside every file of the series, or beside none.');
  const source = emSource(waveform, request.settings);
  if (isFinding(source)) return source;
  return { source, fieldGauss, atItsField: waveform.amplitudeUnit === 'perField' ? fieldHatOf(fieldGauss, mass ?? 1) ** 2 : 1 };
}

function prepare(request: MeasureRequest): SeriesPoint | Finding {
  const all = request.inputs.of.series ?? [];
  if (all.length < FEWEST) return stop('engine/too-few-points', request.claimId, `The series holds ${all.length} file${all.length === 1 ? '' : 's'}; an exponent needs at least ${FEWEST}.`, 'Supply runs at other fields, each with the series’ name.');
  const runs: Run[] = [];
  for (const waveform of all) {
    const run = runOf(waveform, all, request);
    if (isFinding(run)) return run;
    runs.push(run);
  }
  if (new Set(runs.map(({ fieldGauss }) => fieldGauss)).size < FEWEST) return stop('engine/too-few-points', request.claimId, `All files of the series were computed at ${runs[0]!.fieldGauss} G, which gives no slope.`, 'Supply runs at fields that differ.');
  return { runs };
}

const logPoints = ({ runs }: SeriesPoint, energyOf: (source: EmSource) => number): LogPoint[] => runs.map(({ source, fieldGauss, atItsField }) => ({ field: Math.log(fieldGauss), energy: Math.log(atItsField * energyOf(source)) }));
const byA = (point: SeriesPoint): LogPoint[] => logPoints(point, ({ modes }) => totalEnergy(modes));
const byB = (point: SeriesPoint): LogPoint[] => logPoints(point, ({ byRouteB }) => byRouteB());

/** A run at its own field, for what is asked of single points. */
const asPoint = ({ source, fieldGauss, atItsField }: Run): EmPoint => {
  const massMsun = source.waveform.ownTotalMassMsun;
  return { at: {}, source, scale: { factor: atItsField, fieldGauss, massMsun, fieldHat: massMsun === null ? null : fieldHatOf(fieldGauss, massMsun), perField: false } };
};

/** Relative slips of the energies, each carried into the slope by its place in the series. */
function computation(point: SeriesPoint): BudgetLine[] {
  const logs = byA(point);
  const reach = reachOf(logs);
  const centre = logs.reduce((sum, { field }) => sum + field, 0) / logs.length;
  const slips = point.runs.map((run, i) => {
    const each = asPoint(run);
    const energy = Math.exp(logs[i]!.energy);
    const { quadrature, rounding } = emUncertainty(each);
    const lever = (logs[i]!.field - centre) / reach;
    return { quadrature: (lever * quadrature) / energy, rounding: (lever * rounding) / energy };
  });
  return [
    { component: 'Quadrature over time', id: 'E01', group: 'computation', u: Math.hypot(...slips.map(({ quadrature }) => quadrature)), note: 'Each energy by local polynomials of order 8 against 6, carried into the slope.' },
    { component: 'Rounding of the input', id: 'rounding', group: 'computation', u: Math.hypot(...slips.map(({ rounding }) => rounding)), note: 'Last printed digits of each file, carried into the slope.' },
  ];
}

function coverage(point: SeriesPoint): BudgetLine[] {
  const logs = byA(point);
  const scatter = scatterOf(logs, slopeAboutMeans(logs));
  return [
    { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution at each field.' },
    {
      component: 'Scatter about the line', id: 'scatter', group: 'coverage', u: scatter === null ? null : scatter / Math.sqrt(reachOf(logs)),
      ...(scatter === null ? {} : { degreesOfFreedom: logs.length - 2 }),
      note: scatter === null ? 'Not available: two files lie on their line whatever they are.' : `Standard error of the slope from ${logs.length} files.`,
    },
  ];
}

function massesDiffer({ runs }: SeriesPoint): Finding[] {
  const masses = new Set(runs.map(({ source }) => source.waveform.ownTotalMassMsun));
  if (masses.size < 2) return [];
  const where = runs.map(({ source }) => source.waveform.name).join(', ');
  return [{ code: 'engine/masses-differ', level: 'worth-a-look', where, text: 'The files of the series do not state one total mass. E/M goes with B and with M, so that part of the slope may be the mass’s.', fix: 'Compare runs at one total mass.' }];
}

function figureOf(point: SeriesPoint): Figure {
  const logs = byA(point).sort((p, q) => p.field - q.field);
  const residuals = residualsOf(logs, slopeAboutMeans(logs));
  const drawn = { quantity: 'electromagnetic energy', unit: 'M', axis: 'left', scale: 'log' } as const;
  return {
    kind: 'sweep',
    title: 'Electromagnetic energy against the field',
    x: { label: 'Field', unit: 'G', scale: 'log', values: logs.map(({ field }) => Math.exp(field)) },
    series: [
      { ...drawn, label: 'Energy of each file', role: 'claimed', values: logs.map(({ energy }) => Math.exp(energy)) },
      { ...drawn, label: 'Fitted power', role: 'recomputed', values: logs.map(({ energy }, i) => Math.exp(energy - residuals[i]!)) },
    ],
  };
}

function recipeOf(request: MeasureRequest, tolerance: (claimed: number) => number): ToneRecipe<SeriesPoint> {
  return {
    byRouteA: (point) => {
      const logs = byA(point);
      const value = slopeAboutMeans(logs);
      return { value, components: { scatter: scatterOf(logs, value) } };
    },
    byRouteB: (point) => slopeBetweenPairs(byB(point)),
    computation, coverage,
    findings: (point) => [...point.runs.flatMap(({ source }) => earlyPlateau(source)), ...massesDiffer(point), ...testFieldFindings(point.runs.map((run) => ({ point: asPoint(run), ratio: null })))],
    settings: ({ runs }) => usedSettings([{ name: 'startM', value: runs[0]!.source.startM, unit: 'M', matters: runs.some(({ source }) => source.waveform.junkEndM === null) }], request),
    figures: (point) => [figureOf(point)],
    tolerance,
  };
}

/**
 * Measures the power of the field with which the emitted energy grows.
 * Shape:  see Measurement.
 * Units:  dimensionless.
 * Error:  slips of the energies carried into the slope.
 * Fails:  notComputable with the findings that say why.
 * Source: Q24; settings.md section 7.
 */
export const measureFieldExponent =
  (tolerance: (claimed: number) => number) =>
  (request: MeasureRequest, watch: Watch): Measurement =>
    measureTones(request, watch, [{}], [prepare(request)], recipeOf(request, tolerance));
