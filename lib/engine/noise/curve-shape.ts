import { short } from '../findings/spelt';
import { APART, byOctave, LEAST_APART, LEAST_POINTS, LEAST_SAME, longestSame, octaves, SAME, type Point } from './beside-built-in';

const MOST_OCTAVES = 8;

function shapeOf(points: readonly Point[]): string {
  const far = points.reduce((p, q) => (Math.abs(q.apart) > Math.abs(p.apart) ? q : p));
  const above = far.apart > 0;
  const ratio = Math.exp(Math.abs(far.apart));
  const list = byOctave(points)
    .slice(0, MOST_OCTAVES)
    .map((o) => `${short(o.fromHz, 4)}–${short(o.toHz, 4)} Hz ${Math.abs(Math.log(o.ratio)) < SAME ? 'equal' : `×${short(o.ratio)}`}`);
  return `lies up to ×${short(ratio)} ${above ? 'above' : 'below'} it, at ${short(far.fHz, 4)} Hz. Ratio of amplitude densities by octaves: ${list.join(', ')}`;
}

/**
 * How a curve that is called after a built-in one, or copies a piece of it, lies beside it.
 * Shape:  points against one built-in curve.
 * Units:  ratios of amplitude densities.
 * Error:  three per cent before anything is said.
 * Fails:  null where there is nothing to say.
 * Source: domain reference 4.2, V20 and C40.
 */
export function shapeBeside(points: readonly Point[], named: boolean): string | null {
  const apart = octaves(points.filter((point) => Math.abs(point.apart) > APART));
  const same = longestSame(points);
  const close = points.length >= LEAST_POINTS && same >= LEAST_SAME && apart >= LEAST_APART;
  const claimed = named && points.length > 1 && octaves(points) >= 1 && apart >= LEAST_APART;
  if (!close && !claimed) return null;
  const ends = same >= LEAST_APART ? 'One coefficient may be mistyped, or noise was added to it.' : 'It may be another version.';
  return `${shapeOf(points)}. ${ends}`;
}
