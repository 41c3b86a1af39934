import type { DeclaredSettings, ModeIndex } from '@/lib/engine/contract/settings';
import { inForce, isSwept, takes, type FlipContext } from './flip-context';
import { makeFlips, type FlipDraft, type FlipsOfConvention } from './make-flip';

const given = ({ waveforms }: FlipContext): readonly ModeIndex[] =>
  waveforms.flatMap(({ content }) => (content.kind === 'modes' ? content.modes.map(({ l, m }): ModeIndex => [l, m]) : []));

const quadrupole: readonly ModeIndex[] = [[2, 2], [2, -2]];
const isQuadrupole = (modes: unknown): boolean => Array.isArray(modes) && modes.every((mode) => Array.isArray(mode) && mode[0] === 2 && Math.abs(Number(mode[1])) === 2);

const draft = (option: string, clause: string, settings: DeclaredSettings, setting: 'modes' | 'lMax', words: readonly RegExp[]): FlipDraft => ({ convention: 'C25', option, clause, setting, change: { kind: 'rerun', settings }, telling: { supports: words } });

/** Fewer of the modes that the file holds, or all of them. */
export const modeSet: FlipsOfConvention = (context) => {
  const modes = given(context);
  const highest = modes.reduce((l, [own]) => Math.max(l, own), 0);
  const now = inForce(context, 'modes');
  const tones = context.claim.quantity.id.startsWith('ringdown') || context.claim.quantity.id === 'cycles';
  if (modes.length < 2 || tones) return [];
  const drafts: FlipDraft[] = [];
  if (takes(context, 'modes') && !isQuadrupole(now) && modes.some(([l, m]) => l !== 2 || Math.abs(m) !== 2)) drafts.push(draft('modes=22', 'only the (2,±2) modes are used', { modes: quadrupole }, 'modes', [/\(?2,\s*±?2\)?\s*(?:mode)?\s*only/i, /quadrupole/i]));
  if (takes(context, 'modes') && Array.isArray(now)) drafts.push(draft('modes=all', 'all modes of the file are used', { modes: 'all' }, 'modes', [/all\s+modes/i]));
  if (takes(context, 'lMax') && !isSwept(context, 'lMax'))
    for (const l of [2, 3, 4, 6, 8]) if (l < highest && inForce(context, 'lMax') !== l) drafts.push(draft(`lMax=${l}`, `modes up to ℓ = ${l} are used`, { lMax: l }, 'lMax', [new RegExp(String.raw`(?:l|ℓ|ell)(?:_?max)?\s*(?:=|≤|<=)\s*${l}\b`, 'i')]));
  return makeFlips(context, drafts);
};

export const modeFlips: readonly FlipsOfConvention[] = [modeSet];
