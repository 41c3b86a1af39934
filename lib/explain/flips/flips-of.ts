import { conventionById } from '../conventions/conventions';
import type { Flip } from '../flip';
import { angleFlips } from './angle';
import { bandFlips } from './band';
import type { FlipContext } from './flip-context';
import { integrationFlips } from './integration';
import { massFlips } from './mass';
import { maximisationFlips } from './maximisation';
import { modeFlips } from './modes';
import { noiseFlips } from './noise';
import { unitFlips } from './units';
import { variableFlips } from './variable';

const all = [...noiseFlips, ...bandFlips, ...maximisationFlips, ...angleFlips, ...massFlips, ...variableFlips, ...modeFlips, ...integrationFlips, ...unitFlips];

/**
 * Every convention of one claim that can be read otherwise, with what that takes, in the order of the catalogue.
 * A convention is asked only where the catalogue says that it moves the quantity.
 */
export function flipsOf(context: FlipContext): Flip[] {
  const flips = all.flatMap((flipsOfConvention) => flipsOfConvention(context)).filter(({ convention }) => conventionById(convention).affects.includes(context.claim.quantity.id));
  const byId = new Map(flips.map((flip) => [flip.id, flip]));
  return [...byId.values()].sort((p, q) => (p.convention < q.convention ? -1 : p.convention > q.convention ? 1 : 0));
}
