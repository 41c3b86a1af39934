import { houseMatchThreshold, houseValues } from '@/lib/engine/contract/house-values';
import { massMatters, type DetectorPoint, type DetectorTraits } from '@/lib/engine/conditioning/detector-settings';
import type { ConditionedWaveform } from '@/lib/engine/conditioning/condition-waveform';
import type { UsedSetting } from '@/lib/engine/contract/measurement';
import type { SettingName } from '@/lib/engine/contract/settings';

interface Row {
  readonly name: SettingName | 'negativeM';
  readonly value: (point: DetectorPoint) => unknown;
  readonly unit?: string;
  /** Was it used at all? */
  readonly used: boolean;
  /** Could another choice of an undeclared setting change this value? */
  readonly matters: boolean;
}

export interface SettingsContext {
  readonly points: readonly DetectorPoint[];
  readonly waveforms: readonly ConditionedWaveform[];
  readonly traits: DetectorTraits;
  readonly allowed: readonly SettingName[];
  readonly swept: SettingName | null;
}

/** Which of the waveforms' properties decide whether a default can matter. */
function facts({ points, waveforms, traits }: SettingsContext) {
  const point = points[0]!;
  const given = waveforms.map((c) => c.given);
  const modes = given.some((w) => w.content.kind === 'modes');
  const several = waveforms.some((c) => c.whole.content.kind === 'modes' && c.whole.content.modes.length > 1);
  const optimal = point.average === 'optimal' || !traits.loudness;
  const source = point.massFrame === 'source';
  const open = waveforms.some((c) => {
    const taper = c.taper('auto', point.declared.lMax ?? null);
    return taper.startIsOpen || taper.endIsOpen;
  });
  const seen = modes && (optimal || point.average === 'sky');
  // A hybrid is face-on and plus by definition: what the claim says of that is shown, nothing is assumed.
  const fixed = (name: 'inclinationRad' | 'azimuthRad' | 'response'): boolean => traits.joined === true && point.declared[name] === undefined;
  const bySight = (angle: 'inclination' | 'azimuth'): boolean => seen && !fixed(`${angle}Rad`) && !(traits.goesOver?.[angle] && point.declared[`${angle}Rad`] === undefined);
  return { point, given, modes, several, optimal, source, open, bySight, fixed };
}

function rowsOf(context: SettingsContext): Row[] {
  const { traits, waveforms } = context;
  const { point, given, modes, several, optimal, source, open, bySight, fixed } = facts(context);
  const { declared } = point;
  const masses = massMatters(given);
  const fromDistance = source && !traits.horizon && declared.redshift === undefined;
  const toDistance = traits.needsDistance && !traits.horizon && declared.distanceMpc === undefined && declared.redshift !== undefined;
  const expands = fromDistance || toDistance || (traits.horizon && source) || traits.inRedshift === true;
  const weighs = context.allowed.includes('weight');
  const searchesMass = point.maximise.includes('templateMass');
  return [
    { name: 'totalMassMsun', value: (p) => p.massMsun, unit: 'M☉', used: point.massMsun !== null, matters: false },
    { name: 'massFrame', value: (p) => p.massFrame, used: masses, matters: masses },
    { name: 'redshift', value: (p) => p.redshift, used: source && !traits.horizon, matters: true },
    {
      name: 'distanceMpc',
      value: (p) => p.distanceMpc ?? given[0]!.ownDistanceMpc,
      unit: 'Mpc',
      used: traits.needsDistance && !traits.horizon,
      matters: toDistance,
    },
    { name: 'fLowHz', value: (p) => p.band.fLowHz, unit: 'Hz', used: true, matters: true },
    { name: 'fHighHz', value: (p) => p.band.fHighHz, unit: 'Hz', used: true, matters: true },
    { name: 'maximise', value: (p) => p.maximise, used: traits.maximise !== null, matters: true },
    { name: 'templateMassRange', value: (p) => p.templateMassRange, unit: '× M', used: searchesMass, matters: true },
    { name: 'inclinationRad', value: (p) => p.a.inclinationRad, unit: 'rad', used: bySight('inclination'), matters: true },
    { name: 'azimuthRad', value: (p) => p.a.azimuthRad, unit: 'rad', used: bySight('azimuth'), matters: true },
    { name: 'response', value: (p) => p.response, used: optimal && !fixed('response'), matters: true },
    { name: 'modes', value: (p) => p.declared.modes ?? houseValues.modes, used: modes, matters: several },
    { name: 'lMax', value: (p) => p.declared.lMax, used: declared.lMax !== undefined, matters: false },
    {
      name: 'average',
      value: (p) => p.average,
      used: traits.loudness && !(declared.rateLaw === 'comoving') && traits.goesOver === undefined && traits.joined === undefined,
      matters: !point.band.noise.alreadyAveraged,
    },
    { name: 'detectors', value: (p) => p.detectors, used: traits.absolute, matters: true },
    { name: 'armAngleDeg', value: (p) => p.armAngleDeg, unit: '°', used: traits.absolute, matters: true },
    { name: 'taper', value: (p) => p.declared.taper ?? houseValues.taper, used: given.some((w) => w.domain === 'time'), matters: open },
    weighs
      ? { name: 'threshold', value: (p) => p.declared.threshold ?? houseMatchThreshold, used: true, matters: true }
      : { name: 'threshold', value: (p) => p.threshold, used: traits.horizon, matters: true },
    { name: 'weight', value: (p) => p.declared.weight ?? houseValues.weight, used: weighs, matters: true },
    { name: 'cosmology', value: (p) => p.cosmology, unit: 'h0 in km/s/Mpc', used: expands, matters: true },
    { name: 'parameters', value: (p) => p.declared.parameters ?? houseValues.parameters, used: context.allowed.includes('parameters'), matters: true },
    { name: 'rateLaw', value: (p) => p.declared.rateLaw ?? houseValues.rateLaw, used: context.allowed.includes('rateLaw'), matters: true },
    { name: 'statistic', value: (p) => p.declared.statistic ?? houseValues.statistic, used: context.allowed.includes('statistic'), matters: true },
    { name: 'joinHz', value: (p) => p.declared.joinHz, unit: 'Hz', used: traits.joined === true, matters: false },
    { name: 'amplitudeOrder', value: (p) => p.declared.amplitudeOrder ?? houseValues.amplitudeOrder, used: traits.joined === true, matters: true },
    ...(['massRatio', 'chi1z', 'chi2z'] as const).map((name): Row => ({ name, value: (p) => p.declared[name], used: declared[name] !== undefined, matters: false })),
    { name: 'negativeM', value: () => 'mirror', used: waveforms.some((c) => c.mirrorAssumed), matters: true },
  ];
}

