import type { Candidate } from '../candidate';
import { candidateSentence } from '../words/candidate-sentence';
import type { ReadingClass } from './classes';
import { readingOf, settingsOf } from './readings';
import { misfitOf } from './scaled-claim';
import { lnLikelihood, lnUnexplained, oddsOf } from './score';
import { standingOf, type Grounds } from './standing';
import { explains, type Sheet, type Trial } from './trials';

export interface Weighed {
  readonly candidate: Candidate;
  readonly lnOdds: number;
  /** All its flips stand where the author declared nothing. */
  readonly assumed: boolean;
}

const declaredMisfit = ({ claims }: Sheet, c: number): number => misfitOf(claims[c]!, claims[c]!.declared);

/** A class of readings of one claim with its standing, and the whole in words. */
export function weigh(sheet: Sheet, c: number, { trials, changes }: ReadingClass, chance: number): Weighed {
  const { claim } = sheet.claims[c]!;
  const first = trials[0]!;
  const readings = trials.map(({ node }) => readingOf(node));
  const grounds = groundsOf(sheet, c, first, { changes, chance, supported: readings.some(({ evidence }) => evidence === 'supports'), inFile: trials.some(({ node }) => node.flips.some(({ evidence, inFile }) => evidence === 'supports' && inFile)) });
  const facts = {
    id: first.node.id,
    settings: settingsOf(first.node),
    values: valuesOf(first, claim.id),
    chance,
    tried: sheet.trials.filter((trial) => trial.held[c] && trial.changes <= changes).length,
    standing: standingOf(grounds),
    odds: oddsOf(first.lnOdds),
    readings,
    explains: grounds.explains,
    breaks: grounds.breaks,
    changes,
  };
  return { candidate: { ...facts, sentence: candidateSentence(claim, facts) }, lnOdds: first.lnOdds, assumed: trials.some(({ node }) => node.flips.every(({ assumed }) => assumed)) };
}

function groundsOf(sheet: Sheet, c: number, { held, lnOdds }: Trial, known: Pick<Grounds, 'changes' | 'chance' | 'supported' | 'inFile'>): Grounds {
  const others = sheet.claims.map(({ claim }, j) => ({ claim, j })).filter(({ j }) => j !== c);
  const scaled = sheet.claims[c]!;
  return {
    ...known,
    points: scaled.claim.points.length,
    explains: others.filter(({ claim, j }) => claim.wanting && explains(held[j])).map(({ claim }) => claim.id),
    // A reading that leaves an agreeing claim without a number breaks it as one that moves it does.
    breaks: others.filter(({ claim, j }) => !claim.wanting && declaredMisfit(sheet, j) <= 1 && (held[j]?.misfit ?? 0) > 1).map(({ claim }) => claim.id),
    beatsDeclared: declaredMisfit(sheet, c) > 1 || lnOdds > lnLikelihood(scaled, scaled.declared) - lnUnexplained(scaled),
  };
}

function valuesOf({ predictions }: Trial, claimId: string): readonly (number | null)[] {
  const prediction = predictions.get(claimId);
  return prediction && 'values' in prediction ? prediction.values : [];
}

const MOST_CANDIDATES = 3;
const MOST_COINCIDENCES = 12;

/** By odds; where those are alike to the digit that is shown, readings that contradict nobody come first, then those of one change. */
const inOrder = (p: Weighed, q: Weighed): number =>
  q.candidate.odds - p.candidate.odds || Number(q.assumed) - Number(p.assumed) || p.candidate.changes - q.candidate.changes || q.lnOdds - p.lnOdds || (p.candidate.id < q.candidate.id ? -1 : 1);

/** The best three that stand; what else stands joins the list of what may be coincidence, which is closed and not endless. */
export function listed(weighed: readonly Weighed[]): Candidate[] {
  const sorted = [...weighed].sort(inOrder).map(({ candidate }) => candidate);
  const shown = sorted.filter(({ standing }) => standing === 'candidate').slice(0, MOST_CANDIDATES);
  const rest = sorted.filter((one) => !shown.includes(one)).slice(0, MOST_COINCIDENCES);
  return [...shown, ...rest.map((one) => ({ ...one, standing: 'coincidence' as const }))];
}
