import type { Reading } from '../candidate';
import type { Evidence, Flip } from '../flip';
import type { Node } from './node';

/** Settings of a sheet that would say the reading; empty where none can. */
export const settingsOf = ({ flips }: Node): Readonly<Record<string, unknown>> => Object.assign({}, ...flips.map(({ declares }) => declares)) as Record<string, unknown>;

/** Words for one flip and against the other settle nothing. */
function evidenceOf(flips: readonly Flip[]): Evidence {
  const speaks = (evidence: Evidence): boolean => flips.some((flip) => flip.evidence === evidence);
  if (speaks('supports') === speaks('contradicts')) return 'none';
  return speaks('supports') ? 'supports' : 'contradicts';
}

export function readingOf(node: Node): Reading {
  const flips: readonly Flip[] = node.flips;
  const evidence = evidenceOf(flips);
  const from = flips.filter((flip) => flip.evidence === evidence).flatMap(({ evidenceFrom }) => (evidenceFrom === null ? [] : [evidenceFrom]));
  return {
    conventions: flips.map(({ convention }) => convention),
    clause: flips.map(({ clause }) => clause).join(' and, at once, '),
    settings: settingsOf(node),
    evidence,
    evidenceFrom: evidence === 'none' || from.length === 0 ? null : from.join('; '),
  };
}
