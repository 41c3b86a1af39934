import type { SettingName } from '@/lib/engine/contract/settings';
import { unitOf } from '@/lib/engine/contract/quantity';
import { settingsTable } from '@/lib/engine/quantities/settings-table';
import type { Candidate, ExtraNumber } from '@/lib/explain/candidate';
import { extraNumber, type ReadingOnGrid } from '@/lib/explain/search/extra-number';
import type { Node, TriedNode } from '@/lib/explain/search/node';
import { factorsAt, rerunOf } from './node-values';
import { predict, type Asked, type Asking } from './predict';
import type { Subject } from './subject';

/** The parameter along which a further number may be asked for: the swept one, else the first of these that the claim has. */
const free: readonly SettingName[] = ['totalMassMsun', 'fieldGauss', 'inclinationRad'];

/** Around the stated value; a reader can still relate to it. */
const aroundNumber = [0.5, 0.7, 0.85, 1.2, 1.5, 2, 3];
const angles = [0, 0.5236, 0.7854, 1.0472, 1.309, 1.5708];

const rounded = (x: number): number => Number(x.toPrecision(2));

interface Free {
  readonly setting: SettingName;
  readonly stated: readonly number[];
  readonly grid: readonly number[];
}

function freeOf({ asked: { claim } }: Subject): Free | null {
  const { over, settings, quantity } = claim;
  const swept = over?.values.filter((value) => typeof value === 'number') ?? [];
  // Nothing lies between words, and no one of them stands for the others along another parameter.
  if (over !== null && swept.length < over.values.length) return null;
  const setting = over?.setting ?? free.find((name) => typeof settings[name] === 'number' && quantity.sweepable.includes(name));
  if (setting === undefined) return null;
  const one = settings[setting];
  const stated = over !== null ? swept : typeof one === 'number' ? [one] : [];
  if (stated.length === 0) return null;
  const grid = setting === 'inclinationRad' || setting === 'azimuthRad' ? angles : [...new Set(stated.slice(0, 3).flatMap((x) => aroundNumber.map((by) => rounded(x * by))))].sort((p, q) => p - q).slice(0, 14);
  return { setting, stated, grid };
}

/** The claim asked along the grid instead of where it stands. */
function alongGrid({ asked }: Subject, { setting, grid }: Free): Asked {
  const { [setting]: _, ...settings } = asked.claim.settings;
  return { ...asked, claim: { ...asked.claim, settings, over: { setting, values: [...grid] } }, points: grid.map((_x, k) => k) };
}

/** A factor that hangs on the claim's own points, or settings that do, cannot be carried to another place. */
const isPortable = ({ flips }: Node): boolean => flips.every(({ change }) => (change.kind === 'factor' ? typeof change.factor === 'number' : change.perPoint === undefined));

function readingAlong(along: Asked, node: Node | null, { candidate, clause }: Pick<ReadingOnGrid, 'candidate' | 'clause'>, asking: Asking): ReadingOnGrid | null {
  if (node !== null && !isPortable(node)) return null;
  const prediction = predict(along, node === null ? { kind: 'rerun', settings: {} } : rerunOf(node), asking);
  if ('because' in prediction) return null;
  const values = prediction.values.map((value) => (value === null || node === null ? value : value * factorsAt(node, 0)));
  return { candidate, clause, values, expandedUncertainties: values.map(() => null) };
}

/**
 * The one further number that would tell the leading candidates of a claim apart, with what each predicts there.
 * Null where the claim has no free parameter, or no place tells.
 */
export function extraNumberOf(subject: Subject, candidates: readonly Candidate[], tried: readonly TriedNode[], asking: Asking): ExtraNumber | null {
  const parameter = freeOf(subject);
  const named = candidates.filter(({ standing }) => standing === 'candidate');
  const leading = (named.length > 0 ? named : candidates).slice(0, 3);
  const [first] = subject.judged.points;
  if (parameter === null || leading.length === 0 || first === undefined) return null;
  const along = alongGrid(subject, parameter);
  const declared = readingAlong(along, null, { candidate: null, clause: '' }, asking);
  const readings = leading.map((candidate) => {
    const node = tried.find((one) => one.node.id === candidate.id)?.node;
    return node === undefined ? null : readingAlong(along, node, { candidate: candidate.id, clause: candidate.readings[0]?.clause ?? '' }, asking);
  });
  if (declared === null || readings.includes(null)) return null;
  const { quantity, settings } = subject.asked.claim;
  const relative = Math.max(...subject.judged.points.map(({ expandedUncertainty, value }) => Math.abs(expandedUncertainty / value)));
  const withWidth = (reading: ReadingOnGrid): ReadingOnGrid => ({ ...reading, expandedUncertainties: reading.values.map((value) => (value === null ? null : Math.abs(value) * relative)) });
  return extraNumber({
    title: quantity.title, unit: unitOf(quantity, settings), scale: subject.judged.scale, tolerance: first.tolerance,
    setting: parameter.setting, settingUnit: settingsTable.get(parameter.setting)?.unit ?? '', grid: parameter.grid, stated: parameter.stated,
    readings: [declared, ...readings.filter((reading): reading is ReadingOnGrid => reading !== null)].map(withWidth),
  });
}
