import type { BudgetLine } from '../contract/measurement';
import type { QuantityInputs } from '../contract/quantity';
import type { Waveform } from '../contract/waveform';
import { areal } from './areal-radius';
import { withUnit } from './numeral';
import type { Rerun } from './rerun';
import { radiusError, togetherAs, truncationError, type Part, type RunNumber, type SimulationError } from './simulation-error';

export type Kind = 'resolution' | 'radius';

const placeOf = (kind: Kind, waveform: Waveform): number | null => (kind === 'resolution' ? (waveform.resolution ?? null) : areal(waveform));

/**
 * Runs of a waveform's simulation that differ from it in this one thing, as far as the sheet says.
 * Shape:  in the order of the sheet.
 * Units:  none.
 * Error:  none.
 * Fails:  never; none where the sheet gives no resolution or radius.
 * Source: the sheet's \`series\`, \`resolution\` and \`extractionRadiusM\`.
 */
export function relativesOf(kind: Kind, waveform: Waveform, inputs: QuantityInputs): Waveform[] {
  const other: Kind = kind === 'resolution' ? 'radius' : 'resolution';
  const own = placeOf(kind, waveform);
  if (own === null) return [];
  return (inputs.relatives?.get(waveform.name) ?? []).filter((relative) => {
    const place = placeOf(kind, relative);
    return relative.name !== waveform.name && place !== null && place !== own && placeOf(other, relative) === placeOf(other, waveform);
  });
}

/** Waveforms of a claim, each once; the runs of a series are not: what they differ by is the claim. */
export function waveformsOf({ of }: QuantityInputs): Waveform[] {
  const { series: _, ...roles } = of;
  return [...new Set(Object.values(roles).flat())];
}

const DESCRIBED = {
  resolution: { component: 'Simulation truncation error', id: 'E05', one: 'one resolution' },
  radius: { component: 'Extraction radius', id: 'E06', one: 'one radius' },
} as const;

export const unavailable = (kind: Kind, reason: string = DESCRIBED[kind].one): BudgetLine => {
  const { component, id } = DESCRIBED[kind];
  return { component, id, group: 'coverage', u: null, note: `Not available: ${reason}.` };
};

function partOf(kind: Kind, waveform: Waveform, relatives: readonly Waveform[], here: number, rerun: Rerun, formalOrder: number | null, unit: string): SimulationError | null {
  const runs: RunNumber[] = [{ value: here, place: placeOf(kind, waveform)!, isOwn: true }];
  for (const relative of relatives) {
    const value = rerun({ waveform: (given) => (given === waveform ? relative : given) });
    if (value !== null) runs.push({ value, place: placeOf(kind, relative)!, isOwn: false });
  }
  return kind === 'resolution' ? truncationError(runs, formalOrder, unit) : radiusError(runs, unit);
}

/**
 * E05 or E06 of a claim: its number from every other run of each of its simulations, put together.
 * Shape:  one line.
 * Units:  the quantity's.
 * Error:  an estimate.
 * Fails:  null with the reason where one of the waveforms has no other run, or none gives a number.
 * Source: domain reference 5.1.
 */
export function simulationLine(kind: Kind, inputs: QuantityInputs, here: number, rerun: Rerun, formalOrder: number | null, unit: string): BudgetLine {
  const waveforms = waveformsOf(inputs);
  const parts: Part[] = [];
  const without: string[] = [];
  for (const waveform of waveforms) {
    const relatives = relativesOf(kind, waveform, inputs);
    const error = relatives.length === 0 ? null : partOf(kind, waveform, relatives, here, rerun, formalOrder, unit);
    if (error === null) without.push(waveform.name);
    else parts.push({ from: waveform.series ?? waveform.name, error });
  }
  if (parts.length === 0) return unavailable(kind);
  const { component, id, one } = DESCRIBED[kind];
  const together = togetherAs(id, parts);
  if (without.length > 0) return unavailable(kind, `${one} of ${without.join(', ')}; of ${parts.map(({ from }) => from).join(', ')} alone ${withUnit(together.u, unit)}`);
  const { u, degreesOfFreedom, note } = together;
  return { component, id, group: 'coverage', u, note, ...(degreesOfFreedom === undefined ? {} : { degreesOfFreedom }) };
}
