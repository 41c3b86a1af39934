import type { Standing } from '../candidate';

/** What the rules of standing look at. */
export interface Grounds {
  readonly changes: 1 | 2;
  readonly chance: number;
  /** Head or statement speaks for one of its readings. */
  readonly supported: boolean;
  /** The head or the samples of a file do. */
  readonly inFile: boolean;
  readonly points: number;
  /** Other claims of the sheet that want an explanation and agree under it. */
  readonly explains: readonly string[];
  /** Claims that agree as declared and would not under it. */
  readonly breaks: readonly string[];
  /** An unsettled claim may fit as declared; what does no better than that, its weight counted, explains nothing. */
  readonly beatsDeclared: boolean;
}

const SINGLE = 0.05;
const PAIR = 0.01;
const INDEPENDENT_POINTS = 3;

/** A fit that holds is a candidate only by these rules; all else may be coincidence. */
export function standingOf({ changes, chance, supported, inFile, points, explains, breaks, beatsDeclared }: Grounds): Standing {
  if (breaks.length > 0 || !beatsDeclared) return 'coincidence';
  if (changes === 1) return chance <= SINGLE || inFile ? 'candidate' : 'coincidence';
  const standsAlone = points >= INDEPENDENT_POINTS || explains.length > 0 || supported;
  return chance <= PAIR && standsAlone ? 'candidate' : 'coincidence';
}
