import type { MaximiseOver } from '@/lib/engine/contract/settings';
import { inForce, takes, type FlipContext } from './flip-context';
import { makeFlips, type FlipsOfConvention } from './make-flip';

const sets: readonly (readonly MaximiseOver[])[] = [[], ['phase'], ['time'], ['time', 'phase'], ['time', 'polarisation'], ['time', 'phase', 'polarisation'], ['time', 'phase', 'inclination'], ['time', 'phase', 'templateMass']];

const names: Readonly<Record<MaximiseOver, string>> = { time: 'time', phase: 'phase', polarisation: 'polarisation', inclination: 'inclination', templateMass: 'the template’s mass' };

function listed(set: readonly MaximiseOver[]): string {
  const words = set.map((one) => names[one]);
  const last = words.pop();
  if (last === undefined) return 'nothing is maximised';
  return words.length === 0 ? `the maximum is taken over ${last} alone` : `the maximum is taken over ${words.join(', ')} and ${last}`;
}

const key = (set: readonly unknown[]): string => [...set].sort().join(',');

/** Which of the sets mean something here: an angle needs modes, a polarisation both responses, a mass modes in M. */
function isPossible(set: readonly MaximiseOver[], context: FlipContext): boolean {
  const modes = context.waveforms.every(({ content }) => content.kind === 'modes');
  const complex = inForce(context, 'response') === 'complex';
  if (set.includes('polarisation') && !complex) return false;
  if (set.includes('inclination') && !modes) return false;
  return !set.includes('templateMass') || context.waveforms.every(({ unit }) => unit === 'M');
}

export const maximised: FlipsOfConvention = (context) => {
  const now = inForce(context, 'maximise');
  if (!takes(context, 'maximise') || context.claim.quantity.id === 'overlap' || !Array.isArray(now)) return [];
  return makeFlips(context, sets.filter((set) => key(set) !== key(now) && isPossible(set, context)).map((set) => ({
    convention: 'C06', option: `maximise=${set.join(',') || 'none'}`, setting: 'maximise', clause: listed(set), change: { kind: 'rerun', settings: { maximise: [...set] } },
  })));
};

export const maximisationFlips: readonly FlipsOfConvention[] = [maximised];
