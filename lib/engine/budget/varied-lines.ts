import type { BudgetLine, Measurement } from '../contract/measurement';
import type { MeasureRequest } from '../contract/quantity';
import type { DeclaredSettings } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { cutBefore, unitsPerM } from './cut-start';
import { halfUnit } from './half-unit';
import { ROOT3 } from './half-width';
import { waveformsOf } from './relatives';
import { numeral, withUnit } from './numeral';
import type { Rerun } from './rerun';
import { togetherAs, type Part } from './simulation-error';
import { smoothedInspiral } from './smooth-inspiral';

export interface Varying {
  readonly quantityId: string;
  /** The claim's, in which the notes give what a change moves. */
  readonly unit: string;
  readonly allowed: readonly string[];
  readonly request: MeasureRequest;
  readonly measurement: Measurement;
  readonly here: number;
  readonly rerun: Rerun;
}

const has = ({ measurement }: Varying, id: string): boolean => measurement.budget.some((line) => line.id === id && line.u !== null);
const usedOf = ({ measurement }: Varying, name: string): unknown => measurement.settings.find((setting) => setting.name === name)?.value;

/** E07: start moved by ±50 M around the end of the burst, or off the first sample where no burst is declared. */
const START_MOVED_M = 50;

function startOf(waveform: Waveform, { rerun, here, unit }: Varying): Part | string {
  const perM = unitsPerM(waveform);
  if (perM === null) return waveform.domain === 'time' ? `${waveform.name} gives no mass by which 50 M would be a time` : `${waveform.name} is a transform and has no start`;
  const first = waveform.axis[0]!;
  const base = waveform.junkEndM ?? first;
  const times = [base - START_MOVED_M * perM, base, base + START_MOVED_M * perM].filter((time) => time > first);
  const moved = times.flatMap((time) => {
    const cut = cutBefore(waveform, time);
    const value = cut === null ? null : rerun({ waveform: (given) => (given === waveform ? cut : given) });
    return value === null ? [] : [value - here];
  });
  if (moved.length === 0) return `${waveform.name} is too short to move its start by 50 M`;
  const largest = moved.reduce((far, x) => (Math.abs(x) > Math.abs(far) ? x : far));
  const what = waveform.junkEndM === null ? `record of ${waveform.name} begun 50 M later` : `record of ${waveform.name} begun at the end of its burst, ±50 M`;
  return { from: waveform.series ?? waveform.name, error: { u: largest / ROOT3, note: `${what}: ${moved.map((x, i) => (i < moved.length - 1 ? numeral(x) : withUnit(x, unit))).join(', ')}; half-width over √3.` } };
}

function startLine(varying: Varying): BudgetLine[] {
  const base = { component: 'Start-up radiation', id: 'E07', group: 'coverage' } as const;
  if (has(varying, 'E07') || !varying.measurement.budget.some(({ id }) => id === 'E07')) return [];
  const found = waveformsOf(varying.request.inputs).map((waveform) => startOf(waveform, varying));
  const refused = found.filter((part) => typeof part === 'string');
  if (refused.length > 0) return [{ ...base, u: null, note: `Not available: ${refused.join('; ')}.` }];
  const { u, note } = togetherAs('E07', found.filter((part) => typeof part !== 'string'));
  return [{ ...base, u, note: note.replace(/^./, (c) => c.toUpperCase()) }];
}

/** E10: from here on a declared eccentricity is weighed. */
const ECCENTRIC = 1e-3;

function eccentricityLine(varying: Varying): BudgetLine[] {
  const base = { component: 'Eccentricity', id: 'E10', group: 'coverage' } as const;
  const eccentric = waveformsOf(varying.request.inputs).filter(({ binary }) => (binary.eccentricity ?? 0) > ECCENTRIC);
  if (eccentric.length === 0 || varying.quantityId === 'eccentricity' || has(varying, 'E10')) return [];
  const smooth = new Map(eccentric.map((waveform) => [waveform, smoothedInspiral(waveform)] as const));
  const names = eccentric.map(({ name, binary }) => `${name} (e = ${binary.eccentricity})`).join(', ');
  const value = [...smooth.values()].includes(null) ? null : varying.rerun({ waveform: (given) => smooth.get(given) ?? given });
  if (value === null) return [{ ...base, u: null, note: `Not available: the inspiral of ${names} is too short to smooth.` }];
  return [{ ...base, u: Math.abs(value - varying.here) / ROOT3, note: `Inspiral of ${names} smoothed by polynomials in phase and amplitude; half-width over √3.` }];
}

