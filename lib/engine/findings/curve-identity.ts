import type { Finding } from '../contract/finding';
import { angular, constantRatio, densityMistaken, isNamed, octaves, pointsAgainst, APART, SAME, type UploadedCurve } from '../noise/beside-built-in';
import { builtInCurves, type BuiltInCurve } from '../noise/built-in-curves';
import { shapeBeside } from '../noise/curve-shape';

interface Relation {
  readonly says: string;
  readonly fix: string;
}

function relationTo(curve: UploadedCurve, known: BuiltInCurve, named: boolean): Relation | null {
  const points = pointsAgainst(curve, known);
  const constant = constantRatio(points);
  const sides = [Math.SQRT2, Math.SQRT1_2].find((factor) => constant !== null && Math.abs(Math.log(constant / factor)) < SAME);
  if (sides !== undefined) return { says: `its power density is everywhere ×${sides > 1 ? 2 : 0.5} of it: one-sided and two-sided exchanged?`, fix: 'Check "sided" in the sheet, or say why the factor is right.' };
  const mistaken = densityMistaken(curve, known);
  if (mistaken !== null) return { says: mistaken, fix: 'Check the column of the noise in the sheet: asd, psd or characteristic.' };
  if (angular(curve, known)) return { says: 'is that curve with its frequencies multiplied by 2π: an angular frequency in the first column?', fix: 'Give frequencies in Hz.' };
  const shape = shapeBeside(points, named);
  return shape === null ? null : { says: shape, fix: `Correct the curve, name it otherwise, or say why it differs; the published curve is built in as ${known.id}.` };
}

/** V20: an uploaded curve beside the published ones that its name, or its own numbers, say it is. At most one question. */
export function curveIdentity(curve: UploadedCurve): Finding | null {
  const named = builtInCurves.filter((known) => isNamed(curve, known));
  const equal = (known: BuiltInCurve): boolean => {
    const points = pointsAgainst(curve, known);
    return octaves(points) >= 1 && points.every(({ apart }) => Math.abs(apart) < APART);
  };
  if (named.some(equal) || (named.length === 0 && builtInCurves.some(equal))) return null;
  for (const known of [...named, ...builtInCurves.filter((other) => !named.includes(other))]) {
    const relation = relationTo(curve, known, named.includes(known));
    if (relation === null) continue;
    const opening = named.includes(known) ? `The curve ${curve.name} is called ${known.id} (${known.title}), but` : `The curve ${curve.name} is close to ${known.id} (${known.title}), but`;
    return { code: 'engine/curve-identity', level: 'needs-answer', where: curve.name, text: `${opening} ${relation.says.startsWith('its') ? '' : 'it '}${relation.says}`, fix: relation.fix };
  }
  return null;
}
