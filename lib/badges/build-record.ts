import type { ResultClaim, ResultDocument } from '@/lib/pipeline/result';
import { cautionsFor } from './cautions';
import { digestOf } from './canonical-json';
import type { RecordDocument, RecordedClaim, RecordedDecision } from './record';

/** Everything a record is made of, each from the database or the object store and none from a request. */
export interface RecordInputs {
  readonly domain: string;
  readonly id: string;
  readonly title: string;
  readonly authors: readonly string[];
  readonly orcids?: RecordDocument['orcids'];
  readonly revision: number;
  /** UTC instant. */
  readonly enteredAt: Date;
  readonly decision: RecordedDecision;
  /** Ids of the claims the level covers. */
  readonly covers: readonly string[];
  readonly result: ResultDocument;
  readonly sheet: unknown;
  /** As re-hashed from the store. */
  readonly files: RecordDocument['files'];
  readonly isDemonstration: boolean;
  readonly supersedes: string | null;
  readonly keyId: string;
}

/** Months without a successful re-verification after which a badge lapses. */
const VALID_MONTHS = 24;

export const utcDayOf = (instant: Date): string => instant.toISOString().slice(0, 10);

/** The same day of the month, or the last one where the month is shorter (29 February). */
export function lapseDay(entered: Date): string {
  const month = entered.getUTCMonth() + VALID_MONTHS;
  const lastDay = new Date(Date.UTC(entered.getUTCFullYear(), month + 1, 0)).getUTCDate();
  return utcDayOf(new Date(Date.UTC(entered.getUTCFullYear(), month, Math.min(entered.getUTCDate(), lastDay))));
}

function recordClaim(claim: ResultClaim, covers: readonly string[]): RecordedClaim {
  // Candidates are hints to people under review, never part of what is signed.
  const { candidates: _candidates, search: _search, ...kept } = claim;
  return { ...kept, covered: covers.includes(claim.id) };
}

export function buildRecord(inputs: RecordInputs): RecordDocument {
  const { result } = inputs;
  return {
    format: 'counterfoil-record/1',
    domain: inputs.domain,
    id: inputs.id,
    title: inputs.title,
    authors: inputs.authors,
    ...(inputs.orcids && inputs.orcids.length > 0 && { orcids: inputs.orcids }),
    revision: inputs.revision,
    enteredAt: utcDayOf(inputs.enteredAt),
    lapsesAt: lapseDay(inputs.enteredAt),
    decision: inputs.decision,
    engine: result.engine,
    claims: result.claims.map((claim) => recordClaim(claim, inputs.covers)),
    files: inputs.files,
    sheetDigest: digestOf(inputs.sheet),
    resultDigest: digestOf(result),
    cautions: cautionsFor({ claims: result.claims, isDemonstration: inputs.isDemonstration }),
    supersedes: inputs.supersedes,
    keyId: inputs.keyId,
    logIndex: null,
  };
}
