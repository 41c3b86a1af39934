import type { ClaimSheet } from '@/lib/claims/claim';
import type { Watch } from '@/lib/engine/contract/quantity';
import { Workshop } from '@/lib/engine/contract/workshop';
import type { Candidate, SearchOfClaim } from '@/lib/explain/candidate';
import type { SiblingClaim } from '@/lib/explain/flips/flip-context';
import { judge } from '@/lib/explain/search/judge';
import { searchSentence } from '@/lib/explain/words/search-sentence';
import type { Inputs } from '../read-inputs';
import { PredictionCollector } from './collect-predictions';
import { EditedInputs } from './edit-inputs';
import { extraNumberOf } from './extra-number-of';
import type { Asking } from './predict';
import { atAllPoints, triedReadings } from './tried-readings';
import { subjectOf, type Subject, type Weighed } from './subject';

/** What the search says of one claim. */
export interface Explained {
  readonly candidates: readonly Candidate[];
  readonly search: SearchOfClaim;
}

/** Ends a search from outside with what it has: the clock, as a net under the counted budget, or whoever asked for the run. */
export interface SearchEnd {
  /** The reason, to be printed after "The search ended early:"; null while the search may go on. */
  readonly endedBy: () => string | null;
}

export interface Explaining extends SearchEnd {
  readonly onProgress: Watch['onProgress'];
  readonly cancelled: Watch['cancelled'];
}

/** Claims of the same quantity that have a number, from which a wrong scaling may have started. */
const siblingsOf = (weighed: readonly Weighed[], quantity: string): SiblingClaim[] =>
  weighed
    .filter(({ claim, measurement }) => claim.quantity.id === quantity && typeof measurement.points[0]?.value === 'number')
    .map(({ claim }) => ({ claimId: claim.id, fieldGauss: claim.settings.fieldGauss ?? null }));

/** The same sheet over the same bytes draws the same decoys. */
const seedOf = (sheet: ClaimSheet, inputs: Inputs): string => [...inputs.files.files().map(({ sha256 }) => sha256), ...sheet.claims.map(({ id, claimed }) => `${id}=${claimed.map(({ printed }) => printed).join()}`)].join('|');

/**
 * Looks for the reading under which claims that differ or are unsettled would agree. All claims of the sheet are
 * judged together. Pure: files were read before, and the clock is an argument.
 * Shape:  one entry for each claim that was searched.
 * Fails:  throws Cancelled when told to stop; a reading that gives no number is counted and passed over.
 * Source: domain reference 3.2.
 */
export function explainSheet(sheet: ClaimSheet, inputs: Inputs, weighed: readonly Weighed[], how: Explaining): ReadonlyMap<string, Explained> {
  const subjects = weighed.map((one) => subjectOf(one, sheet, inputs, siblingsOf(weighed, one.claim.quantity.id))).filter((subject): subject is Subject => subject !== null);
  if (!subjects.some(({ judged }) => judged.wanting)) return new Map();
  const asking: Asking = { workshop: new Workshop(), edits: new EditedInputs(), watch: { onProgress: () => undefined, cancelled: how.cancelled } };
  const { tried, left, stoppedBecause } = new PredictionCollector(subjects, { ...asking, ...how }).collect();
  how.onProgress(0.8, 'how often chance would fit as well');
  const verdicts = judge(subjects.map(({ judged }) => judged), tried, { seed: seedOf(sheet, inputs) });
  const explained = new Map<string, Explained>();
  for (const subject of subjects) {
    const found = verdicts.get(subject.judged.id);
    if (found === undefined) continue;
    how.onProgress(0.9, `${subject.judged.id}: the number that would tell them apart`);
    const extraNumber = how.endedBy() !== null ? null : extraNumberOf(subject, found.candidates, tried, asking);
    const reach = { ...found.search, left: left.get(subject.judged.id) ?? 0, stoppedBecause };
    explained.set(subject.judged.id, {
      candidates: found.candidates.map((candidate) => ({ ...candidate, values: atAllPoints(candidate.values, subject) })),
      search: { ...reach, extraNumber, sentence: searchSentence(reach, found.candidates), readings: triedReadings(subject, tried) },
    });
  }
  return explained;
}