const same = (a: unknown, b: unknown): boolean => a === b || JSON.stringify(a) === JSON.stringify(b);

/** One value where all points agree; else the range that the points span. */
function shownValue(row: Row, points: readonly DetectorPoint[]): unknown {
  const values = points.map(row.value);
  const first = values[0];
  if (values.every((value) => same(value, first))) return first;
  const numbers = values.filter((value) => typeof value === 'number');
  return numbers.length === values.length ? { from: Math.min(...numbers), to: Math.max(...numbers) } : values;
}

/**
 * The settings as a reader sees them, and the house defaults that could change the value.
 * Shape:  one entry a setting in use; `assumed` in the order of the settings table.
 * Units:  in `unit`.
 * Error:  none.
 * Fails:  never.
 * Source: settings.md section 1 (the ● marks).
 */
export function usedSettings(context: SettingsContext): { settings: UsedSetting[]; assumed: string[] } {
  const { points, swept } = context;
  const { declared } = points[0]!;
  const standing = ({ name }: Row): UsedSetting['standing'] =>
    name === swept ? 'swept' : name !== 'negativeM' && declared[name] !== undefined ? 'declared' : 'assumed';
  const rows = rowsOf(context).filter((row) => row.used);
  const settings = rows.map((row): UsedSetting => ({
    name: row.name,
    value: shownValue(row, points),
    standing: standing(row),
    ...(row.unit === undefined ? {} : { unit: row.unit }),
  }));
  // A file's own mass or distance was not assumed by us.
  const kept = settings.filter(({ name, standing: how }) => !(how === 'assumed' && (name === 'totalMassMsun' || name === 'lMax')));
  return { settings: kept, assumed: rows.filter((row) => row.matters && standing(row) === 'assumed').map((row) => row.name) };
}

/**
 * What each point took where points differ without a sweep of that setting: the settings above hold only the ends.
 * Shape:  one entry a point, empty where all points agree.
 * Units:  as the names say.
 * Error:  none.
 * Fails:  never.
 * Source: a number that is printed alone has to name its own band.
 */
export function settingsByPoint(context: SettingsContext): Readonly<Record<string, unknown>>[] {
  const { points, swept } = context;
  const differing = rowsOf(context).filter((row) => row.used && row.name !== swept && !points.every((point) => same(row.value(point), row.value(points[0]!))));
  return points.map((point) => Object.fromEntries(differing.map((row) => [row.name, row.value(point)])));
}
