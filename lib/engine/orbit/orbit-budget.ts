import { LEAST, ROOT3 } from '../budget/half-width';
import type { Finding } from '../contract/finding';
import type { BudgetLine } from '../contract/measurement';
import { completeModes } from '../conditioning/complete-modes';
import { asModes } from '../alignment/pair-point';
import { radiationRecord } from '../radiation/radiation-record';
import { strainTones } from '../tones/strain-tone';
import { toneName, type Tone } from '../tones/tone';
import type { OrbitPoint } from './orbit-point';

type Read = (tone: Tone) => number;

/** E02: H from news or ψ4 on half the points, by interpolation of order 6. */
export function integrationLine({ tones }: OrbitPoint, value: number, read: Read): BudgetLine[] {
  if (tones.floor === null) return [];
  const turned = read(tones.coarse);
  return [{ component: 'Integration in frequency', id: 'E02', group: 'computation', u: Math.max(Math.abs(turned - value) / ROOT3, LEAST * Math.abs(value)), turned: { values: [turned] }, note: 'Interpolation of order 8 against 6 and half the points.' }];
}

/** E08: the floor times 0.7 and 1.4. */
export function floorLine({ tones, waveform }: OrbitPoint, read: Read): BudgetLine[] {
  const { floor } = tones;
  const shaped = asModes(waveform);
  if (floor === null || 'code' in shaped) return [];
  const record = radiationRecord(shaped);
  if ('saw' in record) return [];
  const here = read(tones.A);
  const moved = [0.7, 1.4].map((by) => Math.abs(read(strainTones(record, tones.A.mode!, floor * by)!.A) - here));
  return [{ component: 'Integration floor', id: 'E08', group: 'coverage', u: Math.max(...moved) / ROOT3, note: `ω₀ = ${Number(floor.toPrecision(4))} rad/M times 0.7 and 1.4; half-width over √3.` }];
}

/** V14 where the mode that is followed was made up by the mirror rule. */
export function madeUp({ waveform, mode }: OrbitPoint): Finding[] {
  if (mode === null || mode[1] >= 0 || !completeModes(waveform).mirrorAssumed) return [];
  return [{ code: 'engine/negative-m-assumed', level: 'needs-answer', where: waveform.name, text: `In ${waveform.name} ${toneName({ mode })} is absent and the sheet does not say why. We use H(ℓ,−m) = (−1)^ℓ H*(ℓ,m), which holds for a system symmetric about its orbital plane.`, fix: 'Declare negativeM: mirror, given or none.' }];
}
