import type { Brand } from '@/lib/kernel/brand';
import type { Caution } from './cautions';
import type { ResultClaim } from '@/lib/pipeline/result';

/**
 * The plaque by the door: a decision and its verdicts become one canonical document, its signature
 * and its badge. Everything here is pure, from arguments alone; only the signer holds a key.
 */
export type RecordId = Brand<string, 'RecordId'>;

export interface RecordedClaim extends Omit<ResultClaim, 'candidates' | 'search'> {
  /** Does the level entered cover this claim? One that differs is covered by none. */
  readonly covered: boolean;
}

export interface RecordedDecision {
  readonly by: string;
  readonly role: 'editor';
  /** UTC day. */
  readonly on: string;
  readonly level: 1 | 2 | 3;
  readonly remarks: readonly string[];
  /** How many referees reported; who they are is nowhere in a record. */
  readonly reports: number;
}

/** `counterfoil-record/1`. Published bytes are the canonical form of this and nothing else. */
export interface RecordDocument {
  readonly format: 'counterfoil-record/1';
  /** Origin at which the record is published: a record copied elsewhere says where it belongs. */
  readonly domain: string;
  readonly id: string;
  readonly title: string;
  readonly authors: readonly string[];
  /** iDs that ORCID vouched for, by place in `authors` from 1; absent when there is none. One that was only typed in is never signed. */
  readonly orcids?: readonly { readonly position: number; readonly orcid: string }[];
  readonly revision: number;
  /** UTC day. */
  readonly enteredAt: string;
  /** UTC day on which it lapses unless run again before. */
  readonly lapsesAt: string;
  readonly decision: RecordedDecision;
  readonly engine: string;
  readonly claims: readonly RecordedClaim[];
  readonly files: readonly { readonly name: string; readonly bytes: number; readonly sha256: string }[];
  /** SHA-256 of the canonical claim sheet that was computed. */
  readonly sheetDigest: string;
  /** SHA-256 of the canonical `counterfoil-result/1` of the run. */
  readonly resultDigest: string;
  readonly cautions: readonly Caution[];
  /** Id of the record this one replaces, if any. */
  readonly supersedes: string | null;
  readonly keyId: string;
  /** Null until the public log exists. */
  readonly logIndex: number | null;
}
