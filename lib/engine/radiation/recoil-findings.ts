import type { CompletedModes } from '../conditioning/complete-modes';
import type { Finding } from '../contract/finding';
import type { PreparedPoint } from './prepare-radiated';
import { listedButMissing } from './used-modes';

type ModeName = { readonly l: number; readonly m: number };

/** Momentum needs the quadrupole and what it is multiplied with (V13). */
const NEEDED: readonly (readonly [number, number])[] = [[2, 2], [2, -2], [2, 1], [2, -1], [3, 3], [3, -3]];

const spelt = (modes: readonly (readonly [number, number])[]): string => modes.map(([l, m]) => `(${l},${m})`).join(', ');

const areNeighbours = (p: ModeName, q: ModeName): boolean => !(p.l === q.l && p.m === q.m) && Math.abs(p.l - q.l) <= 1 && Math.abs(p.m - q.m) <= 1;

/** Is there a pair of modes whose product carries momentum? */
const hasNeighbours = (modes: readonly ModeName[]): boolean => modes.some((p, i) => modes.slice(i + 1).some((q) => areNeighbours(p, q)));

/** A mode by itself pushes along z, opposite for m and −m; what lies in the plane needs neighbours. */
function aloneFindings({ record }: PreparedPoint, name: string): Finding[] {
  if (hasNeighbours(record.modes)) return [];
  const used = spelt(record.modes.map(({ l, m }) => [l, m] as const));
  const text = `A recoil comes mostly from products of neighbouring modes (ℓ and m at most one apart); among those in use of ${name}, ${used}, no two are neighbours. Each pushes along z alone, (ℓ,m) and (ℓ,−m) against each other.`;
  return [{ code: 'engine/modes-missing', level: 'worth-a-look', where: name, text, fix: 'Supply neighbouring modes such as (2,±1) and (3,±3), or list more of those given.' }];
}

/** V13 for a recoil: it comes from products of neighbouring modes, so a missing one is not a small correction. */
export function recoilModesFindings(completed: CompletedModes, point: PreparedPoint): Finding[] {
  const { waveform, negativeM } = completed;
  const { content, name } = waveform;
  if (content.kind !== 'modes') return [];
  const base = { code: 'engine/modes-missing', where: name } as const;
  const absent = NEEDED.filter(([l, m]) => !content.modes.some((mode) => mode.l === l && mode.m === m));
  if (absent.length > 0 && negativeM !== 'none') {
    const text = `A recoil needs (2,±2), (2,±1) and (3,±3); ${name} does not hold ${spelt(absent)}. It comes from products of neighbouring modes and cannot be computed without them.`;
    return [{ ...base, level: 'stops-lodging', text, fix: 'Supply the modes, with zeros if they vanish, or declare negativeM: none if the modes given are meant to stand alone.' }];
  }
  const listed = listedButMissing(completed, point).map(([l, m]): Finding => ({ ...base, level: 'worth-a-look', text: `The claim lists mode (${l},${m}), which ${name} does not hold; it counts as zero.`, fix: 'Supply the mode or leave it out of the list.' }));
  const lone = absent.filter(([, m]) => m > 0);
  const said = [...listed, ...aloneFindings(point, name)];
  if (lone.length === 0) return said;
  return [...said, { ...base, level: 'worth-a-look', text: `${name} does not hold ${spelt(lone)}, which a recoil usually rests on; they count as zero.`, fix: 'Supply the modes.' }];
}
