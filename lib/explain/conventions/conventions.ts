import { angleConventions } from './angle';
import { bandConventions } from './band';
import type { Convention, ConventionGroup, ConventionId } from './convention';
import { integrationConventions } from './integration';
import { massConventions } from './mass';
import { maximisationConventions } from './maximisation';
import { modeConventions } from './modes';
import { noiseConventions } from './noise';
import { unitConventions } from './units';
import { variableConventions } from './variable';

/** How each group is called on a page; in the order in which a number is made. */
export const groupTitles: Readonly<Record<ConventionGroup, string>> = {
  noise: 'Noise and inner product',
  band: 'Band, taper and join',
  maximisation: 'Maximisation and alignment',
  angle: 'Directions, averages and thresholds',
  mass: 'Masses, frames and distances',
  variable: 'Variable, tetrad and extraction',
  modes: 'Modes and their labels',
  integration: 'Integrals over time',
  units: 'Units, labels and constants',
};

/**
 * The one table of what two groups can mean differently by the same words (domain reference 3.1), in the order of its numbers.
 * The search, the settings beside a number, the composer and the public page all read it.
 */
export const conventions: readonly Convention[] = [
  ...noiseConventions, ...bandConventions, ...maximisationConventions, ...angleConventions, ...massConventions, ...variableConventions, ...modeConventions, ...integrationConventions, ...unitConventions,
].sort((a, b) => (a.id < b.id ? -1 : 1));

const byId: ReadonlyMap<ConventionId, Convention> = new Map(conventions.map((convention) => [convention.id, convention]));

/** Throws on a number that the catalogue does not have: whoever asks has it from this table. */
export function conventionById(id: ConventionId): Convention {
  const found = byId.get(id);
  if (found === undefined) throw new Error(`the catalogue has no convention ${id}`);
  return found;
}
