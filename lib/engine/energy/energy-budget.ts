import type { BudgetLine } from '../contract/measurement';
import type { ModeEnergy } from './energy-on-samples';
import { computationUncertainty, energyByRouteA, type EnergyAtPoint, type FluxStore } from './energy-point';
import type { EnergySettings } from './energy-settings';
import type { RadiationRecord } from './radiation-record';

const ROOT3 = Math.sqrt(3);

/** E07: the start moved by ±50 M, as far as the record goes. */
const START_MOVED_M = 50;

type Energy = (settings: EnergySettings) => EnergyAtPoint | null;

function startLine(record: RadiationRecord, settings: EnergySettings, here: EnergyAtPoint, energy: Energy, norm: number): BudgetLine {
  const moved = [-START_MOVED_M, START_MOVED_M]
    .map((by) => settings.startM + by)
    .filter((startM) => startM >= record.axis[0]! && startM < record.axis[record.axis.length - 1]!)
    .map((startM) => energy({ ...settings, startM }))
    .filter((found) => found !== null)
    .map((found) => Math.abs(found.energy - here.energy));
  const u = moved.length === 0 ? null : Math.max(...moved) / ROOT3 / norm;
  const note = moved.length === 0 ? 'The record is too short to move its start by 50 M.' : `Start of the integral moved by ${moved.length === 2 ? '±50 M' : '50 M (the record does not reach further)'}; half-width over √3.`;
  return { component: 'Start-up radiation', id: 'E07', group: 'coverage', u, note };
}

function floorLine(settings: EnergySettings, here: EnergyAtPoint, energy: Energy, norm: number): BudgetLine[] {
  const { floor } = settings;
  if (floor === null) return [];
  const moved = [0.7, 1.4].map((by) => energy({ ...settings, floor: floor * by })).filter((found) => found !== null);
  const u = moved.length === 0 ? null : Math.max(...moved.map((found) => Math.abs(found.energy - here.energy))) / ROOT3 / norm;
  return [{ component: 'Integration floor', id: 'E08', group: 'coverage', u, note: `ω₀ = ${Number(floor.toPrecision(4))} rad/M times 0.7 and 1.4; half-width over √3.` }];
}

/** Energy by ℓ, ascending. */
function byEll(modes: readonly ModeEnergy[]): { l: number; energy: number }[] {
  const sums = new Map<number, number>();
  for (const { l, energy } of modes) sums.set(l, (sums.get(l) ?? 0) + energy);
  return [...sums].map(([l, energy]) => ({ l, energy })).sort((a, b) => a.l - b.l);
}

/**
 * E09: the modes above the last ℓ, as the tail of a geometric series in E_ℓ. Symmetry can silence
 * every other ℓ, so the ratio is taken over two steps where the file has three. One-sided: half of it
 * ± half/√3; we leave the value as it is and give the whole over √3.
 */
function modesLine(modes: readonly ModeEnergy[], norm: number): BudgetLine {
  const base = { component: 'Modes left out', id: 'E09', group: 'coverage' } as const;
  const sums = byEll(modes);
  const [last, before, earlier] = [sums.at(-1), sums.at(-2), sums.at(-3)];
  if (!last || !before) return { ...base, u: null, note: 'One ℓ alone gives no trend to continue.' };
  const from = earlier ?? before;
  const ratio = last.energy / from.energy;
  if (!(ratio < 1)) return { ...base, u: null, note: `The energy does not fall from ℓ = ${from.l} to ${last.l}: no series to continue.` };
  const repeated = earlier ? before.energy + last.energy : last.energy;
  const rest = (repeated * ratio) / (1 - ratio);
  return { ...base, u: rest / ROOT3 / norm, note: `E falls to ${Number((100 * ratio).toPrecision(2))} % from ℓ = ${from.l} to ${last.l}; the rest of that series above ℓ = ${last.l}, one-sided.` };
}

/**
 * The error budget of a radiated energy at one point.
 * Shape:  computation lines make U, coverage lines do not.
 * Units:  fractions of the normalising mass (`norm` in M).
 * Error:  estimates; what one file cannot show is null.
 * Fails:  never.
 * Source: domain reference section 5; settings.md rule 12.
 */
export function energyBudget(record: RadiationRecord, settings: EnergySettings, here: EnergyAtPoint, store: FluxStore, digits: number | null, norm: number): BudgetLine[] {
  const { quadrature, stencil, rounding } = computationUncertainty(record, settings, store, digits);
  const energy: Energy = (changed) => energyByRouteA(record, changed, store);
  const integrates = record.variable === 'psi4';
  const lines: BudgetLine[] = [
    { component: 'Quadrature over time', id: 'E01', group: 'computation', u: quadrature / norm, note: 'Local polynomials of order 8 against 6; half-width over √3.' },
    {
      component: integrates ? 'Integration in frequency' : 'Differentiation',
      id: 'E02',
      group: 'computation',
      u: stencil / norm,
      note: integrates ? 'Interpolation of order 8 against 6 and half the points.' : record.variable === 'news' ? 'News is taken as it stands.' : '13-point against 9-point differences.',
    },
    {
      component: 'Rounding of the input',
      id: 'rounding',
      group: 'computation',
      u: rounding / norm,
      note: digits === null ? 'Binary doubles: nothing was printed.' : `${digits} significant digits in the file.`,
    },
    { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution.' },
    { component: 'Extraction radius', id: 'E06', group: 'coverage', u: null, note: 'Not available: one radius.' },
    startLine(record, settings, here, energy, norm),
    ...floorLine(settings, here, energy, norm),
    modesLine(here.modes, norm),
  ];
  return lines;
}
