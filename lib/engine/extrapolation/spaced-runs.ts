import type { Finding } from '../contract/finding';
import type { MeasureRequest } from '../contract/quantity';
import { isSamePlace, runsApart, type Run } from './runs';
import { fewResolutions, leftOutFindings, named, noOrder, short, startFindings, waveformsOfRuns } from './series-findings';

export interface SpacedRuns {
  /** The finest three, or two where that is enough; coarsest first. */
  readonly runs: readonly Run[];
  /** All of them. */
  readonly all: readonly Run[];
  readonly findings: readonly Finding[];
  /** For findings about all runs together. */
  readonly where: string;
}

/**
 * The finest three runs of a series, or what stops the claim.
 * Shape:  three runs, or two where a formal order is declared.
 * Units:  spacings in M.
 * Error:  none.
 * Fails:  with the findings: no spacing stated, too few runs, equal spacings.
 * Source: settings.md section 6.
 */
export function spacedRuns({ inputs, claimId }: MeasureRequest, fewest: 2 | 3, taken: string): SpacedRuns | readonly Finding[] {
  const series = inputs.of.series ?? [];
  const where = series[0]?.series ?? claimId;
  const apart = runsApart('resolution', series);
  const { unplaced, runs: all } = apart;
  if (unplaced.length > 0) return [noOrder(named(unplaced), `${named(unplaced)} ${unplaced.length > 1 ? 'state' : 'states'} no resolution, so it is not known which run is the finer one.`, 'State the grid spacing in M as "resolution" of each waveform of the series.')];
  const few = fewResolutions(all, where, taken);
  if (all.length < fewest) return [noOrder(where, `The series ${where} holds ${all.length === 1 ? 'one run' : `${all.length} runs`}, ${named(waveformsOfRuns(all))}; ${fewest === 3 ? 'three are' : 'at least two are'} needed.`, 'Supply a run at another resolution.'), ...few];
  const runs = all.slice(-3);
  const twin = runs.find((run, i) => i > 0 && isSamePlace(run.place, runs[i - 1]!.place));
  if (twin) return [noOrder(where, `Two runs of ${where} have the same spacing, ${short(twin.place, 6)} M: ${named(waveformsOfRuns(runs.filter(({ place }) => isSamePlace(place, twin.place))))}.`, 'Give each run its own resolution, or take one of them out of the series.')];
  return { runs, all, where, findings: [...few, ...leftOutFindings(apart, where), ...startFindings(runs, where)] };
}

export const areRuns = (found: SpacedRuns | readonly Finding[]): found is SpacedRuns => 'runs' in found;
