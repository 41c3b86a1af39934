import { alike, explains, type Sheet, type Trial } from './trials';

/** Readings that give the same numbers everywhere: the number alone cannot tell them apart. */
export interface ReadingClass {
  /** The weightiest first. */
  readonly trials: readonly Trial[];
  readonly changes: 1 | 2;
}

/** A hostile sheet could have thousands that fit; the weightiest of them are looked at one by one. */
const MOST_FITTING = 200;

const before = (p: Trial, q: Trial): number => q.lnOdds - p.lnOdds || p.changes - q.changes || (p.node.id < q.node.id ? -1 : 1);

/**
 * Readings under which the claim would agree, without pairs that are another name for one flip, and without those of
 * which one flip alone does it: the second then explains nothing that the first leaves open.
 */
export function fittingOf({ claims, trials }: Sheet, c: number): Trial[] {
  const scaled = claims[c]!;
  const singles = trials.flatMap(({ changes, held }) => (changes === 1 && held[c]?.row ? [held[c].row] : []));
  const enough = new Set(trials.flatMap(({ changes, held, node }) => (changes === 1 && explains(held[c]) ? [node.id] : [])));
  const isNew = ({ changes, held, node }: Trial): boolean => changes === 1 || !(node.flips.some(({ id }) => enough.has(id)) || singles.some((row) => alike(scaled, row, held[c]!.row!)));
  return trials.filter((trial) => explains(trial.held[c]) && isNew(trial)).sort(before);
}

/** The same at every point of every claim; a claim that a reading does not touch keeps its number. */
function same({ claims }: Sheet, p: Trial, q: Trial): boolean {
  return claims.every((scaled, c) => {
    const [a, b] = [p, q].map(({ held }) => (held[c] === null ? scaled.declared : held[c]!.row));
    return a && b ? alike(scaled, a, b) : a === b;
  });
}

export function classesOf(sheet: Sheet, fitting: readonly Trial[]): ReadingClass[] {
  const classes: Trial[][] = [];
  for (const trial of fitting.slice(0, MOST_FITTING)) {
    const own = classes.find(([first]) => same(sheet, first!, trial));
    if (own) own.push(trial);
    else classes.push([trial]);
  }
  return classes.map((members) => ({ trials: members, changes: members.some(({ changes }) => changes === 1) ? 1 : 2 }));
}
