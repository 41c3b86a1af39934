import type { Finding } from '../contract/finding';
import type { ModeIndex } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { toneName } from '../tones/tone';
import type { FollowedRun } from './followed-runs';
import type { Run, Runs } from './runs';

/** Names of runs as a sentence has them. */
export function named(waveforms: readonly Pick<Waveform, 'name'>[]): string {
  const names = waveforms.map(({ name }) => name);
  return names.length < 2 ? (names[0] ?? 'no run') : `${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
}

export const waveformsOfRuns = (runs: readonly Run[]): Waveform[] => runs.map(({ waveform }) => waveform);

export const short = (x: number, digits = 4): string => String(Number(x.toPrecision(digits)));

/** V14 for the mode that is followed. */
export function mirroredFindings({ waveform: { name }, mirrored }: FollowedRun, mode: ModeIndex | null): Finding[] {
  if (!mirrored) return [];
  return [{ code: 'engine/negative-m-assumed', level: 'needs-answer', where: name, text: `In ${name} ${toneName({ mode })} is absent and the sheet does not say why. We use H(ℓ,−m) = (−1)^ℓ H*(ℓ,m), which holds for a system symmetric about its orbital plane.`, fix: 'Declare negativeM: mirror, given or none.' }];
}

/** Members of the series that this claim does not compare. */
export function leftOutFindings({ leftOut, runs }: Runs, where: string): Finding[] {
  if (leftOut.length === 0) return [];
  return [{ code: 'engine/runs-left-out', level: 'note', where, text: `The series holds runs that differ in more than one respect. ${named(waveformsOfRuns(runs))} are compared; ${named(leftOut)} ${leftOut.length > 1 ? 'are' : 'is'} left out.` }];
}

export const noOrder = (where: string, text: string, fix: string): Finding => ({ code: 'engine/no-order', level: 'stops-lodging', where, text, fix });

/** V26 for the number of resolutions. */
export function fewResolutions(runs: readonly Run[], where: string, taken: string): Finding[] {
  if (runs.length >= 3) return [];
  const spacings = runs.map(({ place }) => `${short(place)} M`).join(' and ');
  return [{ code: 'engine/few-resolutions', level: 'worth-a-look', where, text: `${runs.length === 2 ? `Two resolutions, ${spacings}` : `One resolution, ${spacings}`}: no order can be measured${taken}.`, fix: 'Supply a third resolution.' }];
}

const firstTime = ({ axis }: Waveform): number => axis[0]!;
const stepOf = ({ axis }: Waveform): number => (axis[axis.length - 1]! - axis[0]!) / (axis.length - 1);

/** V26 for records that do not begin together. */
export function startFindings(runs: readonly Run[], where: string): Finding[] {
  const waveforms = waveformsOfRuns(runs);
  const starts = waveforms.map(firstTime);
  const apart = Math.max(...starts) - Math.min(...starts);
  if (!(apart > Math.max(...waveforms.map(stepOf)))) return [];
  return [{ code: 'engine/few-resolutions', level: 'worth-a-look', where, text: `The runs do not begin together: ${waveforms.map(({ name }, i) => `${name} at t = ${short(starts[i]!, 6)} M`).join(', ')}. What the longer ones hold before is not compared, and start-up radiation may differ.`, fix: 'Supply the runs from a common start.' }];
}

/** V27, and the radii that are no areal ones. */
export function radiusFindings(runs: readonly Run[], degree: number, where: string): Finding[] {
  const places = runs.map(({ place }) => place);
  const range = Math.max(...places) / Math.min(...places);
  const coordinate = runs.filter(({ waveform }) => waveform.radiusType === 'coordinate');
  const few: Finding[] = runs.length >= 4 && range >= 2 ? [] : [{ code: 'engine/few-radii', level: 'worth-a-look', where, text: `Extrapolation needs at least four radii spanning a factor two; here are ${runs.length} spanning a factor ${short(range, 3)}, for a polynomial of degree ${degree}.`, fix: 'Supply more radii, or lower extrapolationOrder.' }];
  const odd: Finding[] = coordinate.length === 0 ? [] : [{ code: 'engine/coordinate-radius', level: 'worth-a-look', where: named(waveformsOfRuns(coordinate)), text: `The radii of ${named(waveformsOfRuns(coordinate))} are coordinate radii and are used as they stand. A coordinate radius may lie some M off the areal one, and with it the limit moves: at 100 M one M is 1 % of the correction.`, fix: 'State areal radii.' }];
  return [...few, ...odd];
}

/** r_* = r + 2 ln(r/2 − 1), in M. */
const tortoise = (r: number): number => r + 2 * Math.log(r / 2 - 1);

/** C28: one number of time means another retarded time at each radius. */
export function timeLabelFindings(runs: readonly Run[], readsTimes: boolean, where: string): Finding[] {
  const labelled = runs.filter(({ waveform, place }) => waveform.timeLabel === 'coordinate' && place > 2);
  const lags = labelled.map(({ place }) => tortoise(place));
  if (!readsTimes || labelled.length < 2) return [];
  return [{ code: 'engine/time-label', level: 'worth-a-look', where, text: `The times of ${named(waveformsOfRuns(labelled))} are coordinate times: the same moment of the source arrives ${short(Math.max(...lags) - Math.min(...lags))} M later at the largest radius than at the smallest. A start or window given in t is another one of the source at each radius.`, fix: 'Give the records against retarded time t − r*, or a junkEndM for each.' }];
}

/** No single order describes the whole record. */
export function spreadFindings(range: number | null, median: number | null, where: string): Finding[] {
  if (range === null || range <= 1) return [];
  return [{ code: 'engine/no-single-order', level: 'worth-a-look', where, text: `Taken at each time by itself, the order is ${median === null ? 'none in the median' : `${short(median, 3)} in the median`} and its quartiles lie ${short(range, 3)} apart: no single order describes the record.`, fix: 'Declare a window in which the differences do not change sign, or supply a finer run.' }];
}

/** What the runs show one by one, the leading run last: said once, of the leading run where it shows it too. */
export function foundInRuns(runs: readonly { readonly name: string; readonly findings: readonly Finding[] }[]): Finding[] {
  const all = [...runs].reverse().flatMap(({ name, findings }) => findings.map((finding) => ({ name, finding })));
  const isSame = (p: Finding, q: Finding): boolean => p.code === q.code && p.level === q.level;
  return all.flatMap(({ name, finding }, i) => {
    if (all.slice(0, i).some((other) => other.name !== name && isSame(other.finding, finding))) return [];
    const others = [...new Set(all.filter((other) => other.name !== name && isSame(other.finding, finding)).map((other) => other.name))].reverse();
    return [others.length === 0 ? finding : { ...finding, text: `${finding.text} The same is found in ${named(others.map((other) => ({ name: other })))}.` }];
  });
}