/** E11: the join moved by a fifth, and the other order of the amplitude. */
function joinLine(varying: Varying): BudgetLine[] {
  const join = usedOf(varying, 'joinHz');
  if (typeof join !== 'number' || has(varying, 'E11')) return [];
  const swept = varying.request.over?.setting === 'joinHz';
  const order = usedOf(varying, 'amplitudeOrder') === 0 ? 1 : 0;
  const moved = [0.8 * join, 1.2 * join].map((x) => varying.rerun(swept ? { swept: x } : { settings: { joinHz: x } }));
  const values = [...moved, varying.rerun({ settings: { amplitudeOrder: order } })].filter((value) => value !== null);
  const largest = Math.max(...values.map((value) => Math.abs(value - varying.here)));
  return [{ component: 'Post-Newtonian part', id: 'E11', group: 'coverage', u: values.length === 0 ? null : largest / ROOT3, note: `Join moved by a fifth to either side, and amplitude of order ${order}; half-width over √3.` }];
}

const MEASURED = ['massRatio', 'chi1z', 'chi2z'] as const;

/** E13: a mass ratio or a spin that is printed with decimals was measured, or rounded; whole numbers are meant as they stand. */
function parameterLine(varying: Varying): BudgetLine[] {
  const rounded = MEASURED.flatMap((name) => {
    const value = usedOf(varying, name);
    return typeof value === 'number' && !Number.isInteger(value) && varying.allowed.includes(name) && varying.request.over?.setting !== name ? [{ name, value }] : [];
  });
  if (rounded.length === 0 || has(varying, 'E13')) return [];
  const moves = rounded.map(({ name, value }) => varying.rerun({ settings: { [name]: value + halfUnit(value) } }));
  const u = moves.some((value) => value === null) ? null : Math.hypot(...moves.map((value) => (value ?? Number.NaN) - varying.here)) / ROOT3;
  return [{ component: 'Rounded parameters of the claim', id: 'E13', group: 'coverage', u, note: `Half a unit of the last digit of ${rounded.map(({ name }) => name).join(' and ')}, over √3.` }];
}

const MOVED = [-0.2, 0, 0.2];

/** E15: both edges of a window moved by a fifth of its length, nine windows in all. */
function windowLine(varying: Varying): BudgetLine[] {
  const window = usedOf(varying, 'window');
  if (!Array.isArray(window) || varying.measurement.budget.some(({ id }) => id === 'E15')) return [];
  const [from, to] = window as [number, number];
  const length = to - from;
  const windows = MOVED.flatMap((x) => MOVED.map((y): NonNullable<DeclaredSettings['window']> => [from + x * length, to + y * length]));
  const values = windows.map((moved) => varying.rerun({ settings: { window: moved } })).filter((value) => value !== null);
  const base = { component: 'Choice of the window', id: 'E15', group: 'coverage' } as const;
  if (values.length < 2) return [{ ...base, u: null, note: 'Not available: the records are too short to move the edges of the window.' }];
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const u = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
  return [{ ...base, u, degreesOfFreedom: values.length - 1, note: `Each edge moved by a fifth of the window's length: standard deviation of the ${values.length} windows inside the records.` }];
}

/** E16: half of what published fits span. */
function scatterLine(varying: Varying, components: Readonly<Record<string, number | null>>): BudgetLine[] {
  const half = components.halfRange;
  if (typeof half !== 'number' || varying.measurement.budget.some(({ id }) => id === 'E16')) return [];
  return [{ component: 'Scatter of published fits', id: 'E16', group: 'coverage', u: half / ROOT3, note: `Half of what the fits that apply span (${withUnit(half, varying.unit)}), over √3.` }];
}

/**
 * Components that come from computing the number again, wherever a quantity did not estimate them by itself.
 * Shape:  lines that are new, or take the place of one that was not available.
 * Units:  the quantity's.
 * Error:  estimates.
 * Fails:  null with the reason.
 * Source: domain reference 5.1.
 */
export const variedLines = (varying: Varying, components: Readonly<Record<string, number | null>>): BudgetLine[] => [
  ...startLine(varying),
  ...eccentricityLine(varying),
  ...joinLine(varying),
  ...parameterLine(varying),
  ...windowLine(varying),
  ...scatterLine(varying, components),
];
