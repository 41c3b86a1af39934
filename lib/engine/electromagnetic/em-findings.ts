import type { Finding } from '../contract/finding';
import { percent, scientific, short } from '../findings/spelt';
import { samplingFindings } from '../radiation/radiation-findings';
import { energyFlux } from '../radiation/flux-figure';
import type { EmPoint, EmSource } from './em-point';

/** Above these a field bends spacetime enough to be no longer a test field (V30). */
const MOST_FIELD_HAT = 1e-2;
const MOST_RATIO = 1e-3;

/** Share of the way from the start to the peak that counts as before the signal. */
const EARLY = 0.1;
/** How loud it may be: 10⁻⁴, less a tenth, for a background that beats with the peak moves the peak itself by per cents. */
const LOUD = 0.9e-4;

/**
 * V30: a field or an energy at which the B² rule is not justified; said of the worst of several points.
 * Shape:  one finding or none.
 * Units:  B̂ and the ratio are dimensionless.
 * Error:  none: thresholds only.
 * Fails:  never; a field or ratio that is not known says nothing.
 * Source: domain reference Q24, V30.
 */
export function testFieldFindings(points: readonly { readonly point: EmPoint; readonly ratio: number | null }[]): Finding[] {
  const beyond = ({ point, ratio }: (typeof points)[number]): boolean => (point.scale.fieldHat ?? 0) > MOST_FIELD_HAT || (ratio ?? 0) > MOST_RATIO;
  const found = points.filter(beyond).sort((p, q) => (q.point.scale.fieldHat ?? 0) - (p.point.scale.fieldHat ?? 0))[0];
  if (found === undefined) return [];
  const { fieldHat, fieldGauss, massMsun } = found.point.scale;
  const where = found.point.source.waveform.name;
  const at = fieldGauss === null || massMsun === null ? `For ${where}` : `At ${scientific(fieldGauss)} G and ${scientific(massMsun)} M☉`;
  const strong = fieldHat !== null && fieldHat > MOST_FIELD_HAT ? ` B̂ = ${short(fieldHat, 2)}, above ${MOST_FIELD_HAT}` : '';
  const loud = found.ratio !== null && found.ratio > MOST_RATIO ? ` E_EM/E_GW = ${scientific(found.ratio)}, above ${MOST_RATIO}` : '';
  const said = [strong, loud].filter((part) => part !== '').join(' and');
  return [
    {
      code: 'engine/not-test-field',
      level: 'worth-a-look',
      where,
      text: `${at},${said}: the field is no longer a test field, and the rule E ∝ B̂² is not justified there.`,
      fix: 'Claim the number for a weaker field, or supply a run in which the field acts back on the spacetime.',
    },
  ];
}

/**
 * Radiation before the signal: a stationary background, or a record that begins in the midst of things.
 * Shape:  one finding or none.
 * Units:  shares of the peak of Σ|rφ₂|² and of the energy.
 * Error:  none: thresholds only.
 * Fails:  never.
 * Source: settings.md section 7; domain reference C51. What counts as before the signal is ours.
 */
export function earlyPlateau({ waveform: { name }, radiation, startM }: EmSource): Finding[] {
  const { axis } = radiation;
  const power = energyFlux(radiation);
  const first = Math.max(0, axis.findIndex((t) => t >= startM));
  let top = first;
  for (let i = first; i < axis.length; i++) if (power[i]! > power[top]!) top = i;
  const until = axis[first]! + EARLY * (axis[top]! - axis[first]!);
  let [early, sum, count] = [0, 0, 0];
  for (let i = first; i <= top && axis[i]! <= until; i++) [early, sum, count] = [Math.max(early, power[i]!), sum + power[i]!, count + 1];
  if (top === first || !(early > LOUD * power[top]!)) return [];
  const total = power.reduce((all, p, i) => all + (i > first ? ((p + power[i - 1]!) / 2) * (axis[i]! - axis[i - 1]!) : 0), 0);
  const carried = ((sum / count) * (axis[axis.length - 1]! - axis[first]!)) / total;
  return [
    {
      code: 'engine/early-plateau',
      level: 'worth-a-look',
      where: name,
      text: `Before the signal, up to t = ${short(until, 4)} M, |φ₂|² of ${name} reaches ${scientific(early / power[top]!)} of its peak. The background is not subtracted; were it there throughout, it would carry about ${percent(Math.min(1, carried))} of the energy.`,
      fix: 'Subtract the stationary background from the modes, give an earlier record, or declare startM after it.',
    },
  ];
}

const perFieldNote = ({ source, scale }: EmPoint): Finding[] =>
  scale.perField
    ? [{ code: 'engine/per-field', level: 'note', where: source.waveform.name, text: `${source.waveform.name} holds rφ₂ over B̂, and the claim names no field: the number is an energy over M·B̂².`, fix: 'Declare fieldGauss and totalMassMsun to have the energy at a field.' }]
    : [];

/** What one file of φ₂ shows beside its number: V04, a background, and a number without a field. */
export const sourceFindings = (point: EmPoint): Finding[] => [
  ...samplingFindings(point.source.record, point.source.modes, point.source.waveform.name),
  ...earlyPlateau(point.source),
  ...perFieldNote(point),
];
